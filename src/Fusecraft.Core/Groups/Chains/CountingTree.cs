using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>A set of numbers that counts and finds by rank in logarithmic time.</summary>
/// <remarks>Source: P. M. Fenwick, <em>A new data structure for cumulative frequency tables</em>, Softw. Pract. Exper. 24 (1994) (from memory).</remarks>
internal readonly struct CountingTree
{
    private readonly int[] _sums;

    public CountingTree(int bound, ReadOnlySpan<int> members)
    {
        _sums = new int[bound + 1];
        foreach (var member in members)
        {
            _sums[member + 1]++;
        }

        for (var i = 1; i <= bound; i++)
        {
            var next = i + (i & -i);
            if (next <= bound)
            {
                _sums[next] += _sums[i];
            }
        }
    }

    public void Remove(int member)
    {
        for (var i = member + 1; i < _sums.Length; i += i & -i)
        {
            _sums[i]--;
        }
    }

    /// <summary>How many members are smaller.</summary>
    public int CountBelow(int number)
    {
        var count = 0;
        for (var i = number; i > 0; i -= i & -i)
        {
            count += _sums[i];
        }

        return count;
    }

    /// <summary>The member that so many others are smaller than.</summary>
    public int Select(int rank)
    {
        var position = 0;
        for (var step = (int)BitOperations.RoundUpToPowerOf2((uint)_sums.Length); step > 0; step >>= 1)
        {
            if (position + step < _sums.Length && _sums[position + step] <= rank)
            {
                position += step;
                rank -= _sums[position];
            }
        }

        return position;
    }
}
