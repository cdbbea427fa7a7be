using System.Numerics;
using System.Runtime.Intrinsics.X86;

namespace Fusecraft.Groups;

/// <summary>Sets of points, a bit each.</summary>
internal static class PointBits
{
    /// <summary>How many points of the set are smaller.</summary>
    public static int CountBelow(ReadOnlySpan<ulong> set, int point)
    {
        var count = BitOperations.PopCount(set[point >> 6] & ((1UL << (point & 63)) - 1));
        foreach (var word in set[..(point >> 6)])
        {
            count += BitOperations.PopCount(word);
        }

        return count;
    }

    /// <summary>The point of the set that so many others are smaller than; it must be there.</summary>
    public static int Select(ReadOnlySpan<ulong> set, int rank)
    {
        var index = 0;
        for (var count = BitOperations.PopCount(set[0]); count <= rank; count = BitOperations.PopCount(set[index]))
        {
            rank -= count;
            index++;
        }

        return (64 * index) + Select(set[index], rank);
    }

    private static int Select(ulong word, int rank)
    {
        if (Bmi2.X64.IsSupported)
        {
            return BitOperations.TrailingZeroCount(Bmi2.X64.ParallelBitDeposit(1UL << rank, word));
        }

        for (; rank > 0; rank--)
        {
            word &= word - 1;
        }

        return BitOperations.TrailingZeroCount(word);
    }
}
