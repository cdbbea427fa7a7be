using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Permutations;

/// <summary>Every kernel against its one-line definition, for all small degrees (on both sides of every register width) and both lane widths.</summary>
public class LanesTests
{
    public static TheoryData<int> Degrees => [.. Enumerable.Range(0, 140), 191, 192, 193, 254, 255, 256];

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Byte_kernels_meet_their_definitions(int degree) => KernelsMeetTheirDefinitions<byte>(degree);

    [Theory]
    [MemberData(nameof(Degrees))]
    [InlineData(257)]
    [InlineData(1000)]
    [InlineData(65_536)]
    public void Wide_kernels_meet_their_definitions(int degree) => KernelsMeetTheirDefinitions<ushort>(degree);

    private static void KernelsMeetTheirDefinitions<T>(int degree)
        where T : unmanaged, IBinaryInteger<T>
    {
        var random = new SeededRandom((ulong)degree);
        var (p, q) = (RandomLanes<T>(random, degree), RandomLanes<T>(random, degree));
        var n = Enumerable.Range(0, degree).ToArray();
        var result = new T[degree];

        Lanes.Compose<T>(p, q, result);
        Assert.Equal(n.Select(i => q[int.CreateTruncating(p[i])]), result);

        Lanes.Invert<T>(p, result);
        Assert.Equal(n.OrderBy(i => p[i]).Select(T.CreateTruncating), result);

        Lanes.Identity<T>(result);
        Assert.Equal(n.Select(T.CreateTruncating), result);
        Assert.True(Lanes.IsIdentity<T>(result));
        Assert.Equal(0, Lanes.SupportEnd<T>(result));

        for (var i = 1; i < degree; i += Math.Max(1, degree / 50))
        {
            (result[i - 1], result[i]) = (result[i], result[i - 1]);
            Assert.False(Lanes.IsIdentity<T>(result));
            Assert.Equal(i + 1, Lanes.SupportEnd<T>(result));
            (result[i - 1], result[i]) = (result[i], result[i - 1]);
        }
    }

    private static T[] RandomLanes<T>(SeededRandom random, int degree)
        where T : unmanaged, IBinaryInteger<T>
    {
        var lanes = new T[degree];
        random.NextPermutation(degree).CopyLanes<T>(lanes);
        return lanes;
    }
}
