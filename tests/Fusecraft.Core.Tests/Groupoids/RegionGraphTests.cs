using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>
/// A board with one gap on a graph has that graph as its shape graph, so whatever is known of graphs can be asked of it; with one-way edges, of directed graphs.
/// </summary>
public class RegionGraphTests
{
    // Textbook facts of graphs: diameter, girth, bridges, cut vertices. Values from memory; elementary.
    [Theory]
    [InlineData("Petersen", 2, 5, 0, 0)]
    [InlineData("K5", 1, 3, 0, 0)]
    [InlineData("K33", 2, 4, 0, 0)]
    [InlineData("cube", 3, 4, 0, 0)]
    [InlineData("7-cycle", 3, 7, 0, 0)]
    [InlineData("12-cycle", 6, 12, 0, 0)]
    [InlineData("wheel 5", 2, 3, 0, 0)]
    [InlineData("path 6", 5, -1, 5, 4)]
    [InlineData("two triangles sharing a vertex", 2, 3, 0, 1)]
    [InlineData("two triangles joined by an edge", 3, 3, 1, 2)]
    public void Known_graphs_have_their_known_figures(string name, int diameter, int girth, int bridges, int cutVertices)
    {
        var graph = GraphOf(name switch
        {
            "Petersen" => Graphs.Petersen(),
            "K5" => Graphs.Complete(5),
            "K33" => Graphs.CompleteBipartite(3, 3),
            "cube" => Graphs.Grid(2, 2, 2),
            "7-cycle" => Graphs.Cycle(7),
            "12-cycle" => Graphs.Cycle(12),
            "wheel 5" => Graphs.Wheel(5),
            "path 6" => Graphs.Path(6),
            "two triangles sharing a vertex" => Graphs.Cycle(3).With((1, 4), (4, 5), (5, 1)),
            _ => Graphs.Cycle(3).With((1, 4), (4, 5), (5, 6), (6, 4)),
        });

        var bounds = graph.Diameter();
        Assert.True(bounds.IsExact);
        Assert.Equal(diameter, bounds.Lower);
        Assert.Equal(girth, graph.ShortestLoops().Where(length => length > 0).DefaultIfEmpty(-1).Min());
        Assert.Equal(bridges, graph.Bridges().Length);
        Assert.Equal(cutVertices, graph.CutShapes().Length);
    }

    // Elementary: on a tree the ways are unique, so all between two vertices are gates.
    [Fact]
    public void On_a_path_everything_between_is_a_gate()
    {
        var graph = GraphOf(Graphs.Path(6));
        var gates = graph.GatesTo(0);
        Assert.Equal([4, 3, 2, 1], gates.GatesOf(5).ToArray());
        Assert.Empty(gates.GatesOf(1));
        Assert.Empty(gates.GatesOf(0));
        Assert.Equal([5, 4, 3, 2, 1, 0], Enumerable.Range(0, 6).Select(gates.CountBehind));
        Assert.Equal(0, gates.Target);
    }

    // A loop may come back along the way it went out: three steps out, round the triangle, three back.
    [Fact]
    public void Who_stands_on_a_tail_has_a_loop_by_way_of_its_end()
    {
        var graph = GraphOf(Graphs.Cycle(3).With((1, 4), (4, 5), (5, 6)));
        Assert.Equal([3, 3, 3, 5, 7, 9], graph.ShortestLoops().ToArray());
        Assert.Equal(9, graph.ShortestLoopAt(5));
    }

    // Elementary: on a directed cycle everything hangs on everything.
    [Fact]
    public void On_a_one_way_cycle_no_arrow_and_no_shape_can_be_left_out()
    {
        var groupoid = OneWay(5, [(1, 2), (2, 3), (3, 4), (4, 5), (5, 1)]);
        var graph = groupoid.GraphOf(0);
        Assert.Equal(new DiameterBounds(4, 4, 0, 4), graph.Diameter());
        Assert.Equal(5, graph.Bridges().Length);
        Assert.All(graph.Bridges(), bridge => Assert.Null(bridge.Back));
        Assert.Equal([0, 1, 2, 3, 4], graph.CutShapes().ToArray());
        Assert.Equal([0, 4, 3, 2, 1], groupoid.DistancesBack().ToArray());
        Assert.Equal([3, 4], graph.GatesTo(0).GatesOf(2).ToArray());
        Assert.Equal([5, 5, 5, 5, 5], graph.ShortestLoops().ToArray());
    }

