using System.Diagnostics.CodeAnalysis;
using System.Globalization;

namespace Fusecraft.Groups;

public readonly partial struct FactoredInteger : ISpanParsable<FactoredInteger>, ISpanFormattable
{
    private const int LargestExponent = 1_000_000;

    /// <summary>Reads prime powers joined by <c>·</c>, <c>*</c> or <c>.</c>, such as <c>2^4·3·5</c>, in any order, spaces allowed; one is <c>1</c>.</summary>
    /// <exception cref="FormatException">The text is something else; the message says where.</exception>
    public static FactoredInteger Parse(string s)
    {
        ArgumentNullException.ThrowIfNull(s);
        return Parse(s.AsSpan(), null);
    }

    /// <inheritdoc cref="Parse(string)"/>
    public static FactoredInteger Parse(string s, IFormatProvider? provider) => Parse(s);

    /// <inheritdoc cref="Parse(string)"/>
    public static FactoredInteger Parse(ReadOnlySpan<char> s, IFormatProvider? provider) =>
        TryRead(s, out var result, out var problem) ? result : throw new FormatException(problem);

    /// <summary>Reads prime powers, or gives false; see <see cref="Parse(string)"/>.</summary>
    public static bool TryParse([NotNullWhen(true)] string? s, IFormatProvider? provider, out FactoredInteger result) =>
        TryParse(s.AsSpan(), provider, out result);

    /// <inheritdoc cref="TryParse(string, IFormatProvider, out FactoredInteger)"/>
    public static bool TryParse(ReadOnlySpan<char> s, IFormatProvider? provider, out FactoredInteger result) => TryRead(s, out result, out _);

    /// <inheritdoc cref="ToString()"/>
    /// <param name="format">Null, empty or <c>G</c>.</param>
    /// <param name="formatProvider">Not used: the notation does not depend on a culture.</param>
    /// <exception cref="FormatException">Another format was asked for.</exception>
    public string ToString(string? format, IFormatProvider? formatProvider)
    {
        RequireGeneralFormat(format);
        return ToString();
    }

    /// <inheritdoc/>
    public bool TryFormat(Span<char> destination, out int charsWritten, ReadOnlySpan<char> format, IFormatProvider? provider)
    {
        RequireGeneralFormat(format);
        var text = ToString();
        var fits = text.TryCopyTo(destination);
        charsWritten = fits ? text.Length : 0;
        return fits;
    }

    private static void RequireGeneralFormat(ReadOnlySpan<char> format)
    {
        if (format is not ("" or "G"))
        {
            throw new FormatException($"Format \"{format}\" is unknown; factored integers know \"G\", prime powers joined by ·.");
        }
    }

    private static bool TryRead(ReadOnlySpan<char> text, out FactoredInteger result, [NotNullWhen(false)] out string? problem)
    {
        result = default;
        problem = null;
        if (text.Trim() is "1")
        {
            return true;
        }

        var exponents = new SortedDictionary<int, int>();
        foreach (var range in text.SplitAny('·', '*', '.'))
        {
            var power = text[range].Trim();
            var caret = power.IndexOf('^');
            var exponent = 1;
            if (!int.TryParse(caret < 0 ? power : power[..caret], NumberStyles.None, CultureInfo.InvariantCulture, out var prime)
                || (caret >= 0 && (!int.TryParse(power[(caret + 1)..], NumberStyles.None, CultureInfo.InvariantCulture, out exponent) || exponent == 0)))
            {
                problem = string.Create(CultureInfo.InvariantCulture,
                    $"character {range.Start.Value + 1}: found \"{power}\"; prime powers such as 2^4, joined by ·, are expected");
                return false;
            }

            if (!IsPrime(prime))
            {
                problem = string.Create(CultureInfo.InvariantCulture, $"character {range.Start.Value + 1}: {prime} is not a prime");
                return false;
            }

            exponents[prime] = exponents.GetValueOrDefault(prime) + Math.Min(exponent, LargestExponent + 1);
            if (exponents[prime] > LargestExponent)
            {
                problem = string.Create(CultureInfo.InvariantCulture, $"character {range.Start.Value + 1}: the exponent of {prime} is above {LargestExponent}");
                return false;
            }
        }

        result = new FactoredInteger(exponents);
        return true;
    }

    internal static bool IsPrime(int number)
    {
        for (var divisor = 2; divisor <= number / divisor; divisor++)
        {
            if (number % divisor == 0)
            {
                return false;
            }
        }

        return number > 1;
    }
}
