using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Groups;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>Vertex groups at every base and their actions, on random small mechanisms.</summary>
public class VertexGroupTests
{
    private const ulong Seeds = 120;

    [Fact]
    public void A_group_moved_to_another_base_is_the_one_extracted_there() => ForRegions(group =>
    {
        foreach (var shape in ShapesOf(group).Take(60))
        {
            var moved = group.MovedTo(shape);
            var extracted = group.Groupoid.VertexGroupAt(shape);
            Assert.Equal(shape, moved.BaseShape);
            Assert.Equal(extracted.Order, moved.Group.Chain.Order);
            Assert.True(moved.Group.SameGroupAs(extracted.Group));
            Assert.Equal(ChainProof.Proven, moved.Group.Chain.Proof);
            Assert.Equal(extracted.StateCount, moved.StateCount);
            Assert.Equal(group.Group.Generators.Select(generator => generator.ConjugateBy(group.TreePath(shape).Permutation)), moved.Group.Generators);
        }
    });

    [Fact]
    public void A_moved_group_has_real_loops_and_paths_at_its_new_base() => ForRegions(group =>
    {
        foreach (var shape in ShapesOf(group).Take(25))
        {
            var moved = group.MovedTo(shape);
            var loops = moved.GeneratorLoops();
            Assert.Equal(moved.Group.Generators, loops.Select(loop => loop.Permutation));
            Assert.All(loops, loop => IsReal(loop, moved, shape));
            Assert.All(ShapesOf(group).Take(25), target => IsReal(moved.TreePath(target), moved, target));
        }
    });

    [Fact]
    public void Moving_on_is_moving_at_once_and_moving_back_changes_nothing() => ForRegions(group =>
    {
        var shapes = ShapesOf(group).ToList();
        var (one, other) = (shapes[shapes.Count / 2], shapes[^1]);
        Assert.Equal(group.MovedTo(other).Group.Generators.AsEnumerable(), group.MovedTo(one).MovedTo(other).Group.Generators);
        Assert.Equal(group.Group.Generators.AsEnumerable(), group.MovedTo(other).MovedTo(group.BaseShape).Group.Generators);
        Assert.Same(group, group.MovedTo(group.BaseShape));
    });

    [Fact]
    public void A_group_cannot_be_moved_out_of_its_region() => ForRegions(group =>
    {
        foreach (var other in group.Groupoid.Regions.Where(region => region != group.Region))
        {
            Assert.Throws<ArgumentException>(() => group.MovedTo(other.FirstShape));
        }

        Assert.Throws<ArgumentException>(() => group.MovedTo(-1));
        Assert.Throws<ArgumentException>(() => group.MovedTo(group.Groupoid.ShapeCount));
    });

    [Fact]
    public void On_sites_pieces_and_blocks_a_group_acts_as_each_of_its_members_does()
    {
        var (moving, trivial) = (0, 0);
        ForRegions(Check);
        Check(TwoRafts().VertexGroupAt(0));
        Check(ShapeGroupoid.Explore(Make.Custom(8, [Make.Turn("A", "(1 3 5)(2 4 6)"), Make.Turn("B", "(1 3)(2 4)(7 8)"), Make.Turn("C", "(7 8)")], ["1 2", "3 4", "5 6"])).VertexGroupAt(0));
        Assert.True(moving >= 2, $"only {moving} groups move blocks");
        Assert.True(trivial >= 3, $"only {trivial} groups turn pieces in their places");

        void Check(VertexGroup group)
        {
            var mechanism = group.Groupoid.Mechanism;
            var blocks = group.Groupoid.ShapeAt(group.BaseShape).Blocks;
            int[] pieces = [.. Enumerable.Range(0, mechanism.PieceCount)];
            var members = SmallGroups.Closure(group.Group.Generators);
            Holds(group.ActionOnSites(), mechanism.SiteCount, member => member);
            Holds(group.ActionOnPieces(), mechanism.PieceCount, member => PieceAction.Of(mechanism, member, pieces));
            Holds(group.ActionOnBlocks(), blocks.Length, member => PieceAction.OfBlocks(mechanism, member, blocks));
            moving += group.ActionOnBlocks().Image.IsTrivial ? 0 : 1;
            trivial += group.ActionOnPieces().Kernel.IsTrivial ? 0 : 1;

            void Holds(LoopAction action, int count, Func<Permutation, Permutation> expected)
            {
                Assert.Equal(count, action.Action.Degree);
                Assert.Equal(count, action.Names.Length);
                Assert.All(members.Take(50), member => Assert.Equal(expected(member), action.Action.Map(member)));
                Assert.Equal(members.Select(expected).Distinct().Count(), action.Image.Order);
                Assert.Equal(members.Count(member => expected(member).IsIdentity), action.Kernel.Order);
                Assert.All(action.Kernel.Generators, member => Assert.True(members.Contains(member) && expected(member).IsIdentity));
                Assert.All(group.GeneratorLoops(), loop => Assert.Equal(expected(loop.Permutation), action.Of(loop)));
            }
        }
    }

