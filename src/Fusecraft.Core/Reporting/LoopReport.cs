using Fusecraft.Solving;

namespace Fusecraft.Reporting;

/// <summary>A catalogue of useful loops, as JSON.</summary>
public static class LoopReport
{
    /// <summary>
    /// One JSON object on one line: <c>format</c> (<c>fusecraft/loops/1</c>), <c>metric</c>, <c>maxMoved</c>, <c>completeLength</c> (null where nothing is left out), and <c>loops</c>, each with <c>length</c>,
    /// <c>signature</c>, <c>effect</c>, <c>word</c> and <c>labels</c>, the cycles of sites.
    /// </summary>
    /// <param name="catalogue">The catalogue.</param>
    public static string ToJson(LoopCatalogue catalogue)
    {
        ArgumentNullException.ThrowIfNull(catalogue);
        return JsonLine.Write(catalogue, static (json, catalogue) =>
        {
            json.WriteStartObject();
            json.WriteString("format", "fusecraft/loops/1");
            json.WriteString("metric", catalogue.Options.Metric.ToString());
            json.WriteNumber("maxMoved", catalogue.Options.MaxMoved);
            if (catalogue.CompleteLength is { } complete)
            {
                json.WriteNumber("completeLength", complete);
            }
            else
            {
                json.WriteNull("completeLength");
            }

            json.WriteStartArray("loops");
            foreach (var loop in catalogue.Loops)
            {
                json.WriteStartObject();
                json.WriteNumber("length", loop.Length);
                json.WriteString("signature", loop.Effect.Signature);
                json.WriteString("effect", loop.Effect.ToString());
                json.WriteString("word", loop.Path.Word.ToString());
                json.WriteString("labels", catalogue.Shape.Mechanism.Notation.Format(loop.Permutation));
                json.WriteEndObject();
            }

            json.WriteEndArray();
            json.WriteEndObject();
        });
    }
}
