using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>
/// Sliding boards on graphs: n vertices, n - 1 labelled tiles, one gap. The shape is the gap's vertex; the vertex group is that of the closed gap walks, on the tiles.
/// Main source: R. M. Wilson, <em>Graph puzzles, homotopy, and the alternating group</em>, J. Combin. Theory B 16 (1974) 86-96 (not opened; the theorem as quoted in the abstract of Chao Yang,
/// Discrete Math. 311 (2011) 1290-1294). theta(a,b,c): two vertices joined by three paths with a, b, c inner vertices.
/// </summary>
public class GraphBoardTests
{
    private static readonly Dictionary<string, (int Vertices, List<(int A, int B)> Edges)> Named = new()
    {
        ["K33"] = Graphs.CompleteBipartite(3, 3),
        ["K24"] = Graphs.CompleteBipartite(2, 4),
        ["cube"] = Graphs.Grid(2, 2, 2),
        ["K4"] = Graphs.Complete(4),
        ["K5"] = Graphs.Complete(5),
        ["K6"] = Graphs.Complete(6),
        ["Petersen"] = Graphs.Petersen(),
        ["wheel 5"] = Graphs.Wheel(5),
        ["7-cycle with a triangle-cutting chord"] = Graphs.Cycle(7).With((1, 3)),
        ["two triangles sharing a vertex"] = Graphs.Cycle(3).With((1, 4), (4, 5), (5, 1)),
        ["two 4-cycles sharing a vertex"] = Graphs.Cycle(4).With((1, 5), (5, 6), (6, 7), (7, 1)),
        ["two triangles joined by an edge"] = Graphs.Cycle(3).With((1, 4), (4, 5), (5, 6), (6, 4)),
        ["P5"] = Graphs.Path(5),
    };

    // Wilson's exception theta_0 = theta(1,2,2): PGL(2,5) on six tiles (quoted, not opened).
    [Fact]
    public void The_exceptional_graph_has_120_of_720_rearrangements_wherever_the_gap_is()
    {
        for (var gap = 1; gap <= 7; gap++)
        {
            var group = HasOrder(Graphs.Theta(1, 2, 2), gap, 120);
            Assert.Equal(840, group.StateCount);

            // PGL(2,5) is sharply 3-transitive.
            Assert.Equal([6, 5, 4], group.Group.Chain.OrbitLengths.ToArray());
        }
    }

