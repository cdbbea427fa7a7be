using System.Numerics;
using System.Runtime.CompilerServices;

namespace Fusecraft.Solving;

/// <summary>
/// Two bits a state: not reached, or the distance modulo 3. Where every move has a reverse of equal cost, distances of neighbours differ by at most 1, so the residues tell which neighbours are nearer.
/// </summary>
/// <remarks>
/// Source: G. Cooperman, L. Finkelstein, <em>New methods for using Cayley graphs in interconnection networks</em>, Discrete Appl. Math. 37/38 (1992) (from memory). Each row begins with a new 64-bit element; an element holds 32
/// states, the low bits of their codes in its lower half and the high bits in the upper: code 0 is not reached, code 1 + d mod 3 at distance d. One element is read and written at once, so threads may read rows
/// that others write.
/// </remarks>
internal sealed class ResidueTable
{
    public const int StatesPerElement = 32;
    private readonly TableMemory _elements;

    public ResidueTable(int rowCount, int rowStates)
        : this(rowCount, rowStates, TableMemory.Allocate(BytesFor(rowCount, rowStates)))
    {
    }

    public ResidueTable(int rowCount, int rowStates, TableMemory elements)
    {
        RowStates = rowStates;
        RowElements = ElementsOf(rowStates);
        RowCount = rowCount;
        _elements = elements;
    }

    public int RowCount { get; }

    public int RowStates { get; }

    /// <summary>The elements that hold a row.</summary>
    public int RowElements { get; }

    public TableMemory Memory => _elements;

    /// <summary>The bytes that a table takes.</summary>
    public static long BytesFor(long rowCount, int rowStates) => rowCount * ElementsOf(rowStates) * sizeof(ulong);

    private static int ElementsOf(int rowStates) => (rowStates + StatesPerElement - 1) / StatesPerElement;

    /// <summary>The code of states at a distance.</summary>
    public static int CodeOf(int distance) => 1 + (distance % 3);

    /// <summary>The code of the distance one less.</summary>
    public static int Before(int code) => code == 1 ? 3 : code - 1;

    public Span<ulong> Row(int row) => _elements.Slice<ulong>((long)row * RowElements, RowElements);

    /// <summary>The code of a state; 0 where it was not reached.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public int Code(long row, int within)
    {
        var element = _elements.At<ulong>((row * RowElements) + (within >> 5)) >> (within & 31);
        return (int)((element & 1) | ((element >> 31) & 2));
    }

    /// <summary>Gives a state that was not reached its code.</summary>
    public void Set(long row, int within, int code) =>
        _elements.At<ulong>((row * RowElements) + (within >> 5)) |= (((ulong)code & 1) | (((ulong)code >> 1) << 32)) << (within & 31);

    /// <summary>Writes a bit for each state of a row: those of a code.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void CopyBits(int row, int code, Span<uint> bits)
    {
        var elements = Row(row);
        var flip = ((code & 1) == 0 ? uint.MaxValue : 0UL) | ((code & 2) == 0 ? (ulong)uint.MaxValue << 32 : 0);
        for (var i = 0; i < elements.Length; i++)
        {
            var element = elements[i] ^ flip;
            bits[i] = (uint)element & (uint)(element >> 32);
        }
    }

    /// <summary>Gives those states of a row whose bits are set and that were not reached a code; returns how many they are.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public int Reach(int row, ReadOnlySpan<uint> bits, int code)
    {
        var elements = Row(row);
        var mask = ((code & 1) == 0 ? 0 : uint.MaxValue) | ((code & 2) == 0 ? 0 : (ulong)uint.MaxValue << 32);
        var count = 0;
        for (var i = 0; i < elements.Length; i++)
        {
            var element = elements[i];
            var reached = bits[i] & ~((uint)element | (uint)(element >> 32));
            if (reached != 0)
            {
                count += BitOperations.PopCount(reached);
                elements[i] = element | ((reached | ((ulong)reached << 32)) & mask);
            }
        }

        return count;
    }
}
