using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Composition factors of a small group by listing: a proper normal subgroup is looked for among the normal closures of single members; it and the quotient are taken apart in turn.</summary>
internal static class NaiveFactors
{
    /// <summary>The orders of the composition factors, ascending.</summary>
    public static IEnumerable<int> OrdersOf(HashSet<Permutation> members)
    {
        if (members.Count == 1)
        {
            return [];
        }

        var normal = members.Where(member => !member.IsIdentity).Select(member => NormalClosure(member, members)).FirstOrDefault(closure => closure.Count < members.Count);
        return normal is null ? [members.Count] : OrdersOf(normal).Concat(OrdersOf(Quotient(members, normal))).Order();
    }

    private static HashSet<Permutation> NormalClosure(Permutation member, HashSet<Permutation> members) => SmallGroups.Closure(members.Select(member.ConjugateBy).Distinct());

    // On the cosets of the normal subgroup, by multiplication from the right.
    private static HashSet<Permutation> Quotient(HashSet<Permutation> members, HashSet<Permutation> normal)
    {
        var cosetOf = new Dictionary<Permutation, int>();
        var representatives = new List<Permutation>();
        foreach (var member in members.Where(member => !cosetOf.ContainsKey(member)))
        {
            foreach (var factor in normal)
            {
                cosetOf.Add(factor * member, representatives.Count);
            }

            representatives.Add(member);
        }

        return [.. representatives.Select(by => Permutation.FromImages([.. representatives.Select(representative => cosetOf[representative * by])]))];
    }
}
