using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Paths between states: shortest where searched, replayed always, refused with a reason that is true.</summary>
public class SolverTests
{
    private static readonly Mechanism Cube = MechanismBuilder.Cube("Cube", 3).Build();
    private static readonly Mechanism SmallBoard = MechanismBuilder.Board("Board", 3, 2).Build();

    [Fact]
    public void A_solved_state_needs_nothing()
    {
        var result = new Solver(Cube).Solve(Cube.HomeState);

        Assert.Equal((true, 0, true), (result.IsSolvable, result.Path!.Length, result.IsProvenShortest));
    }

    // The greatest depth of the 2x3 board with the hole in a corner is 21, reached by one state (OEIS A090034, opened; 360 states).
    [Fact]
    public void Lengths_on_the_2x3_board_are_those_of_a_search_over_all_states()
    {
        var depths = Depths(SmallBoard.HomeState);
        var solver = new Solver(SmallBoard);

        Assert.Equal(360, depths.Count);
        Assert.Equal(21, depths.Values.Max());
        foreach (var (state, depth) in depths)
        {
            // The board's steps can all be undone, so the way home is as long as the way from home.
            var result = solver.Solve(state);
            Assert.Equal((depth, true), (result.Path!.Length, result.IsProvenShortest));
            Assert.Equal(SmallBoard.HomeState, state.Apply(result.Path.Word));
        }
    }

    [Fact]
    public void With_one_way_turns_lengths_are_those_of_a_search_over_all_states()
    {
        var mechanism = MechanismBuilder.Custom("Ratchet", 5)
            .Turn("A", "(1 2 3)", turn => turn.OneWay())
            .Turn("B", "(3 4 5)", turn => turn.BarredBy("pin@4"))
            .Mark("pin", "2")
            .Build();
        var solver = new Solver(mechanism);
        foreach (var from in Depths(mechanism.HomeState).Keys.Take(12))
        {
            var depths = Depths(from);
            foreach (var (to, depth) in depths)
            {
                var result = solver.Route(from, to);
                Assert.Equal((depth, true), (result.Path!.Length, result.IsProvenShortest));
                Assert.Equal(to, from.Apply(result.Path.Word));
            }
        }
    }

    [Fact]
    public void A_state_of_the_wrong_parity_is_refused_by_the_vertex_group()
    {
        var board = MechanismBuilder.Board("Board", 4, 4).Build();

        var result = new Solver(board).Solve(board.ParseState("(14 15)"));

        Assert.False(result.IsSolvable);
        Assert.Equal(
            "The shape can be reached, but the vertex group at home (order 653837184000) does not hold the permutation. "
            + "With all base points of its stabilizer chain in place, (14 15) is left over.",
            result.Reason);
    }

