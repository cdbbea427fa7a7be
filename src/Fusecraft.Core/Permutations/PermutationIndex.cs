using System.Numerics;
using System.Runtime.InteropServices;

namespace Fusecraft.Permutations;

/// <summary>Different permutations of one degree, numbered from 0 in the order in which they were added, and found again by what they are. Open addressing in a table at most half full.</summary>
internal sealed class PermutationIndex<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly PackedPermutations<T> _rows;

    // A number plus one, or 0.
    private int[] _table = new int[1 << 10];

    /// <param name="stride">Lanes a row; see <see cref="PackedPermutations{T}.Stride"/>.</param>
    public PermutationIndex(int stride) => _rows = new PackedPermutations<T>(stride, 1 << 8);

    public int Count => _rows.Count;

    /// <summary>A permutation by its number; valid until the next one is added.</summary>
    public ReadOnlySpan<T> this[int number] => _rows[number];

    /// <summary>Adds a permutation, unless it is there already; either way gives its number.</summary>
    /// <param name="row">Padded lanes.</param>
    /// <param name="number">The number of the permutation.</param>
    /// <returns>False where it was there.</returns>
    public bool TryAdd(ReadOnlySpan<T> row, out int number)
    {
        var at = Slot(row);
        number = _table[at] - 1;
        if (number >= 0)
        {
            return false;
        }

        number = Count;
        _rows.Add(row);
        _table[at] = Count;
        if (2 * Count > _table.Length)
        {
            _table = new int[2 * _table.Length];
            for (var i = 0; i < Count; i++)
            {
                _table[Slot(_rows[i])] = i + 1;
            }
        }

        return true;
    }

    private int Slot(ReadOnlySpan<T> row)
    {
        var hash = 0UL;
        foreach (var word in MemoryMarshal.Cast<T, ulong>(row))
        {
            hash = (hash ^ word) * 0x9E37_79B9_7F4A_7C15;
            hash ^= hash >> 32;
        }

        var at = (int)(hash & (ulong)(_table.Length - 1));
        while (_table[at] != 0 && !_rows[_table[at] - 1].SequenceEqual(row))
        {
            at = (at + 1) & (_table.Length - 1);
        }

        return at;
    }
}
