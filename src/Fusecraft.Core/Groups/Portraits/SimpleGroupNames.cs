using System.Collections.Immutable;
using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>
/// The names of the non-abelian simple groups of a given order, by the classification of finite simple groups. Two of them that are not isomorphic have the same order only at 20,160, Alt(8) and PSL(3,4), and
/// for PSp(2m,q) and Ω(2m+1,q), q odd, m at least 3, which are named together here.
/// </summary>
/// <remarks>
/// Order formulas and the orders of the sporadic groups: J. H. Conway, R. T. Curtis, S. P. Norton, R. A. Parker, R. A. Wilson, <em>Atlas of Finite Groups</em> (1985) (source not opened, from memory). The exceptional
/// families and the sporadic groups left out have no faithful action on as few points as permutations here may move, nor orders up to the square of that number. The power of the characteristic in the order of a
/// group of Lie type is that of its own field, so there are few candidates to try.
/// </remarks>
internal static class SimpleGroupNames
{
    public const int AmbiguousOrder = 20_160;

    private static readonly ImmutableArray<(string Name, FactoredInteger Order)> _sporadic = Parse(
        ("M11", "2^4·3^2·5·11"), ("M12", "2^6·3^3·5·11"), ("M22", "2^7·3^2·5·7·11"), ("M23", "2^7·3^2·5·7·11·23"), ("M24", "2^10·3^3·5·7·11·23"), ("J1", "2^3·3·5·7·11·19"), ("J2", "2^7·3^3·5^2·7"),
        ("J3", "2^7·3^5·5·17·19"), ("HS", "2^9·3^2·5^3·7·11"), ("McL", "2^7·3^6·5^3·7·11"), ("He", "2^10·3^3·5^2·7^3·17"), ("Ru", "2^14·3^3·5^3·7·13·29"), ("Suz", "2^13·3^7·5^2·7·11·13"),
        ("Co3", "2^10·3^7·5^3·7·11·23"), ("Co2", "2^18·3^6·5^3·7·11·23"), ("Fi22", "2^17·3^9·5^2·7·11·13"), ("Fi23", "2^18·3^13·5^2·7·11·13·17·23"), ("Tits group", "2^11·3^3·5^2·13"));

    /// <summary>All names, alternating groups first; none where no simple group of the families here has the order.</summary>
    public static ImmutableArray<string> OfOrder(FactoredInteger factored)
    {
        var order = factored.Value;
        var names = ImmutableArray.CreateBuilder<string>();
        var factorial = new BigInteger(24);
        for (var n = 5; factorial < 2 * order; n++)
        {
            factorial *= n;
            if (n >= 5 && factorial == 2 * order)
            {
                names.Add($"Alt({n})");
            }
        }

        foreach (var (name, sporadicOrder) in _sporadic)
        {
            if (sporadicOrder == factored)
            {
                names.Add(name);
            }
        }

        var ofLieType = new List<(int Family, int Rank, BigInteger Q, string Name)>();
        foreach (var (prime, exponent) in factored.PrimePowers)
        {
            foreach (var (family, rank, q, name) in Candidates(prime, exponent).Where(candidate => Order(candidate.Family, candidate.Rank, candidate.Q) == order))
            {
                ofLieType.Add((family, rank, q, name));
            }
        }

        ofLieType.Sort();
        names.AddRange(ofLieType.Select(candidate => candidate.Name));
        return names.DrainToImmutable();
    }

    private static ImmutableArray<(string Name, FactoredInteger Order)> Parse(params ReadOnlySpan<(string Name, string Order)> groups)
    {
        var parsed = ImmutableArray.CreateBuilder<(string Name, FactoredInteger Order)>(groups.Length);
        foreach (var (name, order) in groups)
        {
            parsed.Add((name, FactoredInteger.Parse(order)));
        }

        return parsed.DrainToImmutable();
    }

