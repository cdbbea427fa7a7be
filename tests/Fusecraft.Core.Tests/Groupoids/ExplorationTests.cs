using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>Exploration finds and numbers exactly what a plain search does, on any number of threads and however the shapes are held.</summary>
public class ExplorationTests
{
    private static readonly Lazy<Mechanism> Canal = new(() => Make.Cube(5, "", "1,1,2 1,1,3", "5,2,1 5,3,1", "5,4,1 5,5,1", "2,1,5 3,1,5", "4,1,1 5,1,1"));

    // Two words, and tracks of several kinds.
    private static readonly Lazy<Mechanism> Wide = new(() => Make.Cube(5, "", "1,1,2 1,1,3", "5,4,1 5,5,1", "1,5,2 1,4,2", "5,5,3 5,4,3"));

    private static readonly Lazy<PlainExplorer> PlainCanal = new(() => new PlainExplorer(Canal.Value));

    private static readonly Lazy<PlainExplorer> PlainWide = new(() => new PlainExplorer(Wide.Value));

    [Fact]
    public void Random_mechanisms_are_explored_as_by_a_plain_search()
    {
        for (var seed = 0UL; seed < 300; seed++)
        {
            var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
            IsAs(new PlainExplorer(mechanism), Explore(mechanism, 1 + (int)(seed % 4)));
        }
    }

    [Theory]
    [InlineData(1, true)]
    [InlineData(2, true)]
    [InlineData(4, true)]
    [InlineData(1, false)]
    [InlineData(2, false)]
    [InlineData(4, false)]
    public void Threads_and_the_way_of_holding_shapes_change_nothing(int threads, bool mayUseProduct)
    {
        Assert.Equal((1, 2), (Canal.Value.Board.Words, Wide.Value.Board.Words));
        foreach (var (mechanism, plain) in new[] { (Canal.Value, PlainCanal.Value), (Wide.Value, PlainWide.Value) })
        {
            var explorer = Explore(mechanism, threads, mayUseProduct: mayUseProduct);
            Assert.Equal(mayUseProduct, explorer.Shapes is ProductShapes<uint>);
            Assert.True(explorer.Shapes.Count > 200_000, $"{explorer.Shapes.Count} are too few to say much");
            IsAs(plain, explorer);
        }
    }

    [Fact]
    public void Three_tracks_too_long_to_be_joined_are_as_good_as_keys()
    {
        var builder = MechanismBuilder.Custom("Rings", 3 * 66);
        for (var ring = 0; ring < 3; ring++)
        {
            var first = (66 * ring) + 1;
            builder.Turn($"T{ring + 1}", $"({string.Join(' ', Enumerable.Range(first, 66))})").Block($"{first}", $"{first + 1}");
        }

        IsAs(new PlainExplorer(builder.Build()), ExploreAsProduct(builder.Build(), 3, 66 * 66 * 66));
    }

    [Fact]
    public void Guards_with_alternatives_are_as_good_on_tracks()
    {
        // Three rings, each with a pin; the first turns only while one of the other pins is on one of ten sites.
        var builder = MechanismBuilder.Custom("Locks", 100);
        var open = Enumerable.Range(1, 5).SelectMany(i => new[] { $"pin@{30 + i}", $"pin@{60 + i}" }).Select(mark => (Action<GuardBuilder>)(guard => guard.Needs(mark))).ToArray();
        builder.Turn("A", $"({string.Join(' ', Enumerable.Range(1, 30))})", turn => turn.AnyOf(open));
        builder.Turn("B", $"({string.Join(' ', Enumerable.Range(31, 30))})", turn => turn.BarredBy("pin@7"));
        builder.Turn("C", $"({string.Join(' ', Enumerable.Range(61, 40))})", turn => turn.OneWay());
        builder.Mark("pin", "1", "31", "61");
        var plain = new PlainExplorer(builder.Build());
        IsAs(plain, ExploreAsProduct(builder.Build(), 2, plain.Count));
    }

    // Own figures, by an independent program.
    [Fact]
    public void A_5x5x5_with_six_blocks_has_the_figures_of_an_independent_program()
    {
        var groupoid = ShapeGroupoid.Explore(Make.Cube(5, "", "1,1,2 1,1,3", "5,2,1 5,3,1", "5,4,5 5,5,5", "5,4,1 5,5,1", "4,1,1 5,1,1", "2,1,5 3,1,5"));
        Assert.Equal((1748304, 11903832), (groupoid.ShapeCount, groupoid.FreeTurnCount));
    }

    [Theory]
    [InlineData(1, true)]
    [InlineData(16_000, true)]
    [InlineData(17_000, true)]
    [InlineData(90_001, true)]
    [InlineData(90_001, false)]
    public void A_budget_of_shapes_ends_where_a_plain_search_would(int maxShapes, bool mayUseProduct)
    {
        var plain = new PlainExplorer(Canal.Value, maxShapes);
        foreach (var threads in new[] { 1, 3 })
        {
            IsAs(plain, Explore(Canal.Value, threads, maxShapes, mayUseProduct: mayUseProduct));
        }
    }

