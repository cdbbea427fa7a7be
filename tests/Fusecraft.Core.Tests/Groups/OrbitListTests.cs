using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

public class OrbitListTests
{
    [Theory]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(6)]
    public void Every_small_group_carries_sets_and_lists_to_where_its_members_tell(int degree)
    {
        int[][] lists = [[], [degree - 1], [1, 0], [2, 0, 1], [.. Enumerable.Range(0, degree)]];
        foreach (var (group, members) in QueriesOracle.GroupsOfDegree(degree))
        {
            foreach (var list in lists)
            {
                string[] tuples = [.. members.Select(p => QueriesOracle.Images(list, p)).Select(images => Text(images)).Distinct().Order(StringComparer.Ordinal)];
                Assert.Equal(tuples, group.OrbitOfTuple(list).Select(images => Text(images)));
                Assert.Equal(tuples.Length, group.OrbitSizeOfTuple(list));

                string[] sets = [.. members.Select(p => QueriesOracle.Images(list, p).Order()).Select(images => Text(images)).Distinct().Order(StringComparer.Ordinal)];
                Assert.Equal(sets, group.OrbitOfSet(list).Select(images => Text(images)).Order(StringComparer.Ordinal));
                Assert.Equal(sets.Length, group.OrbitSizeOfSet(list));
            }
        }

        static string Text(IEnumerable<int> points) => string.Join(',', points);
    }

    [Fact]
    public void Orbits_far_too_long_to_list_have_a_size_and_a_beginning()
    {
        var symmetric = PermutationGroup.Generate(Permutation.FromCycle(0, 1), Permutation.FromCycle([.. Enumerable.Range(0, 60)]));
        int[] first = [.. Enumerable.Range(0, 30)];

        // 60! / 30! and the binomial coefficient of 30 in 60; own computation.
        Assert.Equal(Enumerable.Range(31, 30).Aggregate(System.Numerics.BigInteger.One, (product, i) => product * i), symmetric.OrbitSizeOfTuple(first));
        Assert.Equal(118264581564861424, symmetric.OrbitSizeOfSet(first));
        Assert.Equal(first, symmetric.OrbitOfTuple(first).First());
        Assert.Equal([.. first[..29], 30], symmetric.OrbitOfTuple(first).ElementAt(1).ToArray());
        Assert.Equal(first, symmetric.OrbitOfSet(first).First());
        Assert.Equal(50, symmetric.OrbitOfSet(first).Take(50).Select(set => string.Join(',', set)).Distinct().Count());
    }

    [Property(MaxTest = 60)]
    public bool A_chain_on_a_wanted_base_begins_with_it_and_has_the_same_members(ulong seed)
    {
        var group = SmallGroups.Random(seed, 18);
        var random = new SeededRandom(seed);
        var order = random.NextPermutation(group.Degree);
        int[] points = [.. Enumerable.Range(0, 4).Select(i => order[i])];
        var chain = group.ChainWithBase(points);
        int[] leading = [.. chain.Base.TakeWhile(points.Contains)];
        return chain.Proof.IsProven && chain.Order == group.Order && leading.SequenceEqual(points.Where(leading.Contains)) && chain.Base.Skip(leading.Length).All(point => !points.Contains(point))
            && chain.Contains(group.RandomElement(random)) && SmallGroups.FindFault(chain) is null;
    }
}
