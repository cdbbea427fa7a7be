using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>
/// Orders of cubes that nothing bars: one shape, whose vertex group is the group of the turns. Sites are the moving facelets (the family has the unmoved ones besides); turns are clockwise
/// quarter turns seen from outside, <c>U2</c> a half turn.
/// </summary>
public class CubeOrderTests
{
    // OEIS A075152, A080602 (opened).
    private static readonly BigInteger Whole = BigInteger.Parse("43252003274489856000");

    [Fact]
    public void The_3x3x3_has_the_published_order()
    {
        var group = Published(3, "", Whole);

        // The factored form is printed with the value in both entries' references.
        Assert.Equal("2^27·3^14·5^3·7^2·11", group.Group.FactoredOrder.ToString());
        Assert.Equal(48, group.Group.MovedOrbits.Sum(orbit => orbit.Length));
        Assert.Equal([24, 24], group.Group.MovedOrbits.Select(orbit => orbit.Length));
    }

    // D. Singmaster, Notes on [the] Magic Cube (1981); source not opened, value from memory.
    [Theory]
    [InlineData("R F D L B")]
    [InlineData("U F D L B")]
    [InlineData("U R D L B")]
    [InlineData("U R F L B")]
    [InlineData("U R F D B")]
    [InlineData("U R F D L")]
    public void Five_faces_of_the_3x3x3_generate_everything(string use) => Published(3, use, Whole);

    // OEIS A075152, A079761 (opened): 7! 3^6, the corner DBL held still.
    [Fact]
    public void The_2x2x2_with_one_corner_held_has_the_published_order()
    {
        var group = Published(2, "", 3674160);
        Assert.Equal(Make.Factorial(7) * 729, group.Order);
        Assert.Equal(21, Assert.Single(group.Group.MovedOrbits).Length);
    }

    // OEIS A080656 (opened): up to the 24 orientations, all pieces distinct. Holding the corner DBL still is the same as counting up to orientation.
    [Fact]
    public void The_4x4x4_with_one_corner_held_has_the_published_order() =>
        Published(4, "", BigInteger.Parse("707195371192426622240452051915172831683411968000000000"));

    // OEIS A080656 (opened): all pieces distinct; the twist of the middle centres does not count.
    [Fact]
    public void The_5x5x5_has_the_published_order()
    {
        var group = Published(5, "", BigInteger.Parse("2582636272886959379162819698174683585918088940054237132144778804568925405184000000000000000"));
        Assert.Equal(144, group.Group.MovedOrbits.Sum(orbit => orbit.Length));
    }

    // OEIS A080661 (opened).
    [Fact]
    public void Marked_centres_multiply_the_order_of_the_3x3x3_by_2048()
    {
        var mechanism = Mechanism.Create(new MechanismDefinition { Name = "marked centres", Family = new CubeFamily(3, centreTwist: true) });
        var group = ShapeGroupoid.Explore(mechanism).VertexGroupAt(0);
        Assert.Equal(BigInteger.Parse("88580102706155225088000"), group.Order);
        Assert.Equal(Whole * 2048, group.Order);
        Assert.Equal(ChainProof.Proven, group.Group.Chain.Proof);
    }

    // OEIS A080628 (opened): 120 x 3^5 x 7!/2; on the corner places PGL(2,5), of order 120.
    [Fact]
    public void Two_neighbouring_faces_generate_the_published_group()
    {
        var group = Published(3, "U R", 73483200);
        var mechanism = group.Groupoid.Mechanism;
        var corners = Enumerable.Range(0, mechanism.PieceCount).Where(piece => mechanism.SitesOfPiece[piece].Length == 3).ToList();
        var onCorners = PermutationGroup.Generate(group.Group.Generators.Select(generator => PieceAction.Of(mechanism, generator, corners)), corners.Count);
        Assert.Equal(120, onCorners.Order);

        // PGL(2,5) is sharply 3-transitive on its six points.
        Assert.Equal([6, 5, 4], onCorners.Chain.OrbitLengths.ToArray());
    }

    // Singmaster 1981, Reid 1992; sources not opened, values from memory.
    [Theory]
    [InlineData("U R F", 170659735142400)]
    [InlineData("U R D", 159993501696000)]
    [InlineData("U2 R2", 12)]
    [InlineData("U2 R", 14400)]
    [InlineData("U2 R2 F2", 2592)]
    [InlineData("U2 R2 D2", 96)]
    public void Some_faces_and_half_turns_generate_groups_of_known_order(string use, long order) => Published(3, use, order);

    // OEIS A080615 (opened).
    [Fact]
    public void Half_turns_of_a_belt_of_four_faces_generate_192_elements() => Published(3, "U2 D2 F2 B2", 192);

    // OEIS A080627 (opened): the squares group; five half turns suffice.
    [Theory]
    [InlineData("U2 R2 F2 D2 L2 B2")]
    [InlineData("U2 R2 F2 D2 L2")]
    public void Half_turns_generate_the_squares_group(string use) => Published(3, use, 663552);

    // The classic nested subgroups; values from memory, no source opened. The second is D1 / 2048.
    [Theory]
    [InlineData("U D R2 L2 F2 B2", 19508428800)]
    [InlineData("U D R L F2 B2", 21119142223872000)]
    public void The_classic_nested_subgroups_have_their_orders(string use, long order)
    {
        Published(3, use, order);
        Assert.Equal(BigInteger.Zero, Whole % order);
    }

    private static VertexGroup Published(int size, string use, BigInteger order)
    {
        var groupoid = ShapeGroupoid.Explore(Make.Cube(size, use));
        Assert.True(groupoid.IsComplete);
        Assert.Equal(1, groupoid.ShapeCount);
        var group = groupoid.VertexGroupAt(0);
        Assert.Equal(order, group.Order);
        Assert.Equal(order, group.StateCount);
        Assert.Equal(ChainProof.Proven, group.Group.Chain.Proof);
        Assert.Equal(order, groupoid.Mechanism.UnguardedGroup.Order);
        return group;
    }
}
