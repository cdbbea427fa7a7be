using FsCheck.Xunit;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

public class LoopBasisTests
{
    private const ulong FixedSeeds = 300;

    [Property(MaxTest = 30)]
    public void A_basis_generates_and_none_of_it_can_be_left_out(ulong seed) => Check(seed);

    [Fact]
    public void A_basis_generates_and_none_of_it_can_be_left_out_on_fixed_seeds()
    {
        var (larger, longer) = (0, 0);
        for (var seed = 0UL; seed < FixedSeeds; seed++)
        {
            foreach (var basis in Check(seed))
            {
                larger += basis.Loops.Length > 1 ? 1 : 0;
                longer += basis.LongestLength > 2 ? 1 : 0;
            }
        }

        Assert.True(larger > 30 && longer > 50, $"{larger} of several loops, {longer} with loops of three steps and more");
    }

    // Five of the six faces do what all six do: widely known in the trade, from memory; which four do not is elementary (an edge between the two other faces would never move).
    [Fact]
    public void Five_quarter_turns_are_a_basis_of_the_3x3x3()
    {
        var basis = LoopBasis.Of(ShapeGroupoid.Explore(Make.Cube(3)).VertexGroupAt(0));
        Assert.Equal(5, basis.Loops.Length);
        Assert.All(basis.Loops, loop => Assert.Equal(1, loop.Length));
        Assert.All(basis.Loops, loop => Assert.Equal("4^5", loop.CycleType.ToString()));
        Assert.True(basis.IsShortest);

        // The symmetries of the cube take every face to every other, and the sixth face's turn is no part of the basis.
        var family = Assert.Single(basis.Families);
        Assert.Equal(6, family.CopyCount);
    }

    // Elementary: round the cycle, and that is all.
    [Theory]
    [InlineData(3)]
    [InlineData(7)]
    [InlineData(12)]
    public void On_a_cycle_the_basis_is_one_round(int n)
    {
        var loop = Assert.Single(LoopBasis.Of(ShapeGroupoid.Explore(Make.GraphBoard(n, Graphs.Cycle(n).Edges, 1)).VertexGroupAt(0)).Loops);
        Assert.Equal(n, loop.Length);
        Assert.Equal(n - 1, loop.Permutation.Order);
    }

    // Elementary: one loop generates a cyclic group, so both 5-cycles of theta(1,2,2) are needed, and the 6-cycle is not. The group is the exception of Wilson's theorem, of order 120 (see GraphBoardTests).
    [Fact]
    public void The_exceptional_graph_needs_two_of_its_three_cycles()
    {
        var basis = LoopBasis.Of(ShapeGroupoid.Explore(Make.GraphBoard(7, Graphs.Theta(1, 2, 2).Edges, 1)).VertexGroupAt(0));
        Assert.Equal(120, basis.VertexGroup.Order);
        Assert.Equal([5, 5], basis.Loops.Select(loop => loop.Length));
        Assert.True(basis.IsShortest);
    }

    [Fact]
    public void No_loops_generate_the_trivial_group()
    {
        var basis = LoopBasis.Of(ShapeGroupoid.Explore(Make.GraphBoard(4, Graphs.Path(4).Edges, 1)).VertexGroupAt(0));
        Assert.Empty(basis.Loops);
        Assert.Empty(basis.Families);
        Assert.Equal((0, 0), (basis.LongestLength, basis.ProvenLength));
    }

    // A square of four tiles and more around a gap in the middle of a 3x3 board: the four rounds through the corners are copies of one another.
    [Fact]
    public void Loops_that_a_symmetry_takes_to_each_other_are_one_family()
    {
        var board = Make.Board(3, 3, "5");
        var group = ShapeGroupoid.Explore(board).VertexGroupAt(0);
        var basis = LoopBasis.Of(group);

        // Elementary (Wilson 1974): the alternating group of the eight tiles.
        Assert.Equal(20160, group.Order);
        Assert.All(basis.Loops, loop => Assert.Equal(4, loop.Length));
        var family = Assert.Single(basis.Families);
        Assert.Equal(basis.Loops.ToArray(), family.Loops);
        Assert.Equal(4, family.CopyCount);
        Assert.All(basis.Loops, loop => Assert.Equal("3", loop.CycleType.ToString()));

        // Without symmetries each loop stands for itself.
        var alone = LoopBasis.Of(group, new LoopBasisOptions { Symmetries = SymmetryGroup.Generate(board) });
        Assert.Equal(alone.Loops.Length, alone.Families.Length);
        Assert.All(alone.Families, loops => Assert.Equal(1, loops.CopyCount));
    }

