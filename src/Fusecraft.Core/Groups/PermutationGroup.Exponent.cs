using System.Numerics;

namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>
    /// The exponent: the least positive number of repetitions that makes every member the identity, which is the least common multiple of the orders of all members. Null where it was not
    /// settled within the limit; a number given is proven.
    /// </summary>
    /// <param name="listingLimit">Groups met on the way with at most so many members are settled by listing them; the others by their structure or not at all.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>
    /// Taken apart without loss: by orbits, by primes, to a subgroup of an index that the prime does not divide (a point stabilizer, or the centralizer of an element of prime order). What is left is settled where it is
    /// symmetric or alternating, where the orders of some members reach a bound from above (by the degree, by a block system's image and kernel), or by listing. Takes a chain for each group met on the way. The same
    /// answer each time.
    /// </remarks>
    /// <exception cref="ArgumentOutOfRangeException">The limit is negative.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public BigInteger? FindExponent(long listingLimit = 200_000, CancellationToken cancellationToken = default)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(listingLimit);
        var exponent = BigInteger.One;
        foreach (var (prime, _) in FactoredOrder.PrimePowers)
        {
            if (new ExponentSearch(prime, listingLimit, cancellationToken).Find(this) is not { } power)
            {
                return null;
            }

            exponent *= power;
        }

        return exponent;
    }
}
