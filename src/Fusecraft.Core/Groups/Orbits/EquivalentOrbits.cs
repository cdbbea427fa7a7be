using System.Collections.Immutable;

namespace Fusecraft.Groups;

/// <summary>Orbits that can be matched point by point such that the group moves matching points alike. A match is known by the partner of one point.</summary>
internal static class EquivalentOrbits
{
    /// <summary>For each point of an orbit, in order, its partner in another; null where there is no match.</summary>
    public static int[]? Match(PermutationGroup group, ImmutableArray<int> orbit, ImmutableArray<int> other)
    {
        if (orbit.Length != other.Length)
        {
            return null;
        }

        var placeOf = new int[group.Degree];
        var match = Match(ActionOn(group.Generators.AsSpan(), orbit, placeOf), ActionOn(group.Generators.AsSpan(), other, placeOf));
        return match is null ? null : Array.ConvertAll(match, place => other[place]);
    }

    /// <summary>The same for the image lists of the generators on two orbits; points are the places there.</summary>
    public static int[]? Match(int[][] one, int[][] other)
    {
        if (one.Length == 0 || one[0].Length != other[0].Length)
        {
            return null;
        }

        var images = new int[one[0].Length];
        var points = new int[images.Length];
        for (var image = 0; image < images.Length; image++)
        {
            if (IsMatch(one, other, image, images, points))
            {
                return images;
            }
        }

        return null;
    }

    /// <summary>The image lists of some permutations on an orbit that they keep; points are the places there.</summary>
    public static int[][] ActionOn(ReadOnlySpan<Permutations.Permutation> members, ImmutableArray<int> orbit, int[] placeOf)
    {
        for (var place = 0; place < orbit.Length; place++)
        {
            placeOf[orbit[place]] = place;
        }

        var generators = new int[members.Length][];
        for (var i = 0; i < generators.Length; i++)
        {
            generators[i] = new int[orbit.Length];
            for (var place = 0; place < orbit.Length; place++)
            {
                generators[i][place] = placeOf[members[i][orbit[place]]];
            }
        }

        return generators;
    }

    private static bool IsMatch(int[][] one, int[][] other, int firstImage, int[] images, int[] points)
    {
        Array.Fill(images, -1);
        images[0] = firstImage;
        points[0] = 0;
        var count = 1;
        for (var i = 0; i < count; i++)
        {
            for (var generator = 0; generator < one.Length; generator++)
            {
                var (next, image) = (one[generator][points[i]], other[generator][images[points[i]]]);
                if (images[next] < 0)
                {
                    images[next] = image;
                    points[count++] = next;
                }
                else if (images[next] != image)
                {
                    return false;
                }
            }
        }

        return true;
    }
}