    // A turn of order two has two steps that do the same; they are one arrow, which undoes itself, and so a bridge.
    [Fact]
    public void A_half_turn_and_its_opposite_are_one_arrow()
    {
        var graph = ShapeGroupoid.Explore(Make.Custom(3, [Make.Turn("A", "(1 2)")], default, Make.Mark("pin", "1"))).GraphOf(0);
        Assert.Equal(2, graph.ArrowCount);
        var bridge = Assert.Single(graph.Bridges());
        Assert.Equal((0, 1), (bridge.There.Source, bridge.There.Target));
        Assert.Equal([-1, -1], graph.ShortestLoops().ToArray());
    }

    // A quarter turn leads to another shape than its opposite does, unless the shape comes back after two: then there are two ways.
    [Fact]
    public void A_turn_and_its_opposite_that_do_different_things_are_two_arrows()
    {
        var graph = ShapeGroupoid.Explore(Make.Custom(4, [Make.Turn("A", "(1 2 3 4)")], default, Make.Mark("pin", "1", "3"))).GraphOf(0);
        Assert.Equal(4, graph.ArrowCount);
        Assert.Empty(graph.Bridges());
        Assert.Equal([2, 2], graph.ShortestLoops().ToArray());
    }

    // Shapes and arrows of fused cubes are own figures of independent programs (see FusedCubeTests).
    [Theory]
    [InlineData(24, 240, "UFR UF")]
    [InlineData(4, 40, "UF U")]
    [InlineData(1, 6, "DBL DB DL BL D B L core")]
    [InlineData(1, 4, "DBL DL DFL BL L FL DB D DF B core F")]
    [InlineData(240, 1992, "UFR UF", "DBL DB")]
    public void Profiles_of_fused_cubes_add_up(int shapes, int arrows, params string[] blocks)
    {
        var groupoid = ShapeGroupoid.Explore(Make.Cube(3, "", blocks));
        var branching = groupoid.BranchingProfile();
        Assert.Equal(shapes, branching.Sum());
        Assert.Equal(arrows, branching.Select((count, free) => count * free).Sum());
        Assert.Equal(shapes, groupoid.DepthProfile().Sum());
        Assert.Equal(arrows, groupoid.GraphOf(0).ArrowCount);

        // Every quarter turn can be undone, so it is as far back as there.
        Assert.Equal(Enumerable.Range(0, shapes).Select(groupoid.DistanceOf), groupoid.DistancesBack());
        Assert.Equal(groupoid.DepthProfile().Length - 1, groupoid.GraphOf(0).Eccentricity(0));
    }

    // Own figures, computed with this library, for regression; the numbers of shapes and dead ends are told in the files.
    [Theory]
    [InlineData("ferry-board", 5, 0, 0, 0)]
    [InlineData("flood-tower", 8, 0, 0, 0)]
    [InlineData("lock-basin", 7, 7, 6, 0)]
    [InlineData("mill-race", 6, 5, 6, 0)]
    [InlineData("seven-piers", 3, 0, 0, 0)]
    [InlineData("weir-gate", 13, 0, 8, 284)]
    public void Home_regions_of_the_workshop_have_these_figures(string puzzle, int diameter, int bridges, int cutShapes, int deadEnds)
    {
        var groupoid = ShapeGroupoid.Explore(MechanismFile.Load(Repository.PathOf($"docs/workshop/{puzzle}.fuse.json")));
        var graph = groupoid.GraphOf(0);
        Assert.Equal((diameter, diameter), (graph.Diameter().Lower, graph.Diameter().Upper));
        Assert.Equal(bridges, graph.Bridges().Length);
        Assert.Equal(cutShapes, graph.CutShapes().Length);
        Assert.Equal(deadEnds, groupoid.DeadEnds().Length);
        Assert.Empty(groupoid.StuckShapes());
    }

