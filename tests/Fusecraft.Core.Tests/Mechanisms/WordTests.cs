using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Mechanisms;

/// <summary>How words are read and written.</summary>
public class WordTests
{
    private static readonly Mechanism Cube = MechanismBuilder.Cube("Cube", 3).Build();
    private static readonly Mechanism Board = MechanismBuilder.Board("Board", 3, 3).Build();
    private static readonly Mechanism TwoGaps = MechanismBuilder.Board("Board", 3, 2, "5", "6").Build();
    private static readonly Mechanism Graph = MechanismBuilder.GraphBoard("Graph", ["a", "b", "c"], [("a", "b"), ("b", "c"), ("c", "a")], ["c"]).Build();

    [Theory]
    [InlineData("", "")]
    [InlineData("U R", "U R")]
    [InlineData("U'", "U'")]
    [InlineData("U2", "U U")]
    [InlineData("U2'", "U' U'")]
    [InlineData("U^-3", "U' U' U'")]
    [InlineData("U^0", "")]
    [InlineData("U'2", "U' U'")]
    [InlineData("(U R)2", "U R U R")]
    [InlineData("(U R)'", "R' U'")]
    [InlineData("(U R')^-1", "R U'")]
    [InlineData("[U, R]", "U R U' R'")]
    [InlineData("[U: R]", "U R U'")]
    [InlineData("[U R: F2]", "U R F F R' U'")]
    [InlineData("[[U, R]: F]", "U R U' R' F R U R' U'")]
    [InlineData("([U, R]2)'", "R U R' U' R U R' U'")]
    public void A_word_is_written_out_step_by_step(string text, string steps) => Assert.Equal(steps, Cube.ParseWord(text).ToString());

    [Theory]
    [InlineData("e1^2", "e1 e1")]
    [InlineData("e1'", "e1'")]
    [InlineData("e1^-2 e2", "e1' e1' e2")]
    public void After_a_name_that_ends_in_a_digit_an_exponent_needs_a_caret(string text, string steps) => Assert.Equal(steps, Graph.ParseWord(text).ToString());

    [Theory]
    [InlineData("L'", "R")]
    [InlineData("(U L)'", "R D")]
    public void The_opposite_of_a_slide_is_written_by_its_own_name_within_brackets(string text, string steps)
    {
        var word = Board.ParseWord(text);
        var start = Board.HomeState.Apply(Board.ParseWord("R D"));

        Assert.Equal(start.Apply(Board.ParseWord(steps)), start.Apply(word));
    }

    [Theory]
    [InlineData("U Q", "character 3: found \"Q\"; the steps are U, U', R, R', F, F', D, D', L, L', B, B'")]
    [InlineData("UR", "character 2: found \"R\" behind \"U\"; steps are separated by spaces")]
    [InlineData("(U R", "character 5: the text ends where ')' is missing")]
    [InlineData("U)", "character 2: found ')', which closes nothing")]
    [InlineData("[U R]", "character 5: ',' or ':' is missing; write [A, B] for A B A' B' or [A: B] for A B A'")]
    [InlineData("[U, R", "character 6: the text ends where ']' is missing")]
    [InlineData("U^", "character 3: a whole number is missing after '^'")]
    [InlineData("U^x", "character 3: a whole number is missing after '^'")]
    [InlineData("U1000001", "character 1: the word has more than 1000000 steps")]
    public void What_is_no_word_is_refused_with_its_place(string text, string problem)
    {
        Assert.False(Cube.TryParseWord(text, out _, out var found));
        Assert.Equal(problem, found);
        Assert.Equal(problem, Assert.Throws<FormatException>(() => Cube.ParseWord(text)).Message);
    }

    [Fact]
    public void An_exponent_behind_a_name_that_ends_in_a_digit_is_refused() => Assert.Equal(
        "character 3: found \"2\" behind \"e1\"; steps are separated by spaces, and an exponent is written with ^",
        Assert.Throws<FormatException>(() => Graph.ParseWord("e12")).Message);

    [Fact]
    public void Brackets_that_stand_too_deep_are_refused() =>
        Assert.Equal("character 65: brackets stand more than 64 deep", Assert.Throws<FormatException>(() => Cube.ParseWord(new string('(', 100))).Message);

