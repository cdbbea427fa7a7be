using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Permutations;

public class SeededRandomTests
{
    [Fact]
    public void The_reference_meets_the_published_vectors()
    {
        // SplitMix64 from the states 1234567 and 0: test vectors that circulate with the generator; source not opened, values from memory.
        var state = 1234567ul;
        Assert.Equal(
            [6457827717110365317, 3203168211198807973, 9817491932198370423, 4593380528125082431, 16408922859458223821],
            Enumerable.Range(0, 5).Select(_ => ReferenceSplitMix64(ref state)).ToArray());
        state = 0;
        Assert.Equal([0xE220A8397B1DCDAF, 0x6E789E6AA1B965F4, 0x06C45D188009454F, 0xF88BB8A8724C81EC], Enumerable.Range(0, 4).Select(_ => ReferenceSplitMix64(ref state)).ToArray());

        // xoshiro256** from the state 1, 2, 3, 4: the vector that implementations share; source not opened, values from memory.
        ulong[] words = [1, 2, 3, 4];
        Assert.Equal(
            [11520, 0, 1509978240, 1215971899390074240, 1216172134540287360, 607988272756665600, 16172922978634559625, 8476171486693032832, 10595114339597558777, 2904607092377533576],
            Enumerable.Range(0, 10).Select(_ => ReferenceXoshiro(words)).ToArray());
    }

    [Theory]
    [InlineData(0ul)]
    [InlineData(1ul)]
    [InlineData(1234567ul)]
    [InlineData(ulong.MaxValue)]
    public void Numbers_are_those_of_the_reference_seeded_by_SplitMix64(ulong seed)
    {
        var state = seed;
        var words = Enumerable.Range(0, 4).Select(_ => ReferenceSplitMix64(ref state)).ToArray();
        var random = new SeededRandom(seed);
        Assert.Equal(seed, random.Seed);
        for (var i = 0; i < 1000; i++)
        {
            Assert.Equal(ReferenceXoshiro(words), random.NextUInt64());
        }
    }

    [Fact]
    public void What_a_seed_gives_stays_the_same()
    {
        // Own figures, for regression: same seed, same permutation and number within a major version.
        var random = new SeededRandom(2026);
        Assert.Equal("(1 3)(4 11)(6 8 12 7)(9 10)", random.NextPermutation(12).ToString());
        Assert.Equal(319_662, random.NextInt32(1_000_000));
        Assert.Equal("601890793456949979200989788172", random.NextBigInteger(BigInteger.Pow(10, 30)).ToString());
    }

    [Fact]
    public void The_same_seed_gives_the_same_and_another_seed_other_permutations()
    {
        Assert.Equal(new SeededRandom(7).NextPermutation(100), new SeededRandom(7).NextPermutation(100));
        Assert.NotEqual(new SeededRandom(7).NextPermutation(100), new SeededRandom(8).NextPermutation(100));
    }

    // Quantiles of the chi-square distribution at 0.1 % and 99.9 %: standard tables, values from memory. Seeds are fixed, so these tests cannot fail by chance.
    [Theory]
    [InlineData(10, 10, 1.152, 27.877)]
    [InlineData(7, 7, 0.381, 22.458)]
    [InlineData(3 << 29, 3, 0.002, 13.816)]      // the worst case for a biased reduction of 32 bits
    [InlineData(int.MaxValue, 10, 1.152, 27.877)]
    public void Numbers_below_a_bound_are_uniform(int bound, int bins, double least, double greatest)
    {
        var random = new SeededRandom((ulong)bound);
        var counts = new int[bins];
        for (var i = 0; i < 100_000; i++)
        {
            var number = random.NextInt32(bound);
            Assert.InRange(number, 0, bound - 1);
            counts[(int)((long)number * bins / bound)]++;
        }

        Assert.InRange(ChiSquare(counts), least, greatest);
    }

