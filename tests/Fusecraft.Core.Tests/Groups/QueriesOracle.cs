using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Small groups to try every question on, and what the answers must be by going through all members.</summary>
internal static class QueriesOracle
{
    private static readonly Lazy<SymmetricTable>[] Tables = [.. Enumerable.Range(0, 7).Select(degree => new Lazy<SymmetricTable>(() => new SymmetricTable(degree)))];

    public static SymmetricTable TableOf(int degree) => Tables[degree].Value;

    /// <summary>All groups of permutations of so many points, up to five; of six points, one of each class of groups that are equal but for the numbering of the points.</summary>
    public static IEnumerable<(PermutationGroup Group, HashSet<Permutation> Members)> GroupsOfDegree(int degree)
    {
        var table = TableOf(degree);
        return (degree < 6 ? table.Subgroups() : table.SubgroupClasses).Select(subgroup => (table.ToGroup(subgroup.Generators), subgroup.Members.Select(member => table.Permutations[member]).ToHashSet()));
    }

    /// <summary>A random group of degree 6 to 8 with its members.</summary>
    public static (PermutationGroup Group, HashSet<Permutation> Members, SeededRandom Random) RandomGroup(ulong seed)
    {
        var random = new SeededRandom(seed);
        var degree = 6 + random.NextInt32(3);
        var generators = SmallGroups.RandomGenerators(seed, degree);
        return (PermutationGroup.Generate(generators, degree), SmallGroups.Closure(generators), random);
    }

    /// <summary>True when the group has these members and no others, and says so.</summary>
    public static bool Has(PermutationGroup group, IEnumerable<Permutation> members)
    {
        var expected = members.ToHashSet();
        return group.Order == expected.Count && expected.SetEquals(SmallGroups.Closure(group.Generators)) && expected.All(group.Contains);
    }

    public static int[] RandomColours(SeededRandom random, int degree)
    {
        var most = 1 + random.NextInt32(4);
        return [.. Enumerable.Range(0, degree).Select(_ => random.NextInt32(most))];
    }

    /// <summary>True when the permutation carries one colouring to the other.</summary>
    public static bool Takes(Permutation permutation, int[] source, int[] target) => Enumerable.Range(0, source.Length).All(i => target[permutation[i]] == source[i]);

    /// <summary>The colouring after the permutation has moved the points with their colours.</summary>
    public static int[] Carry(int[] colours, Permutation permutation)
    {
        var carried = new int[colours.Length];
        for (var i = 0; i < colours.Length; i++)
        {
            carried[permutation[i]] = colours[i];
        }

        return carried;
    }

    public static ImmutableArray<int> Images(IEnumerable<int> points, Permutation permutation) => [.. points.Select(point => permutation[point])];
}