    [Fact]
    public void Random_undirected_graphs_are_cut_as_by_leaving_out()
    {
        var random = new SeededRandom(4);
        var withCuts = 0;
        for (var round = 0; round < 60; round++)
        {
            // A random tree and a few chords.
            var count = 3 + random.NextInt32(10);
            var edges = Enumerable.Range(2, count - 1).Select(vertex => (A: 1 + random.NextInt32(vertex - 1), B: vertex)).ToHashSet();
            for (var chords = random.NextInt32(5); chords > 0; chords--)
            {
                var (a, b) = (1 + random.NextInt32(count), 1 + random.NextInt32(count));
                edges.UnionWith(a == b ? [] : [(Math.Min(a, b), Math.Max(a, b))]);
            }

            var graph = GraphOf((count, [.. edges]));
            withCuts += Check(graph, 2 * edges.Count);
        }

        Assert.InRange(withCuts, 20, 59);
    }

    [Fact]
    public void Random_directed_graphs_are_cut_as_by_leaving_out()
    {
        var random = new SeededRandom(5);
        var withCuts = 0;
        for (var round = 0; round < 60; round++)
        {
            var count = 3 + random.NextInt32(10);
            var arcs = RandomArcs(random, count, random.NextInt32(count * count));
            withCuts += Check(OneWay(count, arcs).GraphOf(0), arcs.Count);
        }

        Assert.InRange(withCuts, 20, 59);
    }

    // Large enough that some hundred shapes are searched from at once.
    [Theory]
    [InlineData(700, 300)]
    [InlineData(400, 1200)]
    public void Diameters_of_large_directed_graphs_are_exact_or_bounded(int count, int chords)
    {
        var arcs = RandomArcs(new SeededRandom(6), count, chords);
        var groupoid = OneWay(count, arcs);
        var graph = groupoid.GraphOf(0);
        var naive = Naive(groupoid, arcs);
        var right = Enumerable.Range(0, count).Max(vertex => naive.DistancesFrom(vertex).Max());

        var exact = graph.Diameter();
        Assert.Equal((right, right), (exact.Lower, exact.Upper));
        Assert.Equal(right, naive.DistancesFrom(exact.From)[exact.To]);

        var reports = new List<DiameterBounds>();
        var bounded = graph.Diameter(new DiameterOptions { MaxArrowsSeen = 0 }, new Reports(reports));
        Assert.False(bounded.IsExact);
        Assert.InRange(right, bounded.Lower, bounded.Upper);
        Assert.Equal(bounded, reports[^1]);
    }

    [Fact]
    public void Everything_ends_early_when_asked_to()
    {
        var groupoid = OneWay(5, [(1, 2), (2, 3), (3, 4), (4, 5), (5, 1)]);
        var graph = groupoid.GraphOf(0);
        var cancelled = new CancellationToken(canceled: true);
        Assert.Throws<OperationCanceledException>(() => groupoid.GraphOf(0, null, cancelled));
        Assert.Throws<OperationCanceledException>(() => groupoid.DeadEnds(cancelled));
        Assert.Throws<OperationCanceledException>(() => groupoid.StuckShapes(cancelled));
        Assert.Throws<OperationCanceledException>(() => groupoid.BranchingProfile(cancelled));
        Assert.Throws<OperationCanceledException>(() => groupoid.DistancesBack(cancelled));
        Assert.Throws<OperationCanceledException>(() => graph.Bridges(cancelled));
        Assert.Throws<OperationCanceledException>(() => graph.CutShapes(cancelled));
        Assert.Throws<OperationCanceledException>(() => graph.GatesTo(0, cancelled));
        Assert.Throws<OperationCanceledException>(() => graph.ShortestLoops(null, cancelled));
        Assert.Throws<OperationCanceledException>(() => graph.Diameter(null, null, cancelled));
    }

