using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>What a group does on one of its orbits, the orbit's points renamed 0, 1, 2, … in ascending order, and whether it does the same on two of them.</summary>
internal static class OrbitImage
{
    /// <param name="group">Any group.</param>
    /// <param name="orbit">One of its orbits.</param>
    /// <param name="order">The order of the image, which is known.</param>
    public static PermutationGroup Of(PermutationGroup group, ImmutableArray<int> orbit, BigInteger order) =>
        PermutationGroup.FromOrder([.. Generators(group, orbit)], orbit.Length, order);

    /// <summary>The image of a set of points that the generators carry to itself, its order to be found.</summary>
    public static PermutationGroup Of(PermutationGroup group, ImmutableArray<int> points) => PermutationGroup.Generate(Generators(group, points), points.Length);

    /// <summary>True when the orbits can be matched point by point such that the group moves matching points alike. A match is known by the partner of one point.</summary>
    public static bool AreEquivalent(PermutationGroup group, ImmutableArray<int> orbit, ImmutableArray<int> other)
    {
        if (orbit.Length != other.Length)
        {
            return false;
        }

        var partner = new int[group.Degree];
        var queue = new int[orbit.Length];
        return other.Any(IsMatch);

        bool IsMatch(int first)
        {
            Array.Fill(partner, -1);
            partner[orbit[0]] = first;
            queue[0] = orbit[0];
            for (var (done, met) = (0, 1); done < met; done++)
            {
                foreach (var generator in group.Generators)
                {
                    var next = generator[queue[done]];
                    var image = generator[partner[queue[done]]];
                    if (partner[next] < 0)
                    {
                        partner[next] = image;
                        queue[met++] = next;
                    }
                    else if (partner[next] != image)
                    {
                        return false;
                    }
                }
            }

            return true;
        }
    }

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
