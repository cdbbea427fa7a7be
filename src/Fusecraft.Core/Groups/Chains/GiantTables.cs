using System.Diagnostics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// The stabilizer chain of a giant: all permutations, or all even ones, of some points. No transversal is stored, because every representative is a transposition or a three-cycle; so a chain of ten thousand
/// levels takes ten thousand numbers.
/// </summary>
internal sealed class GiantTables : ChainTables
{
    // The points moved in the order in which they are base points, and for each point its place in that order, or -1.
    private readonly int[] _order;
    private readonly int[] _placeOf;
    private readonly bool _isAlternating;

    /// <param name="degree">Points are 0 … degree-1.</param>
    /// <param name="order">The points moved, three or more, in the order in which they become base points.</param>
    /// <param name="isAlternating">True for even permutations only.</param>
    public GiantTables(int degree, int[] order, bool isAlternating)
    {
        Degree = degree;
        _order = order;
        _isAlternating = isAlternating;
        _placeOf = new int[degree];
        Array.Fill(_placeOf, -1);
        for (var place = 0; place < order.Length; place++)
        {
            _placeOf[order[place]] = place;
        }
    }

    public override int Degree { get; }

    // The last point goes where it must; of an even permutation the last two do.
    public override int Count => Math.Max(0, _order.Length - (_isAlternating ? 2 : 1));

    public override int BasePoint(int level) => _order[level];

    public override int OrbitLength(int level) => _order.Length - level;

    public override int OrbitPoint(int level, int index) => _order[level + index];

    public override int OrbitIndex(int level, int point) => (uint)point < (uint)Degree && _placeOf[point] >= level ? _placeOf[point] - level : -1;

    public override Permutation Representative(int level, int point) => point == _order[level]
        ? Permutation.Identity
        : _isAlternating ? Permutation.FromCycle(_order[level], point, ThirdPoint(point)) : Permutation.FromCycle(_order[level], point);

    public override IEnumerable<Permutation> OwnGenerators(int level)
    {
        var rest = _order.AsSpan(level);
        if (!_isAlternating)
        {
            return rest.Length < 2 ? [] : [Permutation.FromCycle(rest[..2]), Permutation.FromCycle(rest)];
        }

        // A three-cycle and a long cycle of odd length.
        return rest.Length < 3 ? [] : [Permutation.FromCycle(rest[..3]), Permutation.FromCycle(rest.Length % 2 == 1 ? rest : rest[1..])];
    }

    public override bool Contains(Permutation permutation)
    {
        if (permutation.SupportEnd > Degree)
        {
            return false;
        }

        for (var point = 0; point < permutation.SupportEnd; point++)
        {
            if (_placeOf[point] < 0 && permutation[point] != point)
            {
                return false;
            }
        }

        return !_isAlternating || permutation.Parity == Parity.Even;
    }

    public override int Sift(Permutation permutation, out Permutation residue)
    {
        Debug.Assert(permutation.SupportEnd <= Degree, "The permutation moves points beyond the degree.");
        var images = new int[Degree];
        var origins = new int[Degree];
        permutation.CopyImages(images);
        permutation.Inverse().CopyImages(origins);
        var level = 0;
        for (; level < Count; level++)
        {
            var (point, image) = (_order[level], images[_order[level]]);
            if (image == point)
            {
                continue;
            }

            if (_placeOf[image] < 0)
            {
                break;
            }

            // Times the inverse of the representative: what came to the image now comes to the point, and so on round the cycle.
            var third = _isAlternating ? ThirdPoint(image) : image;
            var (toImage, toThird, toPoint) = (origins[image], origins[third], origins[point]);
            (images[toImage], origins[point]) = (point, toImage);
            if (_isAlternating)
            {
                (images[toThird], origins[image]) = (image, toThird);
            }

            (images[toPoint], origins[third]) = (third, toPoint);
        }

        residue = Permutation.FromTrustedImages<int>(images);
        return level;
    }

    public override bool TryGetDigits(Permutation permutation, Span<int> digits)
    {
        if (!Contains(permutation))
        {
            return false;
        }

        var unused = new CountingTree(Degree, _order);
        for (var level = 0; level < Count; level++)
        {
            var image = permutation[_order[level]];
            digits[level] = unused.CountBelow(image);
            unused.Remove(image);
        }

        return true;
    }

    public override void WriteMember(ReadOnlySpan<int> digits, Span<int> images)
    {
        Lanes.Identity(images[..Degree]);
        var unused = new CountingTree(Degree, _order);
        for (var level = 0; level < _order.Length; level++)
        {
            images[_order[level]] = unused.Select(level < Count ? digits[level] : 0);
            unused.Remove(images[_order[level]]);
        }

        if (_isAlternating && Lanes.IsOdd(images[..Degree]))
        {
            (images[_order[^1]], images[_order[^2]]) = (images[_order[^2]], images[_order[^1]]);
        }
    }

    public override ChainTables Below(int level) => new GiantTables(Degree, _order[level..], _isAlternating);

    // Any base point to come that is neither the level's own nor the given one; the last two are never both taken.
    private int ThirdPoint(int point) => point == _order[^1] ? _order[^2] : _order[^1];
}
