using System.Diagnostics;
using System.Numerics;
using System.Runtime.CompilerServices;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The levels of a stabilizer chain with lanes of one width, and the sifting through them.</summary>
/// <remarks>
/// Reading is safe from several threads as long as no builder adds levels. Sifting and its kernels are optimised from the first call: one chain is work enough
/// to be slow in unoptimised code, and often the only one of a run.
/// </remarks>
internal sealed class ChainTables<T> : ChainTables
    where T : unmanaged, IBinaryInteger<T>
{
    private const int LanesOnStack = 256;
    private const int FewWords = 16;

    private readonly T[] _identity;
    private ChainLevel<T>[] _levels = new ChainLevel<T>[16];
    private int _count;

    public ChainTables(int degree)
    {
        Degree = degree;
        _identity = new T[Lanes.PaddedLength(degree)];
        Lanes.Identity<T>(_identity);
    }

    public override int Degree { get; }

    public int Stride => _identity.Length;

    // Of a set of points, a bit each.
    private int Words => (Stride + 63) / 64;

    public ReadOnlySpan<T> Identity => _identity;

    public override int Count => _count;

    public ChainLevel<T> this[int level] => _levels[level];

    public void Insert(int index, ChainLevel<T> level)
    {
        if (_count == _levels.Length)
        {
            Array.Resize(ref _levels, 2 * _count);
        }

        Array.Copy(_levels, index, _levels, index + 1, _count - index);
        _levels[index] = level;
        _count++;
    }

    /// <summary>
    /// Strips representatives off in place, from a level on: afterwards the permutation is what was given times an element of that level's group.
    /// Gives the level whose orbit the image of the base point is not in, or the number of levels.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public int Sift(Span<T> permutation, int from = 0)
    {
        Debug.Assert(permutation.Length == Stride, "Padded lanes are needed.");
        var levels = _levels.AsSpan(0, _count);
        for (var i = from; i < levels.Length; i++)
        {
            var level = levels[i];
            var slot = level.Slots[int.CreateTruncating(permutation[level.Point])];
            if (slot < 0)
            {
                return i;
            }

            if (slot > 0)
            {
                Lanes.ComposePadded<T>(permutation, level.Inverses[slot], permutation);
            }
        }

        return levels.Length;
    }

    /// <summary>Sifts in place and says whether nothing is left.</summary>
    public bool SiftsAway(Span<T> permutation, int from = 0) =>
        Sift(permutation, from) == _count && permutation.SequenceEqual(_identity);

    public override bool Contains(Permutation permutation)
    {
        if (permutation.SupportEnd > Degree)
        {
            return false;
        }

        if (Stride <= LanesOnStack)
        {
            Span<T> stack = stackalloc T[LanesOnStack];
            var few = stack[..Stride];
            Load(permutation, few);
            return SiftsAway(few);
        }

        using var scratch = new Scratch<T>(Stride);
        Load(permutation, scratch.Span);
        return SiftsAway(scratch.Span);
    }

    public override int Sift(Permutation permutation, out Permutation residue)
    {
        Debug.Assert(permutation.SupportEnd <= Degree, "The permutation moves points beyond the degree.");
        using var scratch = new Scratch<T>(Stride);
        Load(permutation, scratch.Span);
        var level = Sift(scratch.Span);
        residue = Permutation.FromTrustedImages<T>(scratch.Span);
        return level;
    }

    public override int BasePoint(int level) => _levels[level].Point;

    public override int OrbitLength(int level) => _levels[level].OrbitLength;

    public override int OrbitPoint(int level, int index) => _levels[level].OrbitPoint(index);

    public override int OrbitIndex(int level, int point) => (uint)point < (uint)Degree ? _levels[level].Slots[point] : -1;

    public override Permutation Representative(int level, int point)
    {
        var row = _levels[level].Inverses[_levels[level].Slots[point]];
        return Permutation.FromTrustedImages<T>(row).Inverse();
    }

    public override IEnumerable<Permutation> OwnGenerators(int level)
    {
        for (var k = 0; k < _levels[level].Generators.Count; k++)
        {
            yield return Permutation.FromTrustedImages<T>(_levels[level].Generators[k]);
        }
    }

    public override bool TryGetDigits(Permutation permutation, Span<int> digits)
    {
        if (!Contains(permutation))
        {
            return false;
        }

        // A member is u_k … u_2 u_1 with one representative a level. With c = u_(l-1) … u_1 the image of base point l can be c[x] for x in the orbit,
        // so its digit counts the places y below the image whose origin under c lies in the orbit. Kept is the inverse of c, which gives origins.
        using var scratch = new Scratch<T>(2 * Stride);
        var origins = scratch.Span[..Stride];
        var marks = scratch.Span[Stride..];
        Span<ulong> possible = stackalloc ulong[FewWords];
        possible = Words <= FewWords ? possible[..Words] : new ulong[Words];
        _identity.CopyTo(origins);
        for (var i = 0; i < _count; i++)
        {
            var level = _levels[i];
            var image = permutation[level.Point];
            PossibleImages(level, origins, marks, possible);
            digits[i] = PointBits.CountBelow(possible, image);
            Lanes.ComposePadded<T>(origins, level.Inverses[level.Slots[int.CreateTruncating(origins[image])]], origins);
        }

        return true;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public override void WriteMember(ReadOnlySpan<int> digits, Span<int> images)
    {
        using var scratch = new Scratch<T>(2 * Stride);
        var origins = scratch.Span[..Stride];
        var marks = scratch.Span[Stride..];
        Span<ulong> possible = stackalloc ulong[FewWords];
        possible = Words <= FewWords ? possible[..Words] : new ulong[Words];
        _identity.CopyTo(origins);
        for (var i = 0; i < _count; i++)
        {
            var level = _levels[i];
            PossibleImages(level, origins, marks, possible);
            var origin = origins[PointBits.Select(possible, digits[i])];
            Lanes.ComposePadded<T>(origins, level.Inverses[level.Slots[int.CreateTruncating(origin)]], origins);
        }

        for (var point = 0; point < Degree; point++)
        {
            images[int.CreateTruncating(origins[point])] = point;
        }
    }

    public override ChainTables Below(int level)
    {
        var below = new ChainTables<T>(Degree) { SharesGenerators = SharesGenerators };
        for (var i = level; i < _count; i++)
        {
            below.Insert(i - level, _levels[i]);
        }

        return below;
    }

    // The points y whose origin lies in the level's orbit: where the base point can go, given where those before go.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void PossibleImages(ChainLevel<T> level, ReadOnlySpan<T> origins, Span<T> marks, Span<ulong> possible)
    {
        Lanes.ComposePadded(origins, level.OrbitMarks, marks);
        Lanes.HighBits<T>(marks, possible);
    }

    /// <summary>Writes a permutation that moves nothing beyond the degree as padded lanes.</summary>
    private void Load(Permutation permutation, Span<T> lanes)
    {
        var end = permutation.SupportEnd;
        permutation.CopyLanes(lanes[..end]);
        _identity.AsSpan(end).CopyTo(lanes[end..]);
    }
}
