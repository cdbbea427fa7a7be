using System.Numerics;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics.X86;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Permutations;

public class PaddedLanesTests
{
    public static TheoryData<int> Degrees => [0, 1, 2, 15, 16, 17, 31, 32, 33, 47, 48, 63, 64, 65, 95, 96, 97, 127, 128, 129, 144, 159, 160, 161, 191, 192, 193, 223, 224, 225, 255, 256, 257, 300];

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Padded_composition_and_inversion_agree_with_the_plain_loops(int degree)
    {
        var random = new SeededRandom((ulong)degree);
        for (var i = 0; i < 50; i++)
        {
            Check<ushort>(random.NextPermutation(degree), random.NextPermutation(degree), degree);
            if (degree <= 256)
            {
                Check<byte>(random.NextPermutation(degree), random.NextPermutation(degree), degree);
            }
        }
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Every_byte_kernel_of_this_processor_agrees_with_the_plain_loop(int degree)
    {
        if (degree > 256)
        {
            return;
        }

        var random = new SeededRandom((ulong)degree + 1000);
        for (var i = 0; i < 50; i++)
        {
            var (p, q, expected) = Rows<byte>(random.NextPermutation(degree), random.NextPermutation(degree), degree);
            RequireKernel(Lanes.ComposeVector128, p, q, expected);
            if (Avx2.IsSupported)
            {
                RequireKernel(Lanes.ComposeAvx2, p, q, expected);
            }

            if (Avx512Vbmi.IsSupported && Avx512Vbmi.VL.IsSupported)
            {
                RequireKernel(Lanes.ComposeVbmi, p, q, expected);
            }
        }
    }

    [Fact]
    public void Packed_rows_keep_their_lanes_as_the_store_grows()
    {
        var store = new PackedPermutations<byte>(64, 1);
        for (var i = 0; i < 20; i++)
        {
            store.AddRow().Fill((byte)i);
        }

        Assert.Equal(20, store.Count);
        for (var i = 0; i < 20; i++)
        {
            Assert.True(store[i].IndexOfAnyExcept((byte)i) < 0);
            Assert.Equal(64, store[i].Length);
        }
    }

    private delegate void Kernel(ref byte p, ref byte q, ref byte result, int length);

    private static void RequireKernel(Kernel kernel, byte[] p, byte[] q, byte[] expected)
    {
        var result = new byte[p.Length];
        kernel(ref MemoryMarshal.GetArrayDataReference(p), ref MemoryMarshal.GetArrayDataReference(q), ref MemoryMarshal.GetArrayDataReference(result), p.Length);
        Assert.Equal(expected, result);
    }

    private static void Check<T>(Permutation first, Permutation second, int degree)
        where T : unmanaged, IBinaryInteger<T>
    {
        var (p, q, expected) = Rows<T>(first, second, degree);
        var result = new T[p.Length];
        Lanes.ComposePadded<T>(p, q, result);
        Assert.Equal(expected, result);

        var inPlace = p.ToArray();
        Lanes.ComposePadded<T>(inPlace, q, inPlace);
        Assert.Equal(expected, inPlace);

        var inverse = new T[p.Length];
        Lanes.InvertPadded<T>(p, inverse);
        Lanes.ComposePadded<T>(p, inverse, result);
        Assert.True(Lanes.IsIdentity<T>(result));
        Assert.Equal(first * second, Permutation.FromTrustedImages<T>(expected));
    }

    private static (T[] P, T[] Q, T[] Product) Rows<T>(Permutation first, Permutation second, int degree)
        where T : unmanaged, IBinaryInteger<T>
    {
        var length = Lanes.PaddedLength(degree);
        Assert.True(length % Lanes.Padding == 0 && length >= degree);
        var (p, q, product) = (new T[length], new T[length], new T[length]);
        first.CopyLanes<T>(p);
        second.CopyLanes<T>(q);
        Lanes.Compose<T>(p, q, product);
        return (p, q, product);
    }
}
