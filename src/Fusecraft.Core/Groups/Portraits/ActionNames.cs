using System.Globalization;
using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>Proven names of transitive groups, from order and action.</summary>
/// <remarks>
/// Sharply 3-transitive groups of degree q+1 are PGL(2,q) alone, unless q is an even power of an odd prime: H. Zassenhaus, <em>Über endliche Fastkörper</em>, Abh. Math. Sem. Hamburg 11 (1936) (source not opened, from
/// memory). A group with a block system lies in the wreath product of its actions in a part and on the parts, so is that product when the orders agree (Krasner and Kaloujnine).
/// </remarks>
internal static class ActionNames
{
    private const int MostMembers = 100_000;

    public static string? Find(ActionPortrait action)
    {
        var (group, degree) = (action.Group, action.Degree);
        if (group.IsAbelian)
        {
            return OfAbelian(group);
        }

        if (action.IsGiant)
        {
            return $"{(action.IsAlternating ? "Alt" : "Sym")}({degree})";
        }

        if (IsDihedral(group))
        {
            return $"Dih({degree})";
        }

        if (action.IsAffine is true && OfAffine(group) is { } affine)
        {
            return affine;
        }

        if (action.CompositionFactors is [{ Multiplicity: 1, Names: [_, ..] names }])
        {
            return string.Join(" = ", names);
        }

        if (action is { Transitivity: 3, IsSharplyTransitive: true } && AffineSearch.IsPrimePower(degree - 1, out var prime, out var exponent) && (prime == 2 || exponent % 2 == 1))
        {
            return $"PGL(2,{degree - 1})";
        }

        return action.MinimalBlockSystems.Where(system => system.IndexInWreathProduct.IsOne).Select(system => system.WreathProductName).FirstOrDefault(name => name is not null);
    }

    // A transitive abelian group is regular. Written as one cyclic group where it is one.
    private static string OfAbelian(PermutationGroup group)
    {
        var invariants = group.AbelianInvariants();
        var largest = BigInteger.One;
        foreach (var invariant in invariants)
        {
            largest = largest / BigInteger.GreatestCommonDivisor(largest, invariant) * invariant;
        }

        return largest == group.Order
            ? string.Create(CultureInfo.InvariantCulture, $"C{group.Order}")
            : string.Join(" x ", invariants.GroupBy(invariant => invariant).Select(same => same.Count() == 1 ? $"C{same.Key}" : $"C{same.Key}^{same.Count()}"));
    }

    // A cycle through all points, and a member of order 2 with a fixed point that inverts it.
    private static bool IsDihedral(PermutationGroup group)
    {
        if (group.Order != 2 * group.Degree || group.Order > MostMembers)
        {
            return false;
        }

        var reflection = group.PointwiseStabilizer(0).Generators[0];
        return group.Elements().Any(member => member.CycleType.Parts is [var (length, _)] && length == group.Degree && member.ConjugateBy(reflection) == member.Inverse());
    }

    private static string? OfAffine(PermutationGroup group)
    {
        AffineSearch.IsPrimePower(group.Degree, out var prime, out var dimension);
        if (group.Order == AffineSearch.OrderOfAffineGeneral(prime, dimension))
        {
            return $"AGL({dimension},{prime})";
        }

        return dimension == 1 ? string.Create(CultureInfo.InvariantCulture, $"C{prime}:C{group.Order / prime}") : null;
    }
}
