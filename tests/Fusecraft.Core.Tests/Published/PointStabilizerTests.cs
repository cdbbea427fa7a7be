using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>
/// Point stabilizers as vertex groups. O. Schreier, <em>Die Untergruppen der freien Gruppen</em>, 1927; A. Seress, <em>Permutation Group Algorithms</em> (2003), sec. 4.2 (sources not opened, values from memory): a subgroup
/// of index i in a group of r generators has 1 + i(r-1) Schreier generators, those of a free group freely.
/// </summary>
public class PointStabilizerTests
{
    public static TheoryData<string, int, int> Groups => new()
    {
        { "M11", 12, 720 },
        { "M12", 25, 7_920 },
        { "M24", 49, 10_200_960 },
    };

    [Theory]
    [MemberData(nameof(Groups))]
    public void A_mark_on_one_point_makes_its_stabilizer_with_one_loop_for_each_Schreier_generator(string name, int loops, int order)
    {
        var generators = name switch
        {
            "M11" => MathieuGroups.M11,
            "M12" => MathieuGroups.M12,
            _ => MathieuGroups.M24,
        };
        var group = PermutationGroup.Generate(generators);
        ImmutableArray<TurnDefinition> turns = [.. generators.Select((generator, i) => Make.Turn($"t{i}", generator.ToString()))];
        var groupoid = ShapeGroupoid.Explore(Make.Custom(group.Degree, turns, marks: Make.Mark("mark", "1")));

        // Turns that are no part of the spanning tree.
        Assert.Equal(group.Degree, groupoid.ShapeCount);
        Assert.Equal(loops, groupoid.FreeTurnCount - (groupoid.ShapeCount - 1));
        Assert.Equal(loops, 1 + (group.Degree * (generators.Length - 1)));

        var vertexGroup = groupoid.VertexGroupAt(0);
        Assert.Equal(order, vertexGroup.Order);
        Assert.True(vertexGroup.Group.SameGroupAs(group.PointwiseStabilizer(0)));
        Assert.Equal(group.Order, vertexGroup.Order * groupoid.ShapeCount);
    }

    // Own computation, for regression; the product is 3674160 = 7!·3^6, OEIS A075152 and A079761 (opened).
    [Fact]
    public void The_2x2x2_with_a_corner_held_has_these_orbit_lengths_along_a_base()
    {
        var group = ShapeGroupoid.Explore(Make.Cube(2)).VertexGroupAt(0).Group;

        Assert.Equal([21, 18, 15, 12, 9, 6], group.Chain.OrbitLengths.OrderDescending());
        Assert.Equal(new BigInteger(3_674_160), group.Order);
    }
}