    // Elementary: the tiles of a cycle can only go round.
    [Theory]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(7)]
    [InlineData(12)]
    public void On_a_cycle_the_tiles_can_only_go_round(int n) => Assert.Equal(n * (n - 1), HasOrder(Graphs.Cycle(n), n, n - 1).StateCount);

    // Wilson's theorem, bipartite: the alternating group.
    [Theory]
    [InlineData("1 1 1", 12)]
    [InlineData("0 2 2", 60)]
    [InlineData("1 1 3", 360)]
    [InlineData("2 2 2", 2520)]
    [InlineData("1 3 3", 20160)]
    [InlineData("2 2 4", 181440)]
    [InlineData("0 2 4", 2520)]
    [InlineData("K33", 60)]
    [InlineData("K24", 60)]
    [InlineData("cube", 2520)]
    public void Bipartite_graphs_give_the_alternating_group(string graph, int order)
    {
        var (vertices, _) = Find(graph);
        Assert.True(Graphs.IsBipartite(Find(graph)));
        Assert.Equal(Make.Factorial(vertices - 1) / 2, order);
        Assert.Equal(Make.Factorial(vertices) / 2, HasOrder(Find(graph), vertices, order).StateCount);
    }

    // Wilson's theorem, not bipartite: the symmetric group, of so many tiles.
    [Theory]
    [InlineData("0 1 1", 3)]
    [InlineData("0 1 2", 4)]
    [InlineData("1 1 2", 5)]
    [InlineData("0 1 3", 5)]
    [InlineData("1 2 3", 7)]
    [InlineData("0 3 3", 7)]
    [InlineData("1 2 4", 8)]
    [InlineData("K4", 3)]
    [InlineData("K5", 4)]
    [InlineData("K6", 5)]
    [InlineData("Petersen", 9)]
    [InlineData("wheel 5", 5)]
    [InlineData("7-cycle with a triangle-cutting chord", 6)]
    public void Other_graphs_give_the_symmetric_group(string graph, int tiles)
    {
        var (vertices, _) = Find(graph);
        Assert.False(Graphs.IsBipartite(Find(graph)));
        Assert.Equal(vertices - 1, tiles);
        Assert.Equal(Make.Factorial(vertices), HasOrder(Find(graph), 1, Make.Factorial(tiles)).StateCount);
    }

    // Wilson's theorem on random graphs: a cycle with ears is what a 2-connected graph is (Whitney 1932).
    [Fact]
    public void Random_2_connected_graphs_obey_the_theorem()
    {
        var random = new SeededRandom(1974);
        for (var trial = 0; trial < 60; trial++)
        {
            var graph = Graphs.Cycle(3 + random.NextInt32(3));
            for (var ears = 1 + random.NextInt32(3); ears > 0; ears--)
            {
                graph = AddEar(graph, random);
            }

            // The one graph with 7 vertices of degrees 2 and 3, two of them 3, and 8 edges that is an exception is tested above.
            if (graph.Vertices == 7 && graph.Edges.Count == 8)
            {
                continue;
            }

            var order = Make.Factorial(graph.Vertices - 1) / (Graphs.IsBipartite(graph) ? 2 : 1);
            HasOrder(graph, 1 + random.NextInt32(graph.Vertices), order);
        }
    }

    // Wilson's theorem; 16!/2 in OEIS A089484 (opened). The gap is in the last corner.
    [Theory]
    [InlineData(3, 2, 360)]
    [InlineData(4, 2, 20160)]
    [InlineData(3, 3, 181440)]
    [InlineData(4, 3, 239500800)]
    [InlineData(4, 4, 10461394944000)]
    [InlineData(5, 4, 1216451004088320000)]
    public void Boards_have_half_of_all_arrangements(int columns, int rows, long positions) => BoardHas(columns, rows, positions);

    [Fact]
    public void The_5x5_board_has_half_of_all_arrangements() => BoardHas(5, 5, BigInteger.Parse("7755605021665492992000000"));

    // Wilson's theorem.
    [Theory]
    [InlineData(2, 2, 2, "20160")]
    [InlineData(2, 2, 3, "239500800")]
    [InlineData(3, 3, 3, "5444434725209176080384000000")]
    public void Boxes_have_half_of_all_arrangements(int width, int height, int depth, string positions)
    {
        var grid = Graphs.Grid(width, height, depth);
        var group = HasOrder(grid, grid.Vertices, Make.Factorial(grid.Vertices - 1) / 2);
        Assert.Equal(BigInteger.Parse(positions), group.StateCount);
    }

    // Own computation: graphs that one vertex can cut; the gap starts at the joint.
    [Theory]
    [InlineData("two triangles sharing a vertex", 4)]
    [InlineData("two 4-cycles sharing a vertex", 9)]
    [InlineData("two triangles joined by an edge", 4)]
    [InlineData("P5", 1)]
    public void Where_one_vertex_cuts_the_graph_the_parts_turn_by_themselves(string graph, int order) => HasOrder(Find(graph), 1, order);

    private static void BoardHas(int columns, int rows, BigInteger positions)
    {
        var groupoid = ShapeGroupoid.Explore(Make.Board(columns, rows));
        var cells = columns * rows;
        Assert.Equal(cells, groupoid.ShapeCount);
        var group = groupoid.VertexGroupAt(0);
        Assert.Equal(Make.Factorial(cells - 1) / 2, group.Order);
        Assert.Equal(positions, group.StateCount);
        Assert.Equal(ChainProof.Proven, group.Group.Chain.Proof);

        // A slide for each of the two ways along each pair of neighbours: once it is seen as a free forward step.
        Assert.Equal((columns * (rows - 1)) + (rows * (columns - 1)), groupoid.FreeTurnCount);
        Assert.Equal(columns + rows - 2, groupoid.HomeRegion.Eccentricity);
        IsConjugateEverywhere(group);
    }

    // Checks the order at the gap, and that the groups of all other shapes are conjugate to it by a path there.
    private static VertexGroup HasOrder((int Vertices, List<(int A, int B)> Edges) graph, int gap, BigInteger order)
    {
        var groupoid = ShapeGroupoid.Explore(Make.GraphBoard(graph.Vertices, graph.Edges, gap));
        Assert.Equal(graph.Vertices, groupoid.ShapeCount);
        Assert.Equal(graph.Edges.Count, groupoid.FreeTurnCount);
        var home = groupoid.VertexGroupAt(0);
        Assert.Equal(order, home.Order);
        Assert.Equal(ChainProof.Proven, home.Group.Chain.Proof);
        Assert.DoesNotContain(gap - 1, home.Group.MovedOrbits.SelectMany(orbit => orbit));
        IsConjugateEverywhere(home);
        return home;
    }

    private static void IsConjugateEverywhere(VertexGroup home)
    {
        for (var shape = 1; shape < home.Groupoid.ShapeCount; shape++)
        {
            var group = home.Groupoid.VertexGroupAt(shape);
            Conjugacy.Holds(home, group);
            Assert.True(home.MovedTo(shape).Group.SameGroupAs(group.Group));
        }
    }

    private static (int Vertices, List<(int A, int B)> Edges) AddEar((int Vertices, List<(int A, int B)> Edges) graph, SeededRandom random)
    {
        var a = 1 + random.NextInt32(graph.Vertices);
        var b = 1 + ((a + random.NextInt32(graph.Vertices - 1)) % graph.Vertices);
        var inner = random.NextInt32(3);
        if (inner == 0 && graph.Edges.Exists(edge => edge == (a, b) || edge == (b, a)))
        {
            inner = 1;
        }

        var path = new List<int> { a };
        path.AddRange(Enumerable.Range(graph.Vertices + 1, inner));
        path.Add(b);
        return graph.With([.. path.Zip(path.Skip(1))]);
    }

    private static (int Vertices, List<(int A, int B)> Edges) Find(string graph) =>
        Named.TryGetValue(graph, out var found) ? found : Graphs.Theta([.. graph.Split(' ').Select(int.Parse)]);
}
