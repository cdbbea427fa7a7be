using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Symmetric and alternating groups, whose chains are never stored, beside chains built the ordinary way.</summary>
public class GiantTests
{
    public static TheoryData<int, bool> Giants => new()
    {
        { 24, false }, { 25, true }, { 26, true }, { 31, false }, { 40, true }, { 41, false },
    };

    [Theory]
    [MemberData(nameof(Giants))]
    public void Recognised_giants_have_sound_chains(int degree, bool isAlternating)
    {
        var group = Scattered(degree, isAlternating);

        Assert.IsType<GiantTables>(group.Chain.Tables);
        Assert.True(group.Chain.Proof.IsProven);
        Assert.Null(SmallGroups.FindFault(group.Chain));
        Assert.Equal(Factorial(degree) / (isAlternating ? 2 : 1), group.Order);
    }

    [Theory]
    [MemberData(nameof(Giants))]
    public void A_giant_answers_as_the_ordinary_chain_does(int degree, bool isAlternating)
    {
        var group = Scattered(degree, isAlternating);
        var ordinary = Ordinary(group);
        var random = new SeededRandom(11);
        var (one, other) = (new SeededRandom(5), new SeededRandom(5));
        Assert.Equal<IEnumerable<int>>(ordinary.Base, group.Chain.Base);
        Assert.Equal<IEnumerable<int>>(ordinary.OrbitLengths, group.Chain.OrbitLengths);
        for (var i = 0; i < 20; i++)
        {
            var member = group.RandomElement(one);
            Assert.Equal(PermutationGroup.FromChain(group.Generators, ordinary).RandomElement(other), member);
            Assert.True(ordinary.Contains(member));
            Assert.True(group.Contains(member));
            Assert.Equal(member, group.Unrank(group.Rank(member)));
            Assert.True(group.Chain.Sift(member, out var last).IsIdentity);
            Assert.Equal(group.Chain.Base.Length, last);

            var stranger = random.NextPermutation(group.Degree);
            Assert.Equal(ordinary.Contains(stranger), group.Contains(stranger));
            Assert.Equal(group.Contains(stranger), group.Chain.Sift(stranger, out _).IsIdentity);
            Assert.Equal(group.Contains(stranger), group.Explain(stranger).IsMember);
        }
    }

    [Theory]
    [MemberData(nameof(Giants))]
    public void What_sifting_leaves_is_the_permutation_times_a_member_and_fixes_the_base_points_before(int degree, bool isAlternating)
    {
        var group = Scattered(degree, isAlternating);
        var random = new SeededRandom(3);
        for (var i = 0; i < 10; i++)
        {
            var permutation = random.NextPermutation(group.Degree);
            var residue = group.Chain.Sift(permutation, out var level);
            Assert.True(group.Contains(permutation.Inverse() * residue));
            Assert.All(group.Chain.Base.Take(level), point => Assert.Equal(point, residue[point]));
        }
    }

    [Fact]
    public void A_base_may_begin_with_given_points()
    {
        var group = Scattered(30, isAlternating: true);
        var points = group.MovedOrbits[0];
        var chain = StabilizerChain.Build(group, new ChainOptions { BasePrefix = [points[7], points[2]] });

        Assert.Equal([points[7], points[2], points[0]], chain.Base.Take(3));
        Assert.Null(SmallGroups.FindFault(chain));
        Assert.Equal(group.Order / (30 * 29), group.PointwiseStabilizer(points[7], points[2]).Order);
    }

    [Fact]
    public void Other_primitive_groups_are_not_taken_for_giants()
    {
        PermutationGroup[] groups =
        [
            KnownGroups.MathieuM24(), KnownGroups.ProjectiveSpecial(2, 23), KnownGroups.ProjectiveGeneral(2, 31), KnownGroups.AffineGeneral(5, 2),
            KnownGroups.AffineGeneral(1, 29), KnownGroups.ProjectiveSpecial(3, 5), KnownGroups.WreathProduct(KnownGroups.Symmetric(5), KnownGroups.Symmetric(5)),
        ];
        Assert.All(groups, group => Assert.IsNotType<GiantTables>(group.Chain.Tables));
    }

    [Fact]
    public void Groups_of_ten_thousand_points_are_no_burden()
    {
        var random = new SeededRandom(8);
        var group = PermutationGroup.Generate(random.NextPermutation(10_000), random.NextPermutation(10_000));

        // Two random permutations generate a giant with probability about 1 - 1/n (J. D. Dixon, Math. Z. 110 (1969), from memory); the chain then proves it.
        Assert.Equal(Factorial(10_000) / (group.Generators.All(generator => generator.Parity == Parity.Even) ? 2 : 1), group.Order);
        var member = group.RandomElement(random);
        Assert.True(group.Contains(member));
        Assert.Equal(member, group.Unrank(group.Rank(member)));
    }

    // On every second point, so that some are fixed; both groups from a long cycle and one of three or two points, mixed.
    private static PermutationGroup Scattered(int degree, bool isAlternating)
    {
        int[] points = [.. Enumerable.Range(0, degree).Select(i => (2 * i) + 1)];
        var known = isAlternating ? KnownGroups.Alternating(degree) : KnownGroups.Symmetric(degree);
        return PermutationGroup.Generate(known.Generators.Select(generator => Moved(generator, points)), (2 * degree) + 3);
    }

    private static Permutation Moved(Permutation permutation, int[] points)
    {
        int[] images = [.. Enumerable.Range(0, points[^1] + 1)];
        for (var i = 0; i < points.Length; i++)
        {
            images[points[i]] = points[permutation[i]];
        }

        return Permutation.FromImages(images);
    }

    private static StabilizerChain Ordinary(PermutationGroup group)
    {
        var builder = new ChainBuilder<byte>(group.Degree);
        var lanes = new byte[builder.Stride];
        foreach (var generator in group.Generators)
        {
            generator.CopyLanes<byte>(lanes);
            builder.AddUnsettled(lanes);
        }

        builder.Complete();
        return builder.ToChain();
    }

    private static BigInteger Factorial(int number) => Enumerable.Range(1, number).Aggregate(BigInteger.One, (product, factor) => product * factor);
}
