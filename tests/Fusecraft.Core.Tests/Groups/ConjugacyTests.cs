using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

public class ConjugacyTests
{
    [Theory]
    [InlineData(3)]
    [InlineData(4)]
    public void Every_pair_of_permutations_under_every_small_group_is_conjugate_when_its_members_tell(int degree)
    {
        Permutation[] all = [.. SmallGroups.AllOfDegree(degree)];
        foreach (var (group, members) in QueriesOracle.GroupsOfDegree(degree))
        {
            foreach (var a in all)
            {
                Assert.True(QueriesOracle.Has(group.Centralizer(a), members.Where(p => p * a == a * p)));
                foreach (var b in all)
                {
                    RequireConjugator(group, members, a, b);
                }
            }
        }
    }

    [Theory]
    [InlineData(5)]
    [InlineData(6)]
    public void Many_permutations_under_every_small_group_have_the_centralizer_and_the_conjugates_that_its_members_tell(int degree)
    {
        Permutation[] all = [.. SmallGroups.AllOfDegree(degree)];
        foreach (var (group, members) in QueriesOracle.GroupsOfDegree(degree))
        {
            for (var i = members.Count % 3; i < all.Length; i += degree == 5 ? 3 : 31)
            {
                Assert.True(QueriesOracle.Has(group.Centralizer(all[i]), members.Where(p => p * all[i] == all[i] * p)));
                RequireConjugator(group, members, all[i], all[i].ConjugateBy(all[^(1 + (i * 10 % all.Length))]));
            }
        }
    }

    [Theory]
    [InlineData(5, 11)]
    [InlineData(6, 13)]
    public void Small_groups_meet_in_their_common_members(int degree, int stride)
    {
        var groups = QueriesOracle.GroupsOfDegree(degree).ToList();
        var renaming = Permutation.FromCycle([.. Enumerable.Range(0, degree)]);
        for (var i = 0; i < groups.Count; i++)
        {
            for (var k = i % stride; k < groups.Count; k += stride)
            {
                var (group, members) = groups[i];
                var other = PermutationGroup.Generate(groups[k].Group.Generators.Select(p => p.ConjugateBy(renaming)), degree);
                var others = groups[k].Members.Select(p => p.ConjugateBy(renaming)).ToHashSet();
                Assert.True(QueriesOracle.Has(group.Intersection(other), members.Where(others.Contains)));
            }
        }
    }

    [Property(MaxTest = 300)]
    public void A_conjugating_member_is_found_exactly_when_there_is_one(ulong seed)
    {
        var (group, members, random) = QueriesOracle.RandomGroup(seed);
        var a = random.NextInt32(2) == 0 ? group.RandomElement(random) : random.NextPermutation(group.Degree + 1);
        var b = a.ConjugateBy(random.NextInt32(2) == 0 ? group.RandomElement(random) : random.NextPermutation(group.Degree));
        RequireConjugator(group, members, a, b);
        Assert.True(QueriesOracle.Has(group.Centralizer(a), members.Where(p => p * a == a * p)));
    }

    [Property(MaxTest = 100)]
    public bool The_centralizer_of_a_group_commutes_with_all_its_members(ulong seed)
    {
        var (group, members, random) = QueriesOracle.RandomGroup(seed);
        Permutation[] generators = random.NextInt32(2) == 0 ? [.. group.Generators] : [group.RandomElement(random), random.NextPermutation(group.Degree).Power(2)];
        return QueriesOracle.Has(group.CentralizerOf(PermutationGroup.Generate(generators)), members.Where(p => generators.All(g => p * g == g * p)));
    }

    [Property(MaxTest = 150)]
    public bool The_intersection_holds_the_members_of_both(ulong seed)
    {
        var (group, members, random) = QueriesOracle.RandomGroup(seed);
        var (other, others, _) = QueriesOracle.RandomGroup(random.NextUInt64());
        var both = members.Where(others.Contains).ToList();
        return QueriesOracle.Has(group.Intersection(other), both) && QueriesOracle.Has(other.Intersection(group), both);
    }

    [Fact]
    public void Every_two_groups_of_four_points_meet_in_their_common_members()
    {
        var groups = QueriesOracle.GroupsOfDegree(4).ToList();
        foreach (var (group, members) in groups)
        {
            foreach (var (other, others) in groups)
            {
                Assert.True(QueriesOracle.Has(group.Intersection(other), members.Where(others.Contains)));
            }
        }
    }

    [Property(MaxTest = 40)]
    public bool The_conjugacy_class_of_a_member_and_its_centralizer_multiply_to_the_order(ulong seed)
    {
        var (group, members, random) = QueriesOracle.RandomGroup(seed);
        var a = group.RandomElement(random);
        return group.Centralizer(a).Order * members.Select(a.ConjugateBy).Distinct().Count() == group.Order;
    }

    // Larger groups than closure can list: the laws alone.
    [Property(MaxTest = 40)]
    public bool Conjugates_by_members_are_recognised_in_larger_groups(ulong seed)
    {
        var group = SmallGroups.Random(seed, 24);
        var random = new SeededRandom(seed);
        var a = group.RandomElement(random);
        var b = a.ConjugateBy(group.RandomElement(random));
        var centralizer = group.Centralizer(a);
        return group.FindConjugator(a, b) is { } by && group.Contains(by) && a.ConjugateBy(by) == b && centralizer.Contains(a) && centralizer.IsSubgroupOf(group)
            && centralizer.Generators.All(g => g * a == a * g) && PermutationGroup.Generate(centralizer.Generators, group.Degree).Order == centralizer.Order
            && group.Centralizer(b).Order == centralizer.Order;
    }

    private static void RequireConjugator(PermutationGroup group, HashSet<Permutation> members, Permutation a, Permutation b)
    {
        if (group.FindConjugator(a, b) is { } by)
        {
            Assert.Contains(by, members);
            Assert.Equal(b, by.Inverse() * a * by);
        }
        else
        {
            Assert.DoesNotContain(members, p => p.Inverse() * a * p == b);
        }
    }
}
