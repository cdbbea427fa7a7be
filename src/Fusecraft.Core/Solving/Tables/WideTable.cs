using System.Runtime.CompilerServices;

namespace Fusecraft.Solving;

/// <summary>The distance of each state in one byte, or in two where a byte is too small. For moves of different costs, or without a reverse of equal cost.</summary>
internal sealed class WideTable
{
    public WideTable(TableMemory memory, int width)
    {
        Memory = memory;
        Width = width;
    }

    public TableMemory Memory { get; }

    /// <summary>Bytes a state, 1 or 2.</summary>
    public int Width { get; }

    /// <summary>What stands for a state that was not reached.</summary>
    public int Unreached => Width == 1 ? byte.MaxValue : ushort.MaxValue;

    /// <summary>The distance of a state; -1 where it was not reached.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int Distance(long state)
    {
        int distance = Width == 1 ? Memory.At<byte>(state) : Memory.At<ushort>(state);
        return distance == Unreached ? -1 : distance;
    }
}
