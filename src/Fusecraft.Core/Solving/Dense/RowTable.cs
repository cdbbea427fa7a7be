using System.Diagnostics;
using System.Runtime.CompilerServices;

namespace Fusecraft.Solving;

/// <summary>
/// Moves on states that stand in rows. A move takes a row to a row; within it, words of at most 32 states go to words, and within those each state by one of few permutations. So a move on a whole row costs a
/// look-up a word, all of it in near memory, and a search need not touch a permutation.
/// </summary>
/// <remarks>
/// The words are the cosets of a small group that acts on the right, so there are as many permutations within words as that group has members, and row, word and place are the digits of a stabilizer chain.
/// State = row · <see cref="RowStates"/> + word · <see cref="WordStates"/> + place.
/// </remarks>
internal sealed class RowTable
{
    /// <summary>The most states of a word: then they fit a 32-bit number.</summary>
    public const int MaxWordStates = 32;

    private readonly int[] _targets;
    private readonly int[] _maps;
    private readonly uint[] _wordMaps;
    private readonly byte[] _places;
    private readonly uint[] _gather;

    /// <param name="rowCount">The number of rows.</param>
    /// <param name="slots">The number of moves at each row.</param>
    /// <param name="wordCount">The words of a row.</param>
    /// <param name="wordStates">The states of a word.</param>
    /// <param name="targets">For each row and slot the row it leads to, or -1.</param>
    /// <param name="maps">For each row and slot the number of the map of words.</param>
    /// <param name="wordMaps">For each map and word: the first state of the word it goes to, times 32, plus the number of the permutation within.</param>
    /// <param name="places">For each permutation and place where it goes.</param>
    public RowTable(int rowCount, int slots, int wordCount, int wordStates, int[] targets, int[] maps, uint[] wordMaps, byte[] places)
    {
        Debug.Assert(wordStates is >= 1 and <= MaxWordStates, "A word has 1 to 32 states.");
        RowCount = rowCount;
        Slots = slots;
        WordCount = wordCount;
        WordStates = wordStates;
        _targets = targets;
        _maps = maps;
        _wordMaps = wordMaps;
        _places = places;
        WordBytes = (wordStates + 7) / 8;
        _gather = new uint[places.Length / wordStates * WordBytes * 256];
        FillGather();
    }

    public int RowCount { get; }

    /// <summary>The number of moves at each row, counting those that are barred.</summary>
    public int Slots { get; }

    public int WordCount { get; }

    public int WordStates { get; }

    /// <summary>The bytes that hold a bit for each state of a word.</summary>
    public int WordBytes { get; }

    public int RowStates => WordCount * WordStates;

    public long StateCount => (long)RowCount * RowStates;

    /// <summary>The memory held, in bytes.</summary>
    public long Bytes => (4L * (_targets.Length + _maps.Length + _wordMaps.Length + _gather.Length)) + _places.Length;

    /// <summary>For a permutation within words and each byte of a word's bits, the bits of the places that go there: 256 entries a byte, <see cref="WordBytes"/> bytes a permutation.</summary>
    public ReadOnlySpan<uint> Gather => _gather;

    /// <summary>The row that a slot leads to; -1 where it is barred.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int TargetRow(int row, int slot) => _targets[(row * Slots) + slot];

    /// <summary>The rows that the slots of a row lead to, -1 where barred.</summary>
    public ReadOnlySpan<int> TargetRows(int row) => _targets.AsSpan(row * Slots, Slots);

    /// <summary>Where the words of a row go; see the constructor.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ReadOnlySpan<uint> WordMap(int row, int slot) => _wordMaps.AsSpan(_maps[(row * Slots) + slot] * WordCount, WordCount);

    /// <summary>The state that a slot leads to; -1 where it is barred.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public long After(long state, int slot)
    {
        var (row, within) = Math.DivRem(state, RowStates);
        var target = TargetRow((int)row, slot);
        return target < 0 ? -1 : ((long)target * RowStates) + After((int)row, (int)within, slot);
    }

    /// <summary>Where a state of a row goes within the row that a slot leads to.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int After(int row, int within, int slot)
    {
        var (word, place) = Math.DivRem(within, WordStates);
        var entry = _wordMaps[((nint)_maps[(row * Slots) + slot] * WordCount) + word];
        return (int)(entry >> 5) + _places[((entry & 31) * (uint)WordStates) + (uint)place];
    }

    /// <summary>Where the places of a word go, by its entry in a map of words.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ReadOnlySpan<byte> Places(uint entry) => _places.AsSpan((int)(entry & 31) * WordStates, WordStates);

    private void FillGather()
    {
        for (var permutation = 0; permutation < _places.Length / WordStates; permutation++)
        {
            for (var place = 0; place < WordStates; place++)
            {
                var image = _places[(permutation * WordStates) + place];
                var table = _gather.AsSpan((((permutation * WordBytes) + (image >> 3)) << 8), 256);
                for (var bits = 0; bits < 256; bits++)
                {
                    table[bits] |= (uint)((bits >> (image & 7)) & 1) << place;
                }
            }
        }
    }
}
