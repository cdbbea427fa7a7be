using System.Collections.Immutable;
using System.Numerics;

namespace Fusecraft.Permutations;

/// <summary>
/// The cycle type of a permutation: how many cycles of each length two or more. Two permutations are conjugate in the symmetric group exactly when
/// their cycle types are equal.
/// </summary>
/// <remarks>Value equality; the default value is the cycle type of the identity. Written as lengths with exponents, longest first: <c>5^2 3 2</c>; the identity is <c>1</c>.</remarks>
public readonly struct CycleType : IEquatable<CycleType>
{
    private readonly ImmutableArray<(int Length, int Count)> _parts;

    private CycleType(ImmutableArray<(int Length, int Count)> parts) => _parts = parts;

    /// <summary>The lengths from two up, longest first, with the number of cycles of each, which is positive; empty for the identity.</summary>
    public ImmutableArray<(int Length, int Count)> Parts => _parts.IsDefault ? [] : _parts;

    /// <summary>The least common multiple of the lengths; 1 for the identity.</summary>
    public BigInteger Order
    {
        get
        {
            var order = BigInteger.One;
            foreach (var (length, _) in Parts)
            {
                order = order / BigInteger.GreatestCommonDivisor(order, length) * length;
            }

            return order;
        }
    }

    /// <summary>Odd when the number of cycles of even length is odd.</summary>
    public Parity Parity
    {
        get
        {
            var odd = false;
            foreach (var (length, count) in Parts)
            {
                odd ^= ((length - 1) & count & 1) != 0;
            }

            return odd ? Parity.Odd : Parity.Even;
        }
    }

    /// <summary>The number of points moved.</summary>
    public int MovedPoints
    {
        get
        {
            var moved = 0;
            foreach (var (length, count) in Parts)
            {
                moved += length * count;
            }

            return moved;
        }
    }

    /// <summary>True when both have equally many cycles of every length.</summary>
    public static bool operator ==(CycleType left, CycleType right) => left.Equals(right);

    /// <summary>True when they differ in the number of cycles of some length.</summary>
    public static bool operator !=(CycleType left, CycleType right) => !left.Equals(right);

    /// <inheritdoc/>
    public bool Equals(CycleType other) => Parts.AsSpan().SequenceEqual(other.Parts.AsSpan());

    /// <inheritdoc/>
    public override bool Equals(object? obj) => obj is CycleType other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        foreach (var part in Parts)
        {
            hash.Add(part);
        }

        return hash.ToHashCode();
    }

    /// <summary>Lengths with exponents, longest first, such as <c>5^2 3 2</c>; <c>1</c> for the identity.</summary>
    public override string ToString() => Parts.IsEmpty
        ? "1"
        : string.Join(' ', Parts.Select(part => part.Count == 1 ? $"{part.Length}" : $"{part.Length}^{part.Count}"));

    /// <summary>Makes a cycle type from the number of cycles of each length: <c>counts[k]</c> of length <c>k</c>. Lengths 0 and 1 are passed over.</summary>
    internal static CycleType FromCounts(ReadOnlySpan<int> counts)
    {
        var parts = ImmutableArray.CreateBuilder<(int Length, int Count)>();
        for (var length = counts.Length - 1; length >= 2; length--)
        {
            if (counts[length] > 0)
            {
                parts.Add((length, counts[length]));
            }
        }

        return new CycleType(parts.DrainToImmutable());
    }
}
