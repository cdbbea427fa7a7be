using Fusecraft.Groups;
using Fusecraft.Tests.Published;

namespace Fusecraft.Tests.Groups;

/// <summary>Ready-made groups have the orders that theorems give them, reached without being told.</summary>
public class KnownGroupsTests
{
    public static TheoryData<string> Names => [.. All.Keys];

    private static readonly Dictionary<string, Func<PermutationGroup>> All = new()
    {
        ["Symmetric 0"] = () => KnownGroups.Symmetric(0),
        ["Symmetric 1"] = () => KnownGroups.Symmetric(1),
        ["Symmetric 2"] = () => KnownGroups.Symmetric(2),
        ["Symmetric 9"] = () => KnownGroups.Symmetric(9),
        ["Alternating 2"] = () => KnownGroups.Alternating(2),
        ["Alternating 3"] = () => KnownGroups.Alternating(3),
        ["Alternating 4"] = () => KnownGroups.Alternating(4),
        ["Alternating 9"] = () => KnownGroups.Alternating(9),
        ["Alternating 10"] = () => KnownGroups.Alternating(10),
        ["Cyclic 1"] = () => KnownGroups.Cyclic(1),
        ["Cyclic 12"] = () => KnownGroups.Cyclic(12),
        ["Dihedral 3"] = () => KnownGroups.Dihedral(3),
        ["Dihedral 8"] = () => KnownGroups.Dihedral(8),
        ["Direct product"] = () => KnownGroups.DirectProduct(KnownGroups.Symmetric(4), KnownGroups.Cyclic(5)),
        ["Wreath product"] = () => KnownGroups.WreathProduct(KnownGroups.Symmetric(3), KnownGroups.Symmetric(4)),
        ["Wreath product over an intransitive group"] = () => KnownGroups.WreathProduct(KnownGroups.Cyclic(3), KnownGroups.DirectProduct(KnownGroups.Cyclic(2), KnownGroups.Symmetric(1))),
        ["Wreath product on tuples"] = () => KnownGroups.WreathProductOnTuples(KnownGroups.Symmetric(4), KnownGroups.Symmetric(3)),
        ["AGL(1,2)"] = () => KnownGroups.AffineGeneral(1, 2),
        ["AGL(1,13)"] = () => KnownGroups.AffineGeneral(1, 13),
        ["AGL(1,8)"] = () => KnownGroups.AffineGeneral(1, 8),
        ["AGL(3,2)"] = () => KnownGroups.AffineGeneral(3, 2),
        ["AGL(2,4)"] = () => KnownGroups.AffineGeneral(2, 4),
        ["AGL(2,5)"] = () => KnownGroups.AffineGeneral(2, 5),
        ["PSL(2,4)"] = () => KnownGroups.ProjectiveSpecial(2, 4),
        ["PSL(2,9)"] = () => KnownGroups.ProjectiveSpecial(2, 9),
        ["PSL(2,25)"] = () => KnownGroups.ProjectiveSpecial(2, 25),
        ["PSL(2,32)"] = () => KnownGroups.ProjectiveSpecial(2, 32),
        ["PSL(3,4)"] = () => KnownGroups.ProjectiveSpecial(3, 4),
        ["PSL(4,3)"] = () => KnownGroups.ProjectiveSpecial(4, 3),
        ["PGL(2,27)"] = () => KnownGroups.ProjectiveGeneral(2, 27),
        ["PGL(3,4)"] = () => KnownGroups.ProjectiveGeneral(3, 4),
        ["M11"] = KnownGroups.MathieuM11,
        ["M12"] = KnownGroups.MathieuM12,
        ["M22"] = KnownGroups.MathieuM22,
        ["M23"] = KnownGroups.MathieuM23,
        ["M24"] = KnownGroups.MathieuM24,
    };

    [Theory]
    [MemberData(nameof(Names))]
    public void The_order_stated_is_the_order_of_the_generators(string name)
    {
        var group = All[name]();

        Assert.Equal(group.Order, PermutationGroup.Generate(group.Generators, group.Degree).Order);
        Assert.True(group.Chain.Proof.IsProven);
    }

    // q(q²-1)/gcd(2, q-1): e.g. J. D. Dixon, B. Mortimer, Permutation Groups (1996) (source not opened, from memory).
    [Theory]
    [InlineData(5, 60)]
    [InlineData(8, 504)]
    [InlineData(9, 360)]
    [InlineData(16, 4080)]
    [InlineData(23, 6072)]
    public void Psl_2_q_has_the_published_order(int q, int order) => Assert.Equal(order, KnownGroups.ProjectiveSpecial(2, q).Order);

    [Theory]
    [InlineData(3, 4, 20160)]
    [InlineData(3, 5, 372000)]
    [InlineData(4, 3, 6065280)]
    [InlineData(6, 2, 20158709760)]
    public void Psl_d_q_has_the_published_order(int d, int q, long order) => Assert.Equal(order, KnownGroups.ProjectiveSpecial(d, q).Order);

    [Theory]
    [InlineData(7)]
    [InlineData(9)]
    [InlineData(16)]
    public void Psl_2_q_is_the_group_made_by_an_independent_construction(int q)
    {
        var field = new ProjectiveGroups(q);
        var square = field.Multiply(field.PrimitiveElement, field.PrimitiveElement);
        var other = PermutationGroup.Generate(field.Moebius(1, 1, 0, 1), field.Moebius(square, 0, 0, 1), field.Moebius(0, field.Negative(1), 1, 0));

        Assert.Equal(other.Order, KnownGroups.ProjectiveSpecial(2, q).Order);
    }

    [Fact]
    public void Wreath_products_act_as_they_say()
    {
        var blocks = KnownGroups.WreathProduct(KnownGroups.Symmetric(3), KnownGroups.Symmetric(4));
        var tuples = KnownGroups.WreathProductOnTuples(KnownGroups.Symmetric(5), KnownGroups.Symmetric(2));

        Assert.Equal("{1 2 3} {4 5 6} {7 8 9} {10 11 12}", Assert.Single(blocks.BlockSystems(0)).ToString());
        Assert.Equal((25, 28800), (tuples.Degree, (int)tuples.Order));
        Assert.True(tuples.IsPrimitive);
    }

    [Fact]
    public void Arguments_that_give_no_group_are_refused()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => KnownGroups.Symmetric(-1));
        Assert.Throws<ArgumentOutOfRangeException>(() => KnownGroups.Dihedral(2));
        Assert.StartsWith("There is no field of 6 elements", Assert.Throws<ArgumentException>(() => KnownGroups.ProjectiveSpecial(2, 6)).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => KnownGroups.ProjectiveSpecial(1, 5));
        Assert.Throws<ArgumentException>(() => KnownGroups.AffineGeneral(0, 5));
        Assert.Throws<ArgumentException>(() => KnownGroups.AffineGeneral(20, 5));
        Assert.Throws<ArgumentException>(() => KnownGroups.WreathProductOnTuples(KnownGroups.Symmetric(10), KnownGroups.Symmetric(10)));
        Assert.Throws<ArgumentException>(() => KnownGroups.WreathProduct(KnownGroups.Cyclic(1000), KnownGroups.Cyclic(1000)));
    }
}