    [Theory]
    [InlineData(1, 1)]
    [InlineData(100_000, 1000)]
    [InlineData(1_000_000, 10_000)]
    [InlineData(3_000_000, 70_000)]
    public void A_budget_of_bytes_ends_with_fewer_shapes_and_says_so(long maxBytes, int atLeast)
    {
        var explorers = new[] { 1, 2 }.Select(threads => Explore(Canal.Value, threads, maxBytes: maxBytes)).ToList();
        Assert.All(explorers, explorer =>
        {
            Assert.False(explorer.IsComplete);
            Assert.InRange(explorer.Shapes.Count, atLeast, PlainCanal.Value.Count - 1);
            Assert.True(explorer.Shapes.Count == 1 || explorer.Shapes.BytesFor(explorer.Shapes.Count) <= maxBytes);
        });
        IsAs(new PlainExplorer(Canal.Value, explorers[0].Shapes.Count), explorers[1]);
    }

    [Fact]
    public void Limits_below_one_are_refused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => ShapeGroupoid.Explore(Canal.Value, new ExplorationOptions { MaxBytes = 0 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => ShapeGroupoid.Explore(Canal.Value, new ExplorationOptions { DegreeOfParallelism = 0 }));
    }

    [Fact]
    public void Progress_only_grows_and_a_cancelled_exploration_stops_half_way()
    {
        using var source = new CancellationTokenSource();
        var reports = new List<ExplorationProgress>();
        var progress = new Recorder(report =>
        {
            reports.Add(report);
            if (report.ShapesExplored > 50_000)
            {
                source.Cancel();
            }
        });

        Assert.ThrowsAny<OperationCanceledException>(() => ShapeGroupoid.Explore(Canal.Value, null, progress, source.Token));
        Assert.True(reports.Count > 3);
        Assert.All(reports.Zip(reports.Skip(1)), pair => Assert.True(
            pair.First.ShapesExplored < pair.Second.ShapesExplored && pair.First.ShapesFound <= pair.Second.ShapesFound && pair.Second.ShapesExplored <= pair.Second.ShapesFound));
    }

    private static ShapeExplorer Explore(Mechanism mechanism, int threads, int maxShapes = int.MaxValue - 1, long maxBytes = long.MaxValue, bool mayUseProduct = true)
    {
        var options = new ExplorationOptions { DegreeOfParallelism = threads, MaxShapes = maxShapes, MaxBytes = maxBytes };
        var explorer = new ShapeExplorer(mechanism, options, null, default) { MayUseProduct = mayUseProduct };
        explorer.Run(mechanism.Home.Key);
        return explorer;
    }

    private static ShapeExplorer ExploreAsProduct(Mechanism mechanism, int tracks, int shapes)
    {
        var explorer = Explore(mechanism, 2);
        Assert.Equal(shapes, explorer.Shapes.Count);
        Assert.IsType<ProductShapes<uint>>(explorer.Shapes);
        Assert.Equal(tracks, mechanism.Board.ProductWithin(int.MaxValue)!.Tracks.Length);
        return explorer;
    }

    private static void IsAs(PlainExplorer plain, ShapeExplorer explorer)
    {
        var shapes = explorer.Shapes;
        Assert.Equal(
            (plain.Count, plain.IsComplete, plain.FreeTurns, plain.DeadEnds, plain.StuckShapes),
            (shapes.Count, explorer.IsComplete, explorer.FreeTurns, explorer.DeadEnds, explorer.StuckShapes));
        Assert.Equal(plain.LevelStarts, explorer.LevelStarts);
        var key = new ulong[shapes.Words];
        for (var shape = 0; shape < shapes.Count; shape++)
        {
            shapes.CopyKey(shape, key);
            if (!plain.Key(shape).SequenceEqual(key) || shapes.Find(key) != shape || plain.Parents[shape] != shapes.Parent(shape) || plain.ParentSteps[shape] != shapes.ParentStep(shape))
            {
                Assert.Fail($"Shape {shape} is another one.");
            }
        }

        // Steps of some shapes, and one that was not found.
        var moves = explorer.Shapes.Mechanism.Board.Moves;
        var next = new ulong[shapes.Words];
        for (var shape = 0; shape < shapes.Count; shape += 1 + (shapes.Count / 500))
        {
            for (var step = 0; step < moves.Length; step++)
            {
                var isFree = moves[step].IsFree(plain.Key(shape));
                if (isFree)
                {
                    moves[step].Move(plain.Key(shape), next);
                }

                Assert.Equal(isFree ? shapes.Find(next) : -1, shapes.Target(shape, step));
            }
        }

        Array.Fill(key, 0UL);
        Assert.Equal(plain.Count == 1 && plain.Key(0).SequenceEqual(key) ? 0 : -1, shapes.Find(key));
    }

    private sealed class Recorder(Action<ExplorationProgress> note) : IProgress<ExplorationProgress>
    {
        public void Report(ExplorationProgress value) => note(value);
    }
}
