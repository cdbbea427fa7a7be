using System.Collections.Immutable;
using System.Text;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Steps as they are written, read from left to right. A word is only text: which step a name means, and whether it is free, depends on the shape where it is done.
/// </summary>
/// <remarks>Value equality; <c>Word.Empty</c> does nothing. Immutable, safe to share.</remarks>
public sealed class Word : IEquatable<Word>
{
    internal Word(ImmutableArray<string> names) => Names = names;

    /// <summary>The word without steps.</summary>
    public static Word Empty { get; } = new([]);

    /// <summary>The steps as written, one entry a step.</summary>
    public ImmutableArray<string> Names { get; }

    /// <summary>The number of steps.</summary>
    public int Length => Names.Length;

    /// <summary>True when both consist of the same written steps.</summary>
    public static bool operator ==(Word? left, Word? right) => left is null ? right is null : left.Equals(right);

    /// <summary>True when the two words differ.</summary>
    public static bool operator !=(Word? left, Word? right) => !(left == right);

    /// <summary>The word of these steps.</summary>
    /// <param name="steps">Steps of one mechanism.</param>
    public static Word Of(params IEnumerable<Step> steps) => new([.. steps.Select(step => step.Name)]);

    /// <summary>This word, then another.</summary>
    public Word Then(Word next)
    {
        ArgumentNullException.ThrowIfNull(next);
        return new Word(Names.AddRange(next.Names));
    }

    /// <inheritdoc/>
    public bool Equals(Word? other) => other is not null && Names.AsSpan().SequenceEqual(other.Names.AsSpan());

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as Word);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        foreach (var name in Names)
        {
            hash.Add(name);
        }

        return hash.ToHashCode();
    }

    /// <summary>The steps separated by spaces.</summary>
    public override string ToString() => string.Join(' ', Names);

    /// <summary>The steps separated by spaces, runs of one name folded: <c>U U</c> becomes <c>U2</c>, <c>e1 e1</c> becomes <c>e1^2</c>, <c>U' U'</c> becomes <c>U2'</c>.</summary>
    public string ToFoldedString()
    {
        var text = new StringBuilder();
        for (var i = 0; i < Names.Length;)
        {
            var name = Names[i];
            var run = 1;
            while (i + run < Names.Length && Names[i + run] == name)
            {
                run++;
            }

            if (text.Length > 0)
            {
                text.Append(' ');
            }

            var inverse = name.EndsWith('\'');
            var stem = inverse ? name[..^1] : name;
            text.Append(stem);
            if (run > 1)
            {
                text.Append(char.IsAsciiDigit(stem[^1]) ? "^" : "").Append(run);
            }

            text.Append(inverse ? "'" : "");
            i += run;
        }

        return text.ToString();
    }
}
