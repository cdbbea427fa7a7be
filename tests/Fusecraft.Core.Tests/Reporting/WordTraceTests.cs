using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Reporting;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Reporting;

public class WordTraceTests
{
    [Fact]
    public void A_trace_goes_through_the_states_that_the_word_goes_through()
    {
        var cube = Make.Cube(3, "", "UFR UF");
        var word = cube.ParseWord("U' R2 (D L)2");

        var trace = WordTrace.Of(cube.HomeState, word);

        Assert.Null(trace.Barred);
        Assert.Equal(cube.HomeState, trace.Start);
        Assert.Equal(cube.HomeState.Apply(word), trace.End);
        Assert.Equal(word, Word.Of(trace.Steps.Select(traced => traced.Step)));
        var state = cube.HomeState;
        foreach (var traced in trace.Steps)
        {
            state = state.After(traced.Step);
            Assert.Equal(state.Shape, traced.Shape);
        }
    }

    [Fact]
    public void A_barred_step_ends_the_trace_and_is_named()
    {
        var cube = Make.Cube(3, "", "UFR UF");

        var trace = WordTrace.Of(cube.HomeState, cube.ParseWord("U U' L R U"));

        Assert.Equal(3, trace.Steps.Length);
        Assert.Equal("step 4 (R) is barred: it would tear the block [UF UFR]", trace.Barred!.ToString());
        Assert.Equal(cube.HomeState.Apply(cube.ParseWord("L")), trace.End);
    }

    [Fact]
    public void What_a_step_moved_is_told_by_pieces()
    {
        var cube = Make.Cube(3);

        var traced = Assert.Single(WordTrace.Of(cube.HomeState, cube.ParseWord("U")).Steps);

        // Clockwise seen from above, as in the trade's notation: front goes to the left, left to the back.
        Assert.Equal("(UBL UBR UFR UFL)(UL UB UR UF)", traced.Moved);
    }

    [Fact]
    public void Pieces_turned_in_place_are_named_last()
    {
        var cube = MechanismBuilder.Cube("centres", 3, centreTwist: true).Build();

        Assert.EndsWith("; turned in place: U", WordTrace.Of(cube.HomeState, cube.ParseWord("U")).Steps[0].Moved, StringComparison.Ordinal);
    }

    [Fact]
    public void A_step_may_turn_pieces_in_place_and_do_nothing_else()
    {
        var dial = MechanismBuilder.Custom("dial", 3).Piece("1", "2", "3").Turn("a", "(1 2 3)").Build();

        Assert.Equal("turned in place: 1", WordTrace.Of(dial.HomeState, dial.ParseWord("a")).Steps[0].Moved);
    }

    [Fact]
    public void A_trace_may_start_anywhere()
    {
        var board = Make.Board(3, 2);
        var start = board.ParseState("(3 6)");

        var trace = WordTrace.Of(start, board.ParseWord("U R"));

        Assert.Equal(["gap@6", "gap@5"], trace.Steps.Select(traced => traced.Shape.ToString()));
        Assert.Equal(start.Labels * Permutation.Parse("(3 6)") * Permutation.Parse("(5 6)"), trace.End.Labels);
    }

    [Fact]
    public void A_state_without_a_shape_has_no_trace()
    {
        var cube = Make.Cube(3);

        Assert.Throws<InvalidOperationException>(() => WordTrace.Of(cube.ParseState("(UFR:U UF:U)"), Word.Empty));
    }
}
