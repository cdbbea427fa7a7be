using FsCheck.Xunit;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Permutations;

[Properties(Arbitrary = [typeof(PermutationArbitraries)])]
public class CycleNotationTests
{
    private static readonly CycleNotation _lock = new(["gate", "sluice", "basin", "a,b", "x:y.1"]);

    private static readonly CycleNotation _thousand = new(Enumerable.Range(0, 1000).Select(i => $"s{i:x}"));

    [Fact]
    public void Names_stand_for_points()
    {
        Assert.Equal(Permutation.FromCycle(0, 2, 1), _lock.Parse("(gate basin sluice)"));
        Assert.Equal("(gate basin sluice)(a,b x:y.1)", _lock.Format(_lock.Parse("(x:y.1 a,b) (sluice gate basin)")));
        Assert.Equal("()", _lock.Format(Permutation.Identity));
    }

    [Property]
    public bool Parsing_what_was_written_with_names_gives_the_permutation_back(Permutation p) => _thousand.Parse(_thousand.Format(p)) == p;

    [Fact]
    public void Names_that_are_all_numbers_may_be_separated_by_commas()
    {
        var notation = new CycleNotation(["7", "11", "10"]);
        Assert.Equal(Permutation.FromCycle(0, 2, 1), notation.Parse("(7,10, 11)"));
        Assert.Equal("(7 10 11)", notation.Format(Permutation.FromCycle(0, 2, 1)));
    }

    [Fact]
    public void Aliases_are_understood_when_reading_only()
    {
        var asked = new List<string>();
        var notation = new CycleNotation(["UFR", "UF"], name =>
        {
            asked.Add(name);
            return name switch { "FRU" => 0, "far" => 2, "below" => -1, _ => null };
        });
        Assert.Equal(Permutation.FromCycle(0, 1), notation.Parse("(FRU UF)"));
        Assert.Equal(["FRU"], asked);
        Assert.Equal("(UFR UF)", notation.Format(notation.Parse("(UF FRU)")));
        AssertProblem(notation, "(UFR FRU)", "character 6: found \"FRU\" a second time; every point may stand once only");
        AssertProblem(notation, "(UFR XYZ)", "character 6: found \"XYZ\", which is not the name of a point");
        Assert.Equal(
            "The alias function makes \"far\" point 2; only 0 … 1 have names.",
            Assert.Throws<InvalidOperationException>(() => notation.Parse("(far UF)")).Message);
        Assert.Equal(
            "The alias function makes \"below\" point -1; only 0 … 1 have names.",
            Assert.Throws<InvalidOperationException>(() => notation.TryParse("(below)", out _, out _)).Message);
    }

    [Theory]
    [InlineData("", "character 1: found no cycle; the identity is written ()")]
    [InlineData("  ", "character 3: found no cycle; the identity is written ()")]
    [InlineData("(1 2", "character 5: the text ends inside a cycle; ')' is missing")]
    [InlineData("(", "character 2: the text ends inside a cycle; ')' is missing")]
    [InlineData("(1 (2)", "character 4: found '(' inside a cycle; close the cycle with ')' first")]
    [InlineData("(1 2))", "character 6: found ')' without a '(' before it")]
    [InlineData("1 2 3", "character 1: found \"1\" outside a cycle; cycles are written in parentheses, such as (1 2 3)")]
    [InlineData("(1 2),(3 4)", "character 6: found \",\" outside a cycle; cycles are written in parentheses, such as (1 2 3)")]
    [InlineData("(1 2)x", "character 6: found \"x\" outside a cycle; cycles are written in parentheses, such as (1 2 3)")]
    [InlineData("(1 0)", "character 4: found \"0\"; points are numbers from 1 to 65536")]
    [InlineData("(1 -2)", "character 4: found \"-2\"; points are numbers from 1 to 65536")]
    [InlineData("(1 +2)", "character 4: found \"+2\"; points are numbers from 1 to 65536")]
    [InlineData("(1 1.0)", "character 4: found \"1.0\"; points are numbers from 1 to 65536")]
    [InlineData("(65537)", "character 2: found \"65537\"; points are numbers from 1 to 65536")]
    [InlineData("(99999999999999999999)", "character 2: found \"99999999999999999999\"; points are numbers from 1 to 65536")]
    [InlineData("(\u0661 2)", "character 2: found \"\u0661\"; points are numbers from 1 to 65536")]
    [InlineData("(1 2 1)", "character 6: found \"1\" a second time; every point may stand once only")]
    [InlineData("(1 1)", "character 4: found \"1\" a second time; every point may stand once only")]
    [InlineData("(1 2)(2 3)", "character 7: found \"2\" a second time; every point may stand once only")]
    [InlineData("(1)(1 2)", "character 5: found \"1\" a second time; every point may stand once only")]
    [InlineData("(1,,2)", "character 4: found ',' without a point before it")]
    [InlineData("(,1 2)", "character 2: found ',' without a point before it")]
    [InlineData("(1 2,)", "character 6: found ')' after a comma; a point is missing between them")]
    public void Bad_cycles_of_numbers_are_located(string text, string problem) => AssertProblem(CycleNotation.Numbers, text, problem);

