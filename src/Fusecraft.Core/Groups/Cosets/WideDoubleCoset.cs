using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// A double coset A·z·B of too many cosets to list. As <c>A·z·b</c> = <c>A·z</c> exactly for the members b of B that A^z = z⁻¹·A·z has too, its size is |A|·|B| / |A^z ∩ B|; and w lies in it exactly when
/// B meets the coset A^z·(z⁻¹·w). Both are asked of one partition backtrack.
/// </summary>
internal sealed class WideDoubleCoset
{
    private const long MaxTrials = 20_000;
    private readonly Permutation _inverse;
    private readonly PartitionBacktrack _search;

    private WideDoubleCoset(Permutation z, PartitionBacktrack search, BigInteger size)
    {
        _inverse = z.Inverse();
        _search = search;
        Size = size;
    }

    /// <summary>The number of its members.</summary>
    public BigInteger Size { get; }

    /// <summary>The double coset, or null when its size takes too long to find. Takes the trials from the budget, below zero if need be.</summary>
    public static WideDoubleCoset? TryMake(PermutationGroup a, PermutationGroup b, Permutation z, CosetBudget budget, CancellationToken cancellation)
    {
        var moved = PermutationGroup.FromOrder([.. a.Generators.Select(generator => generator.ConjugateBy(z))], a.Degree, a.Order);
        var search = new PartitionBacktrack([b, moved], new PointStructure(new int[a.Degree]), cancellation) { MaxTrials = MaxTrials };
        var common = search.Stabilizer();
        budget.TrySpend(search.Trials);
        return search.IsExhausted ? null : new WideDoubleCoset(z, search, a.Order * b.Order / common.Order);
    }

    /// <summary>Whether a permutation is a member, or null when that takes longer to find than the budget allows.</summary>
    public bool? Contains(Permutation w, CosetBudget budget)
    {
        var found = _search.FindInCosets(Permutation.Identity, _inverse * w);
        return !budget.TrySpend(_search.Trials) || (found is null && _search.IsExhausted) ? null : found is not null;
    }
}
