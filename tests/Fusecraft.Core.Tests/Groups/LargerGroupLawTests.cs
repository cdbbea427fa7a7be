using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Laws on random groups of 7 to 40 points, too large to list. Orders of subgroups that were found with their order are proven anew from their generators alone.</summary>
public class LargerGroupLawTests
{
    [Property(MaxTest = 40)]
    public bool Orbit_sizes_of_sets_and_lists_and_their_stabilizers_multiply_to_the_order(ulong seed)
    {
        var (group, random) = Group(seed);
        int[] points = [.. RandomPoints(random, group.Degree)];
        var setwise = group.SetwiseStabilizer(points);
        var pointwise = group.PointwiseStabilizer(points);
        return group.OrbitSizeOfTuple(points) * pointwise.Order == group.Order && group.Index(pointwise) == group.OrbitSizeOfTuple(points)
            && group.OrbitSizeOfSet(points) * Proven(setwise).Order == group.Order && group.Index(setwise) == group.OrbitSizeOfSet(points)
            && setwise.Generators.All(p => points.All(point => points.Contains(p[point]))) && pointwise.IsSubgroupOf(setwise) && pointwise.IsNormalIn(setwise)
            && Proven(pointwise).Order == pointwise.Order;
    }

    // The action on the points, two by two in order, has the pairs as points: what it fixes there needs no search.
    [Property(MaxTest = 25)]
    public bool The_stabilizer_of_two_points_as_a_set_is_that_of_a_point_of_the_action_on_pairs(ulong seed)
    {
        var (group, random) = Group(seed, 16);
        var pairs = OnPairs(group, out var numberOf);
        var (a, b) = (random.NextInt32(group.Degree - 1), group.Degree - 1);
        return pairs.PointwiseStabilizer(numberOf[(a, b)]).Order * (group.Order / pairs.Order) == group.SetwiseStabilizer([a, b]).Order
            && group.OrbitSizeOfSet([a, b]) == pairs.OrbitOf(numberOf[(a, b)]).Length && group.OrbitOfSet(a, b).Count() == pairs.OrbitOf(numberOf[(a, b)]).Length;
    }

    [Property(MaxTest = 40)]
    public bool Cosets_of_a_large_subgroup_are_told_apart_and_cover(ulong seed)
    {
        var (group, random) = Group(seed);
        var subgroup = group.SetwiseStabilizer([.. RandomPoints(random, group.Degree).Take(2)]);
        Permutation[] representatives = [.. group.CosetRepresentatives(subgroup)];
        var anyone = group.RandomElement(random);
        return representatives.Length == group.Index(subgroup) && representatives.All(group.Contains)
            && representatives.Count(representative => subgroup.Contains(anyone * representative.Inverse())) == 1
            && representatives.Contains(subgroup.LeastOfCoset(anyone));
    }

    [Property(MaxTest = 30)]
    public bool The_intersection_is_the_largest_subgroup_of_both_whichever_is_asked(ulong seed)
    {
        var (group, random) = Group(seed, 24);

        // Groups that have something in common: a subgroup on one side, a conjugate or another group on the other.
        var shared = group.RandomElement(random);
        var other = PermutationGroup.Generate([shared, random.NextInt32(2) == 0 ? random.NextPermutation(group.Degree) : shared.ConjugateBy(group.RandomElement(random))], group.Degree);
        var both = group.Intersection(other);
        return both.SameGroupAs(other.Intersection(group)) && Proven(both).Order == both.Order && both.IsSubgroupOf(group) && both.IsSubgroupOf(other) && both.Contains(shared)
            && Enumerable.Range(0, 30).Select(_ => other.RandomElement(random)).All(p => both.Contains(p) == group.Contains(p));
    }

