using Fusecraft.Permutations;

namespace Fusecraft.Tests.Support;

/// <summary>A dodecahedron whose twelve faces turn, from geometry alone: a sticker is a face together with the two or three faces that meet where it lies.</summary>
internal static class Dodecahedron
{
    private static readonly double _golden = (1 + Math.Sqrt(5)) / 2;

    // Outward directions of the faces: the corners of an icosahedron.
    private static readonly double[][] _faces =
    [
        .. from one in (int[])[1, -1]
           from other in (int[])[1, -1]
           from axis in (int[])[0, 1, 2]
           select Direction(axis, one, other * _golden),
    ];

    public static Permutation[] FaceTurns()
    {
        int[] all = [.. Enumerable.Range(0, _faces.Length)];
        var edges = from f in all from g in all where f < g && AreNeighbours(f, g) select new[] { f, g };
        var corners = from e in edges from h in all where e[1] < h && AreNeighbours(e[0], h) && AreNeighbours(e[1], h) select new[] { e[0], e[1], h };
        string[] stickers = [.. from place in edges.Concat(corners) from face in place select Name(face, place)];
        int[][] places = [.. from place in edges.Concat(corners) from _ in place select place];
        int[] faces = [.. from place in edges.Concat(corners) from face in place select face];
        return
        [
            .. all.Select(turned =>
            {
                int[] image = [.. all.Select(face => Rotated(face, turned))];
                return Permutation.FromImages([.. stickers.Select((_, i) => places[i].Contains(turned) ? Array.IndexOf(stickers, Name(image[faces[i]], [.. places[i].Select(face => image[face])])) : i)]);
            }),
        ];
    }

    private static string Name(int face, int[] place) => $"{face}:{string.Join(',', place.Order())}";

    private static double[] Direction(int axis, double one, double other)
    {
        var direction = new double[3];
        direction[axis] = one;
        direction[(axis + 1) % 3] = other;
        return direction;
    }

    private static double Dot(double[] a, double[] b) => (a[0] * b[0]) + (a[1] * b[1]) + (a[2] * b[2]);

    // Unit directions of neighbouring faces have the product 1/√5.
    private static bool AreNeighbours(int one, int other) => one != other && Dot(_faces[one], _faces[other]) > 0;

    // The face whose direction is that of the given one after a fifth turn about the axis (Rodrigues' formula).
    private static int Rotated(int face, int about)
    {
        var length = Math.Sqrt(Dot(_faces[about], _faces[about]));
        double[] axis = [.. _faces[about].Select(c => c / length)];
        var v = _faces[face];
        var angle = -2 * Math.PI / 5;
        double[] cross = [(axis[1] * v[2]) - (axis[2] * v[1]), (axis[2] * v[0]) - (axis[0] * v[2]), (axis[0] * v[1]) - (axis[1] * v[0])];
        double[] image = [.. Enumerable.Range(0, 3).Select(i => (v[i] * Math.Cos(angle)) + (cross[i] * Math.Sin(angle)) + (axis[i] * Dot(axis, v) * (1 - Math.Cos(angle))))];
        return Enumerable.Range(0, _faces.Length).MaxBy(candidate => Dot(_faces[candidate], image));
    }
}