    // The groups over fields of the given characteristic whose order may be divisible by exactly this power of it. Left out are the few that are not simple.
    private static IEnumerable<(int Family, int Rank, BigInteger Q, string Name)> Candidates(int p, int exponent)
    {
        for (var rank = 1; rank * (rank + 1) / 2 <= exponent; rank++)
        {
            // The exponents of q in the orders: n(n-1)/2 for PSL and PSU of dimension n, m² for PSp(2m), m(m-1) for the even orthogonal groups of dimension 2m.
            if (exponent % (rank * (rank + 1) / 2) == 0)
            {
                var q = BigInteger.Pow(p, exponent / (rank * (rank + 1) / 2));
                if (rank > 1 || q > 3)
                {
                    yield return (0, rank + 1, q, $"PSL({rank + 1},{q})");
                }

                if (rank > 2 || (rank == 2 && q > 2))
                {
                    yield return (2, rank + 1, q, $"PSU({rank + 1},{q})");
                }
            }

            if (rank >= 2 && exponent % (rank * rank) == 0)
            {
                var q = BigInteger.Pow(p, exponent / (rank * rank));
                if (rank > 2 || q > 2)
                {
                    yield return (1, rank, q, rank > 2 && p > 2 ? $"PSp({2 * rank},{q}) or Ω({(2 * rank) + 1},{q})" : $"PSp({2 * rank},{q})");
                }
            }

            if (rank >= 4 && exponent % (rank * (rank - 1)) == 0)
            {
                var q = BigInteger.Pow(p, exponent / (rank * (rank - 1)));
                yield return (3, rank, q, $"PΩ+({2 * rank},{q})");
                yield return (4, rank, q, $"PΩ-({2 * rank},{q})");
            }
        }

        if (exponent % 6 == 0 && (p > 2 || exponent > 6))
        {
            yield return (5, 2, BigInteger.Pow(p, exponent / 6), $"G2({BigInteger.Pow(p, exponent / 6)})");
        }

        if (exponent % 12 == 0)
        {
            yield return (6, 4, BigInteger.Pow(p, exponent / 12), $"3D4({BigInteger.Pow(p, exponent / 12)})");
        }

        if (p == 2 && exponent % 4 == 2 && exponent > 2)
        {
            yield return (7, 2, BigInteger.Pow(2, exponent / 2), $"Sz({BigInteger.Pow(2, exponent / 2)})");
        }

        if (p == 3 && exponent % 6 == 3 && exponent > 3)
        {
            yield return (8, 2, BigInteger.Pow(3, exponent / 3), $"Ree({BigInteger.Pow(3, exponent / 3)})");
        }
    }

    private static BigInteger Order(int family, int rank, BigInteger q)
    {
        switch (family)
        {
            case 0:
                return Product(q, rank * (rank - 1) / 2, 2, rank, i => BigInteger.Pow(q, i) - 1) / BigInteger.GreatestCommonDivisor(rank, q - 1);
            case 1:
                return Product(q, rank * rank, 1, rank, i => BigInteger.Pow(q, 2 * i) - 1) / BigInteger.GreatestCommonDivisor(2, q - 1);
            case 2:
                return Product(q, rank * (rank - 1) / 2, 2, rank, i => BigInteger.Pow(q, i) - (i % 2 == 0 ? 1 : -1)) / BigInteger.GreatestCommonDivisor(rank, q + 1);
            case 3 or 4:
                var last = BigInteger.Pow(q, rank) + (family == 3 ? -1 : 1);
                return Product(q, rank * (rank - 1), 1, rank - 1, i => BigInteger.Pow(q, 2 * i) - 1) * last / BigInteger.GreatestCommonDivisor(4, last);
            case 5:
                return BigInteger.Pow(q, 6) * (BigInteger.Pow(q, 6) - 1) * ((q * q) - 1);
            case 6:
                return BigInteger.Pow(q, 12) * (BigInteger.Pow(q, 8) + BigInteger.Pow(q, 4) + 1) * (BigInteger.Pow(q, 6) - 1) * ((q * q) - 1);
            case 7:
                return q * q * ((q * q) + 1) * (q - 1);
            default:
                return BigInteger.Pow(q, 3) * (BigInteger.Pow(q, 3) + 1) * (q - 1);
        }
    }

    private static BigInteger Product(BigInteger q, int exponent, int first, int last, Func<int, BigInteger> factor)
    {
        var product = BigInteger.Pow(q, exponent);
        for (var i = first; i <= last; i++)
        {
            product *= factor(i);
        }

        return product;
    }
}
