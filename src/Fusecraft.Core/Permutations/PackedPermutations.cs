using System.Diagnostics;
using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Fusecraft.Permutations;

/// <summary>
/// Many permutations of one degree in one block of memory, each a row of padded lanes (see <see cref="Lanes.Padding"/>). Grows by doubling;
/// rows already handed out as spans go stale when it does.
/// </summary>
internal sealed class PackedPermutations<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private T[] _lanes;

    public PackedPermutations(int stride, int capacity = 4)
    {
        Debug.Assert(stride % Lanes.Padding == 0, "Rows are padded.");
        Stride = stride;
        _lanes = GC.AllocateUninitializedArray<T>(checked(stride * capacity));
    }

    /// <summary>Lanes a row.</summary>
    public int Stride { get; }

    /// <summary>Rows in use.</summary>
    public int Count { get; private set; }

    /// <summary>A row; valid until the next row is added.</summary>
    public Span<T> this[int row]
    {
        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        get
        {
            Debug.Assert((uint)row < (uint)Count, "There is no such row.");
            return MemoryMarshal.CreateSpan(ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(_lanes), (nint)row * Stride), Stride);
        }
    }

    /// <summary>Adds a row whose lanes the caller fills.</summary>
    public Span<T> AddRow()
    {
        if ((Count + 1) * (long)Stride > _lanes.Length)
        {
            var larger = GC.AllocateUninitializedArray<T>(checked(_lanes.Length * 2));
            _lanes.AsSpan(0, Count * Stride).CopyTo(larger);
            _lanes = larger;
        }

        Count++;
        return this[Count - 1];
    }

    /// <summary>Adds a copy of a row.</summary>
    public void Add(ReadOnlySpan<T> row) => row.CopyTo(AddRow());
}
