using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

public class ColouringTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(6)]
    public void Sets_of_points_under_every_small_group_has_the_stabilizer_that_its_members_tell(int degree)
    {
        foreach (var (group, members) in QueriesOracle.GroupsOfDegree(degree))
        {
            // Of six points every fifth set.
            for (var bits = 0; bits < 1 << degree; bits += degree < 6 ? 1 : 5)
            {
                int[] set = [.. Enumerable.Range(0, degree).Where(i => ((bits >> i) & 1) != 0)];
                Assert.True(QueriesOracle.Has(group.SetwiseStabilizer(set), members.Where(p => set.All(i => set.Contains(p[i])))));
                Assert.Equal(members.Select(p => string.Join(',', set.Select(i => p[i]).Order())).Distinct().Count(), group.OrbitSizeOfSet(set));
            }
        }
    }

    [Property(MaxTest = 300)]
    public bool The_stabilizer_of_a_colouring_holds_the_members_that_keep_every_colour(ulong seed)
    {
        var (group, members, random) = QueriesOracle.RandomGroup(seed);
        var colours = QueriesOracle.RandomColours(random, group.Degree);
        return QueriesOracle.Has(group.ColouringStabilizer(colours), members.Where(p => QueriesOracle.Takes(p, colours, colours)))
            && group.OrbitSizeOfColouring(colours) == members.Select(p => string.Join(',', QueriesOracle.Carry(colours, p))).Distinct().Count();
    }

    [Property(MaxTest = 300)]
    public bool A_member_that_takes_one_colouring_to_another_is_found_exactly_when_there_is_one(ulong seed)
    {
        var (group, members, random) = QueriesOracle.RandomGroup(seed);
        var source = QueriesOracle.RandomColours(random, group.Degree);

        // Half of the time by a member, else by any permutation.
        var by = random.NextInt32(2) == 0 ? group.RandomElement(random) : random.NextPermutation(group.Degree);
        var target = QueriesOracle.Carry(source, by);
        var found = group.FindMemberTaking(source, target);
        return found is { } member
            ? members.Contains(member) && QueriesOracle.Takes(member, source, target)
            : !members.Any(p => QueriesOracle.Takes(p, source, target));
    }

    // The descent deals with orbits one by one and with giants without search; the backtrack searches all points at once.
    [Property(MaxTest = 100)]
    public bool Orbit_by_orbit_and_all_at_once_agree(ulong seed)
    {
        var group = SmallGroups.Random(seed, 14);
        var random = new SeededRandom(seed);
        var colours = QueriesOracle.RandomColours(random, group.Degree);
        var search = new PartitionBacktrack([group], new PointStructure(colours), default);
        var target = QueriesOracle.Carry(colours, random.NextInt32(2) == 0 ? group.RandomElement(random) : random.NextPermutation(group.Degree));
        var found = group.FindMemberTaking(colours, target);
        return search.Stabilizer().SameGroupAs(group.ColouringStabilizer(colours)) && (search.FindCarryingTo(new PointStructure(target)) is null) == (found is null)
            && (found is not { } member || (group.Contains(member) && QueriesOracle.Takes(member, colours, target)));
    }

    [Property(MaxTest = 60)]
    public bool The_stabilizer_of_a_colouring_carried_on_is_the_conjugate(ulong seed)
    {
        var group = SmallGroups.Random(seed, 20);
        var random = new SeededRandom(seed);
        var colours = QueriesOracle.RandomColours(random, group.Degree);
        var by = group.RandomElement(random);
        var stabilizer = group.ColouringStabilizer(colours);
        var carried = group.ColouringStabilizer(QueriesOracle.Carry(colours, by));
        return stabilizer.IsSubgroupOf(group) && carried.Order == stabilizer.Order && stabilizer.Generators.All(p => carried.Contains(p.ConjugateBy(by)))
            && StabilizerChain.Build(PermutationGroup.Generate(stabilizer.Generators, group.Degree)).Order == stabilizer.Order;
    }

    [Fact]
    public void Even_permutations_can_carry_a_colouring_only_with_two_points_alike_or_an_even_exchange()
    {
        var alternating = PermutationGroup.Generate(Permutation.FromCycle(0, 1, 2), Permutation.FromCycle(0, 1, 2, 3, 4));

        Assert.Null(alternating.FindMemberTaking([0, 1, 2, 3, 4], [1, 0, 2, 3, 4]));
        Assert.NotNull(alternating.FindMemberTaking([0, 1, 2, 3, 4], [1, 0, 3, 2, 4]));
        Assert.NotNull(alternating.FindMemberTaking([0, 1, 2, 3, 3], [1, 0, 2, 3, 3]));
        Assert.True(alternating.ColouringStabilizer([0, 1, 2, 3, 3]).IsTrivial);
    }

    [Fact]
    public void Whoever_gives_a_wrong_number_of_colours_or_a_point_outside_is_told()
    {
        var group = PermutationGroup.Generate(Permutation.FromCycle(0, 1, 2));

        Assert.Contains("2 colours", Assert.Throws<ArgumentException>(() => group.ColouringStabilizer([0, 1])).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => group.SetwiseStabilizer([3]));
        Assert.Throws<ArgumentException>(() => group.SetwiseStabilizer([1, 1]));
        Assert.Throws<ArgumentException>(() => group.FindMemberTaking([0, 0, 0], [0, 0]));
    }

    [Fact]
    public void Cancelling_ends_a_search()
    {
        var group = PermutationGroup.Generate(Permutation.Parse("(1 2 3 4 5 6 7 8 9)"), Permutation.Parse("(1 4 7)(2 5)"));
        using var source = new CancellationTokenSource();
        source.Cancel();

        Assert.Throws<OperationCanceledException>(() => group.SetwiseStabilizer([0, 1, 2], source.Token));
        Assert.Throws<OperationCanceledException>(() => group.Centralizer(Permutation.FromCycle(0, 1), source.Token));
    }

    [Fact]
    public void A_group_without_points_has_one_colouring()
    {
        var none = PermutationGroup.Generate();

        Assert.Equal(BigInteger.One, none.OrbitSizeOfColouring([]));
        Assert.Equal(BigInteger.One, none.CountColourings(5));
        Assert.True(none.Centralizer(Permutation.FromCycle(0, 1)).IsTrivial);
        Assert.True(none.Intersection(PermutationGroup.Generate(Permutation.FromCycle(0, 1))).IsTrivial);
        Assert.Null(none.FindConjugator(Permutation.FromCycle(0, 1), Permutation.FromCycle(0, 2)));
    }
}
