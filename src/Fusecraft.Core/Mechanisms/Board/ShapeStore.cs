using System.Numerics;
using System.Runtime.CompilerServices;

namespace Fusecraft.Mechanisms;

/// <summary>Shapes, or other keys of so many words, each once, numbered in the order of their finding: the keys in one block of memory, and an open-addressing table of their numbers.</summary>
internal sealed class ShapeStore
{
    private const int InitialCapacity = 64;
    private readonly int _words;
    private ulong[] _keys;
    private int[] _table;
    private int _shift;

    public ShapeStore(int words)
    {
        _words = words;
        _keys = new ulong[InitialCapacity * words];
        _table = new int[2 * InitialCapacity];
        _shift = 64 - BitOperations.Log2((uint)_table.Length);
    }

    public int Count { get; private set; }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ReadOnlySpan<ulong> Key<TWidth>(int shape)
        where TWidth : struct, IShapeWidth
    {
        var words = TWidth.Words(_words);
        return _keys.AsSpan(shape * words, words);
    }

    public ReadOnlySpan<ulong> Key(int shape) => _keys.AsSpan(shape * _words, _words);

    /// <summary>The number of a shape, or -1.</summary>
    public int Find(ReadOnlySpan<ulong> key) => _words == 1 ? Find<OneWord>(key) : Find<ManyWords>(key);

    /// <summary>The number of a shape, or -1.</summary>
    public int Find<TWidth>(ReadOnlySpan<ulong> key)
        where TWidth : struct, IShapeWidth
    {
        var at = Slot<TWidth>(key);
        return _table[at] - 1;
    }

    /// <summary>The number of a shape; a new one where it was not there (then it equals the old <see cref="Count"/>).</summary>
    public int FindOrAdd<TWidth>(ReadOnlySpan<ulong> key)
        where TWidth : struct, IShapeWidth
    {
        var at = Slot<TWidth>(key);
        if (_table[at] != 0)
        {
            return _table[at] - 1;
        }

        var words = TWidth.Words(_words);
        if ((Count + 1) * (long)words > _keys.Length)
        {
            Array.Resize(ref _keys, (int)Math.Min(Array.MaxLength, 2L * _keys.Length));
        }

        key[..words].CopyTo(_keys.AsSpan(Count * words, words));
        _table[at] = ++Count;
        if (2L * Count > _table.Length)
        {
            Grow<TWidth>();
        }

        return Count - 1;
    }

    /// <summary>Takes back the shape added last.</summary>
    public void RemoveLast<TWidth>()
        where TWidth : struct, IShapeWidth
    {
        // Nothing was added since, so no probe sequence runs over its place.
        _table[Slot<TWidth>(Key<TWidth>(Count - 1))] = 0;
        Count--;
    }

    /// <summary>Gives back what growing ahead took.</summary>
    public void Trim() => Array.Resize(ref _keys, Count * _words);

    // The place of the key in the table, or the empty place where it belongs.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private int Slot<TWidth>(ReadOnlySpan<ulong> key)
        where TWidth : struct, IShapeWidth
    {
        var words = TWidth.Words(_words);
        var hash = 0UL;
        for (var i = 0; i < words; i++)
        {
            hash = (hash ^ key[i]) * 0x9E3779B97F4A7C15;
            hash ^= hash >> 29;
        }

        var mask = _table.Length - 1;
        var at = (int)(hash * 0xBF58476D1CE4E5B9 >> _shift);
        while (true)
        {
            var entry = _table[at];
            if (entry == 0)
            {
                return at;
            }

            var difference = 0UL;
            var start = (entry - 1) * words;
            for (var i = 0; i < words; i++)
            {
                difference |= _keys[start + i] ^ key[i];
            }

            if (difference == 0)
            {
                return at;
            }

            at = (at + 1) & mask;
        }
    }

    private void Grow<TWidth>()
        where TWidth : struct, IShapeWidth
    {
        _table = new int[checked(2 * _table.Length)];
        _shift--;
        for (var shape = 0; shape < Count; shape++)
        {
            _table[Slot<TWidth>(Key<TWidth>(shape))] = shape + 1;
        }
    }
}
