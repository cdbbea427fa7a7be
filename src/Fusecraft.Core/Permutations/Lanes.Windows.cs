using System.Diagnostics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace Fusecraft.Permutations;

// Permutations that keep some windows of at most 32 points each: a byte a point, counted from the start of its window. Far fewer look-ups than for as many points without windows.
internal static partial class Lanes
{
    /// <summary>
    /// First <paramref name="p"/>, then <paramref name="q"/>, window by window. The result overlaps neither. What lies between the end of a window and its 32 bytes is read and left undefined.
    /// </summary>
    /// <param name="p">A row; it has 32 bytes from the start of its last window on.</param>
    /// <param name="q">A row.</param>
    /// <param name="result">Gets a row.</param>
    /// <param name="starts">Where the windows start, ascending.</param>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void ComposeWindows(ReadOnlySpan<byte> p, ReadOnlySpan<byte> q, Span<byte> result, int[] starts)
    {
        Debug.Assert(p.Length == q.Length && p.Length == result.Length, "Rows of one length are needed.");
        if (Avx2.IsSupported)
        {
            ref var first = ref MemoryMarshal.GetReference(p);
            ref var table = ref MemoryMarshal.GetReference(q);
            ref var to = ref MemoryMarshal.GetReference(result);
            foreach (var start in starts)
            {
                ref var window = ref Unsafe.Add(ref table, start);
                LookUp(Vector256.LoadUnsafe(ref window), Vector256.LoadUnsafe(ref first, (nuint)start)).StoreUnsafe(ref to, (nuint)start);
            }
        }
        else
        {
            for (var i = 0; i < starts.Length; i++)
            {
                var end = i + 1 < starts.Length ? starts[i + 1] : p.Length;
                for (var at = starts[i]; at < end; at++)
                {
                    // Undefined bytes of the last window may point anywhere.
                    result[at] = q[Math.Min(starts[i] + p[at], q.Length - 1)];
                }
            }
        }
    }

    /// <summary>For each index below 32 the byte of the table there; anything for others.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static Vector256<byte> LookUp(Vector256<byte> table, Vector256<byte> index) => Avx512Vbmi.VL.IsSupported
        ? Avx512Vbmi.VL.PermuteVar32x8(table, index)
        : Avx2.IsSupported
            ? Pair(Avx2.Permute2x128(table, table, 0x00), Avx2.Permute2x128(table, table, 0x11), index)
            : Vector256.Shuffle(table, index);
}
