using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// Shapes held by their keys and looked up in an open-addressing table of their numbers. An entry holds a part of the hash too, so that a look-up reads one line of the table and, where it
/// finds the shape, its key. Look-ups come in batches: each is announced to the memory long before it is made.
/// </summary>
internal sealed partial class KeyedShapes<TWidth> : ExploredShapes
    where TWidth : struct, IShapeWidth
{
    private const int FirstTableLength = 128;

    /// <summary>So many keys fit the caches, so that announcing look-ups brings nothing.</summary>
    private const int CachedShapes = 1 << 14;

    private readonly Column<ulong> _keys;
    private ulong[] _table = new ulong[FirstTableLength];
    private int _shift = 64 - BitOperations.Log2(FirstTableLength);

    public KeyedShapes(Mechanism mechanism, ReadOnlySpan<ulong> first)
        : base(mechanism, new Column<int>(), new Column<ushort>())
    {
        _keys = new Column<ulong>(Words);
        _moves = mechanism.Board.Moves.ToArray();
        _turnOf = Array.ConvertAll([.. mechanism.Steps], step => step.Turn.Index);
        _isForward = Array.ConvertAll([.. mechanism.Steps], step => step.IsForward);
        _names = SharedNames(mechanism);
        Insert(Hash(ref MemoryMarshal.GetReference(first)), ref MemoryMarshal.GetReference(first));
        SetOrigin(0, -1, 0);
    }

    // While the table grows the old one is still there.
    public override long BytesFor(long count) =>
        (count * ((8L * Words) + sizeof(int) + sizeof(ushort))) + (12L * (long)Math.Max(FirstTableLength, BitOperations.RoundUpToPowerOf2((ulong)(count * 8 / 5))));

    public override ReadOnlySpan<ulong> Key(int shape) => _keys.Entry(shape);

    public override void CopyKey(int shape, Span<ulong> key) => _keys.Entry(shape).CopyTo(key);

    public override int Find(ReadOnlySpan<ulong> key) => Find(Hash(ref MemoryMarshal.GetReference(key)), ref MemoryMarshal.GetReference(key));

    public override bool Contains(ReadOnlySpan<ulong> key) => Find(key) >= 0;

    public override int Target(int shape, int step)
    {
        var key = _keys.Entry(shape);
        if (!_moves[step].IsFree<TWidth>(key))
        {
            return -1;
        }

        Span<ulong> next = stackalloc ulong[8];
        next = key.Length <= next.Length ? next[..key.Length] : new ulong[key.Length];
        _moves[step].Move<TWidth>(key, next);
        return Find(next);
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public override int Add(Candidates candidates, int limit)
    {
        const int Ahead = 12;
        var words = TWidth.Words(Words);
        EnsureCapacity((int)Math.Min(limit, (long)Count + candidates.Count));
        ref var records = ref MemoryMarshal.GetArrayDataReference(candidates.Records);
        var hashes = candidates.Hashes;
        for (var i = 0; i < candidates.Count; i++)
        {
            if (i + Ahead < candidates.Count)
            {
                Announce(hashes[i + Ahead]);
            }

            ref var record = ref Unsafe.Add(ref records, i * words);
            if (Find(hashes[i], ref record) >= 0)
            {
                continue;
            }

            if (Count >= limit)
            {
                return i;
            }

            var origin = candidates.Origins[i];
            SetOrigin(Count, candidates.First + (int)(origin >> 16), (int)(origin & 0xFFFF));
            Insert(hashes[i], ref record);
        }

        return candidates.Count;
    }

    public override bool TryAddAfter(int parent, int step)
    {
        if (!_moves[step].IsFree<TWidth>(_keys.Entry(parent)))
        {
            return false;
        }

        Span<ulong> next = stackalloc ulong[8];
        next = Words <= next.Length ? next[..Words] : new ulong[Words];
        _moves[step].Move<TWidth>(_keys.Entry(parent), next);
        ref var key = ref MemoryMarshal.GetReference(next);
        var hash = Hash(ref key);
        if (Find(hash, ref key) >= 0)
        {
            return false;
        }

        EnsureCapacity(Count + 1);
        SetOrigin(Count, parent, step);
        Insert(hash, ref key);
        return true;
    }

    public override void Finish(int threads)
    {
        _keys.Trim(Count);
        Parents.Trim(Count);
        Steps.Trim(Count);
    }

    public override ExploredShapes? In(ShapeProduct product) => product.Size <= uint.MaxValue ? In<uint>(product) : In<ulong>(product);

    private ProductShapes<T>? In<T>(ShapeProduct product)
        where T : unmanaged, IBinaryInteger<T>
    {
        var codes = new Column<T>();
        codes.EnsureCapacity(Count);
        for (var shape = 0; shape < Count; shape++)
        {
            if (!product.TryEncode(Key(shape), out var code))
            {
                return null;
            }

            codes.At(shape) = T.CreateTruncating(code);
        }

        return new ProductShapes<T>(Mechanism, product, codes, Count, Parents, Steps);
    }

    private void EnsureCapacity(int count)
    {
        _keys.EnsureCapacity(count);
        Parents.EnsureCapacity(count);
        Steps.EnsureCapacity(count);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private ulong Hash(ref ulong key)
    {
        var hash = 0UL;
        for (var i = 0; i < TWidth.Words(Words); i++)
        {
            hash = (hash ^ Unsafe.Add(ref key, i)) * 0x9E3779B97F4A7C15;
            hash ^= hash >> 32;
        }

        return hash * 0xBF58476D1CE4E5B9;
    }

    // An entry: the number plus one in the lower half, bits of the hash in the upper one.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ulong Tag(ulong hash) => hash << 24 >> 32;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void Announce(ulong hash) => Memory.Announce(ref MemoryMarshal.GetArrayDataReference(_table).At(hash >> _shift));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private bool IsAt(int shape, ref ulong key)
    {
        ref var known = ref _keys.At(shape);
        var difference = 0UL;
        for (var i = 0; i < TWidth.Words(Words); i++)
        {
            difference |= Unsafe.Add(ref known, i) ^ Unsafe.Add(ref key, i);
        }

        return difference == 0;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private int Find(ulong hash, ref ulong key)
    {
        ref var table = ref MemoryMarshal.GetArrayDataReference(_table);
        var mask = (ulong)(_table.Length - 1);
        for (var at = hash >> _shift; ; at = (at + 1) & mask)
        {
            var entry = table.At(at);
            if (entry == 0)
            {
                return -1;
            }

            if (entry >> 32 == Tag(hash) && IsAt((int)(uint)entry - 1, ref key))
            {
                return (int)(uint)entry - 1;
            }
        }
    }

    // Adds a key that is not there; its column has room, the table gets it.
    private void Insert(ulong hash, ref ulong key)
    {
        for (var i = 0; i < TWidth.Words(Words); i++)
        {
            Unsafe.Add(ref _keys.At(Count), i) = Unsafe.Add(ref key, i);
        }

        Count++;
        Place(hash, Count);
        if (Count * 8L > _table.Length * 5L)
        {
            Grow();
        }
    }

    private void Place(ulong hash, int number)
    {
        var mask = (ulong)(_table.Length - 1);
        var at = hash >> _shift;
        while (_table[at] != 0)
        {
            at = (at + 1) & mask;
        }

        _table[at] = (Tag(hash) << 32) | (uint)number;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Grow()
    {
        _table = HugePages.AllocateZeroed<ulong>(checked(2 * _table.Length));
        _shift--;
        const int Ahead = 16;
        for (var shape = 0; shape < Count; shape++)
        {
            if (shape + Ahead < Count)
            {
                Announce(Hash(ref _keys.At(shape + Ahead)));
            }

            Place(Hash(ref _keys.At(shape)), shape + 1);
        }
    }
}
