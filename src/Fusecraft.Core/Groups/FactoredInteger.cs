using System.Collections.Immutable;
using System.Diagnostics;
using System.Globalization;
using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>A positive integer of any size as a product of prime powers, such as 2^27·3^14·5^3·7^2·11.</summary>
/// <remarks>Primes fit in 31 bits. Value equality; the default value is 1. Immutable, safe to share.</remarks>
public readonly partial struct FactoredInteger : IEquatable<FactoredInteger>, IMultiplyOperators<FactoredInteger, FactoredInteger, FactoredInteger>,
    IEqualityOperators<FactoredInteger, FactoredInteger, bool>
{
    private readonly ImmutableArray<(int Prime, int Exponent)> _powers;

    private FactoredInteger(SortedDictionary<int, int> exponents) =>
        _powers = [.. exponents.Select(power => (power.Key, power.Value))];

    /// <summary>The primes in ascending order, each with its positive exponent.</summary>
    public ImmutableArray<(int Prime, int Exponent)> PrimePowers => _powers.IsDefault ? [] : _powers;

    /// <summary>The integer itself.</summary>
    public BigInteger Value
    {
        get
        {
            var value = BigInteger.One;
            foreach (var (prime, exponent) in PrimePowers)
            {
                value *= BigInteger.Pow(prime, exponent);
            }

            return value;
        }
    }

    /// <summary>True when both are the same integer.</summary>
    public static bool operator ==(FactoredInteger left, FactoredInteger right) => left.Equals(right);

    /// <summary>True when they are different integers.</summary>
    public static bool operator !=(FactoredInteger left, FactoredInteger right) => !left.Equals(right);

    /// <summary>The product.</summary>
    public static FactoredInteger operator *(FactoredInteger left, FactoredInteger right) => Multiply(left, right);

    /// <summary>The product.</summary>
    public static FactoredInteger Multiply(FactoredInteger left, FactoredInteger right)
    {
        var exponents = new SortedDictionary<int, int>();
        foreach (var (prime, exponent) in left.PrimePowers.AddRange(right.PrimePowers))
        {
            exponents[prime] = checked(exponents.GetValueOrDefault(prime) + exponent);
        }

        return new FactoredInteger(exponents);
    }

    /// <summary>The product of some positive integers, each factored by trial division.</summary>
    /// <exception cref="ArgumentException">A factor is not positive.</exception>
    public static FactoredInteger FromFactors(params ReadOnlySpan<int> factors)
    {
        var exponents = new SortedDictionary<int, int>();
        foreach (var factor in factors)
        {
            if (factor <= 0)
            {
                throw new ArgumentException($"Factor {factor} is not positive.", nameof(factors));
            }

            var rest = factor;
            for (var prime = 2; prime <= rest / prime; prime++)
            {
                for (; rest % prime == 0; rest /= prime)
                {
                    Count(prime);
                }
            }

            if (rest > 1)
            {
                Count(rest);
            }
        }

        return new FactoredInteger(exponents);

        void Count(int prime) => exponents[prime] = exponents.GetValueOrDefault(prime) + 1;
    }

    /// <summary>A positive integer with no prime factor above a bound, by trial division.</summary>
    internal static FactoredInteger FromSmooth(BigInteger value, int largestPrime)
    {
        var exponents = new SortedDictionary<int, int>();
        for (var prime = 2; prime <= largestPrime && !value.IsOne; prime++)
        {
            for (var quotient = BigInteger.DivRem(value, prime, out var rest); rest.IsZero; quotient = BigInteger.DivRem(value, prime, out rest))
            {
                value = quotient;
                exponents[prime] = exponents.GetValueOrDefault(prime) + 1;
            }
        }

        Debug.Assert(value.IsOne, "Some prime factor is above the bound.");
        return new FactoredInteger(exponents);
    }

    /// <inheritdoc/>
    public bool Equals(FactoredInteger other) => PrimePowers.AsSpan().SequenceEqual(other.PrimePowers.AsSpan());

    /// <inheritdoc/>
    public override bool Equals(object? obj) => obj is FactoredInteger other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        foreach (var power in PrimePowers)
        {
            hash.Add(power);
        }

        return hash.ToHashCode();
    }

    /// <summary>Primes ascending, joined by <c>·</c>, with exponents above one: <c>2^4·3·5</c>. One is <c>1</c>.</summary>
    public override string ToString() => PrimePowers.IsEmpty ? "1" : string.Join('·', PrimePowers.Select(power => power.Exponent == 1
        ? power.Prime.ToString(CultureInfo.InvariantCulture)
        : string.Create(CultureInfo.InvariantCulture, $"{power.Prime}^{power.Exponent}")));
}
