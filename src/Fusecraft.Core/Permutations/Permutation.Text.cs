using System.Diagnostics.CodeAnalysis;

namespace Fusecraft.Permutations;

public readonly partial struct Permutation : ISpanParsable<Permutation>, ISpanFormattable
{
    /// <summary>Reads disjoint cycles of 1-based numbers, such as <c>(1 2 3)(5 6)</c>. For named points see <see cref="CycleNotation"/>.</summary>
    /// <exception cref="FormatException">The text is not a product of disjoint cycles; the message says where.</exception>
    public static Permutation Parse(string s)
    {
        ArgumentNullException.ThrowIfNull(s);
        return CycleNotation.Numbers.Parse(s);
    }

    /// <inheritdoc cref="Parse(string)"/>
    public static Permutation Parse(string s, IFormatProvider? provider) => Parse(s);

    /// <inheritdoc cref="Parse(string)"/>
    public static Permutation Parse(ReadOnlySpan<char> s, IFormatProvider? provider) => CycleNotation.Numbers.Parse(s);

    /// <summary>Reads disjoint cycles of 1-based numbers; false where the text is none.</summary>
    public static bool TryParse([NotNullWhen(true)] string? s, IFormatProvider? provider, out Permutation result) =>
        TryParse(s.AsSpan(), provider, out result);

    /// <inheritdoc cref="TryParse(string, IFormatProvider, out Permutation)"/>
    public static bool TryParse(ReadOnlySpan<char> s, IFormatProvider? provider, out Permutation result) =>
        CycleNotation.Numbers.TryParse(s, out result, out _);

    /// <summary>Disjoint cycles of 1-based numbers; the identity is <c>()</c>.</summary>
    public override string ToString() => CycleNotation.Numbers.Format(this);

    /// <inheritdoc cref="ToString()"/>
    /// <param name="format">Null, empty or <c>G</c>.</param>
    /// <param name="formatProvider">Not used: the notation does not depend on a culture.</param>
    /// <exception cref="FormatException">Another format was asked for.</exception>
    public string ToString(string? format, IFormatProvider? formatProvider)
    {
        RequireGeneralFormat(format);
        return ToString();
    }

    /// <summary>Writes disjoint cycles of 1-based numbers into a span; false, with nothing counted as written, where they do not fit.</summary>
    /// <param name="destination">Where to write.</param>
    /// <param name="charsWritten">How many characters were written.</param>
    /// <param name="format">Empty or <c>G</c>.</param>
    /// <param name="provider">Not used: the notation does not depend on a culture.</param>
    /// <exception cref="FormatException">Another format was asked for.</exception>
    public bool TryFormat(Span<char> destination, out int charsWritten, ReadOnlySpan<char> format, IFormatProvider? provider)
    {
        RequireGeneralFormat(format);
        return CycleNotation.Numbers.TryFormat(this, destination, out charsWritten);
    }

    private static void RequireGeneralFormat(ReadOnlySpan<char> format)
    {
        if (format is not ("" or "G"))
        {
            throw new FormatException($"Format \"{format}\" is unknown; the only one is \"G\", disjoint cycles.");
        }
    }
}
