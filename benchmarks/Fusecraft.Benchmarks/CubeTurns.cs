using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>Layer turns of an n x n x n cube on the facelets that they move.</summary>
internal static class CubeTurns
{
    /// <summary>Quarter turns of the layers at some depths (0 = outer) on each of the six sides.</summary>
    public static Permutation[] OfLayers(int n, params int[] depths)
    {
        int[] coordinates = [.. Enumerable.Range(0, n + 2).Select(i => i == 0 ? -n : i == n + 1 ? n : (2 * i) - n - 1)];
        int[][] facelets =
        [
            .. from x in coordinates
               from y in coordinates
               from z in coordinates
               where (Math.Abs(x) == n ? 1 : 0) + (Math.Abs(y) == n ? 1 : 0) + (Math.Abs(z) == n ? 1 : 0) == 1
               select new[] { x, y, z },
        ];
        int[][] turns =
        [
            .. from axis in Enumerable.Range(0, 3)
               from side in new[] { -1, 1 }
               from depth in depths
               select facelets.Select(facelet => Array.FindIndex(facelets, other => other.SequenceEqual(Turned(facelet, n, axis, side, depth)))).ToArray(),
        ];
        int[] moved = [.. Enumerable.Range(0, facelets.Length).Where(i => turns.Any(turn => turn[i] != i))];
        return [.. turns.Select(turn => Permutation.FromImages([.. moved.Select(i => Array.IndexOf(moved, turn[i]))]))];
    }

    private static int[] Turned(int[] facelet, int n, int axis, int side, int depth)
    {
        var along = side * facelet[axis];
        if (along != n - 1 - (2 * depth) && !(depth == 0 && along == n))
        {
            return facelet;
        }

        var (next, last) = ((axis + 1) % 3, (axis + 2) % 3);
        var image = new int[3];
        image[axis] = facelet[axis];
        image[next] = side * facelet[last];
        image[last] = -side * facelet[next];
        return image;
    }
}
