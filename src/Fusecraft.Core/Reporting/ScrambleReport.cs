using Fusecraft.Solving;

namespace Fusecraft.Reporting;

/// <summary>A scramble as JSON.</summary>
public static class ScrambleReport
{
    /// <summary>What the object calls its format.</summary>
    public const string Format = "fusecraft/scramble/1";

    /// <summary>
    /// One JSON object on one line: <c>format</c>, <c>seed</c>, <c>number</c> (from 0, of those drawn with the seed), <c>state</c> as cycles of sites, <c>word</c> from home and its <c>length</c> in steps (null where the
    /// search for one ended by its budget).
    /// </summary>
    /// <param name="scramble">What was drawn.</param>
    /// <param name="seed">The seed it was drawn with.</param>
    /// <param name="number">Which of those drawn with the seed it is, from 0.</param>
    public static string ToJson(Scramble scramble, ulong seed, int number)
    {
        ArgumentNullException.ThrowIfNull(scramble);
        return JsonLine.Write((scramble, seed, number), static (json, given) =>
        {
            json.WriteStartObject();
            json.WriteString("format", Format);
            json.WriteNumber("seed", given.seed);
            json.WriteNumber("number", given.number);
            json.WriteString("state", given.scramble.State.ToString());
            json.WriteString("word", given.scramble.Path?.Word.ToString());
            if (given.scramble.Path is { } path)
            {
                json.WriteNumber("length", path.Length);
            }
            else
            {
                json.WriteNull("length");
            }

            json.WriteEndObject();
        });
    }
}
