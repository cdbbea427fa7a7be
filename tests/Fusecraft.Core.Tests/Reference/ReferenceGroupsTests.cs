using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Reference;

/// <summary>That the groups compared are those that are meant. Needs no SymPy.</summary>
[Trait("Category", "Reference")]
public class ReferenceGroupsTests
{
    [Fact]
    public void There_are_two_hundred_of_degree_4_to_30()
    {
        Assert.Equal(200, ReferenceGroups.All.Length);
        Assert.All(ReferenceGroups.All, pair => Assert.InRange(pair.Group.Degree, ReferenceGroups.LeastDegree, ReferenceGroups.LargestDegree));
    }

    [Fact]
    public void Each_kind_is_what_it_says()
    {
        All("trivial", group => group.IsTrivial);
        All("cyclic", group => group.Order == group.Generators[^1].Order);
        All("direct product", group => group.Order == Pieces(group));
        All("equivalent orbits", group => group.MovedOrbits.Length > 1 && group.Order < Pieces(group));
        All("imprimitive", group => group.IsTransitive && !group.MinimalBlockSystems(0).IsEmpty);
        All("primitive", group => group.IsPrimitive);
        All("repeated generators", group => group.Generators.Distinct().Count() < group.Generators.Length && group.Generators.Contains(Permutation.Identity));
        Assert.Contains(Of("subdirect product"), group => group.Order < Pieces(group));
        Assert.True(Of("random").Select(group => group.Order).Distinct().Count() > 10);
    }

    // What the actions on the orbits would make if they were independent.
    private static BigInteger Pieces(PermutationGroup group) =>
        group.MovedOrbits.Aggregate(BigInteger.One, (product, orbit) => product * group.ActionOn(orbit).Image.Order);

    private static IEnumerable<PermutationGroup> Of(string kind) => ReferenceGroups.All.Where(pair => pair.Kind == kind).Select(pair => pair.Group);

    private static void All(string kind, Func<PermutationGroup, bool> holds)
    {
        Assert.NotEmpty(Of(kind));
        Assert.All(Of(kind), group => Assert.True(holds(group), $"{kind}, degree {group.Degree}: {string.Join("; ", group.Generators)}"));
    }
}