    // Dedekind: the intersection of two point stabilizers fixes both points.
    [Property(MaxTest = 30)]
    public bool The_intersection_of_stabilizers_is_the_stabilizer_of_both(ulong seed)
    {
        var (group, random) = Group(seed, 30);
        var (a, b) = (random.NextInt32(group.Degree), random.NextInt32(group.Degree));
        int[] both = a == b ? [a] : [a, b];
        return group.PointwiseStabilizer(a).Intersection(group.PointwiseStabilizer(b)).SameGroupAs(group.PointwiseStabilizer(both))
            && group.SetwiseStabilizer(both).Intersection(group.PointwiseStabilizer(a)).SameGroupAs(group.PointwiseStabilizer(both));
    }

    [Property(MaxTest = 40)]
    public bool A_normal_closure_is_normal_and_holds_the_conjugates(ulong seed)
    {
        var (group, random) = Group(seed);
        var member = group.RandomElement(random).Power(1 + random.NextInt32(6));
        var closure = group.NormalClosure(member);
        return closure.IsNormalIn(group) && closure.Contains(member.ConjugateBy(group.RandomElement(random)))
            && closure.Generators.All(p => closure.Contains(p.ConjugateBy(group.RandomElement(random)))) && (member.IsIdentity ? closure.IsTrivial : !closure.IsTrivial);
    }

    [Property(MaxTest = 30)]
    public bool The_centre_is_the_common_centralizer_and_the_quotient_by_the_derived_subgroup_commutes(ulong seed)
    {
        var (group, random) = Group(seed, 30);
        var centre = group.Centre();
        var derived = group.DerivedSubgroup();
        return centre.IsNormalIn(group) && centre.IsAbelian && centre.SameGroupAs(group.CentralizerOf(group))
            && derived.Contains(Permutation.Commutator(group.RandomElement(random), group.RandomElement(random)))
            && group.Index(derived) == group.AbelianInvariants().Aggregate(BigInteger.One, (product, invariant) => product * invariant);
    }

    [Property(MaxTest = 40)]
    public bool Block_systems_are_carried_to_themselves_and_refine_as_their_joins_say(ulong seed)
    {
        var (group, random) = Group(seed);
        foreach (var orbit in group.MovedOrbits.Where(orbit => orbit.Length <= 24))
        {
            var all = group.BlockSystems(orbit[0]);
            var by = group.RandomElement(random);
            foreach (var system in all)
            {
                if (system.IsTrivial || orbit.Length % system.PartSize != 0 || system.Parts.Any(part => part.Select(point => system.PartOf(by[point])).Distinct().Count() != 1)
                    || group.BlockSystemJoining(system.Parts[0].AsSpan()) != system)
                {
                    return false;
                }
            }

            var minimal = group.MinimalBlockSystems(orbit[0]);
            var joined = group.BlockSystemJoining(orbit[0], orbit[^1]);
            if (!minimal.All(all.Contains) || (minimal.IsEmpty != all.IsEmpty) || (!joined.IsTrivial && !all.Contains(joined)))
            {
                return false;
            }
        }

        return true;
    }

    [Property(MaxTest = 60)]
    public bool A_carried_colouring_is_reached_by_a_member_and_counted_with_it(ulong seed)
    {
        var (group, random) = Group(seed);
        var colours = QueriesOracle.RandomColours(random, group.Degree);
        var target = QueriesOracle.Carry(colours, group.RandomElement(random));
        var stabilizer = group.ColouringStabilizer(colours);
        return group.FindMemberTaking(colours, target) is { } by && group.Contains(by) && QueriesOracle.Takes(by, colours, target)
            && group.OrbitSizeOfColouring(target) == group.OrbitSizeOfColouring(colours) && Proven(stabilizer).Order == stabilizer.Order
            && stabilizer.Generators.All(p => group.Contains(p) && QueriesOracle.Takes(p, colours, colours))
            && stabilizer.Order * group.OrbitSizeOfColouring(colours) == group.Order;
    }