    [Fact]
    public void A_label_outside_its_orbit_is_named()
    {
        var result = new Solver(Cube).Solve(Cube.ParseState("(UF:U UB:U)(UF:F UB:B)(UFR:U UBR:U DFR:D)(UFR:F UBR:R DFR:F)(UFR:R UBR:B DFR:R)"));

        Assert.False(result.IsSolvable);
        Assert.Contains("does not hold the permutation", result.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void A_piece_taken_apart_is_refused_at_once()
    {
        var result = new Solver(Cube).Solve(Cube.ParseState("(UF:U UFR:F)"));

        Assert.False(result.IsSolvable);
        Assert.Equal("The path starts in a state where no turns can bring the puzzle: a piece is taken apart, or a block or mark lies where it can never come.", result.Reason);
    }

    [Fact]
    public void Long_paths_come_from_words_when_the_search_ends_and_replay()
    {
        var mechanism = MechanismBuilder.Cube("Fused", 3).Block("UFR", "UF").Block("DBL", "DB").Build();
        var solver = new Solver(mechanism, new SolveOptions { MaxStates = 2_000 });
        var state = RandomState(mechanism, 60, 3);

        var result = solver.Solve(state);

        Assert.True(result.IsSolvable);
        Assert.False(result.IsProvenShortest);
        Assert.Equal(mechanism.HomeState, state.Apply(result.Path!.Word));
        Assert.Equal(result.Path.Word, new Solver(mechanism, new SolveOptions { MaxStates = 2_000 }).Solve(state).Path!.Word);
    }

    [Fact]
    public void Long_paths_respect_one_way_turns()
    {
        var mechanism = MechanismBuilder.Custom("Wheels", 12)
            .Turn("A", "(1 2 3 4 5)", turn => turn.OneWay())
            .Turn("B", "(4 5 6 7 8)", turn => turn.OneWay().BarredBy("pin@4"))
            .Turn("C", "(8 9 10 11 12)", turn => turn.OneWay())
            .Mark("pin", "1")
            .Build();
        var solver = new Solver(mechanism, new SolveOptions { MaxStates = 500 });
        var state = RandomState(mechanism, 60, 8);

        var result = solver.Solve(state);

        Assert.True(result.IsSolvable, result.Reason);
        Assert.Equal(mechanism.HomeState, state.Apply(result.Path!.Word));
    }

    [Fact]
    public void A_greatest_length_is_kept_or_proven_too_small()
    {
        var far = Depths(SmallBoard.HomeState).MaxBy(state => state.Value).Key;

        var tooShort = new Solver(SmallBoard, new SolveOptions { MaxLength = 20 }).Solve(far);
        var enough = new Solver(SmallBoard, new SolveOptions { MaxLength = 21 }).Solve(far);

        Assert.Equal((false, "A search over all paths of at most 20 steps found none."), (tooShort.IsSolvable, tooShort.Reason));
        Assert.Equal(21, enough.Path!.Length);
    }

    [Fact]
    public void A_budget_that_ends_a_bounded_search_leaves_the_answer_open()
    {
        var state = RandomState(Cube, 60, 5);

        var result = new Solver(Cube, new SolveOptions { MaxLength = 20, MaxStates = 1_000, MaxNodes = 10_000, MaxStagedMoves = 0 }).Solve(state);

        Assert.Null(result.IsSolvable);
        Assert.Null(result.Path);
        Assert.Contains("The budget of 10000 nodes ended a bounded search; no path is shorter than", result.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void A_budget_of_shapes_leaves_the_answer_open()
    {
        var mechanism = MechanismFile.Load(Repository.PathOf("docs/workshop/weir-gate.fuse.json"));

        var result = new Solver(mechanism, new SolveOptions { MaxStates = 100, MaxShapes = 10 }).Solve(RandomState(mechanism, 40, 1));

        Assert.Null(result.IsSolvable);
        Assert.Contains("more than 10 shapes", result.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void A_passage_can_be_taken_forward_but_not_back()
    {
        var mechanism = MechanismFile.Load(Repository.PathOf("docs/workshop/mill-race.fuse.json"));
        var trapped = mechanism.ParseState("Gate Gate Wheel Chute");
        var solver = new Solver(mechanism);

        var forward = solver.Route(mechanism.HomeState, trapped);
        var back = solver.Route(trapped, mechanism.HomeState);

        Assert.Equal(trapped, mechanism.HomeState.Apply(forward.Path!.Word));
        Assert.False(back.IsSolvable);
        Assert.StartsWith("The shapes differ for good", back.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void A_cancelled_search_stops()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();

        Assert.ThrowsAny<OperationCanceledException>(() => new Solver(Cube).Solve(RandomState(Cube, 40, 2), null, source.Token));
    }

    [Fact]
    public void A_state_of_another_mechanism_is_refused() =>
        Assert.Throws<ArgumentException>(() => new Solver(Cube).Solve(SmallBoard.HomeState));

    internal static State RandomState(Mechanism mechanism, int length, ulong seed)
    {
        var random = new SeededRandom(seed);
        var state = mechanism.HomeState;
        for (var i = 0; i < length; i++)
        {
            var steps = state.Shape!.FreeSteps();
            state = state.After(steps[random.NextInt32(steps.Length)]);
        }

        return state;
    }

    // As far as steps are free.
    internal static State RandomStateIfFree(Mechanism mechanism, int length, ulong seed)
    {
        var random = new SeededRandom(seed);
        var state = mechanism.HomeState;
        for (var i = 0; i < length && state.Shape!.FreeSteps() is { Length: > 0 } steps; i++)
        {
            state = state.After(steps[random.NextInt32(steps.Length)]);
        }

        return state;
    }

    // The least number of steps to every state, by plain breadth-first search.
    internal static Dictionary<State, int> Depths(State start)
    {
        var depths = new Dictionary<State, int> { [start] = 0 };
        var queue = new Queue<State>([start]);
        while (queue.TryDequeue(out var state))
        {
            foreach (var step in state.Shape!.FreeSteps())
            {
                var next = state.After(step);
                if (depths.TryAdd(next, depths[state] + 1))
                {
                    queue.Enqueue(next);
                }
            }
        }

        return depths;
    }
}
