using System.Globalization;
using FsCheck.Xunit;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Permutations;

[Properties(Arbitrary = [typeof(PermutationArbitraries)])]
public class PermutationTextTests
{
    [Property]
    public bool Parsing_what_was_written_gives_the_permutation_back(Permutation p) =>
        Permutation.Parse(p.ToString()) == p && ParsedString<Permutation>(p.ToString()) == p && ParsedSpan<Permutation>(p.ToString()) == p;

    [Theory]
    [InlineData("()", "()")]
    [InlineData("(3)", "()")]
    [InlineData("(1)(2)", "()")]
    [InlineData(" ( 2 , 3\t1 ) \n", "(1 2 3)")]
    [InlineData("(5 6)(3 1 2)()", "(1 2 3)(5 6)")]
    [InlineData("(10,9)", "(9 10)")]
    [InlineData("(007 1)", "(1 7)")]
    [InlineData("(65536 1)", "(1 65536)")]
    [InlineData("(256 257 1)", "(1 256 257)")]
    public void Cycles_are_written_smallest_point_first(string text, string canonical) => Assert.Equal(canonical, Permutation.Parse(text).ToString());

    [Fact]
    public void Numbers_in_text_are_one_more_than_points_in_code() => Assert.Equal(Permutation.FromCycle(0, 2), Permutation.Parse("(1 3)"));

    [Fact]
    public void TryParse_answers_without_throwing()
    {
        Assert.True(Permutation.TryParse("(1 2)", null, out var p));
        Assert.Equal(Permutation.FromCycle(0, 1), p);
        Assert.False(Permutation.TryParse("(1 2", null, out p));
        Assert.True(p.IsIdentity);
        Assert.False(Permutation.TryParse(null, null, out _));
        Assert.False(TriedString<Permutation>("1 2"));
        Assert.False(TriedSpan<Permutation>("(0)"));
        Assert.True(TriedString<Permutation>("(1 2)") && TriedSpan<Permutation>("(1 2)"));
        Assert.Throws<ArgumentNullException>("s", () => Permutation.Parse(null!));
        Assert.Throws<FormatException>(() => Permutation.Parse(""));
    }

    [Property]
    public bool Formatting_into_a_span_writes_the_text_exactly_where_it_fits(Permutation p)
    {
        var text = p.ToString();
        Span<char> exact = new char[text.Length];
        var fits = Written(p, exact) == text.Length && exact.SequenceEqual(text);
        for (var length = Math.Max(0, text.Length - 12); length < text.Length; length++)
        {
            fits &= Written(p, new char[length]) == -1;
        }

        return fits && Written(p, []) == -1 && $"{p}" == text && $"{p:G}" == text;
    }

    [Fact]
    public void The_text_does_not_depend_on_the_culture()
    {
        var p = Permutation.FromCycle(999, 1233);
        Assert.Equal("(1000 1234)", p.ToString("G", CultureInfo.GetCultureInfo("de-DE")));
        Assert.Equal("(1000 1234)", p.ToString(null, CultureInfo.InvariantCulture));
        Assert.Equal("(1000 1234)", p.ToString("", null));
        Assert.Equal(p, Permutation.Parse("(1000 1234)", CultureInfo.GetCultureInfo("ar-SA")));
    }

    [Fact]
    public void Other_formats_are_refused()
    {
        const string Message = "Format \"X\" is unknown; the only one is \"G\", disjoint cycles.";
        Assert.Equal(Message, Assert.Throws<FormatException>(() => Permutation.Identity.ToString("X", null)).Message);
        Assert.Equal(Message, Assert.Throws<FormatException>(() => Permutation.Identity.TryFormat(new char[9], out _, "X", null)).Message);
    }

    private static T ParsedString<T>(string text)
        where T : IParsable<T> => T.Parse(text, null);

    private static T ParsedSpan<T>(ReadOnlySpan<char> text)
        where T : ISpanParsable<T> => T.Parse(text, null);

    private static bool TriedString<T>(string text)
        where T : IParsable<T> => T.TryParse(text, null, out _);

    private static bool TriedSpan<T>(ReadOnlySpan<char> text)
        where T : ISpanParsable<T> => T.TryParse(text, null, out _);

    private static int Written<T>(T value, Span<char> destination)
        where T : ISpanFormattable
    {
        var fits = value.TryFormat(destination, out var written, default, null);
        Assert.True(fits || written == 0);
        return fits ? written : -1;
    }
}