    [Fact]
    public void What_a_loop_does_to_blocks_is_told_by_piece_names()
    {
        // Two dominoes that trade places, and one that turns over where it is.
        var mechanism = Make.Custom(6, [Make.Turn("Swap", "(1 3)(2 4)"), Make.Turn("Over", "(5 6)")], ["1 2", "3 4", "5 6"]);
        var basis = LoopBasis.Of(ShapeGroupoid.Explore(mechanism).VertexGroupAt(0));
        Assert.Equal(["Swap", "Over"], basis.Loops.Select(loop => loop.ToString()));
        Assert.Equal(["([1 2] [3 4])", "[5 6] turned"], basis.Loops.Select(loop => loop.DescribeBlocks()));
        Assert.Equal([BlockMotion.Moved, BlockMotion.Moved, BlockMotion.Still], basis.Loops[0].Blocks.Select(block => block.Motion));
        Assert.Equal([2, 3], basis.Loops[0].Blocks[0].Target.ToArray());
        Assert.Equal([BlockMotion.Still, BlockMotion.Still, BlockMotion.Turned], basis.Loops[1].Blocks.Select(block => block.Motion));
    }

    // Own figures, computed with this library, for regression.
    [Theory]
    [InlineData("lock-basin", 100)]
    [InlineData("mill-race", 100)]
    [InlineData("seven-piers", 100)]
    [InlineData("ferry-board", 100)]
    [InlineData("weir-gate", 1000)]
    public void Bases_of_the_workshop_generate_whatever_the_budget(string puzzle, int budget)
    {
        var group = ShapeGroupoid.Explore(MechanismFile.Load(Repository.PathOf($"docs/workshop/{puzzle}.fuse.json"))).VertexGroupAt(0);
        var basis = IsBasis(LoopBasis.Of(group));
        var hasty = IsBasis(LoopBasis.Of(group, new LoopBasisOptions { MaxStates = budget }));
        Assert.InRange(hasty.ProvenLength, 1, basis.LongestLength);
        Assert.InRange(basis.LongestLength, basis.ProvenLength, hasty.LongestLength);
    }

    [Fact]
    public void What_cannot_be_is_refused()
    {
        var group = ShapeGroupoid.Explore(Make.Cube(2)).VertexGroupAt(0);
        Assert.Throws<ArgumentOutOfRangeException>("options", () => LoopBasis.Of(group, new LoopBasisOptions { MaxStates = 0 }));
        Assert.Throws<ArgumentException>("options", () => LoopBasis.Of(group, new LoopBasisOptions { Symmetries = SymmetryGroup.Of(Make.Cube(2)) }));
        Assert.Throws<OperationCanceledException>(() => LoopBasis.Of(group, null, new CancellationToken(canceled: true)));
    }

    private static List<LoopBasis> Check(ulong seed)
    {
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed)));
        var bases = new List<LoopBasis>();
        foreach (var shape in groupoid.Regions.Take(3).Select(region => region.FirstShape).Append(groupoid.ShapeCount - 1))
        {
            var group = groupoid.VertexGroupAt(shape);
            bases.Add(IsBasis(LoopBasis.Of(group)));
            Assert.True(bases[^1].IsShortest);
            IsLongEnough(bases[^1]);
            foreach (var budget in (int[])[1, 3, 20])
            {
                var hasty = IsBasis(LoopBasis.Of(group, new LoopBasisOptions { MaxStates = budget }));
                Assert.InRange(hasty.ProvenLength, 0, bases[^1].ProvenLength);
            }
        }

        return bases;
    }

    private static LoopBasis IsBasis(LoopBasis basis)
    {
        var group = basis.VertexGroup;
        Assert.Equal(basis.Loops.OrderBy(loop => loop.Length), basis.Loops);
        Assert.True(basis.ProvenLength <= basis.LongestLength);
        Assert.Equal(group.Order, Order(basis.Loops));
        Assert.Equal(basis.Loops.ToHashSet(), basis.Families.SelectMany(family => family.Loops).ToHashSet());
        Assert.Equal(basis.Loops.Length, basis.Families.Sum(family => family.Loops.Length));
        for (var i = 0; i < basis.Loops.Length; i++)
        {
            Assert.Equal(group.BaseShape, group.Groupoid.IndexOf(basis.Loops[i].Path.Source));
            Assert.True(basis.Loops[i].Path.IsLoop);
            Assert.True(Order(basis.Loops.RemoveAt(i)) < group.Order);
        }

        return basis;

        System.Numerics.BigInteger Order(IEnumerable<BasisLoop> loops) => PermutationGroup.Generate(loops.Select(loop => loop.Permutation), group.Group.Degree).Order;
    }

    // All loops shorter than the longest, by trying all words, generate less.
    private static void IsLongEnough(LoopBasis basis)
    {
        var start = (Labels: Permutation.Identity, Shape: basis.VertexGroup.Groupoid.ShapeAt(basis.VertexGroup.BaseShape));
        var seen = new HashSet<(Permutation Labels, Shape Shape)> { start };
        List<(Permutation Labels, Shape Shape)> level = [start];
        for (var length = 1; length < basis.LongestLength; length++)
        {
            level = [.. level.SelectMany(state => state.Shape.FreeSteps().Select(step => (state.Labels * step.Permutation, state.Shape.After(step)!))).Where(seen.Add)];
        }

        var loops = seen.Where(state => state.Shape == start.Shape).Select(state => state.Labels);
        Assert.True(basis.Loops.IsEmpty || PermutationGroup.Generate(loops, basis.VertexGroup.Group.Degree).Order < basis.VertexGroup.Order);
    }
}