    [Fact]
    public void Huge_numbers_below_a_bound_are_uniform()
    {
        var unit = BigInteger.Pow(10, 30);
        var random = new SeededRandom(30);
        var (high, low) = (new int[7], new int[10]);
        for (var i = 0; i < 50_000; i++)
        {
            var number = random.NextBigInteger(7 * unit);
            Assert.True(number.Sign >= 0);
            high[(int)(number / unit)]++;
            low[(int)(number % 10)]++;
        }

        Assert.InRange(ChiSquare(high), 0.381, 22.458);
        Assert.InRange(ChiSquare(low), 1.152, 27.877);
    }

    [Fact]
    public void Permutations_are_uniform()
    {
        var random = new SeededRandom(4);
        var counts = new Dictionary<Permutation, int>();
        for (var i = 0; i < 48_000; i++)
        {
            var p = random.NextPermutation(4);
            counts[p] = counts.GetValueOrDefault(p) + 1;
        }

        Assert.Equal(24, counts.Count);
        Assert.InRange(ChiSquare([.. counts.Values]), 7.529, 49.728);
    }

    [Fact]
    public void Bounds_of_one_and_powers_of_two_work()
    {
        var random = new SeededRandom(5);
        Assert.Equal(0, random.NextInt32(1));
        Assert.Equal(BigInteger.Zero, random.NextBigInteger(1));
        for (var i = 0; i < 200; i++)
        {
            Assert.InRange(random.NextBigInteger(BigInteger.One << 64), BigInteger.Zero, ulong.MaxValue);
            Assert.InRange(random.NextBigInteger((BigInteger.One << 64) + 1), BigInteger.Zero, BigInteger.One << 64);
            Assert.InRange(random.NextBigInteger(2), BigInteger.Zero, BigInteger.One);
        }
    }

    [Fact]
    public void Degrees_from_zero_to_the_greatest_work()
    {
        var random = new SeededRandom(6);
        Assert.True(random.NextPermutation(0).IsIdentity);
        Assert.True(random.NextPermutation(1).IsIdentity);
        var p = random.NextPermutation(Permutation.MaxDegree);
        Assert.InRange(p.SupportEnd, Permutation.MaxDegree - 10, Permutation.MaxDegree);
        Assert.True((p * p.Inverse()).IsIdentity);
    }

    [Fact]
    public void Bounds_and_degrees_out_of_range_are_refused()
    {
        var random = new SeededRandom(7);
        Assert.Throws<ArgumentOutOfRangeException>("bound", () => random.NextInt32(0));
        Assert.Throws<ArgumentOutOfRangeException>("bound", () => random.NextInt32(-3));
        Assert.Throws<ArgumentOutOfRangeException>("bound", () => random.NextBigInteger(0));
        Assert.Throws<ArgumentOutOfRangeException>("bound", () => random.NextBigInteger(-1));
        Assert.Throws<ArgumentOutOfRangeException>("degree", () => random.NextPermutation(-1));
        Assert.Throws<ArgumentOutOfRangeException>("degree", () => random.NextPermutation(Permutation.MaxDegree + 1));
    }

    private static double ChiSquare(int[] counts)
    {
        var expected = counts.Average();
        return counts.Sum(count => (count - expected) * (count - expected) / expected);
    }

    private static ulong ReferenceSplitMix64(ref ulong state)
    {
        state = unchecked(state + 0x9E3779B97F4A7C15);
        var mixed = unchecked((state ^ (state >> 30)) * 0xBF58476D1CE4E5B9);
        mixed = unchecked((mixed ^ (mixed >> 27)) * 0x94D049BB133111EB);
        return mixed ^ (mixed >> 31);
    }

    private static ulong ReferenceXoshiro(ulong[] s)
    {
        var times5 = unchecked(s[1] * 5);
        var result = unchecked(((times5 << 7) | (times5 >> 57)) * 9);
        ulong[] old = [.. s];
        s[0] = old[0] ^ old[1] ^ old[3];
        s[1] = old[0] ^ old[1] ^ old[2];
        s[2] = old[0] ^ old[2] ^ (old[1] << 17);
        var last = old[1] ^ old[3];
        s[3] = (last << 45) | (last >> 19);
        return result;
    }
}
