using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groups;

/// <summary>The bound by which large groups with several orbits are proven: never too small, and met where it should be.</summary>
public class SubdirectBoundTests
{
    [Fact]
    public void The_bound_is_never_below_the_order()
    {
        for (var seed = 0UL; seed < 400; seed++)
        {
            var group = SmallGroups.Random(seed, 16);
            Assert.True(SubdirectBound.Of(group, Fixing(group), default) >= SmallChainOrder(group), $"Seed {seed}.");
        }
    }

    [Fact]
    public void The_bound_holds_for_subgroups_of_products_of_imprimitive_groups()
    {
        var random = new SeededRandom(4);
        PermutationGroup[] parts =
        [
            KnownGroups.WreathProduct(KnownGroups.Cyclic(3), KnownGroups.Symmetric(4)), KnownGroups.WreathProduct(KnownGroups.Cyclic(2), KnownGroups.Alternating(5)),
            KnownGroups.WreathProduct(KnownGroups.Dihedral(4), KnownGroups.Cyclic(3)), KnownGroups.Symmetric(6), KnownGroups.WreathProduct(KnownGroups.Symmetric(3), KnownGroups.Dihedral(4)),
        ];
        for (var round = 0; round < 120; round++)
        {
            var product = KnownGroups.DirectProduct(parts[random.NextInt32(parts.Length)], parts[random.NextInt32(parts.Length)]);
            Permutation[] members = [.. Enumerable.Range(0, 1 + random.NextInt32(3)).Select(_ => product.RandomElement(random))];
            var group = PermutationGroup.Generate(members, product.Degree);
            Assert.True(SubdirectBound.Of(group, Fixing(group), default) >= SmallChainOrder(group), string.Join(", ", members));
        }
    }

    [Fact]
    public void Signs_twists_and_equivalent_orbits_count()
    {
        // Even permutations with twists that sum to zero, beside a copy of the same exchange of parts.
        var wreath = KnownGroups.WreathProduct(KnownGroups.Cyclic(3), KnownGroups.Symmetric(7));
        int[] twistFree = [.. Enumerable.Range(0, 21)];
        var cycle = Permutation.FromImages([.. twistFree.Select(point => (point + 3) % 21)]);
        var corner = Permutation.FromCycle(0, 1, 2) * Permutation.FromCycle(3, 5, 4);
        var three = Permutation.FromCycle(0, 3, 6) * Permutation.FromCycle(1, 4, 7) * Permutation.FromCycle(2, 5, 8);
        var group = PermutationGroup.Generate([.. new[] { cycle, corner, three }.Select(p => Doubled(p, 21))], 42);

        Assert.Equal(wreath.Order / 3 / 2, SubdirectBound.Of(group, Fixing(group), default));
        Assert.Equal(wreath.Order / 3 / 2, group.Order);
    }

    [Fact]
    public void Chains_proven_by_the_bound_are_complete()
    {
        for (var size = 3; size <= 5; size++)
        {
            var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(size, size < 4 ? [1] : [1, 2]));
            var chain = StabilizerChain.Build(group);
            Assert.Equal(SubdirectBound.Of(group, Fixing(group), default), chain.Order);
            Assert.Equal(SmallChainOrder(group), chain.Order);
        }
    }

    [Fact]
    public void A_bound_that_is_not_met_costs_nothing_but_time()
    {
        // Two copies of one group, glued: too thin for the bound, which takes the orbits for giants.
        var m24 = KnownGroups.MathieuM24();
        var twisted = PermutationGroup.Generate([.. m24.Generators.Select(p => p * Shifted(p.Inverse().Power(3), 24) * Shifted(p, 48))], 72);

        Assert.True(SubdirectBound.Of(twisted, [], default) > twisted.Order);
        Assert.True(twisted.Chain.Proof.IsProven);
        Assert.Equal(SmallChainOrder(twisted), twisted.Order);
    }

    private static Permutation[] Fixing(PermutationGroup group) => group.MovedOrbits.IsEmpty ? [] : [.. group.PointwiseStabilizer(group.MovedOrbits[0][0]).Generators];

    // By Schreier generators alone.
    private static BigInteger SmallChainOrder(PermutationGroup group)
    {
        var builder = new ChainBuilder<byte>(group.Degree);
        var lanes = new byte[builder.Stride];
        foreach (var generator in group.Generators)
        {
            generator.CopyLanes<byte>(lanes);
            builder.AddUnsettled(lanes);
        }

        builder.Complete();
        return builder.Order;
    }

    private static Permutation Doubled(Permutation permutation, int degree) => permutation * Shifted(permutation, degree);

    private static Permutation Shifted(Permutation permutation, int by) =>
        Permutation.FromImages([.. Enumerable.Range(0, by + permutation.SupportEnd).Select(i => i < by ? i : permutation[i - by] + by)]);
}
