using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>Whether a group is all permutations, or all even ones, of the points it moves.</summary>
/// <remarks>
/// By a theorem of Jordan a primitive group of degree n with a cycle of prime length p ≤ n-3 is a giant; and a transitive group with such a cycle of length p > n/2 is primitive, for the cycle would have to
/// act within a part or move p parts. So transitivity and one element prove it. Elements are drawn at random, but what they show is certain. Source: H. Wielandt, <em>Finite Permutation
/// Groups</em> (1964), 13.9 (from memory).
/// </remarks>
internal static class GiantRecognition
{
    /// <summary>Below this number of points an ordinary chain is as fast.</summary>
    public const int FewestPoints = 24;

    private const int Draws = 160;
    private const ulong Seed = 0x61A7;

    /// <summary>The chain of the group where it is recognised as a giant; null where it is not.</summary>
    /// <param name="group">Any group.</param>
    /// <param name="prefix">Points to take first as base points.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static GiantTables? Recognise(PermutationGroup group, int[] prefix, CancellationToken cancellation)
    {
        var moved = group.MovedOrbits;
        if (moved.Length != 1 || moved[0].Length < FewestPoints)
        {
            return null;
        }

        var isGiant = group.Degree <= 256 ? HasWitness<byte>(group, moved[0].Length, cancellation) : HasWitness<ushort>(group, moved[0].Length, cancellation);
        if (!isGiant)
        {
            return null;
        }

        var points = moved[0];
        var first = prefix.Where(point => points.AsSpan().BinarySearch(point) >= 0).ToArray();
        return new GiantTables(group.Degree, [.. first, .. points.Except(first)], group.Generators.All(generator => generator.Parity == Parity.Even));
    }

    private static bool HasWitness<T>(PermutationGroup group, int points, CancellationToken cancellation)
        where T : unmanaged, IBinaryInteger<T>
    {
        var stride = Lanes.PaddedLength(group.Degree);
        var walk = new RandomWalk<T>(stride);
        var lanes = new T[stride];
        foreach (var generator in group.Generators)
        {
            if (!generator.IsIdentity)
            {
                generator.CopyLanes<T>(lanes);
                walk.Add(lanes);
            }
        }

        var random = new SeededRandom(Seed);
        var seen = new bool[group.Degree];
        for (var draw = 0; draw < Draws; draw++)
        {
            cancellation.ThrowIfCancellationRequested();
            if (IsWitness(walk.Next(random), points, seen))
            {
                return true;
            }
        }

        return false;
    }

    // A cycle whose length is a prime p with n/2 < p < n-2. All other cycles are shorter than p, so a power of the element is that cycle alone.
    private static bool IsWitness<T>(ReadOnlySpan<T> element, int points, bool[] seen)
        where T : unmanaged, IBinaryInteger<T>
    {
        Array.Clear(seen);
        for (var start = 0; start < seen.Length; start++)
        {
            var length = 0;
            for (var point = start; !seen[point]; point = int.CreateTruncating(element[point]))
            {
                seen[point] = true;
                length++;
            }

            if (2 * length > points && length < points - 2)
            {
                return FactoredInteger.IsPrime(length);
            }
        }

        return false;
    }
}