    [Theory]
    [InlineData("(gate weir)", "character 7: found \"weir\", which is not the name of a point")]
    [InlineData("(gate,sluice)", "character 2: found \"gate,sluice\", which is not the name of a point")]
    [InlineData("(Gate sluice)", "character 2: found \"Gate\", which is not the name of a point")]
    [InlineData("(1 2)", "character 2: found \"1\", which is not the name of a point")]
    [InlineData("(gate gate)", "character 7: found \"gate\" a second time; every point may stand once only")]
    public void Bad_cycles_of_names_are_located(string text, string problem) => AssertProblem(_lock, text, problem);

    [Theory]
    [InlineData(new[] { "a", "" }, "Name 1 is \"\"; names must not be empty or hold white space or parentheses.")]
    [InlineData(new[] { "a", null }, "Name 1 is \"\"; names must not be empty or hold white space or parentheses.")]
    [InlineData(new[] { "a b" }, "Name 0 is \"a b\"; names must not be empty or hold white space or parentheses.")]
    [InlineData(new[] { "a", "b(" }, "Name 1 is \"b(\"; names must not be empty or hold white space or parentheses.")]
    [InlineData(new[] { "a", ")" }, "Name 1 is \")\"; names must not be empty or hold white space or parentheses.")]
    [InlineData(new[] { "a", "b", "c", "b" }, "Name 3 is \"b\", and so is name 1; names must be distinct.")]
    public void Names_that_cannot_be_told_apart_in_text_are_refused(string?[] names, string message) =>
        Assert.Equal($"{message} (Parameter 'names')", Assert.Throws<ArgumentException>(nameof(names), () => new CycleNotation(names!)).Message);

    [Fact]
    public void The_greatest_number_of_names_is_the_greatest_degree()
    {
        var names = Enumerable.Range(0, Permutation.MaxDegree).Select(i => $"s{i}").ToArray();
        Assert.Equal(Permutation.FromCycle(0, 65_535), new CycleNotation(names).Parse("(s65535 s0)"));
        Assert.Equal(
            "65537 names were given; at most 65536 are supported. (Parameter 'names')",
            Assert.Throws<ArgumentException>("names", () => new CycleNotation([.. names, "one more"])).Message);
    }

    [Fact]
    public void Missing_arguments_are_refused()
    {
        Assert.Throws<ArgumentNullException>("names", () => new CycleNotation(null!));
        Assert.Throws<ArgumentNullException>("alias", () => new CycleNotation(["a"], null!));
    }

    [Fact]
    public void Points_without_names_cannot_be_written()
    {
        Assert.Equal(
            "The permutation moves point 6; only 0 … 4 have names. (Parameter 'permutation')",
            Assert.Throws<ArgumentException>("permutation", () => _lock.Format(Permutation.FromCycle(6, 2))).Message);
        Assert.Equal(
            "The permutation moves point 1; no point has a name. (Parameter 'permutation')",
            Assert.Throws<ArgumentException>("permutation", () => new CycleNotation([]).Format(Permutation.FromCycle(0, 1))).Message);
    }

    private static void AssertProblem(CycleNotation notation, string text, string expected)
    {
        Assert.False(notation.TryParse(text, out var permutation, out var problem));
        Assert.True(permutation.IsIdentity);
        Assert.Equal(expected, problem);
        Assert.Equal(expected, Assert.Throws<FormatException>(() => notation.Parse(text)).Message);
    }
}
