using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// The permutations of one orbit that commute with a group's action on it and lie in that action's centre. A permutation that commutes with a transitive group is known by the image of one point: where
/// that goes to q, the image under g goes to the image of q under g.
/// </summary>
internal static class OrbitCentralizer
{
    /// <summary>All non-trivial permutations of the orbit's points, fixing all others, that commute with every generator and with each other.</summary>
    public static IEnumerable<Permutation> Of(PermutationGroup group, ImmutableArray<int> orbit)
    {
        var all = orbit.Skip(1).Select(image => Candidate(group, orbit, image)).OfType<Permutation>().ToList();

        // The centre of the action lies in the action itself, so its elements commute with all of the centralizer.
        return all.Where(one => all.TrueForAll(other => one * other == other * one));
    }

    private static Permutation? Candidate(PermutationGroup group, ImmutableArray<int> orbit, int image)
    {
        var images = Enumerable.Range(0, group.Degree).ToArray();
        var known = new bool[group.Degree];
        var points = new List<int> { orbit[0] };
        images[orbit[0]] = image;
        known[orbit[0]] = true;
        for (var i = 0; i < points.Count; i++)
        {
            foreach (var generator in group.Generators)
            {
                var next = generator[points[i]];
                var nextImage = generator[images[points[i]]];
                if (!known[next])
                {
                    known[next] = true;
                    images[next] = nextImage;
                    points.Add(next);
                }
                else if (images[next] != nextImage)
                {
                    return null;
                }
            }
        }

        return Permutation.FromTrustedImages<int>(images);
    }
}
