using Fusecraft.Permutations;

namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>The members that commute with a permutation, which need not be a member.</summary>
    /// <param name="element">Any permutation.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Partition backtrack; fast as a rule, exponential in the worst case.</remarks>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public PermutationGroup Centralizer(Permutation element, CancellationToken cancellationToken = default) =>
        Search(Math.Max(Degree, element.SupportEnd), cancellationToken, element).Stabilizer();

    /// <summary>The members that commute with every member of another group, which need not be a subgroup.</summary>
    /// <inheritdoc cref="Centralizer"/>
    /// <param name="group">Any group.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    public PermutationGroup CentralizerOf(PermutationGroup group, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(group);
        return Search(Math.Max(Degree, group.Degree), cancellationToken, [.. group.Generators]).Stabilizer();
    }

    /// <summary>A member <c>g</c> with <c>g⁻¹ * a * g == b</c>, or null where there is none, which is then proven.</summary>
    /// <param name="a">Any permutation.</param>
    /// <param name="b">Any permutation.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>All such members: those of the <see cref="Centralizer"/> of <paramref name="a"/>, each followed by the one found. Partition backtrack, as there.</remarks>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public Permutation? FindConjugator(Permutation a, Permutation b, CancellationToken cancellationToken = default)
    {
        if (a == b)
        {
            return Permutation.Identity;
        }

        if (a.CycleType != b.CycleType)
        {
            return null;
        }

        var degree = Math.Max(Degree, Math.Max(a.SupportEnd, b.SupportEnd));
        return Search(degree, cancellationToken, a).FindCarryingTo(new PointStructure(new int[degree], b));
    }

    /// <summary>The members that two groups have in common.</summary>
    /// <param name="group">Any group.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Partition backtrack through both groups at once; fast as a rule, exponential in the worst case.</remarks>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public PermutationGroup Intersection(PermutationGroup group, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(group);
        if (IsSubgroupOf(group))
        {
            return this;
        }

        return group.IsSubgroupOf(this)
            ? FromOrder(group.Generators, Degree, group.Order)
            : new PartitionBacktrack([this, group], new PointStructure(new int[Math.Max(Degree, group.Degree)]), cancellationToken).Stabilizer();
    }

    private PartitionBacktrack Search(int degree, CancellationToken cancellationToken, params Permutation[] permutations) =>
        new([this], new PointStructure(new int[degree], [.. permutations]), cancellationToken);
}
