using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

public class CosetTests
{
    [Theory]
    [InlineData(2, 1)]
    [InlineData(3, 1)]
    [InlineData(4, 1)]
    [InlineData(5, 11)]
    [InlineData(6, 5)]
    public void Two_small_groups_compare_as_their_members_do(int degree, int stride)
    {
        var groups = QueriesOracle.GroupsOfDegree(degree).ToList();
        for (var i = 0; i < groups.Count; i++)
        {
            for (var k = i % stride; k < groups.Count; k += stride)
            {
                var (group, members) = groups[i];
                var (other, others) = groups[k];
                Assert.Equal(members.IsSubsetOf(others), group.IsSubgroupOf(other));
                Assert.Equal(members.SetEquals(others), group.SameGroupAs(other));
                var isNormalized = others.All(by => members.All(p => members.Contains(p.ConjugateBy(by))));
                Assert.Equal(isNormalized, group.IsNormalizedBy(other));
                Assert.Equal(isNormalized && members.IsSubsetOf(others), group.IsNormalIn(other));
                if (members.IsSubsetOf(others))
                {
                    RequireCosets(other, others, group, members);
                }
                else
                {
                    Assert.Throws<ArgumentException>(() => other.Index(group));
                    Assert.Throws<ArgumentException>(() => other.CosetRepresentatives(group));
                }
            }
        }
    }

    [Property(MaxTest = 80)]
    public void The_cosets_of_a_random_subgroup_part_the_group(ulong seed)
    {
        var (group, members, random) = QueriesOracle.RandomGroup(seed);
        Permutation[] generators = [group.RandomElement(random).Power(2), group.RandomElement(random).Power(3)];
        RequireCosets(group, members, PermutationGroup.Generate(generators), SmallGroups.Closure(generators));
    }

    [Property(MaxTest = 60)]
    public bool The_least_of_a_coset_depends_on_the_coset_alone(ulong seed)
    {
        var group = SmallGroups.Random(seed, 30);
        var random = new SeededRandom(seed);
        var p = random.NextPermutation(32);
        var least = group.LeastOfCoset(p);
        return group.Contains(least * p.Inverse()) && group.LeastOfCoset(group.RandomElement(random) * p) == least;
    }

    [Property(MaxTest = 40)]
    public bool Elements_are_all_members_in_the_order_of_their_ranks(ulong seed)
    {
        var (group, members, _) = QueriesOracle.RandomGroup(seed);
        Permutation[] elements = [.. group.Elements()];
        return members.SetEquals(elements) && elements.Length == members.Count && elements[0].IsIdentity && Enumerable.Range(0, Math.Min(elements.Length, 500)).All(i => group.Rank(elements[i]) == i);
    }

    [Fact]
    public void The_first_members_of_a_huge_group_come_at_once()
    {
        var symmetric = PermutationGroup.Generate(Permutation.FromCycle(0, 1), Permutation.FromCycle([.. Enumerable.Range(0, 40)]));

        Assert.Equal(["()", "(39 40)", "(38 39)", "(38 39 40)", "(38 40 39)", "(38 40)"], symmetric.Elements().Take(6).Select(p => p.ToString()));
    }

    private static void RequireCosets(PermutationGroup group, HashSet<Permutation> members, PermutationGroup subgroup, HashSet<Permutation> subgroupMembers)
    {
        Assert.Equal(members.Count / subgroupMembers.Count, group.Index(subgroup));
        Permutation[] representatives = [.. group.CosetRepresentatives(subgroup)];
        Assert.Equal(new BigInteger(representatives.Length), group.Index(subgroup));
        Assert.True(representatives[0].IsIdentity);
        var met = new HashSet<Permutation>();
        foreach (var representative in representatives)
        {
            Permutation[] coset = [.. subgroupMembers.Select(p => p * representative)];
            Assert.Equal(representative, coset.MinBy(p => string.Concat(Enumerable.Range(0, group.Degree).Select(i => (char)p[i])), StringComparer.Ordinal));
            Assert.All(coset, p => Assert.True(met.Add(p)));
        }

        Assert.True(met.SetEquals(members));
    }
}
