using System.Numerics;

namespace Fusecraft.Permutations;

/// <summary>
/// The project's generator of pseudo-random numbers: xoshiro256**, its state filled from the seed by SplitMix64. The same seed gives the same
/// numbers on every machine. Not for secrets.
/// </summary>
/// <remarks>
/// Source: D. Blackman, S. Vigna, <em>Scrambled linear pseudorandom number generators</em>, ACM Trans. Math. Softw. 47 (2021);
/// bounded numbers by D. Lemire, <em>Fast random integer generation in an interval</em>, ACM Trans. Model. Comput. Simul. 29 (2019). Not safe to share between threads.
/// </remarks>
public sealed class SeededRandom
{
    private ulong _s0;
    private ulong _s1;
    private ulong _s2;
    private ulong _s3;

    /// <summary>Starts the sequence that belongs to a seed.</summary>
    /// <param name="seed">Any number; neighbouring seeds give unrelated sequences.</param>
    public SeededRandom(ulong seed)
    {
        Seed = seed;
        _s0 = SplitMix64(ref seed);
        _s1 = SplitMix64(ref seed);
        _s2 = SplitMix64(ref seed);
        _s3 = SplitMix64(ref seed);
    }

    /// <summary>The seed this generator started from.</summary>
    public ulong Seed { get; }

    /// <summary>The next 64 bits.</summary>
    public ulong NextUInt64()
    {
        var result = BitOperations.RotateLeft(_s1 * 5, 7) * 9;
        var t = _s1 << 17;
        _s2 ^= _s0;
        _s3 ^= _s1;
        _s1 ^= _s2;
        _s0 ^= _s3;
        _s2 ^= t;
        _s3 = BitOperations.RotateLeft(_s3, 45);
        return result;
    }

    /// <summary>A number from 0 up to but not including <paramref name="bound"/>, each equally likely.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The bound is not positive.</exception>
    public int NextInt32(int bound)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(bound);
        var range = (uint)bound;
        var product = (NextUInt64() >> 32) * range;
        if ((uint)product < range)
        {
            var threshold = (0u - range) % range;
            while ((uint)product < threshold)
            {
                product = (NextUInt64() >> 32) * range;
            }
        }

        return (int)(product >> 32);
    }

    /// <summary>A number from 0 up to but not including <paramref name="bound"/>, each equally likely.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The bound is not positive.</exception>
    public BigInteger NextBigInteger(BigInteger bound)
    {
        if (bound.Sign <= 0)
        {
            throw new ArgumentOutOfRangeException(nameof(bound), bound, "The bound must be positive.");
        }

        var bits = (int)(bound - 1).GetBitLength();
        while (true)
        {
            var value = BigInteger.Zero;
            for (var filled = 0; filled < bits; filled += 64)
            {
                var take = Math.Min(64, bits - filled);
                value = (value << take) | (NextUInt64() >> (64 - take));
            }

            if (value < bound)
            {
                return value;
            }
        }
    }

    /// <summary>A uniformly random permutation of 0 … <paramref name="degree"/> - 1 (Fisher-Yates).</summary>
    /// <exception cref="ArgumentOutOfRangeException">The degree is negative or above <see cref="Permutation.MaxDegree"/>.</exception>
    public Permutation NextPermutation(int degree)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(degree);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, Permutation.MaxDegree);
        var images = new int[degree];
        Lanes.Identity<int>(images);
        for (var i = degree - 1; i > 0; i--)
        {
            var j = NextInt32(i + 1);
            (images[i], images[j]) = (images[j], images[i]);
        }

        return Permutation.FromTrustedImages<int>(images);
    }

    private static ulong SplitMix64(ref ulong state)
    {
        var z = state += 0x9E3779B97F4A7C15;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }
}
