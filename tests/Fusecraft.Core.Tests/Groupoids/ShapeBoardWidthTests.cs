using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Groupoids;

/// <summary>Keys of every width give the same answers; and budgets, cancellation and partial composition say what they did.</summary>
public class ShapeBoardWidthTests
{
    // Rings of n sites with a pair of neighbours fused; each ring turns on its own and has n shapes, and n slots.
    [Theory]
    [InlineData(1, 5, 1)]
    [InlineData(2, 32, 1)]
    [InlineData(2, 33, 2)]
    [InlineData(2, 100, 4)]
    [InlineData(2, 200, 8)]
    [InlineData(3, 25, 2)]
    [InlineData(2, 300, 10)]
    public void Rings_that_turn_alone_have_the_product_of_their_shapes(int rings, int size, int words)
    {
        var builder = MechanismBuilder.Custom("Rings", rings * size);
        for (var ring = 0; ring < rings; ring++)
        {
            var first = (ring * size) + 1;
            builder.Turn($"T{ring + 1}", $"({string.Join(' ', Enumerable.Range(first, size))})").Block($"{first}", $"{first + 1}");
        }

        var mechanism = builder.Build();
        var groupoid = ShapeGroupoid.Explore(mechanism);

        Assert.Equal(words, mechanism.Board.Words);
        Assert.Equal((int)Math.Pow(size, rings), groupoid.ShapeCount);
        Assert.Equal((long)rings * groupoid.ShapeCount, groupoid.FreeTurnCount);
        Assert.Equal(rings * (size / 2), groupoid.HomeRegion.Eccentricity);
        Assert.Equal(1, groupoid.VertexGroupAt(0).Order);
        var last = groupoid.ShapeAt(groupoid.ShapeCount - 1);
        Assert.Equal(groupoid.ShapeCount - 1, groupoid.IndexOf(last));
        Assert.Equal(last, groupoid.PathTo(groupoid.ShapeCount - 1).Target);
    }

    [Fact]
    public void A_budget_of_shapes_ends_with_what_was_found()
    {
        var mechanism = MechanismBuilder.Cube("Fused", 3).Block("UFR", "UF").Build();

        var partial = ShapeGroupoid.Explore(mechanism, new ExplorationOptions { MaxShapes = 10 });
        var whole = ShapeGroupoid.Explore(mechanism, new ExplorationOptions { MaxShapes = 24 });

        Assert.Equal((false, 10), (partial.IsComplete, partial.ShapeCount));
        Assert.Equal((true, 24), (whole.IsComplete, whole.ShapeCount));
        Assert.All(Enumerable.Range(0, 10), shape => Assert.Equal(whole.ShapeAt(shape), partial.ShapeAt(shape)));
        Assert.Throws<InvalidOperationException>(() => partial.Regions);
        Assert.Throws<InvalidOperationException>(() => partial.VertexGroupAt(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => ShapeGroupoid.Explore(mechanism, new ExplorationOptions { MaxShapes = 0 }));
    }

    [Fact]
    public void A_cancelled_exploration_stops()
    {
        using var source = new CancellationTokenSource();
        source.Cancel();

        Assert.ThrowsAny<OperationCanceledException>(() => ShapeGroupoid.Explore(MechanismBuilder.Cube("Fused", 3).Block("UFR", "UF").Build(), null, null, source.Token));
    }

    [Fact]
    public void Steps_written_alike_and_free_together_are_refused()
    {
        var mechanism = MechanismBuilder.Custom("Alike", 4).Turn("A", "(1 2)", turn => turn.WrittenAs("X", "Y")).Turn("B", "(3 4)", turn => turn.WrittenAs("X", "Z")).Build();

        var problem = Assert.Single(Assert.Throws<MechanismFormatException>(() => ShapeGroupoid.Explore(mechanism)).Problems);

        Assert.Equal("$.turns.B", problem.Path);
        Assert.Equal("steps of the turns \"A\" and \"B\", both written \"X\" and free in one reachable shape", problem.Found);
    }

    [Fact]
    public void Paths_that_do_not_meet_do_not_compose()
    {
        var mechanism = MechanismBuilder.Cube("Fused", 3).Block("UFR", "UF").Build();
        var path = TurnPath.Follow(mechanism.Home, mechanism.ParseWord("U"));

        Assert.False(path.TryThen(path, out _));
        Assert.Equal(
            "The paths do not meet: the first ends in [UL UFL], the second starts in [UF UFR]. (Parameter 'next')",
            Assert.Throws<ArgumentException>(() => path.Then(path)).Message);
        Assert.Equal(
            "The path cannot be done: step 1 (R) is barred: it would tear the block [UF UFR]. (Parameter 'word')",
            Assert.Throws<ArgumentException>(() => TurnPath.Follow(mechanism.Home, mechanism.ParseWord("R"))).Message);
        Assert.True(path.Then(path.Inverse()).IsLoop);
        Assert.True(path.Then(path.Inverse()).Permutation.IsIdentity);
    }

    [Fact]
    public void Equal_fusings_are_equal_shapes_however_they_were_written_down()
    {
        var cube = MechanismBuilder.Cube("Cube", 3).Block("UFR", "UF", "UFL").Build();
        var same = MechanismBuilder.Cube("Cube", 3).Block("LFU", "FRU", "FU").Build();

        Assert.Equal(cube.Home.ToString(), same.Home.ToString());
        Assert.Equal(ShapeGroupoid.Explore(cube).ShapeCount, ShapeGroupoid.Explore(same).ShapeCount);
        Assert.Equal(2, cube.Board.HomeKey.Sum(word => System.Numerics.BitOperations.PopCount(word)));
    }
}
