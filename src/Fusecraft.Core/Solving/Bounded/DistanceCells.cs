using System.Numerics;
using System.Runtime.CompilerServices;

namespace Fusecraft.Solving;

/// <summary>A distance for each of many entries, none at first, in 4 or 8 bits each. Several threads may set and get: an entry goes from unseen to its distance once.</summary>
internal interface IDistanceCells
{
    /// <summary>What an entry holds that is unseen: all bits set, more than any distance.</summary>
    static abstract int Unseen { get; }

    int Get(long entry);

    void Set(long entry, int distance);

    /// <summary>Writes the places, counted from the start, of those entries of a row that hold a value; returns how many.</summary>
    int Collect(long start, int length, int value, Span<int> places);
}

/// <summary>Eight bits an entry.</summary>
internal readonly struct ByteCells(byte[] cells) : IDistanceCells
{
    public static int Unseen => 255;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int Get(long entry) => cells[entry];

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Set(long entry, int distance) => cells[entry] = (byte)distance;

    public int Collect(long start, int length, int value, Span<int> places)
    {
        var row = cells.AsSpan((int)start, length);
        var count = 0;
        for (var at = 0; ; at++)
        {
            var next = row[at..].IndexOf((byte)value);
            if (next < 0)
            {
                return count;
            }

            at += next;
            places[count++] = at;
        }
    }
}

/// <summary>Four bits an entry, sixteen entries a word.</summary>
internal readonly struct NibbleCells(ulong[] cells) : IDistanceCells
{
    private const ulong Ones = 0x1111111111111111;

    public static int Unseen => 15;

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int Get(long entry) => (int)(cells[entry >> 4] >> (int)(entry & 15) * 4) & 15;

    // An unseen entry has all its bits set, so clearing some makes it any value; neighbours in the word keep theirs.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Set(long entry, int distance) => Interlocked.And(ref cells[entry >> 4], ~((ulong)(15 - distance) << (int)(entry & 15) * 4));

    public int Collect(long start, int length, int value, Span<int> places)
    {
        var count = 0;
        var end = start + length;
        var pattern = Ones * (ulong)value;
        for (var word = start >> 4; word << 4 < end; word++)
        {
            // One bit for each nibble that differs, then those that do not.
            var differs = cells[word] ^ pattern;
            differs |= differs >> 2;
            differs |= differs >> 1;
            for (var same = ~differs & Ones; same != 0; same &= same - 1)
            {
                var entry = (word << 4) + (BitOperations.TrailingZeroCount(same) >> 2);
                if (entry >= start && entry < end)
                {
                    places[count++] = (int)(entry - start);
                }
            }
        }

        return count;
    }
}
