using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>What a group does on one of its orbits, the orbit's points renamed 0, 1, 2, … in ascending order.</summary>
internal static class OrbitImage
{
    /// <param name="group">Any group.</param>
    /// <param name="orbit">One of its orbits.</param>
    /// <param name="order">The order of the image, which is known.</param>
    public static PermutationGroup Of(PermutationGroup group, ImmutableArray<int> orbit, BigInteger order) =>
        PermutationGroup.FromOrder([.. Generators(group, orbit)], orbit.Length, order);

    /// <summary>The image of a set of points that the generators carry to itself, its order to be found.</summary>
    public static PermutationGroup Of(PermutationGroup group, ImmutableArray<int> points) => PermutationGroup.Generate(Generators(group, points), points.Length);

    private static IEnumerable<Permutation> Generators(PermutationGroup group, ImmutableArray<int> points)
    {
        var position = new int[group.Degree];
        for (var i = 0; i < points.Length; i++)
        {
            position[points[i]] = i;
        }

        return group.Generators.Select(generator => Permutation.FromTrustedImages<int>([.. points.Select(point => position[generator[point]])])).Where(generator => !generator.IsIdentity).Distinct();
    }
}
