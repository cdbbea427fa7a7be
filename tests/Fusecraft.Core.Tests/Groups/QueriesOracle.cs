using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Small groups to try every question on, and what the answers must be by going through all members.</summary>
internal static class QueriesOracle
{
    /// <summary>The different groups made by two permutations of so many points, the first one of each cycle type (that is, up to renaming points).</summary>
    public static IEnumerable<(PermutationGroup Group, HashSet<Permutation> Members)> GroupsOfDegree(int degree)
    {
        Permutation[] all = [.. SmallGroups.AllOfDegree(degree)];
        var met = new HashSet<string>();
        foreach (var first in all.GroupBy(p => p.CycleType).Select(group => group.First()))
        {
            foreach (var second in all)
            {
                var members = SmallGroups.Closure([first, second]);
                if (met.Add(string.Concat(all.Select(p => members.Contains(p) ? '1' : '0'))))
                {
                    yield return (PermutationGroup.Generate([first, second], degree), members);
                }
            }
        }
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
