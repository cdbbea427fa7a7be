using System.Numerics;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Measures of levels, against plain searches over all states of small mechanisms, one-way ones among them.</summary>
public class LevelMeasuresTests
{
    [Theory]
    [InlineData("step")]
    [InlineData("run")]
    [InlineData("weights")]
    public void All_figures_are_those_of_a_plain_search(string metric) => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var random = new SeededRandom(seed);
        var mechanism = WithGoal(RandomMechanisms.From(seed), random);
        var start = SolverTests.RandomStateIfFree(mechanism, random.NextInt32(9), seed + 1);
        if (metric == "run" && SolverTests.Depths(start).Count > 1000)
        {
            return;
        }

        Check(start, metric switch
        {
            "step" => Metric.Step,
            "run" => Metric.Run,
            _ => Metric.Weights(mechanism.Turns.Select(turn => KeyValuePair.Create(turn.Name, 1 + random.NextInt32(3)))),
        });
    });

    [Fact]
    public void A_table_gives_the_figures_of_the_search()
    {
        foreach (var mechanism in (Mechanism[])[Make.Board(3, 2), Make.Cube(2, "U R")])
        {
            foreach (var metric in (Metric[])[Metric.Step, Metric.Run])
            {
                using var table = DistanceTable.Build(StateNumbering.Of(mechanism), new DistanceOptions { Metric = metric, DegreeOfParallelism = 1 });
                for (var seed = 1UL; seed <= 5; seed++)
                {
                    var start = SolverTests.RandomState(mechanism, 30, seed);

                    Assert.Equal(Text(LevelMeasures.Of(start, new LevelOptions { Metric = metric })), Text(LevelMeasures.FromTable(start, table)));
                    Assert.Equal(table.CountShortestPaths(start), LevelMeasures.FromTable(start, table).ShortestWordCount);
                }
            }
        }
    }

    [Fact]
    public void One_way_passages_and_lost_moves_are_told()
    {
        // A boat may go to and fro between 1 and 2, falls to 3 for good, or goes by 4, once, to where the goal is.
        var river = MechanismBuilder.Custom("River", 5)
            .Turn("A", "(1 2)", turn => turn.Needs("boat@1"))
            .Turn("B", "(2 3)", turn => turn.Needs("boat@2").OneWay())
            .Turn("C", "(2 4)", turn => turn.Needs("boat@2").OneWay())
            .Turn("D", "(4 5)", turn => turn.Needs("boat@4"))
            .Mark("boat", "1")
            .Goal(Goal.MarksAt("boat@5"))
            .Build();

        var level = LevelMeasures.Of(river.HomeState);

        Assert.Equal((true, 3, BigInteger.One), (level.IsSolvable, level.ShortestLength, level.ShortestWordCount));
        Assert.Equal("A C D", level.Path.ToString());
        Assert.Equal((3, 1), (level.ShapeChangeCount, level.PassageCount));
        Assert.Equal((3, 1), (level.Stages[1].FreeCount, level.Stages[1].BestCount));
        Assert.Equal(["A' 2 False", "B  True"], level.Stages[1].WrongMoves.Select(move => $"{move.Steps[0]} {move.Detour} {move.IsLost}"));
        Assert.Equal(0, LevelMeasures.Of(river.ParseState("A C D")).ShortestLength);
        Assert.False(LevelMeasures.Of(river.ParseState("A B")).IsSolvable);
        Assert.Throws<InvalidOperationException>(() => LevelMeasures.Of(river.ParseState("A B")).Path);
    }

    [Fact]
    public void A_budget_leaves_open_what_it_does_not_settle()
    {
        var cube = Make.Cube(3);
        var far = SolverTests.RandomState(cube, 30, 1);

        Assert.Null(LevelMeasures.Of(far, new LevelOptions { MaxStates = 500 }).IsSolvable);
        var near = LevelMeasures.Of(cube.ParseState("U R"), new LevelOptions { MaxStates = 500 });
        Assert.Equal((2, BigInteger.One), (near.ShortestLength, near.ShortestWordCount));
        Assert.All(near.Stages[0].WrongMoves, move => Assert.Equal((null, null), (move.Detour, move.IsLost)));
        Assert.All(near.Stages[1].WrongMoves, move => Assert.NotNull(move.Detour));
    }

    [Fact]
    public void What_is_no_level_is_refused()
    {
        var board = Make.Board(3, 2);
        var free = Metric.Weights([KeyValuePair.Create(board.Turns[0].Name, 0)]);

        Assert.Throws<ArgumentException>(() => LevelMeasures.Of(board.HomeState, new LevelOptions { Metric = free }));
        Assert.Throws<ArgumentException>(() => LevelMeasures.Of(Make.Cube(3, "", "UF UFR").ParseState("(UF:U DB:D)(UF:F DB:B)")));
        using var fromBase = DistanceTable.Build(StateNumbering.Of(board), new DistanceOptions { Origin = DistanceOrigin.FromBase });
        Assert.Throws<ArgumentException>(() => LevelMeasures.FromTable(board.HomeState, fromBase));
    }

    internal static Mechanism WithGoal(MechanismDefinition plain, SeededRandom random)
    {
        var marks = plain.Marks.Select(mark => $"{mark.Name}@{plain.Sites[random.NextInt32(plain.Sites.Length)]}").ToList();
        var goal = random.NextInt32(5) switch
        {
            0 => Goal.Shape,
            1 => Goal.Colours,
            2 => Goal.SitesHome([.. plain.Sites.Where(_ => random.NextInt32(2) == 0).DefaultIfEmpty(plain.Sites[0])]),
            3 when marks.Count > 0 => Goal.MarksAt(marks[0]),
            _ => Goal.Home,
        };
        return Mechanism.Create(new MechanismDefinition
        {
            Name = plain.Name,
            Sites = plain.Sites,
            Pieces = plain.Pieces,
            Turns = plain.Turns,
            Blocks = plain.Blocks,
            Marks = plain.Marks,
            Goal = goal,
            Colours = ColourScheme.Alike([plain.Sites[0], plain.Sites[1]], [plain.Sites[2], plain.Sites[3]]),
        });
    }

    internal static bool IsGoal(State state)
    {
        var mechanism = state.Mechanism;
        return mechanism.Goal.Kind switch
        {
            GoalKind.Shape => state.Shape == mechanism.Home,
            GoalKind.Colours => state.Shape == mechanism.Home && Enumerable.Range(0, mechanism.SiteCount).All(site => mechanism.ColourOfSite[state.Labels[site]] == mechanism.ColourOfSite[site]),
            GoalKind.Sites => mechanism.Goal.Names.All(name => state.Labels[mechanism.FindSite(name)!.Value] == mechanism.FindSite(name)),
            GoalKind.Marks => mechanism.Goal.Names.All(name => state.Shape!.Marks.Any(mark => $"{mark.Mark}@{mechanism.SiteNames[mark.Site]}" == name)),
            _ => state.Labels.IsIdentity,
        };
    }

    private static void Check(State start, Metric metric)
    {
        var level = LevelMeasures.Of(start, new LevelOptions { Metric = metric });
        var moves = new Dictionary<State, List<(string First, long Cost, State Next)>>();
        foreach (var state in SolverTests.Depths(start).Keys)
        {
            moves.Add(state, Moves(state, metric));
        }

        // Distances to the goal by relaxing all moves until nothing changes.
        var distances = moves.Keys.Where(IsGoal).ToDictionary(state => state, _ => 0L);
        for (var isChanged = true; isChanged;)
        {
            isChanged = false;
            foreach (var (state, list) in moves)
            {
                foreach (var (_, cost, next) in list)
                {
                    if (distances.TryGetValue(next, out var rest) && (!distances.TryGetValue(state, out var known) || rest + cost < known))
                    {
                        distances[state] = rest + cost;
                        isChanged = true;
                    }
                }
            }
        }

        long? DistanceOf(State state) => distances.TryGetValue(state, out var distance) ? distance : null;
        Assert.Equal(DistanceOf(start), level.ShortestLength);
        Assert.Equal(DistanceOf(start) is not null, level.IsSolvable);
        Assert.Equal(DistanceOf(start) is null ? null : Words(start), level.ShortestWordCount);
        var at = start;
        foreach (var stage in level.Stages)
        {
            Assert.Equal(at, stage.State);
            Assert.Equal(DistanceOf(at), stage.Distance);
            Assert.Equal(moves[at].Count, stage.FreeCount);
            Assert.Equal(moves[at].Count(move => move.Cost + DistanceOf(move.Next) == DistanceOf(at)), stage.BestCount);
            Assert.Equal(
                moves[at].Select(move => (move.First, Detour: move.Cost + DistanceOf(move.Next) - DistanceOf(at))).Where(move => move.Detour != 0).Select(move => $"{move.First} {move.Detour}").Order(StringComparer.Ordinal),
                stage.WrongMoves.Select(move => $"{move.Steps[0]} {move.Detour}").Order(StringComparer.Ordinal));
            Assert.All(stage.WrongMoves, move => Assert.Equal(move.Detour is null, move.IsLost));
            var (changes, passages) = (0, 0);
            foreach (var step in stage.Steps)
            {
                var before = at.Shape!;
                at = at.After(step);
                changes += before == at.Shape ? 0 : 1;
                passages += SolverTests.Depths(at).Keys.Any(state => state.Shape == before) ? 0 : 1;
            }

            Assert.Equal((changes, passages), (stage.ShapeChanges, stage.Passages));
        }

        Assert.True(level.IsSolvable == false || IsGoal(at));
        Assert.True(level.IsSolvable == false || metric.LengthOf(level.Path) == level.ShortestLength);

        BigInteger Words(State state) => IsGoal(state)
            ? BigInteger.One
            : moves[state].Where(move => move.Cost + DistanceOf(move.Next) == DistanceOf(state)).Aggregate(BigInteger.Zero, (sum, move) => sum + Words(move.Next));
    }

    // Single steps, or whole runs of a turn.
    private static List<(string First, long Cost, State Next)> Moves(State state, Metric metric)
    {
        var moves = new List<(string First, long Cost, State Next)>();
        foreach (var turn in state.Mechanism.Turns)
        {
            Step[] steps = turn.Backward is null ? [turn.Forward] : [turn.Forward, turn.Backward];
            if (metric.Kind != MetricKind.Run)
            {
                moves.AddRange(steps.Where(state.IsFree).Select(step => (step.Name, (long)metric.WeightsByTurn.GetValueOrDefault(turn.Name, 1), state.After(step))));
                continue;
            }

            var reached = new Dictionary<State, string> { [state] = "" };
            var queue = new Queue<State>([state]);
            while (queue.TryDequeue(out var now))
            {
                foreach (var step in steps.Where(now.IsFree))
                {
                    if (reached.TryAdd(now.After(step), reached[now].Length > 0 ? reached[now] : step.Name))
                    {
                        queue.Enqueue(now.After(step));
                    }
                }
            }

            moves.AddRange(reached.Where(pair => pair.Key != state).Select(pair => (pair.Value, 1L, pair.Key)));
        }

        return moves;
    }

    private static string Text(LevelMeasures level) => $"{level.ShortestLength} {level.ShortestWordCount} {level.Path}: " + string.Join("; ", level.Stages.Select(stage =>
        $"{stage.Distance} {stage.FreeCount} {stage.BestCount} {stage.ShapeChanges} {stage.Passages} {string.Join(',', stage.WrongMoves.Select(move => $"{string.Concat(move.Steps)} {move.Detour} {move.IsLost}"))}"));
}
