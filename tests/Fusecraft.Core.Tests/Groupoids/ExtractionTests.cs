using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>The machinery that proves vertex groups of large graphs: rows of permutations, labels of trees, membership by defining conditions, several threads.</summary>
public class ExtractionTests
{
    private static readonly string[][] _fusings =
    [
        [], ["UFR UF"], ["UF U"], ["UFR UF", "DBL DB"], ["UFR UF", "DFL DF", "UBL UB"], ["UFR UF U"], ["UF U F"],
    ];

    public static TheoryData<int, int> Cubes => new()
    {
        { 2, 0 }, { 3, 0 }, { 3, 1 }, { 3, 2 }, { 3, 3 }, { 3, 4 }, { 3, 5 }, { 3, 6 }, { 4, 0 }, { 5, 0 },
    };

    [Theory]
    [MemberData(nameof(Cubes))]
    public void Rows_multiply_and_invert_as_permutations_do(int size, int fusing)
    {
        var mechanism = Make.Cube(size, "", _fusings[fusing]);
        var random = new SeededRandom(6);
        var rows = Assert.IsType<WindowRows>(mechanism.SiteRows);
        foreach (var layout in (SiteRows[])[rows, new PlainRows<byte>(mechanism), new PlainRows<ushort>(mechanism)])
        {
            for (var i = 0; i < 20; i++)
            {
                var (one, other) = (mechanism.UnguardedGroup.RandomElement(random), mechanism.UnguardedGroup.RandomElement(random));
                var (first, second, result) = (Row(layout, one), Row(layout, other), new byte[layout.Pitch]);
                layout.Compose(first, second, result);
                Assert.Equal(one * other, Read(layout, result, mechanism));
                layout.Invert(first, result);
                Assert.Equal(one.Inverse(), Read(layout, result, mechanism));
            }
        }
    }

    [Theory]
    [MemberData(nameof(Cubes))]
    public void Membership_by_conditions_is_membership(int size, int fusing)
    {
        var mechanism = Make.Cube(size, "", _fusings[fusing]);
        var rows = (WindowRows)mechanism.SiteRows;
        var group = ShapeGroupoid.Explore(mechanism).VertexGroupAt(0).Group;
        var membership = WindowMembership.TryCreate(rows, [.. group.Generators.SelectMany(generator => Row(rows, generator))], group.Order, default);
        if (membership is null)
        {
            // Too thin for its orbits: such a group is asked through its chain.
            Assert.NotEqual(group.Order, SubdirectBound.Of(group, [], default));
            return;
        }

        var random = new SeededRandom(9);
        for (var i = 0; i < 100; i++)
        {
            Assert.True(membership.Contains(Row(rows, group.RandomElement(random))));

            // From far away, and from so near that a single condition must tell.
            var stranger = mechanism.UnguardedGroup.RandomElement(random);
            Assert.Equal(group.Contains(stranger), membership.Contains(Row(rows, stranger)));
            var near = group.RandomElement(random) * mechanism.Turns[random.NextInt32(mechanism.Turns.Length)].Permutation.Power(random.NextInt32(4));
            Assert.Equal(group.Contains(near), membership.Contains(Row(rows, near)));
        }
    }

    [Fact]
    public void Most_vertex_groups_of_fused_cubes_have_membership_by_conditions()
    {
        var found = _fusings.Count(fusing =>
        {
            var mechanism = Make.Cube(3, "", fusing);
            var group = ShapeGroupoid.Explore(mechanism).VertexGroupAt(0).Group;
            return WindowMembership.TryCreate((WindowRows)mechanism.SiteRows, [.. group.Generators.SelectMany(generator => Row(mechanism.SiteRows, generator))], group.Order, default) is not null;
        });
        Assert.True(found >= 5, $"{found} of {_fusings.Length}.");
    }

    [Fact]
    public void The_group_and_its_loops_do_not_depend_on_the_threads()
    {
        // 7,344 shapes, more than one piece of work.
        var groupoid = ShapeGroupoid.Explore(Make.Cube(3, "", "UFR UF", "DBL DB", "UBR UR", "DFL DL", "UBL UL"));
        Assert.Equal(7344, groupoid.ShapeCount);
        var one = VertexGroupExtraction.Run(groupoid, RegionTree.Of(groupoid, 0), 1, default);
        foreach (var threads in (int[])[2, 3, 8])
        {
            var other = VertexGroupExtraction.Run(groupoid, RegionTree.Of(groupoid, 0), threads, default);
            Assert.Equal<IEnumerable<Permutation>>(one.Group.Generators, other.Group.Generators);
            Assert.Equal(one.Order, other.Order);
            Assert.Equal(one.GeneratorLoops().Select(loop => loop.ToString()), other.GeneratorLoops().Select(loop => loop.ToString()));
        }
    }

    [Theory]
    [InlineData(long.MaxValue)]
    [InlineData(100_000)]
    [InlineData(2_000)]
    public void Labels_are_the_permutations_of_the_tree_paths_however_many_are_held(long mostBytes)
    {
        var groupoid = ShapeGroupoid.Explore(Make.Cube(3, "", "UFR UF", "DBL DB"));
        foreach (var root in (int[])[0, 17])
        {
            var tree = RegionTree.Of(groupoid, root);
            var rows = groupoid.Mechanism.SiteRows;
            var labels = new TreeLabels(tree, rows, rows.LoadSteps(), mostBytes);
            var (row, scratch) = (new byte[rows.Pitch], new byte[rows.Pitch]);
            foreach (var shape in tree.Order)
            {
                var path = tree.PathTo(shape)!.Value.Aggregate(Permutation.Identity, (product, step) => product * step.Permutation);
                labels.Announce(shape);
                Assert.Equal(path.Inverse(), Read(rows, labels.Inverse(shape, row, scratch), groupoid.Mechanism));
            }
        }
    }

    [Fact]
    public void Orbits_larger_than_a_window_are_held_plain()
    {
        Assert.IsType<PlainRows<byte>>(Make.Board(6, 6).SiteRows);
        Assert.IsType<PlainRows<ushort>>(Make.Board(17, 17).SiteRows);
    }

    private static byte[] Row(SiteRows rows, Permutation permutation)
    {
        var row = new byte[rows.Pitch];
        rows.Load(permutation, row);
        return row;
    }

    private static Permutation Read(SiteRows rows, ReadOnlySpan<byte> row, Mechanism mechanism)
    {
        var images = new int[mechanism.SiteCount];
        rows.CopyImages(row, images);
        return Permutation.FromImages(images);
    }
}
