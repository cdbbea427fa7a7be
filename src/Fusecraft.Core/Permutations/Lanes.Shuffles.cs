using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics;
using System.Runtime.Intrinsics.X86;

namespace Fusecraft.Permutations;

/// <summary>
/// Composition of padded byte lanes by table look-ups in registers: the second permutation is the table, the lanes of the first are the indices.
/// Internal to the project so that tests can hold each against the plain loop.
/// </summary>
internal static partial class Lanes
{
    /// <summary>AVX-512 VBMI: tables of 64 or 128 bytes at a time.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static void ComposeVbmi(ref byte p, ref byte q, ref byte result, int length)
    {
        if (length == 64)
        {
            Avx512Vbmi.PermuteVar64x8(Vector512.LoadUnsafe(ref q), Vector512.LoadUnsafe(ref p)).StoreUnsafe(ref result);
        }
        else if (length == 32)
        {
            Avx512Vbmi.VL.PermuteVar32x8(Vector256.LoadUnsafe(ref q), Vector256.LoadUnsafe(ref p)).StoreUnsafe(ref result);
        }
        else
        {
            ComposeVbmiLong(ref p, ref q, ref result, length);
        }
    }

    /// <summary>AVX2: a shuffle looks up 16 bytes by the low index bits; blends choose among the shuffles by the high ones.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    internal static void ComposeAvx2(ref byte p, ref byte q, ref byte result, int length)
    {
        if (length == 64)
        {
            var t0 = Table(ref q, 0);
            var t1 = Table(ref q, 1);
            var t2 = Table(ref q, 2);
            var t3 = Table(ref q, 3);
            var index0 = Vector256.LoadUnsafe(ref p);
            var index1 = Vector256.LoadUnsafe(ref p, 32);
            Quad(t0, t1, t2, t3, index0).StoreUnsafe(ref result);
            Quad(t0, t1, t2, t3, index1).StoreUnsafe(ref result, 32);
        }
        else if (length == 32)
        {
            Pair(Table(ref q, 0), Table(ref q, 1), Vector256.LoadUnsafe(ref p)).StoreUnsafe(ref result);
        }
        else
        {
            ComposeAvx2Long(ref p, ref q, ref result, length);
        }
    }

    /// <summary>Any processor with 16-byte shuffles: each 16 bytes of the table answer the indices that fall into them, zero elsewhere.</summary>
    internal static void ComposeVector128(ref byte p, ref byte q, ref byte result, int length)
    {
        for (nuint i = 0; i < (nuint)length; i += 16)
        {
            var index = Vector128.LoadUnsafe(ref p, i);
            var image = Vector128<byte>.Zero;
            for (nuint t = 0; t < (nuint)length; t += 16)
            {
                image |= Vector128.Shuffle(Vector128.LoadUnsafe(ref q, t), index);
                index -= Vector128.Create((byte)16);
            }

            image.StoreUnsafe(ref result, i);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static void ComposeVbmiLong(ref byte p, ref byte q, ref byte result, int length)
    {
        var q0 = Load64(ref q, 0, length);
        var q1 = Load64(ref q, 64, length);
        var q2 = Load64(ref q, 128, length);
        var q3 = Load64(ref q, 192, length);
        for (var i = 0; i < length; i += 64)
        {
            var index = Load64(ref p, i, length);
            var image = Avx512Vbmi.PermuteVar64x8x2(q0, index, q1);
            if (length > 128)
            {
                var beyond = Avx512Vbmi.PermuteVar64x8x2(q2, index, q3);
                image = Vector512.ConditionalSelect(Vector512.LessThan(index.AsSByte(), Vector512<sbyte>.Zero).AsByte(), beyond, image);
            }

            if (length - i >= 64)
            {
                image.StoreUnsafe(ref result, (nuint)i);
            }
            else
            {
                image.GetLower().StoreUnsafe(ref result, (nuint)i);
            }
        }
    }

    // Only a pointer lets the table come by broadcasting loads; inserting the upper half takes as long as the shuffle itself.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static unsafe void ComposeAvx2Long(ref byte p, ref byte q, ref byte result, int length)
    {
        fixed (byte* table = &q)
        {
            for (nuint i = 0; i < (nuint)length; i += 32)
            {
                var index = Vector256.LoadUnsafe(ref p, i);

                // A shuffle gives zero where bit 7 of its index is set; the blend by that bit never picks those.
                var image = length <= 128
                    ? Half(table, length, index)
                    : Avx2.BlendVariable(Half(table, 128, index), Half(table + 128, length - 128, index ^ Vector256.Create((byte)0x80)), index);
                image.StoreUnsafe(ref result, i);
            }
        }
    }

    // Looks up indices below 128 in a table of `length` bytes, a multiple of 32 up to 128.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static unsafe Vector256<byte> Half(byte* table, int length, Vector256<byte> index)
    {
        if (length == 32)
        {
            return Pair(Table(table, 0), Table(table, 1), index);
        }

        var low = Quad(Table(table, 0), Table(table, 1), Table(table, 2), Table(table, 3), index);
        if (length == 64)
        {
            return low;
        }

        var high = length == 96
            ? Pair(Table(table, 4), Table(table, 5), index)
            : Quad(Table(table, 4), Table(table, 5), Table(table, 6), Table(table, 7), index);
        return Avx2.BlendVariable(low, high, Avx2.ShiftLeftLogical(index.AsUInt16(), 1).AsByte());
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static unsafe Vector256<byte> Table(byte* table, int unit) => Avx2.BroadcastVector128ToVector256(table + (16 * unit));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<byte> Quad(Vector256<byte> t0, Vector256<byte> t1, Vector256<byte> t2, Vector256<byte> t3, Vector256<byte> index) =>
        Avx2.BlendVariable(Pair(t0, t1, index), Pair(t2, t3, index), Avx2.ShiftLeftLogical(index.AsUInt16(), 2).AsByte());

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<byte> Pair(Vector256<byte> t0, Vector256<byte> t1, Vector256<byte> index) =>
        Avx2.BlendVariable(Avx2.Shuffle(t0, index), Avx2.Shuffle(t1, index), Avx2.ShiftLeftLogical(index.AsUInt16(), 3).AsByte());

    // Sixteen bytes of the table, in both halves of the register.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector256<byte> Table(ref byte q, int unit)
    {
        var table = Vector128.LoadUnsafe(ref q, (nuint)unit * 16);
        return Vector256.Create(table);
    }

    // Sixty-four lanes from an offset; zero beyond the end, which is a multiple of 32.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static Vector512<byte> Load64(ref byte lanes, int offset, int length) => (length - offset) switch
    {
        >= 64 => Vector512.LoadUnsafe(ref lanes, (nuint)offset),
        >= 32 => Vector256.LoadUnsafe(ref lanes, (nuint)offset).ToVector512(),
        _ => Vector512<byte>.Zero,
    };
}