    [Theory]
    [InlineData("U U R", "U2 R")]
    [InlineData("U' U' U'", "U3'")]
    [InlineData("U U'", "U U'")]
    [InlineData("", "")]
    public void Folding_writes_runs_with_exponents(string text, string folded)
    {
        Assert.Equal(folded, Cube.ParseWord(text).ToFoldedString());
        Assert.Equal(Cube.ParseWord(text), Cube.ParseWord(Cube.ParseWord(text).ToFoldedString()));
    }

    [Fact]
    public void Folding_puts_a_caret_behind_a_digit() => Assert.Equal("e1^2 e2", Graph.ParseWord("e1 e1 e2").ToFoldedString());

    [Fact]
    public void With_one_gap_a_slide_is_written_by_the_way_the_tile_moves()
    {
        // The gap starts in the last cell, so the tiles left of it and above it can slide.
        Assert.Equal(["D", "R"], Board.Home.FreeSteps().Select(step => step.Name).Order(StringComparer.Ordinal));
        var state = Board.HomeState.Apply(Board.ParseWord("R"));
        Assert.Equal(["D", "L", "R"], state.Shape!.FreeSteps().Select(step => step.Name).Order(StringComparer.Ordinal));
        Assert.Equal(8, state.Labels[7]);
    }

    [Fact]
    public void With_several_gaps_a_slide_names_the_cell_of_the_tile()
    {
        Assert.Equal(["D.2", "D.3", "R.4"], TwoGaps.Home.FreeSteps().Select(step => step.Name).Order(StringComparer.Ordinal));
        var state = TwoGaps.HomeState.Apply(TwoGaps.ParseWord("R.4"));
        Assert.Equal(4, state.Labels[3]);
    }

    [Fact]
    public void The_half_turn_alone_is_a_turn_of_its_own()
    {
        var cube = MechanismBuilder.Cube("Cube", 3).Use("U", "F2").Build();

        Assert.Equal(["U", "F2"], cube.Turns.Select(turn => turn.Name));
        Assert.Equal("F2 F2' U U", cube.ParseWord("F2 F2' U2").ToString());
        Assert.Equal(Cube.HomeState.Apply(Cube.ParseWord("F F")).Labels, cube.HomeState.Apply(cube.ParseWord("F2")).Labels);
    }

    [Fact]
    public void The_opposite_of_a_one_way_turn_is_barred_and_never_rewritten()
    {
        var mechanism = MechanismBuilder.Custom("Ratchet", 3).Turn("A", "(1 2 3)", turn => turn.OneWay()).Build();

        Assert.False(mechanism.HomeState.TryApply(mechanism.ParseWord("A A'"), out var end, out var barred));
        Assert.Equal("step 2 (A') is barred: turn A goes one way only", barred.ToString());
        Assert.Equal(BarrierKind.OneWay, barred.Barrier.Kind);
        Assert.Equal(mechanism.HomeState.Apply(mechanism.ParseWord("A")), end);
    }

    [Fact]
    public void A_name_that_several_steps_share_means_the_free_one_or_none()
    {
        Assert.False(Board.HomeState.TryApply(Board.ParseWord("L"), out _, out var barred));
        Assert.Equal(BarrierKind.NoneFree, barred.Barrier.Kind);
        Assert.StartsWith("none of the 6 steps written so is free", barred.Barrier.ToString(), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("home", "()")]
    [InlineData("  home ", "()")]
    [InlineData("()", "()")]
    [InlineData("(UF:U UB:U)", "(UB:U UF:U)")]
    [InlineData("(FU:U BU:U)", "(UB:U UF:U)")]
    [InlineData("(U U')", "()")]
    public void A_state_is_home_or_cycles_or_a_word(string text, string cycles) => Assert.Equal(cycles, Cube.ParseState(text).ToString());

    [Theory]
    [InlineData("Q", "\"Q\" is neither \"home\", nor cycles of sites, nor a word: character 1: found \"Q\"; the steps are U, U', R, R', F, F', D, D', L, L', B, B'")]
    [InlineData("(U", "\"(U\" is neither cycles of sites (character 2: found \"U\", which is not the name of a point) nor a word (character 3: the text ends where ')' is missing)")]
    public void What_is_no_state_is_refused(string text, string message) => Assert.Equal(message, Assert.Throws<FormatException>(() => Cube.ParseState(text)).Message);
}
