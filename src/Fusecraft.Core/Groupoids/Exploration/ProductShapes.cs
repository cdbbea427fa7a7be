using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// Shapes held by their numbers in a product of tracks. A bit for each number of the product says whether that shape was found: far less memory to jump about in than any table of keys, so that
/// it often fits the caches.
/// </summary>
/// <typeparam name="T">The integer that holds the numbers of the product.</typeparam>
internal sealed partial class ProductShapes<T> : ExploredShapes
    where T : unmanaged, IBinaryInteger<T>
{
    /// <summary>So many words of bits share a count of those before.</summary>
    private const int GroupShift = 3;

    private readonly ShapeProduct _product;
    private readonly StepMasks _masks;
    private readonly Column<T> _codes;
    private readonly ulong[] _found;
    private readonly int _steps;

    // For each track, position and step, what the step adds to the number of a shape.
    private readonly T[][] _parts;
    private readonly ulong[][] _terms;

    // For lookups: the number of bits before each group, and the shapes in the order of their bits.
    private int[] _before = [];
    private int[] _numbers = [];

    public ProductShapes(Mechanism mechanism, ShapeProduct product, Column<T> codes, int count, Column<int> parents, Column<ushort> steps)
        : base(mechanism, parents, steps)
    {
        _product = product;
        _masks = mechanism.Board.Masks!;
        _codes = codes;
        _steps = _masks.StepCount;
        Count = count;
        _parts = [.. product.Tracks.Select((track, i) => Parts(track, T.CreateTruncating(product.Radices[i])))];
        _terms = [.. product.Tracks.Select(track => track.Terms.ToArray())];
        _found = HugePages.AllocateZeroed<ulong>((int)((product.Size + 63) / 64));
        for (var shape = 0; shape < count; shape++)
        {
            var code = ulong.CreateTruncating(codes.At(shape));
            _found[code >> 6] |= 1UL << (int)code;
        }
    }

    public override long BytesFor(long count) => BytesFor(Mechanism, _product, count);

    /// <summary>The bytes that so many shapes take, with the bits and the tables.</summary>
    public static long BytesFor(Mechanism mechanism, ShapeProduct product, long count)
    {
        var groups = (long)(product.Size >> (6 + GroupShift)) + 1;
        return (count * (Unsafe.SizeOf<T>() + (2 * sizeof(int)) + sizeof(ushort)))
            + (groups * ((sizeof(ulong) << GroupShift) + sizeof(int)))
            + product.Bytes
            + ((long)product.PositionCount * mechanism.Steps.Length * Unsafe.SizeOf<T>());
    }

    public override ReadOnlySpan<ulong> Key(int shape)
    {
        var key = new ulong[Words];
        CopyKey(shape, key);
        return key;
    }

    public override void CopyKey(int shape, Span<ulong> key) => _product.Decode(ulong.CreateTruncating(_codes.At(shape)), key[..Words]);

    public override int Find(ReadOnlySpan<ulong> key) => _product.TryEncode(key, out var code) ? NumberOf(code) : -1;

    public override bool Contains(ReadOnlySpan<ulong> key) => _product.TryEncode(key, out var code) && IsFound(code);

    public override ExploredShapes? In(ShapeProduct product) => null;

    public override int Target(int shape, int step) => TryMove(shape, step, out var code) ? NumberOf(code) : -1;

    // In rounds, each announcing to the memory what the next one reads: bits and counts, then numbers.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public override void Targets(ReadOnlySpan<int> shapes, ReadOnlySpan<int> steps, Span<int> targets)
    {
        using var scratch = new Permutations.Scratch<ulong>(shapes.Length * steps.Length);
        var codes = scratch.Span;
        var at = 0;
        Span<int> positions = stackalloc int[_parts.Length];
        foreach (var shape in shapes)
        {
            var code = ulong.CreateTruncating(_codes.At(shape));
            var terms = ulong.MaxValue;
            for (var i = 0; i < positions.Length; i++)
            {
                (var position, code) = Math.DivRem(code, _product.Radices[i]);
                positions[i] = (int)position;
                terms &= _terms[i][position];
            }

            var free = _masks.StepsOf(terms);
            foreach (var step in steps)
            {
                targets[at] = -1;
                if ((free >> step & 1) != 0)
                {
                    var next = T.Zero;
                    for (var i = 0; i < positions.Length; i++)
                    {
                        next += _parts[i][(positions[i] * _steps) + step];
                    }

                    codes[at] = ulong.CreateTruncating(next);
                    targets[at] = 0;
                    Memory.Announce(ref _found[codes[at] >> 6]);
                    Memory.Announce(ref _before[codes[at] >> (6 + GroupShift)]);
                }

                at++;
            }
        }

        for (var i = 0; i < at; i++)
        {
            targets[i] = targets[i] == 0 && IsFound(codes[i]) ? PlaceOf(codes[i]) : -1;
            if (targets[i] >= 0)
            {
                Memory.Announce(ref _numbers[targets[i]]);
            }
        }

        for (var i = 0; i < at; i++)
        {
            targets[i] = targets[i] >= 0 ? _numbers[targets[i]] : -1;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public override int Add(Candidates candidates, int limit)
    {
        var room = (int)Math.Min(limit, (long)Count + candidates.Count);
        _codes.EnsureCapacity(room);
        Parents.EnsureCapacity(room);
        Steps.EnsureCapacity(room);
        ref var found = ref MemoryMarshal.GetArrayDataReference(_found);
        for (var i = 0; i < candidates.Count; i++)
        {
            var code = candidates.Records[i];
            ref var word = ref found.At(code >> 6);
            var bit = 1UL << (int)code;
            if ((word & bit) != 0)
            {
                continue;
            }

            if (Count >= limit)
            {
                return i;
            }

            word |= bit;
            var origin = candidates.Origins[i];
            _codes.At(Count) = T.CreateTruncating(code);
            SetOrigin(Count, candidates.First + (int)(origin >> 16), (int)(origin & 0xFFFF));
            Count++;
        }

        return candidates.Count;
    }

    public override bool TryAddAfter(int parent, int step)
    {
        if (!TryMove(parent, step, out var code) || IsFound(code))
        {
            return false;
        }

        _codes.EnsureCapacity(Count + 1L);
        Parents.EnsureCapacity(Count + 1L);
        Steps.EnsureCapacity(Count + 1L);
        _found[code >> 6] |= 1UL << (int)code;
        _codes.At(Count) = T.CreateTruncating(code);
        SetOrigin(Count, parent, step);
        Count++;
        return true;
    }

    public override void Finish(int threads)
    {
        _codes.Trim(Count);
        Parents.Trim(Count);
        Steps.Trim(Count);
        _before = HugePages.Allocate<int>((_found.Length >> GroupShift) + 1);
        var before = 0;
        for (var at = 0; at < _found.Length; at++)
        {
            if ((at & ((1 << GroupShift) - 1)) == 0)
            {
                _before[at >> GroupShift] = before;
            }

            before += BitOperations.PopCount(_found[at]);
        }

        _numbers = HugePages.Allocate<int>(Count);
        const int Piece = 1 << 16;
        if (threads == 1 || Count <= Piece)
        {
            Number(0, Count);
        }
        else
        {
            Parallel.For(0, (Count + Piece - 1) / Piece, new ParallelOptions { MaxDegreeOfParallelism = threads }, i => Number(i * Piece, (int)Math.Min(Count, (i + 1L) * Piece)));
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Number(int first, int end)
    {
        Span<int> places = stackalloc int[Batch];
        for (var start = first; start < end; start += Batch)
        {
            var count = Math.Min(Batch, end - start);
            for (var i = 0; i < count; i++)
            {
                var code = ulong.CreateTruncating(_codes.At(start + i));
                Memory.Announce(ref _found[code >> 6]);
                Memory.Announce(ref _before[code >> (6 + GroupShift)]);
            }

            for (var i = 0; i < count; i++)
            {
                places[i] = PlaceOf(ulong.CreateTruncating(_codes.At(start + i)));
                Memory.Announce(ref _numbers[places[i]]);
            }

            for (var i = 0; i < count; i++)
            {
                _numbers[places[i]] = start + i;
            }
        }
    }

    private bool IsFound(ulong code) => (_found[code >> 6] >> (int)code & 1) != 0;

    private int NumberOf(ulong code) => IsFound(code) ? _numbers[PlaceOf(code)] : -1;

    // How many shapes were found whose numbers are smaller.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private int PlaceOf(ulong code)
    {
        var word = (int)(code >> 6);
        var place = _before[word >> GroupShift];
        for (var at = word >> GroupShift << GroupShift; at < word; at++)
        {
            place += BitOperations.PopCount(_found[at]);
        }

        return place + BitOperations.PopCount(_found[word] & ((1UL << (int)code) - 1));
    }

    private bool TryMove(int shape, int step, out ulong next)
    {
        var code = ulong.CreateTruncating(_codes.At(shape));
        var terms = ulong.MaxValue;
        next = 0;
        for (var i = 0; i < _parts.Length; i++)
        {
            (var position, code) = Math.DivRem(code, _product.Radices[i]);
            terms &= _terms[i][position];
            next += ulong.CreateTruncating(_parts[i][((int)position * _steps) + step]);
        }

        return (_masks.StepsOf(terms) >> step & 1) != 0;
    }

    private static T[] Parts(ShapeTrack track, T radix)
    {
        var parts = HugePages.Allocate<T>(track.Next.Length);
        for (var i = 0; i < parts.Length; i++)
        {
            parts[i] = T.CreateTruncating(track.Next[i]) * radix;
        }

        return parts;
    }
}
