using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Double cosets H·x·V against all products of members.</summary>
public class DoubleCosetTests
{
    private const int Degree = 6;

    [Fact]
    public void A_set_of_double_cosets_holds_each_once_with_its_size()
    {
        ForRandomPairs((h, v, left, right, random) =>
        {
            var set = new DoubleCosetSet(h, v, new CosetBudget(10_000), default);
            var plain = new List<HashSet<Permutation>>();
            for (var i = 0; i < 12; i++)
            {
                var x = random.NextPermutation(Degree);
                Assert.True(set.TryAdd(x, out var isNew));
                Assert.Equal(!plain.Exists(doubleCoset => doubleCoset.Contains(x)), isNew);
                if (isNew)
                {
                    plain.Add(Products(left, x, right));
                    Assert.Equal((x, new BigInteger(plain[^1].Count)), set.Entries[^1]);
                }
            }

            Assert.Equal(plain.Count, set.Entries.Count);
        });
    }

    [Fact]
    public void A_double_coset_asked_by_search_has_the_members_and_the_size_of_a_listed_one() => ForRandomPairs((h, v, left, right, random) =>
    {
        var x = random.NextPermutation(Degree);
        var plain = Products(left, x, right);
        var budget = new CosetBudget(1_000_000);
        var wide = WideDoubleCoset.TryMake(h, v, x, budget, default)!;
        Assert.Equal(plain.Count, wide.Size);
        for (var i = 0; i < 20; i++)
        {
            var y = random.NextPermutation(Degree);
            Assert.Equal(plain.Contains(y), wide.Contains(y, budget));
        }

        Assert.All(plain.Take(20), member => Assert.True(wide.Contains(member, budget)));
    });

    [Fact]
    public void A_walk_meets_each_coset_of_a_double_coset_once() => ForRandomPairs((a, b, left, right, random) =>
    {
        var z = random.NextPermutation(Degree);
        var walk = new CosetWalk(a, b, z);
        var budget = new CosetBudget(10_000);
        while (!walk.IsClosed)
        {
            Assert.True(walk.TryAdvance(budget));
        }

        var cosets = walk.Representatives.Select(representative => Products(left, representative, [Permutation.Identity])).ToList();
        Assert.Equal(cosets.Sum(coset => coset.Count), cosets.SelectMany(coset => coset).Distinct().Count());
        Assert.True(Products(left, z, right).SetEquals(cosets.SelectMany(coset => coset)));
    });

    [Fact]
    public void A_budget_that_does_not_reach_leaves_the_question_open()
    {
        var symmetric = PermutationGroup.Generate(Permutation.Parse("(1 2 3 4 5 6)"), Permutation.Parse("(1 2)"));
        var other = PermutationGroup.Generate(Permutation.Parse("(6 7 8 9)"), Permutation.Parse("(6 7)"));

        // The cosets say where points 7, 8 and 9 come from: from any of 6, 7, 8 and 9, in 24 ways.
        Assert.False(new DoubleCosetSet(Widened(symmetric), Widened(other), new CosetBudget(23), default).TryAdd(Permutation.Identity, out _));
        Assert.True(new DoubleCosetSet(Widened(symmetric), Widened(other), new CosetBudget(24), default).TryAdd(Permutation.Identity, out _));

        static PermutationGroup Widened(PermutationGroup group) => PermutationGroup.Generate(group.Generators, 9);
    }

    private static void ForRandomPairs(Action<PermutationGroup, PermutationGroup, HashSet<Permutation>, HashSet<Permutation>, SeededRandom> check)
    {
        for (var seed = 0UL; seed < 150; seed++)
        {
            var random = new SeededRandom(seed);
            var (one, other) = (Generators(seed), Generators(seed + 1000));
            check(PermutationGroup.Generate(one, Degree), PermutationGroup.Generate(other, Degree), SmallGroups.Closure(one), SmallGroups.Closure(other), random);
        }

        static Permutation[] Generators(ulong seed) => SmallGroups.RandomGenerators(seed, Degree);
    }

    private static HashSet<Permutation> Products(IEnumerable<Permutation> left, Permutation middle, IReadOnlyCollection<Permutation> right) =>
        [.. left.SelectMany(h => right.Select(v => h * middle * v))];
}
