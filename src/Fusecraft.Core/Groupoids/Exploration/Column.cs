using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Fusecraft.Groupoids;

/// <summary>One entry a shape, each of so many values, in chunks: beyond the first chunk it grows without copying what is there.</summary>
internal sealed class Column<T>
    where T : unmanaged
{
    private const int ChunkBytes = 1 << 25;
    private const int FirstCapacity = 64;
    private readonly int _width;
    private readonly int _shift;
    private T[][] _chunks;
    private int _chunkCount = 1;

    public Column(int width = 1)
    {
        _width = width;
        _shift = BitOperations.Log2((uint)Math.Max(FirstCapacity, ChunkBytes / (width * Unsafe.SizeOf<T>())));
        _chunks = [new T[FirstCapacity * width]];
    }

    /// <summary>The number of entries that there is room for.</summary>
    public long Capacity => _chunkCount == 1 ? _chunks[0].Length / _width : (long)_chunkCount << _shift;

    /// <summary>The first value of an entry that there is room for; the others of the entry follow it.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ref T At(int entry) => ref Unsafe.Add(
        ref MemoryMarshal.GetArrayDataReference(Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(_chunks), entry >>> _shift)),
        (nint)(uint)(entry & ((1 << _shift) - 1)) * _width);

    /// <summary>The values of an entry that there is room for.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public Span<T> Entry(int entry) => MemoryMarshal.CreateSpan(ref At(entry), _width);

    /// <summary>The entries from one on that lie beside each other, at most <paramref name="count"/>.</summary>
    public Span<T> Stretch(int entry, int count) => MemoryMarshal.CreateSpan(ref At(entry), Math.Min(count, (1 << _shift) - (entry & ((1 << _shift) - 1))) * _width);

    /// <summary>Makes room.</summary>
    public void EnsureCapacity(long entries)
    {
        if (entries <= Capacity)
        {
            return;
        }

        // The first chunk doubles up to its full size; only then there are others.
        if (_chunkCount == 1 && _chunks[0].Length < _width << _shift)
        {
            var grown = HugePages.Allocate<T>((int)Math.Min(1L << _shift, (long)BitOperations.RoundUpToPowerOf2((ulong)entries)) * _width);
            _chunks[0].CopyTo(grown, 0);
            _chunks[0] = grown;
        }

        for (; entries > Capacity; _chunkCount++)
        {
            if (_chunkCount == _chunks.Length)
            {
                Array.Resize(ref _chunks, 2 * _chunks.Length);
            }

            _chunks[_chunkCount] = HugePages.Allocate<T>(_width << _shift);
        }
    }

    /// <summary>Gives back what growing ahead took, if it is worth it.</summary>
    public void Trim(int count)
    {
        var last = _chunkCount - 1;
        var used = (int)(count - ((long)last << _shift)) * _width;
        if (used >= 0 && _chunks[last].Length - used > 2048)
        {
            Array.Resize(ref _chunks[last], used);
        }
    }
}