    // Two rafts of two tiles change places; a tile beside them, and the rafts' own tiles, can be turned about.
    [Fact]
    public void The_action_on_blocks_says_which_block_goes_where_and_which_loops_leave_all_in_place()
    {
        var group = TwoRafts().VertexGroupAt(0);
        var action = group.ActionOnBlocks();
        Assert.Equal(["[1 2]", "[3 4]"], action.Names.AsEnumerable());
        Assert.Equal(2, action.Image.Order);
        Assert.Equal(group.Order / 2, action.Kernel.Order);
        var home = group.Groupoid.ShapeAt(0);
        Assert.Equal("(1 2)", action.Of(TurnPath.Follow(home, group.Groupoid.Mechanism.ParseWord("A"))).ToString());
        Assert.True(action.Of(TurnPath.Follow(home, group.Groupoid.Mechanism.ParseWord("A A B"))).IsIdentity);
    }

    [Fact]
    public void Things_acted_on_go_by_their_names()
    {
        var group = ShapeGroupoid.Explore(Make.Cube(3, "U R", "UFR UF", "core U F")).VertexGroupAt(0);
        Assert.Equal(["[F U core]", "[UF UFR]"], group.ActionOnBlocks().Names.Select(Sorted).Order(StringComparer.Ordinal));
        Assert.Equal(group.Groupoid.Mechanism.PieceNames, group.ActionOnPieces().Names);
        Assert.Equal(group.Groupoid.Mechanism.SiteNames, group.ActionOnSites().Names);

        static string Sorted(string block) => $"[{string.Join(' ', block.Trim('[', ']').Split(' ').Order(StringComparer.Ordinal))}]";
    }

    [Fact]
    public void Only_loops_at_the_base_shape_act()
    {
        var group = ShapeGroupoid.Explore(Make.Board(3, 2)).VertexGroupAt(0);
        var path = group.TreePath(1);
        Assert.Throws<ArgumentException>(() => group.ActionOnPieces().Of(path));
        Assert.Throws<ArgumentException>(() => group.ActionOnPieces().Of(path.Inverse().Then(path)));
        Assert.True(group.ActionOnPieces().Of(path.Then(path.Inverse())).IsIdentity);
    }

    private static ShapeGroupoid TwoRafts() => ShapeGroupoid.Explore(Make.Custom(
        6, [Make.Turn("A", "(1 3)(2 4)"), Make.Turn("B", "(1 2)"), Make.Turn("C", "(5 6)")], ["1 2", "3 4"]));

    private static void IsReal(TurnPath path, VertexGroup group, int target)
    {
        var replayed = TurnPath.Follow(group.Groupoid.ShapeAt(group.BaseShape), path.Steps);
        Assert.Equal(target, group.Groupoid.IndexOf(replayed.Target));
        Assert.Equal(path.Permutation, replayed.Permutation);
    }

    private static IEnumerable<int> ShapesOf(VertexGroup group) =>
        Enumerable.Range(0, group.Groupoid.ShapeCount).Where(shape => group.Groupoid.RegionOf(shape) == group.Region.Index);

    private static void ForRegions(Action<VertexGroup> check)
    {
        for (var seed = 0UL; seed < Seeds; seed++)
        {
            var groupoid = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed)));
            foreach (var region in groupoid.Regions.Take(4))
            {
                try
                {
                    check(groupoid.VertexGroupAt(region.FirstShape));
                }
                catch (Exception problem)
                {
                    throw new InvalidOperationException($"Seed {seed}, region {region.Index}: {problem.Message}\n{MechanismFile.Write(RandomMechanisms.From(seed))}", problem);
                }
            }
        }
    }
}
