using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Published;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving.Stages;

/// <summary>Words found by stages: each is replayed, none is shorter than it can be, and the same question has the same answer.</summary>
public class StagedSolverTests
{
    // A corner-turning tetrahedron: pieces 1 … 4 with three sites each at the corners, six edges with two; four third-turns. Own numbering.
    private static readonly Mechanism Tetrahedron = Mechanism.FromGenerators(
        "Tetrahedron",
        24,
        ("A", Permutation.Parse("(1 2 3)(13 15 17)(14 16 18)")),
        ("B", Permutation.Parse("(4 5 6)(13 20 21)(14 19 22)")),
        ("C", Permutation.Parse("(7 8 9)(15 23 19)(16 24 20)")),
        ("D", Permutation.Parse("(10 11 12)(17 22 24)(18 21 23)")));

    public static TheoryData<string, int> Mechanisms => new()
    {
        { "cube 2", 400 },
        { "cube 3", 60 },
        { "cube 4", 6 },
        { "pair", 60 },
        { "docs/workshop/weir-gate.fuse.json", 60 },
        { "docs/workshop/flood-tower.fuse.json", 6 },
        { "docs/workshop/ferry-board.fuse.json", 300 },
        { "docs/workshop/seven-piers.fuse.json", 300 },
        { "docs/workshop/lock-basin.fuse.json", 300 },
        { "docs/workshop/mill-race.fuse.json", 100 },
        { "board", 300 },
        { "graph", 300 },
        { "tetrahedron", 300 },
        { "M12", 300 },
        { "M24", 40 },
        { "one-way wheels", 60 },
    };

    [Theory]
    [MemberData(nameof(Mechanisms))]
    public void Words_for_uniformly_random_states_lead_home(string name, int count)
    {
        var mechanism = Named(name);
        var solver = new StagedSolver(mechanism, new StagedOptions { Metric = Metric.Run, MaxNodes = 30_000 });
        foreach (var state in RandomStates(mechanism, count, 5))
        {
            var result = solver.Solve(state);

            Assert.True(result.IsSolvable, result.Reason);
            Assert.Equal(mechanism.HomeState, state.Apply(result.Path!.Word));
            Assert.Equal(Metric.Run.LengthOf(result.Path), result.Length);
        }
    }

    [Fact]
    public void Words_between_any_two_states_lead_from_one_to_the_other()
    {
        var mechanism = Named("pair");
        var solver = new StagedSolver(mechanism, new StagedOptions { MaxNodes = 20_000 });
        var states = RandomStates(mechanism, 40, 6);
        for (var i = 1; i < states.Count; i++)
        {
            var result = solver.Route(states[i - 1], states[i]);

            Assert.Equal(states[i], states[i - 1].Apply(result.Path!.Word));
        }
    }

    // Random states of the 3x3x3 in runs, without knowing the puzzle; the bound is far above what is reached. A published figure to stand beside is 60 (Egner, Püschel, ISSAC 1998; abstract opened).
    [Fact]
    public void Words_for_the_3x3x3_are_short()
    {
        var mechanism = Named("cube 3");
        var solver = new StagedSolver(mechanism, new StagedOptions { Metric = Metric.Run, MaxNodes = 300_000 });

        Assert.InRange(RandomStates(mechanism, 40, 7).Average(state => solver.Solve(state).Length), 15, 27);
    }

