using FsCheck.Xunit;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>What a region's graph says, on random small mechanisms, against trying everything.</summary>
public class RegionGraphLawTests
{
    private const ulong FixedSeeds = RandomMechanisms.FixedSeeds;

    /// <summary>Larger regions take too long to cut apart arrow by arrow.</summary>
    private const int MaxShapesToCut = 40;

    [Property(MaxTest = 100)]
    public void Lists_and_profiles_are_those_of_a_plain_reading(ulong seed) => CheckLists(seed);

    [Fact]
    public void Lists_and_profiles_are_those_of_a_plain_reading_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckLists);

    [Property(MaxTest = 50)]
    public void Distances_eccentricities_and_diameters_are_those_of_flooding(ulong seed) => CheckDistances(seed);

    [Fact]
    public void Distances_eccentricities_and_diameters_are_those_of_flooding_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckDistances);

    [Property(MaxTest = 50)]
    public void Bridges_cut_shapes_and_gates_are_what_cannot_be_left_out(ulong seed) => CheckCuts(seed);

    [Fact]
    public void Bridges_cut_shapes_and_gates_are_what_cannot_be_left_out_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckCuts);

    [Property(MaxTest = 50)]
    public void Shortest_loops_are_those_of_walking_over_arrows(ulong seed) => CheckLoops(seed);

    [Fact]
    public void Shortest_loops_are_those_of_walking_over_arrows_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckLoops);

    [Fact]
    public void The_random_regions_show_everything_that_matters()
    {
        var counts = new Dictionary<string, int>();
        for (var seed = 0UL; seed < FixedSeeds; seed++)
        {
            var groupoid = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed)));
            Count("passages", !groupoid.Passages().IsEmpty);
            foreach (var region in groupoid.Regions)
            {
                var graph = groupoid.GraphOf(region.Index);
                var bridges = graph.Bridges();
                var cutShapes = graph.CutShapes();
                var loops = graph.ShortestLoops();
                var isReversible = groupoid.Mechanism.IsReversible;
                Count("bridges where every step can be undone", isReversible && !bridges.IsEmpty);
                Count("bridges that can be undone beside one-way steps", !isReversible && bridges.Any(bridge => bridge.Back is not null));
                Count("bridges that cannot be undone", bridges.Any(bridge => bridge.Back is null));
                Count("cut shapes beside one-way steps", !isReversible && !cutShapes.IsEmpty);
                Count("several shapes and no cut shape", region.ShapeCount > 3 && cutShapes.IsEmpty);
                Count("shapes without a loop", loops.Contains(-1));
                Count("loops of three and more steps", loops.Max() >= 3);
                Count("different distances there and back", !graph.DistancesFrom(region.FirstShape).SequenceEqual(graph.DistancesTo(region.FirstShape)));
                Count("gates", graph.Shapes.Any(shape => !graph.GatesTo(region.FirstShape).GatesOf(shape).IsEmpty));
            }
        }

        Assert.All(counts, pair => Assert.True(pair.Value >= 10, $"only {pair.Value} have {pair.Key}"));

        void Count(string what, bool has) => counts[what] = counts.GetValueOrDefault(what) + (has ? 1 : 0);
    }

    private static void CheckLists(ulong seed)
    {
        var definition = RandomMechanisms.From(seed);
        var shapes = new NaiveMechanism(definition).Shapes();
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
        var arrows = Enumerable.Range(0, groupoid.ShapeCount).Select(shape => shapes[NaiveReading.Of(groupoid.ShapeAt(shape))].Arrows).ToList();
        var turns = arrows.ConvertAll(list => list.Select(arrow => arrow.Step.Turn).Distinct().Count());
        Assert.Equal(Enumerable.Range(0, turns.Count).Where(shape => turns[shape] == 1), groupoid.DeadEnds());
        Assert.Equal(Enumerable.Range(0, turns.Count).Where(shape => turns[shape] == 0), groupoid.StuckShapes());
        Assert.Equal(groupoid.DeadEndCount, groupoid.DeadEnds().Length);
        Assert.Equal(groupoid.StuckShapeCount, groupoid.StuckShapes().Length);
        Assert.Equal(Enumerable.Range(0, 1 + arrows.Max(list => list.Count)).Select(free => arrows.Count(list => list.Count == free)), groupoid.BranchingProfile());
        Assert.Equal(Enumerable.Range(0, 1 + shapes.Values.Max(shape => shape.Distance)).Select(depth => shapes.Values.Count(shape => shape.Distance == depth)), groupoid.DepthProfile());
        Assert.Equal(groupoid.PassageCount, groupoid.Passages().Length);
        Assert.All(groupoid.Passages(), passage =>
        {
            Assert.Equal(passage.Target, groupoid.After(passage.Source, passage.Step));
            Assert.NotEqual(groupoid.RegionOf(passage.Source), groupoid.RegionOf(passage.Target));
        });
    }

    private static void CheckDistances(ulong seed)
    {
        foreach (var (graph, naive) in Read(seed))
        {
            var groupoid = graph.Groupoid;
            var distances = Enumerable.Range(0, naive.Vertices).Select(vertex => naive.DistancesFrom(vertex)).ToArray();
            var back = groupoid.DistancesBack();
            var eccentricities = Array.ConvertAll(distances, from => from.Max());
            for (var i = 0; i < distances.Length; i++)
            {
                Assert.Equal(distances[i], graph.DistancesFrom(graph.Shapes[i]));
                Assert.Equal(distances.Select(from => from[i]), graph.DistancesTo(graph.Shapes[i]));
                Assert.Equal(eccentricities[i], graph.Eccentricity(graph.Shapes[i]));
                Assert.Equal(graph.Region.Index == 0 ? distances[i][0] : -1, back[graph.Shapes[i]]);
            }

            Assert.Equal(naive.Arrows.Count(), graph.ArrowCount);
            var diameter = graph.Diameter();
            Assert.True(diameter.IsExact);
            Assert.Equal(eccentricities.Max(), diameter.Lower);
            foreach (var bounds in (DiameterBounds[])[diameter, graph.Diameter(new DiameterOptions { MaxArrowsSeen = 0 })])
            {
                Assert.InRange(diameter.Lower, bounds.Lower, bounds.Upper);
                Assert.Equal(bounds.Lower, distances[graph.Shapes.IndexOf(bounds.From)][graph.Shapes.IndexOf(bounds.To)]);
            }
        }
    }

    private static void CheckCuts(ulong seed)
    {
        foreach (var (graph, naive) in Read(seed).Where(pair => pair.Naive.Vertices <= MaxShapesToCut))
        {
            var mechanism = graph.Groupoid.Mechanism;
            var shapes = graph.Shapes;
            Assert.Equal(naive.CutVertices().Select(vertex => shapes[vertex]), graph.CutShapes());
            var bridges = graph.Bridges();
            Assert.Equal(naive.Bridges(), bridges.Select(bridge => (shapes.IndexOf(bridge.There.Source), shapes.IndexOf(bridge.There.Target), Images(bridge.There.Step))).ToHashSet());
            foreach (var (there, back) in bridges)
            {
                Assert.Equal(there.Target, graph.Groupoid.After(there.Source, there.Step));
                Assert.Equal(naive.Arrows.Any(arrow => shapes[arrow.From] == there.Target && arrow.What == Images(there.Step, inverse: true)), back is not null);
                if (back is { } undoing)
                {
                    Assert.Equal((there.Target, there.Source), (undoing.Source, graph.Groupoid.After(undoing.Source, undoing.Step)));
                    Assert.Equal(there.Step.Permutation.Inverse(), undoing.Step.Permutation);
                }
            }

            for (var target = 0; target < naive.Vertices; target += 3)
            {
                var gates = graph.GatesTo(shapes[target]);
                var all = Enumerable.Range(0, naive.Vertices).Select(from => gates.GatesOf(shapes[from]).Select(gate => shapes.IndexOf(gate)).ToList()).ToList();
                Assert.Equal(shapes[target], gates.Target);
                for (var without = 0; without < naive.Vertices; without++)
                {
                    // Who can no longer reach the target has this shape as a gate.
                    var stranded = Enumerable.Range(0, naive.Vertices).Where(from => from != without && naive.DistancesFrom(from, to => to != without)[target] < 0).ToList();
                    Assert.Equal(stranded.Count, gates.CountBehind(shapes[without]));
                    Assert.Equal(without == target ? [] : stranded, Enumerable.Range(0, naive.Vertices).Where(from => all[from].Contains(without)));
                }

                for (var from = 0; from < naive.Vertices; from++)
                {
                    // In the order in which they are passed.
                    var distances = naive.DistancesFrom(from);
                    Assert.Equal(all[from].OrderBy(gate => distances[gate]), all[from]);
                }
            }

            string Images(Step step, bool inverse = false)
            {
                var permutation = inverse ? step.Permutation.Inverse() : step.Permutation;
                return string.Join(' ', Enumerable.Range(0, mechanism.SiteCount).Select(site => mechanism.SiteNames[permutation[site]]));
            }
        }
    }

    private static void CheckLoops(ulong seed)
    {
        foreach (var (graph, naive) in Read(seed))
        {
            var lengths = Enumerable.Range(0, naive.Vertices).Select(naive.ShortestReducedLoop).ToList();
            Assert.Equal(lengths, graph.ShortestLoops());
            Assert.Equal(lengths[^1], graph.ShortestLoopAt(graph.Shapes[^1]));
        }
    }

    private static IEnumerable<(RegionGraph Graph, NaiveGraph Naive)> Read(ulong seed)
    {
        var definition = RandomMechanisms.From(seed);
        var naive = new NaiveMechanism(definition);
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
        foreach (var region in groupoid.Regions)
        {
            var graph = groupoid.GraphOf(region.Index);
            Assert.Equal(Enumerable.Range(0, groupoid.ShapeCount).Where(shape => groupoid.RegionOf(shape) == region.Index), graph.Shapes);
            yield return (graph, NaiveGraph.Of(naive, [.. graph.Shapes.Select(shape => NaiveReading.Of(groupoid.ShapeAt(shape)))]));
        }
    }
}
