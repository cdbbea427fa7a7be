using Fusecraft.Permutations;

namespace Fusecraft.Tests.Support;

/// <summary>
/// An independent model of the n×n×n cube for tests: every sticker is a point in space and a turn is a rotation of space applied to those
/// beyond a cut. Nothing here comes from the library but the type of the answer.
/// </summary>
/// <remarks>
/// <para>Axes: x to the right, y up, z to the viewer, the cube's centre at the origin, and cells two units wide. A sticker sits at the
/// middle of its cell's outer side: one coordinate is n or -n, the other two are among -(n-1), -(n-3), …, n-1.</para>
/// <para>Order of the 6n² points: lexicographic by (x, y, z). So they begin with the n² stickers of the left face, lowest row first, back to front.</para>
/// </remarks>
public sealed class CubeFacelets
{
    private static readonly (char Face, int Axis, int Sign)[] _faces = [('R', 0, 1), ('L', 0, -1), ('U', 1, 1), ('D', 1, -1), ('F', 2, 1), ('B', 2, -1)];

    private readonly int _size;
    private readonly List<(int X, int Y, int Z)> _stickers = [];
    private readonly Dictionary<(int X, int Y, int Z), int> _pointOf = [];

    public CubeFacelets(int size)
    {
        _size = size;
        for (var x = -size; x <= size; x++)
        {
            for (var y = -size; y <= size; y++)
            {
                for (var z = -size; z <= size; z++)
                {
                    int[] place = [x, y, z];
                    if (place.Count(c => Math.Abs(c) == size) == 1 && place.All(c => Math.Abs(c) == size || (c + size) % 2 != 0))
                    {
                        _pointOf.Add((x, y, z), _stickers.Count);
                        _stickers.Add((x, y, z));
                    }
                }
            }
        }
    }

    /// <summary>The places of the stickers in the order of their points.</summary>
    public IReadOnlyList<(int X, int Y, int Z)> Stickers => _stickers;

    /// <summary>The point of the sticker on a face of the cell (x, y, z), coordinates 1 … n from left, bottom and back.</summary>
    public int PointOf(int x, int y, int z, char face)
    {
        var (axis, sign) = Axis(face);
        int[] place = [(2 * x) - _size - 1, (2 * y) - _size - 1, (2 * z) - _size - 1];
        place[axis] = sign * _size;
        return _pointOf[(place[0], place[1], place[2])];
    }

    /// <summary>A quarter turn, clockwise seen from the face, of its outer layer.</summary>
    public Permutation Turn(char face) => Turn(face, 1, 1);

    /// <summary>A quarter turn, clockwise seen from the face, of the layers <paramref name="first"/> … <paramref name="last"/>, counted from 1 at the face.</summary>
    public Permutation Turn(char face, int first, int last)
    {
        var (axis, sign) = Axis(face);
        var images = new int[_stickers.Count];
        for (var point = 0; point < images.Length; point++)
        {
            var place = _stickers[point];
            var depth = Math.Clamp(sign * Coordinate(place, axis), 1 - _size, _size - 1);
            var layer = (_size + 1 - depth) / 2;
            images[point] = layer >= first && layer <= last ? _pointOf[Quarter(place, axis, sign)] : point;
        }

        return Permutation.FromImages(images);
    }

    /// <summary>Quarter turns of single layers on each of the six sides, at the given depths (1 = outer); stickers that none of them moves are left out.</summary>
    public static Permutation[] LayerTurns(int size, params int[] depths)
    {
        var cube = new CubeFacelets(size);
        var turns = depths.SelectMany(depth => _faces.Select(face => cube.Turn(face.Face, depth, depth))).ToList();
        int[] moved = [.. Enumerable.Range(0, cube.Stickers.Count).Where(point => turns.Exists(turn => turn[point] != point))];
        return [.. turns.Select(turn => Permutation.FromImages([.. moved.Select(point => Array.IndexOf(moved, turn[point]))]))];
    }

    /// <summary>A word of quarter turns of outer layers, read from left to right, such as <c>R U2 D' B D'</c>.</summary>
    public Permutation Word(string word)
    {
        var result = Permutation.Identity;
        foreach (var step in word.Split(' ', StringSplitOptions.RemoveEmptyEntries))
        {
            result *= Turn(step[0]).Power(step[1..] switch
            {
                "" => 1,
                "2" => 2,
                "'" => -1,
                var exponent => throw new FormatException($"\"{exponent}\" is no exponent."),
            });
        }

        return result;
    }

    private static (int Axis, int Sign) Axis(char face)
    {
        var (_, axis, sign) = _faces.Single(entry => entry.Face == face);
        return (axis, sign);
    }

    private static int Coordinate((int X, int Y, int Z) place, int axis) => axis switch
    {
        0 => place.X,
        1 => place.Y,
        _ => place.Z,
    };

    // Clockwise seen from the positive end of the axis: of the two axes that follow it in cyclic order, the second goes to the first.
    private static (int X, int Y, int Z) Quarter((int X, int Y, int Z) place, int axis, int sign)
    {
        var second = (axis + 1) % 3;
        var third = (axis + 2) % 3;
        var turned = new int[3];
        turned[axis] = Coordinate(place, axis);
        turned[second] = sign * Coordinate(place, third);
        turned[third] = -sign * Coordinate(place, second);
        return (turned[0], turned[1], turned[2]);
    }
}
