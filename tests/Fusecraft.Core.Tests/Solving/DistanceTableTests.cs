using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Distance tables and the numbering of states, against plain search over states of random small mechanisms, one-way steps and weights of 0 among them.</summary>
public class DistanceTableTests
{
    private const int MostStates = 1500;

    [Property(MaxTest = 60)]
    public void Numbers_and_states_belong_together(ulong seed) => CheckNumbering(seed);

    [Fact]
    public void Numbers_and_states_belong_together_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckNumbering);

    [Property(MaxTest = 40)]
    public void Every_distance_is_that_of_a_plain_search(ulong seed) => CheckDistances(seed);

    [Fact]
    public void Every_distance_is_that_of_a_plain_search_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckDistances);

    [Fact]
    public void Tables_do_not_depend_on_the_number_of_threads()
    {
        foreach (var metric in (Metric[])[Metric.Step, Metric.Run, Metric.Weights([new("U", 0), new("R", 3)])])
        {
            var numbering = StateNumbering.Of(Make.Cube(2));
            var one = DistanceTable.Build(numbering, new DistanceOptions { Metric = metric, DegreeOfParallelism = 1 });
            var two = DistanceTable.Build(numbering, new DistanceOptions { Metric = metric, DegreeOfParallelism = 2 });
            Assert.Equal(Written(one), Written(two));
        }
    }

    [Fact]
    public void Antipodes_are_the_states_without_a_farther_neighbour_at_the_greatest_distance()
    {
        var table = DistanceTable.Build(StateNumbering.Of(Make.Board(3, 3)));
        var antipodes = table.StatesAt(table.Greatest).ToList();
        Assert.Equal(2, antipodes.Count);
        Assert.All(antipodes, state => Assert.Equal(31, table.ShortestPath(state)!.Length));
        Assert.Equal(table.Counts[5], table.StatesAt(5).Count());
        Assert.Empty(table.StatesAt(32));
    }

    [Fact]
    public void Goals_other_than_home_are_all_at_distance_0()
    {
        var cube = Make.Cube(2);
        DistanceTable Table(MechanismFamily family, Goal goal, ColourScheme? colours = null) =>
            DistanceTable.Build(StateNumbering.Of(Mechanism.Create(new MechanismDefinition { Name = "goal", Family = family, Goal = goal, Colours = colours ?? ColourScheme.Distinct })));
        var table = Table(new CubeFamily(2), Goal.Colours, ColourScheme.Faces);

        // All 24 facelets tell the seven free pieces apart, so only home looks like home.
        Assert.Equal(1, table.Counts[0]);
        var corner = Table(new CubeFamily(2), Goal.SitesHome("UFR:U"));

        // 7!·3^6 states, and the piece goes to 21 places and twists.
        Assert.Equal(cube.UnguardedGroup.Order / 21, corner.Counts[0]);
        var gapHome = Table(new BoardFamily(3, 2, []), Goal.Shape);
        Assert.Equal(60, gapHome.Counts[0]);
        Assert.Equal(360, gapHome.StateCount);
    }

    [Fact]
    public void Two_hundred_random_states_of_the_2x2x2_are_brought_home_by_words_as_long_as_their_distance()
    {
        var numbering = StateNumbering.Of(Make.Cube(2));
        var random = new SeededRandom(5);
        foreach (var metric in (Metric[])[Metric.Step, Metric.Run])
        {
            var table = DistanceTable.Build(numbering, new DistanceOptions { Metric = metric });
            for (var i = 0; i < 100; i++)
            {
                var state = numbering.Mechanism.StateOf(numbering.Group.Group.RandomElement(random));
                var path = table.ShortestPath(state)!;
                Assert.Equal(numbering.Mechanism.HomeState, state.Apply(path.Word));
                Assert.Equal(table.DistanceOf(state), metric.LengthOf(path));
            }
        }
    }

    [Fact]
    public void Steps_that_do_not_bring_the_goal_nearer_are_no_hints()
    {
        var table = DistanceTable.Build(StateNumbering.Of(Make.Cube(2)));
        var state = table.Numbering.Mechanism.ParseState("U R");
        Assert.Equal(["R'"], table.BestSteps(state).Select(step => step.Name));
        Assert.Equal(BigInteger.One, table.CountShortestPaths(state));
        Assert.Empty(table.BestSteps(table.Numbering.Mechanism.HomeState));

        // Half a turn is undone in either sense.
        Assert.Equal(["U", "U'"], table.BestSteps(table.Numbering.Mechanism.ParseState("U2")).Select(step => step.Name));
        Assert.Equal(2, table.CountShortestPaths(table.Numbering.Mechanism.ParseState("U2")));
    }

    [Fact]
    public void A_table_that_would_take_too_much_memory_is_refused_before_it_is_begun()
    {
        var numbering = StateNumbering.Of(Make.Cube(2));
        var problem = Assert.Throws<InvalidOperationException>(() => DistanceTable.Build(numbering, new DistanceOptions { MaxBytes = 100_000 }));
        Assert.Contains("3674160 states", problem.Message, StringComparison.Ordinal);
        Assert.InRange(DistanceTable.BytesFor(numbering), 3674160 / 4, 4_000_000);
        Assert.Throws<ArgumentException>(() => DistanceTable.Build(numbering, new DistanceOptions { Metric = Metric.Weights([new("Q", 2)]) }));
        Assert.Throws<InvalidOperationException>(() => StateNumbering.Of(Make.Cube(3)));
    }

    private static void CheckNumbering(ulong seed)
    {
        if (Region(seed) is not { } numbering)
        {
            return;
        }

        var mechanism = numbering.Mechanism;
        var seen = new HashSet<State>();
        for (var number = 0L; number < numbering.Count; number++)
        {
            var state = numbering.Unrank(number);
            Assert.True(seen.Add(state));
            Assert.Equal(number, numbering.Rank(state));
            Assert.Equal(numbering.Group.Groupoid.IndexOf(state.Shape!), numbering.ShapeOf(number));
            foreach (var step in mechanism.Steps)
            {
                var after = state.TryStep(step, out var next) ? numbering.Rank(next) : -1;
                Assert.Equal(after, numbering.After(number, step));
            }
        }

        Assert.Equal(mechanism.HomeState, numbering.Unrank(0));
    }

    private static void CheckDistances(ulong seed)
    {
        if (Region(seed) is not { } numbering)
        {
            return;
        }

        var mechanism = numbering.Mechanism;
        var all = Enumerable.Range(0, (int)numbering.Count).Select(number => numbering.Unrank(number)).ToHashSet();
        var random = new SeededRandom(seed);
        var weights = Metric.Weights(mechanism.Turns.Select(turn => new KeyValuePair<string, int>(turn.Name, random.NextInt32(4))));
        foreach (var metric in (Metric[])[Metric.Step, Metric.Run, weights])
        {
            foreach (var origin in (DistanceOrigin[])[DistanceOrigin.FromBase, DistanceOrigin.ToGoal])
            {
                var table = DistanceTable.Build(numbering, new DistanceOptions { Metric = metric, Origin = origin });
                List<State> starts = origin == DistanceOrigin.FromBase ? [mechanism.HomeState] : [.. all.Where(IsGoal)];
                var distances = BruteDistances.From(starts, all, metric, origin == DistanceOrigin.ToGoal);
                Assert.Equal(distances.Count, table.StateCount);
                foreach (var state in all)
                {
                    Assert.True(distances.GetValueOrDefault(state, -1) == table.DistanceOf(state), $"{metric} {origin} {state}: {distances.GetValueOrDefault(state, -1)} is not {table.DistanceOf(state)}");
                }

                for (var distance = 0; distance <= table.Greatest; distance++)
                {
                    Assert.Equal(distances.Values.LongCount(d => d == distance), table.Counts[distance]);
                }

                CheckWords(table, distances, all, new SeededRandom(seed));
            }
        }

        bool IsGoal(State state) => mechanism.Goal.Kind switch
        {
            GoalKind.Home => state == mechanism.HomeState,
            GoalKind.Shape => state.Shape == mechanism.Home,
            GoalKind.Marks => mechanism.Goal.Names.All(name => state.Shape!.Marks.Any(mark => $"{mark.Mark}@{mechanism.SiteNames[mark.Site]}" == name)),
            GoalKind.Sites => mechanism.Goal.Names.All(name => state.Labels[mechanism.FindSite(name)!.Value] == mechanism.FindSite(name)!.Value),
            _ => state.Shape == mechanism.Home && Enumerable.Range(0, mechanism.SiteCount).All(site => mechanism.ColourOfSite[site] == mechanism.ColourOfSite[state.Labels[site]]),
        };
    }

    private static void CheckWords(DistanceTable table, Dictionary<State, int> distances, HashSet<State> all, SeededRandom random)
    {
        var mechanism = table.Numbering.Mechanism;
        foreach (var state in all.Where(_ => random.NextInt32(8) == 0))
        {
            if (!distances.TryGetValue(state, out var distance))
            {
                Assert.Null(table.ShortestPath(state));
                continue;
            }

            var path = table.ShortestPath(state)!;
            Assert.InRange(table.Metric.LengthOf(path), 0, distance);
            if (table.Origin == DistanceOrigin.FromBase)
            {
                Assert.Equal(state, mechanism.HomeState.Apply(path.Word));
                continue;
            }

            Assert.Equal(0, distances[state.Apply(path.Word)]);
            if (table.Metric.Kind == MetricKind.Step)
            {
                var best = mechanism.Steps.Where(step => distance > 0 && state.TryStep(step, out var next) && distances.GetValueOrDefault(next, -1) == distance - 1);
                Assert.Equal(best, table.BestSteps(state));
                Assert.Equal(Ways(state), table.CountShortestPaths(state));
            }
        }

        BigInteger Ways(State state) => distances[state] == 0
            ? BigInteger.One
            : mechanism.Steps.Aggregate(
                BigInteger.Zero, (sum, step) => state.TryStep(step, out var next) && distances.TryGetValue(next, out var left) && left == distances[state] - 1 ? sum + Ways(next) : sum);
    }

    // The home region, where it is small enough to search plainly.
    private static StateNumbering? Region(ulong seed)
    {
        var group = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed))).VertexGroupAt(0);
        return group.StateCount > MostStates ? null : StateNumbering.Of(group);
    }

    private static byte[] Written(DistanceTable table)
    {
        using var stream = new MemoryStream();
        table.Save(stream);
        return stream.ToArray();
    }
}