    // Above 256 points permutations are stored in another width; a group whose points are spread out that far, in the same order, is the same to every question.
    [Property(MaxTest = 60)]
    public void A_group_spread_over_300_points_answers_as_before(ulong seed)
    {
        var (group, _, random) = QueriesOracle.RandomGroup(seed);
        int[] places = [.. Enumerable.Range(0, group.Degree).Select(i => (37 * i) + 2)];
        var spread = Permutation.FromImages([.. places, .. Enumerable.Range(0, 300).Except(places)]);
        var wide = Spread(group, spread);
        var (a, b) = (group.RandomElement(random), random.NextPermutation(group.Degree));
        Assert.Equal(group.Order, wide.Order);
        Assert.Equal(group.Rank(a), wide.Rank(a.ConjugateBy(spread)));
        Assert.Equal(a.ConjugateBy(spread), wide.Unrank(group.Rank(a)));
        Assert.Equal(group.Contains(b), wide.Contains(b.ConjugateBy(spread)));
        Assert.Equal(group.LeastOfCoset(b).ConjugateBy(spread), wide.LeastOfCoset(b.ConjugateBy(spread)));
        Assert.Equal(group.FindExponent(), wide.FindExponent());
        Assert.Equal(group.AbelianInvariants().ToArray(), wide.AbelianInvariants());
        Assert.Equal(group.BlockSystems(0).Select(system => system.PartSize), wide.BlockSystems(places[0]).Select(system => system.PartSize));
        RequireSame(group.Centre(), wide.Centre());
        RequireSame(group.DerivedSubgroup(), wide.DerivedSubgroup());
        RequireSame(group.NormalClosure(a), wide.NormalClosure(a.ConjugateBy(spread)));
        RequireSame(group.Centralizer(b), wide.Centralizer(b.ConjugateBy(spread)));
        RequireSame(group.SetwiseStabilizer([0, 3]), wide.SetwiseStabilizer([places[0], places[3]]));
        RequireSame(group.PointwiseStabilizer(1, 2), wide.PointwiseStabilizer(places[1], places[2]));
        var other = PermutationGroup.Generate([a, b], group.Degree);
        RequireSame(group.Intersection(other), wide.Intersection(Spread(other, spread)));
        Assert.Equal(group.FindConjugator(a, a.ConjugateBy(b)) is null, wide.FindConjugator(a.ConjugateBy(spread), a.ConjugateBy(b).ConjugateBy(spread)) is null);

        void RequireSame(PermutationGroup narrow, PermutationGroup found) => Assert.True(Spread(narrow, spread).SameGroupAs(found));
    }

    private static PermutationGroup Spread(PermutationGroup group, Permutation spread) => PermutationGroup.Generate(group.Generators.Select(p => p.ConjugateBy(spread)), 300);

    private static (PermutationGroup Group, SeededRandom Random) Group(ulong seed, int largestDegree = 40)
    {
        var random = new SeededRandom(seed);
        var degree = 7 + random.NextInt32(largestDegree - 6);
        return (PermutationGroup.Generate(SmallGroups.RandomGenerators(random.NextUInt64(), degree), degree), random);
    }

    private static PermutationGroup Proven(PermutationGroup group) => PermutationGroup.Generate(group.Generators, group.Degree);

    private static IEnumerable<int> RandomPoints(SeededRandom random, int degree)
    {
        var order = random.NextPermutation(degree);
        return Enumerable.Range(0, 1 + random.NextInt32(degree - 1)).Select(i => order[i]);
    }

    private static PermutationGroup OnPairs(PermutationGroup group, out Dictionary<(int, int), int> numberOf)
    {
        var pairs = new List<(int A, int B)>();
        var numbers = new Dictionary<(int, int), int>();
        for (var b = 0; b < group.Degree; b++)
        {
            for (var a = 0; a < b; a++)
            {
                numbers.Add((a, b), pairs.Count);
                pairs.Add((a, b));
            }
        }

        numberOf = numbers;
        return PermutationGroup.Generate(
            group.Generators.Select(p => Permutation.FromImages([.. pairs.Select(pair => numbers[(Math.Min(p[pair.A], p[pair.B]), Math.Max(p[pair.A], p[pair.B]))])])), pairs.Count);
    }
}
