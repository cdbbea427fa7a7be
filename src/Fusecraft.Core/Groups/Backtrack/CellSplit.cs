namespace Fusecraft.Groups;

/// <summary>
/// One refinement of an ordered partition by keys: points of a cell with unequal keys are parted. Made on one partition, it is then done in the same way to others, which succeeds exactly
/// when their cells part into keys and sizes alike.
/// </summary>
internal sealed class CellSplit
{
    private const int Parted = -1;

    // The key shared by all points of a cell, or Parted. Keys are not negative.
    private readonly int[] _keyOf;
    private readonly Dictionary<(int Cell, int Key), int> _parts = [];
    private readonly int[] _sizes;

    /// <summary>Refines a partition in place.</summary>
    /// <param name="cells">For each point the number of its cell.</param>
    /// <param name="keys">A number for each point, not negative.</param>
    /// <param name="count">How many cells there are; becomes how many there are afterwards. The part with the key met first keeps the cell's number.</param>
    public CellSplit(int[] cells, int[] keys, ref int count)
    {
        _keyOf = new int[count];
        var first = new int[count];
        first.AsSpan().Fill(-1);
        for (var point = 0; point < cells.Length; point++)
        {
            var cell = cells[point];
            if (first[cell] < 0)
            {
                first[cell] = _keyOf[cell] = keys[point];
            }
            else if (first[cell] != keys[point])
            {
                _keyOf[cell] = Parted;
            }
        }

        for (var point = 0; point < cells.Length; point++)
        {
            var cell = cells[point];
            if (_keyOf[cell] != Parted)
            {
                continue;
            }

            if (!_parts.TryGetValue((cell, keys[point]), out var part))
            {
                part = keys[point] == first[cell] ? cell : count++;
                _parts.Add((cell, keys[point]), part);
            }

            cells[point] = part;
        }

        _sizes = new int[_parts.Count == 0 ? 0 : count];
        if (_sizes.Length > 0)
        {
            foreach (var cell in cells)
            {
                _sizes[cell]++;
            }
        }
    }

    /// <summary>True when no cell was parted.</summary>
    public bool IsTrivial => _sizes.Length == 0;

    /// <summary>Refines another partition, whose cells have the same sizes, in place. False, with the partition spoilt, where its cells part otherwise.</summary>
    /// <param name="cells">For each point the number of its cell.</param>
    /// <param name="keys">A number for each point, not negative.</param>
    /// <param name="counter">Scratch: at least as long as there are cells afterwards.</param>
    public bool TryApply(int[] cells, int[] keys, int[] counter)
    {
        var sizes = _sizes;
        Array.Clear(counter, 0, sizes.Length);
        for (var point = 0; point < cells.Length; point++)
        {
            var cell = cells[point];
            var key = _keyOf[cell];
            if (key == Parted)
            {
                if (!_parts.TryGetValue((cell, keys[point]), out var part) || ++counter[part] > sizes[part])
                {
                    return false;
                }

                cells[point] = part;
            }
            else if (key != keys[point])
            {
                return false;
            }
        }

        return true;
    }
}
