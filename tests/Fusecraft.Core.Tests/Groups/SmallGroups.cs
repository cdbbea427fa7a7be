using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>An oracle without group theory, and random groups for properties.</summary>
internal static class SmallGroups
{
    /// <summary>All products of the generators, by plain closure.</summary>
    public static HashSet<Permutation> Closure(IEnumerable<Permutation> generators)
    {
        Permutation[] list = [.. generators];
        var members = new HashSet<Permutation> { Permutation.Identity };
        var queue = new Queue<Permutation>(members);
        while (queue.TryDequeue(out var member))
        {
            foreach (var generator in list)
            {
                if (members.Add(member * generator))
                {
                    queue.Enqueue(member * generator);
                }
            }
        }

        return members;
    }

    /// <summary>Every permutation of 0 … degree-1, in lexicographic order of image lists.</summary>
    public static IEnumerable<Permutation> AllOfDegree(int degree)
    {
        return Extend([]);

        IEnumerable<Permutation> Extend(int[] images)
        {
            if (images.Length == degree)
            {
                return [Permutation.FromImages(images)];
            }

            return Enumerable.Range(0, degree).Where(point => !images.Contains(point)).SelectMany(point => Extend([.. images, point]));
        }
    }

    /// <summary>Random generators of many kinds of groups: few points moved, products of disjoint parts, block systems, several copies of one action.</summary>
    public static Permutation[] RandomGenerators(ulong seed, int largestDegree)
    {
        var random = new SeededRandom(seed);
        var degree = 2 + random.NextInt32(largestDegree - 1);
        var generators = new Permutation[random.NextInt32(4)];
        for (var i = 0; i < generators.Length; i++)
        {
            generators[i] = random.NextInt32(4) switch
            {
                0 => random.NextPermutation(degree),
                1 => random.NextPermutation(degree).Power(2),
                2 => random.NextPermutation(1 + (degree / 2)),
                _ => Doubled(random.NextPermutation(degree / 2), degree / 2),
            };
        }

        return generators;
    }

    public static PermutationGroup Random(ulong seed, int largestDegree)
    {
        var generators = RandomGenerators(seed, largestDegree);
        return PermutationGroup.Generate(generators, largestDegree);
    }

    public static string? FindFault(StabilizerChain chain) => chain.Tables switch
    {
        ChainTables<byte> narrow => narrow.FindFault(chain.Proof.IsProven),
        ChainTables<ushort> wide => wide.FindFault(chain.Proof.IsProven),
        GiantTables giant => FindFault(giant),
        _ => "Unknown lanes.",
    };

    private static string? FindFault(GiantTables chain)
    {
        for (var level = 0; level < chain.Count; level++)
        {
            for (var index = 0; index < chain.OrbitLength(level); index++)
            {
                var point = chain.OrbitPoint(level, index);
                var representative = chain.Representative(level, point);
                var fixesEarlier = Enumerable.Range(0, level).All(earlier => representative[chain.BasePoint(earlier)] == chain.BasePoint(earlier));
                if (chain.OrbitIndex(level, point) != index || representative[chain.BasePoint(level)] != point || !fixesEarlier || !chain.Contains(representative))
                {
                    return $"Level {level}: the representative of {point} is wrong.";
                }
            }
        }

        return null;
    }

    private static Permutation Doubled(Permutation permutation, int degree) =>
        Permutation.FromImages([.. Enumerable.Range(0, 2 * degree).Select(i => permutation[i % degree] + (i / degree * degree))]);
}