    [Fact]
    public void What_is_not_known_or_not_there_is_refused()
    {
        var partial = ShapeGroupoid.Explore(Make.Cube(3, "", "UFR UF"), new ExplorationOptions { MaxShapes = 10 });
        Assert.Throws<InvalidOperationException>(() => partial.GraphOf(0));
        Assert.Throws<InvalidOperationException>(() => partial.DeadEnds());
        Assert.Throws<InvalidOperationException>(() => partial.StuckShapes());
        Assert.Throws<InvalidOperationException>(() => partial.BranchingProfile());
        Assert.Throws<InvalidOperationException>(() => partial.DistancesBack());
        Assert.Equal(10, partial.DepthProfile().Sum());

        var groupoid = OneWay(4, [(1, 2), (2, 1), (2, 3), (3, 4), (4, 3)]);
        Assert.Throws<ArgumentOutOfRangeException>("region", () => groupoid.GraphOf(2));
        Assert.Throws<ArgumentOutOfRangeException>("shape", () => groupoid.GraphOf(0).DistancesFrom(2));
        Assert.Throws<ArgumentOutOfRangeException>("shape", () => groupoid.GraphOf(1).GatesTo(0));
        Assert.Throws<ArgumentOutOfRangeException>("shape", () => groupoid.GraphOf(1).Eccentricity(-1));
        Assert.Throws<ArgumentOutOfRangeException>("options", () => groupoid.GraphOf(1).Diameter(new DiameterOptions { MaxArrowsSeen = -1 }));
    }

    private static int Check(RegionGraph graph, int arrows)
    {
        var groupoid = graph.Groupoid;
        var naive = new NaiveGraph(groupoid.ShapeCount);
        foreach (var shape in graph.Shapes)
        {
            foreach (var step in groupoid.ShapeAt(shape).FreeSteps())
            {
                naive.Add(shape, groupoid.After(shape, step), step.Permutation.ToString(), step.Permutation.Inverse().ToString());
            }
        }

        Assert.Equal(arrows, naive.Arrows.Count());
        Assert.Equal(arrows, graph.ArrowCount);
        Assert.Equal(naive.CutVertices(), graph.CutShapes());
        Assert.Equal(naive.Bridges().Select(bridge => (bridge.From, bridge.To)).ToHashSet(), graph.Bridges().Select(bridge => (bridge.There.Source, bridge.There.Target)).ToHashSet());
        Assert.Equal(naive.Bridges().Count, graph.Bridges().Length);
        Assert.Equal(graph.Shapes.Select(naive.ShortestReducedLoop), graph.ShortestLoops());
        return graph.CutShapes().IsEmpty ? 0 : 1;
    }

    private static RegionGraph GraphOf((int Vertices, List<(int A, int B)> Edges) graph) => ShapeGroupoid.Explore(Make.GraphBoard(graph.Vertices, graph.Edges, 1)).GraphOf(0);

    // A cycle through all vertices in a random order, so that all can reach each other, and chords.
    private static HashSet<(int From, int To)> RandomArcs(SeededRandom random, int count, int chords)
    {
        var order = random.NextPermutation(count);
        var arcs = Enumerable.Range(0, count).Select(i => (order[i] + 1, order[(i + 1) % count] + 1)).ToHashSet();
        for (; chords > 0; chords--)
        {
            var (from, to) = (1 + random.NextInt32(count), 1 + random.NextInt32(count));
            arcs.UnionWith(from == to ? [] : [(from, to)]);
        }

        return arcs;
    }

    /// <summary>A gap that rides along arcs between the sites 1 … n, from site 1.</summary>
    private static ShapeGroupoid OneWay(int sites, IEnumerable<(int From, int To)> arcs) => ShapeGroupoid.Explore(Make.Custom(
        sites,
        arcs.Select((arc, i) => new TurnDefinition { Name = $"t{i}", Moves = $"({arc.From} {arc.To})", Guard = Make.Needs($"gap@{arc.From}"), IsOneWay = true }),
        default,
        Make.Mark("gap", "1")));

    private static NaiveGraph Naive(ShapeGroupoid groupoid, IEnumerable<(int From, int To)> arcs)
    {
        var shapeOf = Enumerable.Range(0, groupoid.ShapeCount).ToDictionary(shape => groupoid.ShapeAt(shape).Marks.Single().Site + 1);
        var naive = new NaiveGraph(groupoid.ShapeCount);
        foreach (var (from, to) in arcs)
        {
            naive.Add(shapeOf[from], shapeOf[to], $"{from} {to}", $"{to} {from}");
        }

        return naive;
    }

    private sealed class Reports(List<DiameterBounds> reports) : IProgress<DiameterBounds>
    {
        public void Report(DiameterBounds value) => reports.Add(value);
    }
}
