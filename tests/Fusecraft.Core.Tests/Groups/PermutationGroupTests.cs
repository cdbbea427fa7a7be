using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

public class PermutationGroupTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Every_group_made_by_two_permutations_of_few_points_has_the_members_of_the_closure(int degree)
    {
        Permutation[] all = [.. SmallGroups.AllOfDegree(degree)];
        foreach (var first in all)
        {
            foreach (var second in all)
            {
                RequireMembers([first, second], degree, all);
            }
        }
    }

    [Fact]
    public void Every_group_made_by_two_permutations_of_five_points_has_the_members_of_the_closure()
    {
        Permutation[] all = [.. SmallGroups.AllOfDegree(5)];
        Permutation[] firsts = [.. all.GroupBy(p => p.CycleType).Select(group => group.First())];

        // Up to conjugation the first generator is one of each cycle type.
        foreach (var first in firsts)
        {
            foreach (var second in all)
            {
                RequireMembers([first, second], 5, all);
            }
        }
    }

    [Theory]
    [InlineData(6, 60)]
    [InlineData(7, 20)]
    [InlineData(8, 6)]
    public void Random_groups_have_the_members_of_the_closure(int degree, int count)
    {
        Permutation[] all = [.. SmallGroups.AllOfDegree(Math.Min(degree, 6))];
        for (var seed = 0; seed < count; seed++)
        {
            RequireMembers(SmallGroups.RandomGenerators((ulong)(seed + (1000 * degree)), degree), degree, all);
        }
    }

    [Property(MaxTest = 60)]
    public bool Chains_of_random_groups_are_valid_and_proven(ulong seed)
    {
        var group = SmallGroups.Random(seed, 24);
        return SmallGroups.FindFault(group.Chain) is null && group.Chain.Proof.IsProven && group.Generators.All(group.Contains);
    }

    [Property(MaxTest = 60)]
    public bool Products_and_inverses_of_members_are_members(ulong seed)
    {
        var group = SmallGroups.Random(seed, 20);
        var random = new SeededRandom(seed);
        var a = group.RandomElement(random);
        var b = group.RandomElement(random);
        return group.Contains(a) && group.Contains(b) && group.Contains(a * b) && group.Contains(a.Inverse());
    }

    [Property(MaxTest = 60)]
    public bool The_order_of_a_member_and_of_a_subgroup_divides_the_order_of_the_group(ulong seed)
    {
        var group = SmallGroups.Random(seed, 16);
        var random = new SeededRandom(seed);
        var a = group.RandomElement(random);
        var subgroup = PermutationGroup.Generate([a, group.RandomElement(random)], group.Degree);
        return (group.Order % a.Order).IsZero && (group.Order % subgroup.Order).IsZero;
    }

    [Property(MaxTest = 60)]
    public bool Orbit_length_times_order_of_the_stabilizer_is_the_order_of_the_group(ulong seed)
    {
        var group = SmallGroups.Random(seed, 18);
        var point = (int)(seed % (ulong)group.Degree);
        var stabilizer = group.PointwiseStabilizer(point);
        return stabilizer.Order * group.OrbitOf(point).Length == group.Order && stabilizer.Generators.All(g => g[point] == point && group.Contains(g));
    }

    [Property(MaxTest = 40)]
    public bool The_pointwise_stabilizer_holds_the_members_that_fix_the_points(ulong seed)
    {
        var group = SmallGroups.Random(seed, 7);
        var stabilizer = group.PointwiseStabilizer(4, 1);
        var fixing = SmallGroups.Closure(group.Generators).Where(p => p[1] == 1 && p[4] == 4).ToHashSet();
        return stabilizer.Order == fixing.Count && fixing.All(stabilizer.Contains) && fixing.SetEquals(SmallGroups.Closure(stabilizer.Generators))
            && fixing.All(p => stabilizer.Unrank(stabilizer.Rank(p)) == p);
    }

    [Property(MaxTest = 30)]
    public bool Rank_counts_members_in_lexicographic_order_of_image_lists(ulong seed)
    {
        var group = SmallGroups.Random(seed, 6);
        int[][] members = [.. SmallGroups.Closure(group.Generators).Select(p => Images(p, group.Degree))];
        Array.Sort(members, (a, b) => a.AsSpan().SequenceCompareTo(b));
        for (var i = 0; i < members.Length; i++)
        {
            var member = Permutation.FromImages(members[i]);
            if (group.Rank(member) != i || group.Unrank(i) != member)
            {
                return false;
            }
        }

        return group.Order == members.Length;
    }

    [Property(MaxTest = 60)]
    public bool Rank_undoes_unrank_and_ascends_with_the_image_lists(ulong seed)
    {
        var group = SmallGroups.Random(seed, 40);
        var random = new SeededRandom(seed);
        var (r, s) = (random.NextBigInteger(group.Order), random.NextBigInteger(group.Order));
        var (a, b) = (group.Unrank(r), group.Unrank(s));
        var compared = Images(a, group.Degree).AsSpan().SequenceCompareTo(Images(b, group.Degree));
        return group.Rank(a) == r && group.Rank(b) == s && Math.Sign(compared) == r.CompareTo(s);
    }

    [Fact]
    public void The_first_member_is_the_identity_and_positions_out_of_range_are_refused()
    {
        var group = PermutationGroup.Generate(Permutation.FromCycle(0, 1, 2, 3));

        Assert.True(group.Unrank(0).IsIdentity);
        Assert.Throws<ArgumentOutOfRangeException>(() => group.Unrank(4));
        Assert.Throws<ArgumentOutOfRangeException>(() => group.Unrank(-1));
        Assert.Throws<ArgumentException>(() => group.Rank(Permutation.FromCycle(0, 1)));
    }

    [Fact]
    public void Random_elements_are_uniform()
    {
        // Order 24 acting on 6 points in two orbits; chi-square with 23 degrees of freedom exceeds 49.7 with probability 0.001. The seed is fixed.
        var group = PermutationGroup.Generate(Permutation.Parse("(1 2 3 4)(5 6)"), Permutation.Parse("(1 2)(5 6)"));
        const int draws = 48_000;
        var counts = new int[24];
        var random = new SeededRandom(7);
        for (var i = 0; i < draws; i++)
        {
            counts[(int)group.Rank(group.RandomElement(random))]++;
        }

        var expected = draws / 24.0;
        Assert.InRange(counts.Sum(count => (count - expected) * (count - expected) / expected), 5, 49.7);
    }

    [Fact]
    public void Random_elements_depend_on_the_group_and_the_seed_but_not_on_the_generators()
    {
        var one = PermutationGroup.Generate(Permutation.FromCycle(0, 1), Permutation.FromCycle(0, 1, 2, 3, 4, 5, 6));
        var other = PermutationGroup.Generate(Permutation.FromCycle(2, 5), Permutation.FromCycle(0, 1, 2, 3), Permutation.FromCycle(3, 4, 5, 6));
        var (a, b) = (new SeededRandom(5), new SeededRandom(5));

        for (var i = 0; i < 20; i++)
        {
            Assert.Equal(one.RandomElement(a), other.RandomElement(b));
        }
    }

    [Property(MaxTest = 80)]
    public bool Evidence_can_be_checked(ulong seed)
    {
        var group = SmallGroups.Random(seed, 6);
        var members = SmallGroups.Closure(group.Generators);
        var p = new SeededRandom(seed).NextPermutation(7);
        var evidence = group.Explain(p);
        var chain = group.Chain;
        bool FixesBase(int levels, Permutation q) => chain.Base.Take(levels).All(point => q[point] == point);
        return evidence.IsMember == members.Contains(p) && evidence.Kind switch
        {
            MembershipEvidenceKind.Member => true,
            MembershipEvidenceKind.LeavesOrbit => p[evidence.Point!.Value] == evidence.Image
                && members.All(m => m[evidence.Point.Value] != evidence.Image) && members.Select(m => m[evidence.Point.Value]).ToHashSet().SetEquals(evidence.Orbit),
            MembershipEvidenceKind.LeavesLevel => members.Contains(p.Inverse() * evidence.Residue) && FixesBase(evidence.Level!.Value, evidence.Residue)
                && evidence.Residue[evidence.Point!.Value] == evidence.Image
                && members.Where(m => FixesBase(evidence.Level.Value, m)).All(m => m[evidence.Point.Value] != evidence.Image),
            _ => members.Contains(p.Inverse() * evidence.Residue) && FixesBase(chain.Base.Length, evidence.Residue) && !evidence.Residue.IsIdentity,
        };
    }

    [Theory]
    [InlineData("(1 2)(3 4)", "(1 3)", MembershipEvidenceKind.LeavesOrbit)]
    [InlineData("(1 2)(3 4)", "(1 2)(3 4)", MembershipEvidenceKind.Member)]
    [InlineData("(1 2)(3 4)", "(1 2)", MembershipEvidenceKind.LeavesResidue)]
    [InlineData("(1 2 3 4 5);(2 3)(4 5)", "(1 2)", MembershipEvidenceKind.LeavesResidue)]
    [InlineData("(1 2 3 4)(5 6);(1 2)(3 4);(5 6)(7 8);(7 8 9)", "(2 3)(8 9)", MembershipEvidenceKind.LeavesLevel)]
    public void Evidence_names_what_fails(string generators, string permutation, MembershipEvidenceKind kind)
    {
        var group = PermutationGroup.Generate([.. generators.Split(';').Select(Permutation.Parse)], 9);
        var evidence = group.Explain(Permutation.Parse(permutation));

        Assert.Equal(kind == MembershipEvidenceKind.Member, group.Contains(Permutation.Parse(permutation)));
        Assert.Equal(kind, evidence.Kind);
        Assert.NotEmpty(evidence.ToString());
    }

    [Fact]
    public void Orbits_are_sorted_and_include_fixed_points()
    {
        var group = PermutationGroup.Generate([Permutation.Parse("(2 7)(3 4)"), Permutation.Parse("(7 5)")], 8);

        Assert.Equal(["0", "1,4,6", "2,3", "5", "7"], group.Orbits.Select(orbit => string.Join(',', orbit)));
        Assert.Equal(["1,4,6", "2,3"], group.MovedOrbits.Select(orbit => string.Join(',', orbit)));
        Assert.Equal([1, 4, 6], group.OrbitOf(6).ToArray());
        Assert.False(group.IsTransitive);
        Assert.True(PermutationGroup.Generate(Permutation.FromCycle(0, 2, 1)).IsTransitive);
        Assert.Throws<ArgumentOutOfRangeException>(() => group.OrbitOf(8));
    }

    [Fact]
    public void Trivial_groups_have_one_member()
    {
        foreach (var group in new[] { PermutationGroup.Generate(), PermutationGroup.Generate([], 300), PermutationGroup.Generate(default(Permutation)) })
        {
            Assert.True(group.Order.IsOne);
            Assert.True(group.IsTrivial);
            Assert.True(group.Contains(Permutation.Identity));
            Assert.False(group.Contains(Permutation.FromCycle(0, 1)));
            Assert.Equal("1", group.FactoredOrder.ToString());
            Assert.True(group.Rank(default).IsZero);
            Assert.True(group.RandomElement(new SeededRandom(1)).IsIdentity);
        }
    }

    [Fact]
    public void Generators_beyond_the_degree_are_refused()
    {
        var exception = Assert.Throws<ArgumentException>(() => PermutationGroup.Generate([Permutation.FromCycle(0, 1), Permutation.FromCycle(2, 5)], 5));

        Assert.Contains("Generator 1 moves point 5", exception.Message, StringComparison.Ordinal);
    }

    [Fact]
    public void Many_redundant_generators_do_no_harm()
    {
        var random = new SeededRandom(3);
        var group = PermutationGroup.Generate(Enumerable.Range(0, 300).Select(_ => random.NextPermutation(12)).ToArray(), 12);

        Assert.Equal(new BigInteger(479001600), group.Order);
    }

    private static int[] Images(Permutation permutation, int degree)
    {
        var images = new int[degree];
        permutation.CopyImages(images);
        return images;
    }

    private static void RequireMembers(Permutation[] generators, int degree, Permutation[] candidates)
    {
        var group = PermutationGroup.Generate(generators, degree);
        var members = SmallGroups.Closure(generators);

        Assert.Equal(members.Count, group.Order);
        Assert.All(members, member => Assert.True(group.Contains(member)));
        foreach (var candidate in candidates)
        {
            Assert.Equal(members.Contains(candidate), group.Contains(candidate));
        }

        Assert.Equal(group.Order, group.FactoredOrder.Value);
    }
}