    [Fact]
    public void In_small_spaces_words_home_are_as_short_as_can_be() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var solver = new StagedSolver(mechanism);
        var groupoid = ShapeGroupoid.Explore(mechanism);
        foreach (var state in SolverTests.Depths(mechanism.HomeState).Keys.Take(60).Where(state => groupoid.RegionOf(groupoid.IndexOf(state.Shape!)) == 0))
        {
            var result = solver.Solve(state);

            Assert.Equal(mechanism.HomeState, state.Apply(result.Path!.Word));
            Assert.Equal(SolverTests.Depths(state)[mechanism.HomeState], result.Length);
        }
    });

    [Fact]
    public void In_small_spaces_words_between_states_are_no_shorter_than_can_be() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var solver = new StagedSolver(mechanism);
        var from = SolverTests.RandomState(mechanism, mechanism.Home.FreeSteps().IsEmpty ? 0 : 1, seed);
        foreach (var (to, depth) in SolverTests.Depths(from).Take(30))
        {
            var result = solver.Route(from, to);

            Assert.True(result.Path is null || (result.Length >= depth && from.Apply(result.Path.Word) == to));
            Assert.NotEqual(false, result.IsSolvable);
        }
    });

    [Theory]
    [InlineData(3, 2)]
    [InlineData(2, 3)]
    public void In_small_spaces_words_have_as_few_runs_as_can_be(int columns, int rows)
    {
        var board = Make.Board(columns, rows);
        var solver = new StagedSolver(board, new StagedOptions { Metric = Metric.Run });
        foreach (var state in SolverTests.Depths(board.HomeState).Keys)
        {
            Assert.Equal(LeastRuns(state), solver.Solve(state).Length);
        }
    }

    [Fact]
    public void Weights_are_what_is_made_small()
    {
        var cube = Make.Cube(2);
        var weights = Metric.Weights([new("U", 5), new("R", 1), new("F", 1)]);
        var solver = new StagedSolver(cube, new StagedOptions { Metric = weights, MaxNodes = 4_000_000 });
        var byStep = new StagedSolver(cube, new StagedOptions { MaxNodes = 4_000_000 });
        foreach (var state in RandomStates(cube, 30, 3))
        {
            var result = solver.Solve(state);

            Assert.Equal(weights.LengthOf(result.Path!), result.Length);
            Assert.True(result.Length <= weights.LengthOf(byStep.Solve(state).Path!));
        }
    }

    [Fact]
    public void The_same_question_has_the_same_answer_on_any_thread_and_whatever_was_asked_before()
    {
        var mechanism = Named("pair");
        var options = new StagedOptions { Metric = Metric.Run, MaxNodes = 50_000 };
        var states = RandomStates(mechanism, 12, 8);
        var one = new StagedSolver(mechanism, options);
        var other = new StagedSolver(mechanism, options);

        var words = states.ConvertAll(state => one.Solve(state).Path!.Word);
        var again = new Fusecraft.Mechanisms.Word[states.Count];
        Parallel.For(0, states.Count, new ParallelOptions { MaxDegreeOfParallelism = 2 }, i => again[^(i + 1)] = other.Solve(states[^(i + 1)]).Path!.Word);

        Assert.Equal(words, again);
    }

    [Fact]
    public void A_time_limit_reports_the_budget_that_finds_the_same_word()
    {
        var mechanism = Named("pair");
        var state = RandomStates(mechanism, 1, 9)[0];

        var timed = new StagedSolver(mechanism, new StagedOptions { Metric = Metric.Run, TimeLimit = TimeSpan.FromSeconds(0.3) }).Solve(state);
        var counted = new StagedSolver(mechanism, new StagedOptions { Metric = Metric.Run, MaxNodes = timed.Nodes }).Solve(state);

        Assert.Equal(timed.Path!.Word, counted.Path!.Word);
    }

    [Fact]
    public void What_cannot_be_reached_is_refused_with_the_reason()
    {
        var board = Make.Board(4, 4);

        var result = new StagedSolver(board).Solve(board.ParseState("(14 15)"));

        Assert.False(result.IsSolvable);
        Assert.Contains("does not hold the permutation", result.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Options_are_checked()
    {
        var cube = Make.Cube(2);

        Assert.Throws<ArgumentOutOfRangeException>(() => new StagedSolver(cube, new StagedOptions { MaxNodes = 0 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => new StagedSolver(cube, new StagedOptions { TimeLimit = TimeSpan.Zero }));
        Assert.Throws<ArgumentException>(() => new StagedSolver(cube, new StagedOptions { Metric = Metric.Weights([new("X", 2)]) }));
        Assert.Throws<ArgumentException>(() => new StagedSolver(cube).Solve(Make.Cube(3).HomeState));
    }

    [Fact]
    public void A_cancelled_search_stops()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();
        var cube = Named("cube 3");

        Assert.ThrowsAny<OperationCanceledException>(() => new StagedSolver(cube).Solve(RandomStates(cube, 1, 1)[0], source.Token));
    }

    internal static Mechanism Named(string name) => name switch
    {
        "cube 2" => Make.Cube(2),
        "cube 3" => Make.Cube(3),
        "cube 4" => Make.Cube(4),
        "pair" => Make.Cube(3, "U R F", "UFR UF"),
        "board" => Make.Board(3, 3),
        "graph" => Make.GraphBoard(8, [(1, 2), (2, 3), (3, 4), (4, 5), (5, 6), (6, 1), (1, 7), (7, 4), (7, 8)], 8),
        "tetrahedron" => Tetrahedron,
        "M12" => Mechanism.FromGenerators("M12", MathieuGroups.M12),
        "M24" => Mechanism.FromGenerators("M24", MathieuGroups.M24),
        "one-way wheels" => MechanismBuilder.Custom("Wheels", 12)
            .Turn("A", "(1 2 3 4 5)", turn => turn.OneWay())
            .Turn("B", "(4 5 6 7 8)", turn => turn.OneWay().BarredBy("pin@4"))
            .Turn("C", "(8 9 10 11 12)", turn => turn.OneWay())
            .Mark("pin", "1")
            .Build(),
        _ => MechanismFile.Load(Repository.PathOf(name)),
    };

    internal static List<State> RandomStates(Mechanism mechanism, int count, ulong seed)
    {
        var groupoid = ShapeGroupoid.Explore(mechanism);
        var group = groupoid.VertexGroupAt(0);
        var random = new SeededRandom(seed);
        var shapes = Enumerable.Range(0, groupoid.ShapeCount).Where(shape => groupoid.RegionOf(shape) == 0).ToList();
        return [.. Enumerable.Range(0, count).Select(_ =>
            mechanism.StateOf(group.Group.RandomElement(random) * group.TreePath(shapes[random.NextInt32(shapes.Count)]).Permutation))];
    }

    // Breadth-first, run by run: from each state all that steps of one name and its opposite lead to.
    private static int LeastRuns(State from)
    {
        var seen = new HashSet<State> { from };
        List<State> level = [from];
        for (var runs = 0; ; runs++)
        {
            if (level.Contains(from.Mechanism.HomeState))
            {
                return runs;
            }

            var next = new List<State>();
            foreach (var state in level)
            {
                foreach (var names in (string[])["LR", "UD"])
                {
                    var run = new Queue<State>([state]);
                    var inRun = new HashSet<State> { state };
                    while (run.TryDequeue(out var at))
                    {
                        foreach (var step in at.Shape!.FreeSteps().Where(step => names.Contains(step.Name, StringComparison.Ordinal)))
                        {
                            if (inRun.Add(at.After(step)))
                            {
                                run.Enqueue(at.After(step));
                            }
                        }
                    }

                    next.AddRange(inRun.Where(seen.Add));
                }
            }

            level = next;
        }
    }
}
