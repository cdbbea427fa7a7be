using System.Diagnostics;
using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.Arm;
using System.Runtime.Intrinsics.Wasm;
using System.Runtime.Intrinsics.X86;

namespace Fusecraft.Permutations;

/// <summary>
/// The kernels for padded lanes: lists extended by fixed points to a multiple of <see cref="Padding"/>, so that vector code needs no remainder loop.
/// </summary>
internal static partial class Lanes
{
    /// <summary>Padded lists have a multiple of this many lanes.</summary>
    public const int Padding = 32;

    /// <summary>True where the processor looks up bytes of a 16-byte table in one instruction.</summary>
    private static bool HasByteShuffle => Ssse3.IsSupported || AdvSimd.Arm64.IsSupported || PackedSimd.IsSupported;

    /// <summary>The number of lanes of a padded list of the given degree; at least <see cref="Padding"/>.</summary>
    public static int PaddedLength(int degree) => Math.Max(Padding, (degree + Padding - 1) / Padding * Padding);

    /// <summary>
    /// First <paramref name="p"/>, then <paramref name="q"/>, for padded lists of one length: <c>result[i] = q[p[i]]</c>.
    /// The result may be <paramref name="p"/> itself but may not overlap <paramref name="q"/>.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void ComposePadded<T>(ReadOnlySpan<T> p, ReadOnlySpan<T> q, Span<T> result)
        where T : unmanaged, IBinaryInteger<T>
    {
        Debug.Assert(p.Length % Padding == 0 && p.Length == q.Length && p.Length == result.Length, "Padded lists of one length are needed.");
        if (typeof(T) == typeof(byte))
        {
            ComposePadded(
                ref Unsafe.As<T, byte>(ref MemoryMarshal.GetReference(p)),
                ref Unsafe.As<T, byte>(ref MemoryMarshal.GetReference(q)),
                ref Unsafe.As<T, byte>(ref MemoryMarshal.GetReference(result)),
                p.Length);
        }
        else
        {
            // No common processor looks up 16-bit lanes in tables of this size, so the plain loop is the fastest.
            ComposeUnchecked(ref MemoryMarshal.GetReference(p), ref MemoryMarshal.GetReference(q), ref MemoryMarshal.GetReference(result), p.Length);
        }
    }

    /// <summary><c>result[p[i]] = i</c> for padded lists. The result may not overlap <paramref name="p"/>.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public static void InvertPadded<T>(ReadOnlySpan<T> p, Span<T> result)
        where T : unmanaged, IBinaryInteger<T>
    {
        Debug.Assert(p.Length == result.Length, "Padded lists of one length are needed.");
        ref var to = ref MemoryMarshal.GetReference(result);
        for (var i = 0; i < p.Length; i++)
        {
            Unsafe.Add(ref to, nuint.CreateTruncating(p[i])) = T.CreateTruncating(i);
        }
    }

    /// <summary>The highest bit of each lane of a padded list, sixty-four to a word.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void HighBits<T>(ReadOnlySpan<T> lanes, Span<ulong> bits)
        where T : unmanaged, IBinaryInteger<T>
    {
        ref var first = ref MemoryMarshal.GetReference(lanes);
        bits.Clear();
        for (var i = 0; i < lanes.Length; i += Vector256<T>.Count)
        {
            bits[i >> 6] |= (ulong)Vector256.LoadUnsafe(ref first, (nuint)i).ExtractMostSignificantBits() << (i & 63);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void ComposePadded(ref byte p, ref byte q, ref byte result, int length)
    {
        if (Avx512Vbmi.IsSupported && Avx512Vbmi.VL.IsSupported)
        {
            ComposeVbmi(ref p, ref q, ref result, length);
        }
        else if (Avx2.IsSupported)
        {
            ComposeAvx2(ref p, ref q, ref result, length);
        }
        else if (HasByteShuffle && length <= 128)
        {
            // The work grows with the square of the length; beyond this the plain loop is faster.
            ComposeVector128(ref p, ref q, ref result, length);
        }
        else
        {
            ComposeUnchecked(ref p, ref q, ref result, length);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void ComposeUnchecked<T>(ref T p, ref T q, ref T result, int length)
        where T : unmanaged, IBinaryInteger<T>
    {
        for (nuint i = 0; i < (nuint)length; i += 4)
        {
            Unsafe.Add(ref result, i) = Unsafe.Add(ref q, nuint.CreateTruncating(Unsafe.Add(ref p, i)));
            Unsafe.Add(ref result, i + 1) = Unsafe.Add(ref q, nuint.CreateTruncating(Unsafe.Add(ref p, i + 1)));
            Unsafe.Add(ref result, i + 2) = Unsafe.Add(ref q, nuint.CreateTruncating(Unsafe.Add(ref p, i + 2)));
            Unsafe.Add(ref result, i + 3) = Unsafe.Add(ref q, nuint.CreateTruncating(Unsafe.Add(ref p, i + 3)));
        }
    }
}
