using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// Whether a primitive group has an elementary abelian normal subgroup; as such a subgroup is transitive and regular, the group is then one of affine maps of a vector space whose translations it contains.
/// </summary>
/// <remarks>
/// The translation that takes point 0 to another point x is the only one, so members that fix both commute with it. The centralizer of their subgroup is searched for it; where it is not there the group is
/// proven not affine. (The idea: P. M. Neumann, <em>Some algorithms for computing with finite permutation groups</em>, Groups St Andrews 1985; source not opened, from memory.)
/// </remarks>
internal static class AffineSearch
{
    private const int MostCandidates = 100_000;

    /// <param name="group">A primitive group on all its points.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <returns>Null when there are too many candidates to settle it.</returns>
    public static bool? IsAffine(PermutationGroup group, CancellationToken cancellation)
    {
        var n = group.Degree;
        if (!IsPrimePower(n, out var p, out var dimension) || !(OrderOfAffineGeneral(p, dimension) % group.Order).IsZero)
        {
            return false;
        }

        // Of a divisor of p(p-1), only 1 divides p-1 and leaves 1 modulo p, so there is one subgroup of order p (Sylow).
        if (dimension == 1)
        {
            return true;
        }

        var stabilizer = group.PointwiseStabilizer(0);
        var x = stabilizer.Orbits.Where(orbit => orbit[0] != 0).MinBy(orbit => orbit.Length)[0];
        var fixing = stabilizer.PointwiseStabilizer(x);
        var centralizer = fixing.IsTrivial ? group : group.CentralizerOf(fixing, cancellation);
        var chain = centralizer.ChainWithBase(0);
        if (chain.Base.IsEmpty || chain.Base[0] != 0 || !chain.Orbit(0).Contains(x))
        {
            return false;
        }

        var carrier = chain.Representative(0, x);
        var rest = centralizer.PointwiseStabilizer(0);
        if (rest.Order > MostCandidates)
        {
            return null;
        }

        foreach (var member in rest.Elements())
        {
            cancellation.ThrowIfCancellationRequested();
            if (IsTranslation(group, member * carrier, p))
            {
                return true;
            }
        }

        return false;
    }

    public static bool IsPrimePower(int n, out int prime, out int exponent)
    {
        (prime, exponent) = n > 1 && FactoredInteger.FromFactors(n).PrimePowers is [var only] ? only : (0, 0);
        return exponent > 0;
    }

    public static BigInteger OrderOfAffineGeneral(int p, int dimension)
    {
        var points = BigInteger.Pow(p, dimension);
        var order = points;
        for (var i = 0; i < dimension; i++)
        {
            order *= points - BigInteger.Pow(p, i);
        }

        return order;
    }

    // A non-trivial member is a translation when its conjugates commute: they generate a normal subgroup.
    private static bool IsTranslation(PermutationGroup group, Permutation member, int p)
    {
        if (member.CycleType.Parts is not [var (length, count)] || length != p || length * count != group.Degree
            || group.Generators.Any(by => member.ConjugateBy(by) * member != member * member.ConjugateBy(by)))
        {
            return false;
        }

        return group.NormalClosure(member).IsAbelian;
    }
}
