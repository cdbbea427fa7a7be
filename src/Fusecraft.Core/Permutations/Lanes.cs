using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Fusecraft.Permutations;

/// <summary>
/// Span kernels for permutations held as image lists, one lane a point. Written once for lanes of one byte (degree up to 256) and
/// of two bytes (degree up to 65,536). Callers guarantee valid permutations of equal degree; only Debug builds check.
/// </summary>
internal static partial class Lanes
{
    /// <summary>Fills <paramref name="images"/> with the identity.</summary>
    public static void Identity<T>(Span<T> images)
        where T : unmanaged, IBinaryInteger<T>
    {
        for (var i = 0; i < images.Length; i++)
        {
            images[i] = T.CreateTruncating(i);
        }
    }

    /// <summary>True when every point is fixed.</summary>
    public static bool IsIdentity<T>(ReadOnlySpan<T> images)
        where T : unmanaged, IBinaryInteger<T>
    {
        for (var i = 0; i < images.Length; i++)
        {
            if (images[i] != T.CreateTruncating(i))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>First <paramref name="p"/>, then <paramref name="q"/>: <c>result[i] = q[p[i]]</c>. The result may not overlap <paramref name="q"/>.</summary>
    public static void Compose<T>(ReadOnlySpan<T> p, ReadOnlySpan<T> q, Span<T> result)
        where T : unmanaged, IBinaryInteger<T>
    {
        for (var i = 0; i < p.Length; i++)
        {
            result[i] = q[int.CreateTruncating(p[i])];
        }
    }

    /// <summary><c>result[p[i]] = i</c>. The result may not overlap <paramref name="p"/>.</summary>
    public static void Invert<T>(ReadOnlySpan<T> p, Span<T> result)
        where T : unmanaged, IBinaryInteger<T>
    {
        for (var i = 0; i < p.Length; i++)
        {
            result[int.CreateTruncating(p[i])] = T.CreateTruncating(i);
        }
    }

    /// <summary>True for an odd permutation: each cycle of k points counts k - 1.</summary>
    public static bool IsOdd(ReadOnlySpan<int> images)
    {
        using var scratch = new Scratch<bool>(images.Length);
        var seen = scratch.Span;
        seen.Clear();
        var isOdd = false;
        for (var start = 0; start < images.Length; start++)
        {
            for (var point = start; !seen[point]; point = images[point])
            {
                seen[point] = true;
                isOdd ^= images[point] != start;
            }
        }

        return isOdd;
    }

    /// <summary>The number of points up to and including the largest one moved.</summary>
    public static int SupportEnd<T>(ReadOnlySpan<T> images)
        where T : unmanaged, IBinaryInteger<T>
    {
        var end = images.Length;
        while (end > 0 && images[end - 1] == T.CreateTruncating(end - 1))
        {
            end--;
        }

        return end;
    }
}
