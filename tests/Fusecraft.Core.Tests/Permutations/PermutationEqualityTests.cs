using FsCheck.Xunit;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Permutations;

[Properties(Arbitrary = [typeof(PermutationArbitraries)])]
public class PermutationEqualityTests
{
    [Fact]
    public void The_default_is_the_identity()
    {
        Permutation none = default;
        Assert.True(none.IsIdentity);
        Assert.Equal(Permutation.Identity, none);
        Assert.Equal(Permutation.FromImages(0, 1, 2), none);
        Assert.Equal(0, none.SupportEnd);
        Assert.Empty(none.Support);
        Assert.Empty(none.Cycles());
        Assert.Equal("()", none.ToString());
        Assert.Equal(1, none.Order);
        Assert.Equal(Parity.Even, none.Parity);
        Assert.Equal(default, none.CycleType);
        Assert.Equal(41, none[41]);
        Assert.True(none.Inverse().IsIdentity && none.Power(-7).IsIdentity && none.ConjugateBy(none).IsIdentity && (none * none).IsIdentity);
    }

    [Property]
    public bool Trailing_fixed_points_do_not_count(Permutation p, byte extra)
    {
        var images = new int[p.SupportEnd + extra];
        p.CopyImages(images);
        var extended = Permutation.FromImages(images);
        return extended == p && extended.Equals((object)p) && extended.GetHashCode() == p.GetHashCode() && extended.SupportEnd == p.SupportEnd;
    }

    [Property]
    public bool Equality_is_equality_of_all_images(Permutation p, Permutation q)
    {
        var same = Enumerable.Range(0, 1100).All(i => p[i] == q[i]);
        return p == q == same && p != q == !same && p.Equals(q) == same && (!same || p.GetHashCode() == q.GetHashCode());
    }

    [Property]
    public bool Swapping_two_images_makes_a_different_permutation(Permutation p, byte i, byte j) =>
        (p * Permutation.FromCycle(i, j + 256)) != p;

    [Fact]
    public void A_permutation_equals_no_other_kind_of_object()
    {
        Assert.False(Permutation.Identity.Equals(null));
        Assert.False(Permutation.FromCycle(0, 1).Equals("(1 2)"));
    }

    [Fact]
    public void Hashes_of_all_permutations_of_six_points_hardly_collide()
    {
        var hashes = new HashSet<int>();
        var all = new HashSet<Permutation> { Permutation.Identity };
        for (var i = 1; i < 6; i++)
        {
            all = [.. all.SelectMany(p => Enumerable.Range(0, i + 1).Select(j => j == i ? p : p * Permutation.FromCycle(j, i)))];
        }

        Assert.Equal(720, all.Count);
        hashes.UnionWith(all.Select(p => p.GetHashCode()));
        Assert.InRange(hashes.Count, 710, 720);
    }
}
