using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>The symmetric and alternating groups, known by degree and order: no other group of degree n has n! or n!/2 members.</summary>
internal static class Giants
{
    /// <summary>Null for a group that is neither; true for the alternating, false for the symmetric group.</summary>
    public static bool? Kind(BigInteger order, int degree)
    {
        var factorial = BigInteger.One;
        for (var i = 2; i <= degree; i++)
        {
            factorial *= i;
            if (factorial > 2 * order)
            {
                return null;
            }
        }

        return factorial == order ? false : factorial == 2 * order ? true : null;
    }

    /// <summary>The least common multiple of the orders of all members: of all cycle lengths up to n. In the alternating group a cycle of even length needs another one beside it.</summary>
    public static BigInteger Exponent(int degree, bool isAlternating)
    {
        var exponent = BigInteger.One;
        for (var length = 2; length <= degree; length++)
        {
            if (!isAlternating || length % 2 == 1 || length <= degree - 2)
            {
                exponent = exponent / BigInteger.GreatestCommonDivisor(exponent, length) * length;
            }
        }

        return exponent;
    }
}
