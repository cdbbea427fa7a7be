using Fusecraft.Permutations;

namespace Fusecraft.Tests.Published;

/// <summary>
/// Layer turns of an n x n x n cube as permutations of its facelets, straight from coordinates: facelet centres lie at odd or even coordinates between -n and n,
/// one of them ±n. Written for these tests alone.
/// </summary>
internal static class CubeFacelets
{
    /// <summary>Quarter turns of the layers at the given depths (0 = outer) on each of the six sides, in the order L R D U B F; facelets that none of them moves are left out.</summary>
    public static Permutation[] LayerTurns(int n, params int[] depths)
    {
        var facelets = Facelets(n);
        var all = new List<int[]>();
        for (var axis = 0; axis < 3; axis++)
        {
            foreach (var side in new[] { -1, 1 })
            {
                foreach (var depth in depths)
                {
                    all.Add([.. facelets.Select(facelet => facelets.IndexOf(Turned(facelet, n, axis, side, depth)))]);
                }
            }
        }

        int[] moved = [.. Enumerable.Range(0, facelets.Count).Where(i => all.Any(turn => turn[i] != i))];
        return [.. all.Select(turn => Permutation.FromImages([.. moved.Select(i => Array.IndexOf(moved, turn[i]))]))];
    }

    private static List<(int X, int Y, int Z)> Facelets(int n)
    {
        var facelets = new List<(int, int, int)>();
        for (var x = -n; x <= n; x++)
        {
            for (var y = -n; y <= n; y++)
            {
                for (var z = -n; z <= n; z++)
                {
                    int[] coordinates = [x, y, z];
                    if (coordinates.Count(c => Math.Abs(c) == n) == 1 && coordinates.All(c => Math.Abs(c) == n || (c + n) % 2 == 1))
                    {
                        facelets.Add((x, y, z));
                    }
                }
            }
        }

        return facelets;
    }

    private static (int X, int Y, int Z) Turned((int X, int Y, int Z) facelet, int n, int axis, int side, int depth)
    {
        var along = side * (axis == 0 ? facelet.X : axis == 1 ? facelet.Y : facelet.Z);
        if (along != n - 1 - (2 * depth) && !(depth == 0 && along == n))
        {
            return facelet;
        }

        // Clockwise seen from outside on the positive side; on the negative side the other way round.
        var (x, y, z) = facelet;
        return axis switch
        {
            0 => side > 0 ? (x, z, -y) : (x, -z, y),
            1 => side > 0 ? (-z, y, x) : (z, y, -x),
            _ => side > 0 ? (y, -x, z) : (-y, x, z),
        };
    }
}
