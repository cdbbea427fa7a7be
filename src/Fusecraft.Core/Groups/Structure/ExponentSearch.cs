using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// The greatest power of one prime p that is the order of a member of a group. An element of such an order lies in a Sylow subgroup, and all of these are conjugate; so a subgroup whose index p does not divide
/// has elements of the same p-power orders, and one may go down to it.
/// </summary>
/// <remarks>Elementary facts (Sylow; Cauchy) put together by us; no source.</remarks>
internal sealed class ExponentSearch
{
    private const int Samples = 100;
    private const int CentralizersTried = 20;

    // So few members are listed faster than their structure is looked at.
    private const int ListedAtOnce = 2000;

    private readonly int _prime;
    private readonly long _listingLimit;
    private readonly CancellationToken _cancellation;

    public ExponentSearch(int prime, long listingLimit, CancellationToken cancellation)
    {
        _prime = prime;
        _listingLimit = listingLimit;
        _cancellation = cancellation;
    }

    /// <summary>The power of the prime, or null where it is not settled.</summary>
    public BigInteger? Find(PermutationGroup group)
    {
        _cancellation.ThrowIfCancellationRequested();
        var valuation = Valuation(group.Order);
        if (valuation <= 1)
        {
            return BigInteger.Pow(_prime, valuation);
        }

        if (group.IsAbelian)
        {
            return group.Generators.Max(PartOfOrder);
        }

        if (group.Order <= Math.Min(ListedAtOnce, _listingLimit))
        {
            return List(group, 1, BigInteger.Pow(_prime, valuation));
        }

        // A power of an element is the identity when it is on every orbit, and every element of the action on an orbit comes from a member.
        var orbits = group.MovedOrbits;
        if (orbits.Length > 1)
        {
            return Greatest(orbits.Select(orbit => Find(group.ActionOn(orbit).Image)));
        }

        // Where the prime does not divide the length of the orbit, it does not divide the index of a point's stabilizer.
        return OfSymmetricOrAlternating(group, orbits[0].Length)
            ?? (orbits[0].Length % _prime != 0 ? Find(group.PointwiseStabilizer(orbits[0][0])) : FindTransitive(group, orbits[0].Length));
    }

    private BigInteger? FindTransitive(PermutationGroup group, int length)
    {
        var random = new SeededRandom(1);
        var members = Enumerable.Range(0, Samples).Select(_ => group.RandomElement(random)).ToList();
        var least = members.Concat(group.Generators).Max(PartOfOrder);

        // An element of order p^k has a cycle of a length divisible by p^k, and its order divides that of the group.
        var most = BigInteger.Min(GreatestPowerUpTo(length), BigInteger.Pow(_prime, Valuation(group.Order)));
        if (least == most || BoundByBlockSystems(group, most) == least)
        {
            return least;
        }

        if (group.Order <= _listingLimit)
        {
            return List(group, least, most);
        }

        foreach (var member in members.Take(CentralizersTried))
        {
            var order = member.Order;
            if (order % _prime != 0)
            {
                continue;
            }

            var centralizer = group.Centralizer(member.Power(order / _prime), _cancellation);
            if (centralizer.Order < group.Order && Valuation(centralizer.Order) == Valuation(group.Order))
            {
                return Find(centralizer);
            }
        }

        return null;
    }

    // The order of an element divides that of its image times the exponent of the kernel.
    private BigInteger BoundByBlockSystems(PermutationGroup group, BigInteger most)
    {
        foreach (var system in group.MinimalBlockSystems(group.MovedOrbits[0][0]))
        {
            // Both are smaller groups, so this ends.
            var action = group.ActionOn(system);
            if (Find(action.Image) is { } image && Find(action.Kernel) is { } kernel)
            {
                most = BigInteger.Min(most, image * kernel);
            }
        }

        return most;
    }

    private BigInteger List(PermutationGroup group, BigInteger least, BigInteger most)
    {
        foreach (var member in group.Elements())
        {
            _cancellation.ThrowIfCancellationRequested();
            least = BigInteger.Max(least, PartOfOrder(member));
            if (least == most)
            {
                break;
            }
        }

        return least;
    }

    // One long cycle; in the alternating group a cycle of even length needs another one beside it.
    private BigInteger? OfSymmetricOrAlternating(PermutationGroup group, int points)
    {
        var factorial = BigInteger.One;
        for (var i = 2; i <= points; i++)
        {
            factorial *= i;
        }

        var isAlternating = group.Order * 2 == factorial;
        return isAlternating || group.Order == factorial ? GreatestPowerUpTo(isAlternating && _prime == 2 ? points - 2 : points) : null;
    }

    private BigInteger GreatestPowerUpTo(int bound)
    {
        var power = BigInteger.One;
        while (power * _prime <= bound)
        {
            power *= _prime;
        }

        return power;
    }

    private BigInteger PartOfOrder(Permutation member) => BigInteger.Pow(_prime, Valuation(member.Order));

    private int Valuation(BigInteger number)
    {
        var valuation = 0;
        for (; (number % _prime).IsZero; number /= _prime)
        {
            valuation++;
        }

        return valuation;
    }

    private static BigInteger? Greatest(IEnumerable<BigInteger?> powers)
    {
        var greatest = BigInteger.One;
        foreach (var power in powers)
        {
            if (power is null)
            {
                return null;
            }

            greatest = BigInteger.Max(greatest, power.Value);
        }

        return greatest;
    }
}
