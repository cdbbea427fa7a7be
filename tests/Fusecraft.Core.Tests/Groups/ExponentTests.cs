using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Exponents; those of every small group are in <see cref="EverySmallGroupTests"/>.</summary>
public class ExponentTests
{
    public static TheoryData<string> Names => [.. Listed.Keys];

    private static readonly Dictionary<string, Func<PermutationGroup>> Listed = new()
    {
        ["C4 wr C4"] = () => KnownGroups.WreathProduct(KnownGroups.Cyclic(4), KnownGroups.Cyclic(4)),
        ["S3 wr S4"] = () => KnownGroups.WreathProduct(KnownGroups.Symmetric(3), KnownGroups.Symmetric(4)),
        ["C3 wr A5"] = () => KnownGroups.WreathProduct(KnownGroups.Cyclic(3), KnownGroups.Alternating(5)),
        ["S4 x D8"] = () => KnownGroups.DirectProduct(KnownGroups.Symmetric(4), KnownGroups.Dihedral(8)),
        ["S4 wr S2 on pairs"] = () => KnownGroups.WreathProductOnTuples(KnownGroups.Symmetric(4), KnownGroups.Symmetric(2)),
        ["AGL(2,3)"] = () => KnownGroups.AffineGeneral(2, 3),
        ["AGL(3,2)"] = () => KnownGroups.AffineGeneral(3, 2),
        ["PGL(2,9)"] = () => KnownGroups.ProjectiveGeneral(2, 9),
        ["PSL(2,27)"] = () => KnownGroups.ProjectiveSpecial(2, 27),
        ["PSL(3,4)"] = () => KnownGroups.ProjectiveSpecial(3, 4),
        ["M11"] = KnownGroups.MathieuM11,
    };

    [Theory]
    [MemberData(nameof(Names))]
    public void The_exponent_is_the_least_common_multiple_of_the_orders_listed_or_searched(string name)
    {
        var group = Listed[name]();
        var listed = Lcm(group.Elements().Select(member => member.Order));

        Assert.Equal(listed, group.FindExponent());
        Assert.Contains(group.FindExponent(listingLimit: 0), (BigInteger?[])[listed, null]);
    }

    [Property(MaxTest = 60)]
    public bool Without_listing_the_exponent_is_right_or_not_given(ulong seed)
    {
        var (group, members, _) = QueriesOracle.RandomGroup(seed);
        var exponent = Lcm(members.Select(member => member.Order));
        return group.FindExponent() == exponent && (group.FindExponent(listingLimit: 0) ?? exponent) == exponent && (group.FindExponent(listingLimit: 20) ?? exponent) == exponent;
    }

    [Property(MaxTest = 40)]
    public bool Members_of_larger_groups_have_orders_that_divide_the_exponent(ulong seed)
    {
        var group = SmallGroups.Random(seed, 30);
        var random = new SeededRandom(seed);
        return group.FindExponent() is not { } exponent || (Enumerable.Range(0, 100).All(_ => (exponent % group.RandomElement(random).Order).IsZero) && group.FactoredOrder.PrimePowers.All(power => (exponent % power.Prime).IsZero));
    }

    // The least common multiple of 1 … n: OEIS A003418 (source not opened, values from memory). For even permutations a cycle of length 2^k needs another one beside it.
    [Theory]
    [InlineData(8, 840, 420)]
    [InlineData(9, 2520, 1260)]
    [InlineData(10, 2520, 2520)]
    [InlineData(16, 720720, 360360)]
    [InlineData(17, 12252240, 6126120)]
    [InlineData(18, 12252240, 12252240)]
    [InlineData(25, 26771144400, 26771144400)]
    public void Symmetric_and_alternating_groups_have_the_exponents_of_their_degree(int n, long symmetric, long alternating)
    {
        Assert.Equal(symmetric, KnownGroups.Symmetric(n).FindExponent());
        Assert.Equal(alternating, KnownGroups.Alternating(n).FindExponent());
    }

    [Fact]
    public void A_group_that_is_too_large_to_list_and_has_no_structure_known_has_no_answer()
    {
        var group = KnownGroups.ProjectiveSpecial(3, 3);

        Assert.Null(group.FindExponent(listingLimit: 0));
        Assert.Equal(Lcm(group.Elements().Select(member => member.Order)), group.FindExponent());
        Assert.Throws<ArgumentOutOfRangeException>(() => group.FindExponent(-1));
        using var cancelled = new CancellationTokenSource();
        cancelled.Cancel();
        Assert.Throws<OperationCanceledException>(() => group.FindExponent(cancellationToken: cancelled.Token));
    }

    private static BigInteger Lcm(IEnumerable<BigInteger> numbers) => numbers.Aggregate(BigInteger.One, (a, b) => a / BigInteger.GreatestCommonDivisor(a, b) * b);
}
