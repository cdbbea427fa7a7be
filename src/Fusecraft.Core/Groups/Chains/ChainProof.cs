using System.Globalization;

namespace Fusecraft.Groups;

/// <summary>What a claim rests on: a proof, or random tests with a bound on the probability of error.</summary>
/// <remarks>Value equality; the default value is <see cref="Proven"/>.</remarks>
public readonly record struct ChainProof
{
    private ChainProof(int errorBits) => ErrorBits = errorBits;

    /// <summary>The claim is proven.</summary>
    public static ChainProof Proven => default;

    /// <summary>True when nothing rests on randomness.</summary>
    public bool IsProven => ErrorBits == 0;

    /// <summary>k, where the claim is wrong with probability at most 2^-k; 0 when it is proven.</summary>
    public int ErrorBits { get; }

    /// <summary>The claim is wrong with probability at most 2^-<paramref name="bits"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The number of bits is not positive.</exception>
    public static ChainProof ErrorBound(int bits)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(bits);
        return new ChainProof(bits);
    }

    /// <summary><c>proven</c>, or <c>error at most 2^-k</c>.</summary>
    public override string ToString() => IsProven ? "proven" : string.Create(CultureInfo.InvariantCulture, $"error at most 2^-{ErrorBits}");
}
