using System.Numerics;

namespace Fusecraft.Groupoids;

public sealed partial class ShapeGroupoid
{
    /// <summary>
    /// The number of states that can be reached from the first shape's own, over all regions. With one region that is its shapes times the order of its vertex group. The permutations that reach a shape of another
    /// region form double cosets of the vertex groups here and there; they are counted one by one, so the number is exact.
    /// </summary>
    /// <param name="options">How much work it may take; null for the default.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <returns>The exact number, or null when the budget does not suffice to find it.</returns>
    /// <exception cref="ArgumentOutOfRangeException">The budget is negative.</exception>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// Takes the vertex group of each region, and at least one look-up a passage. What comes on top depends on how the vertex groups lie to each other: little where they are alike or small, up to the budget where
    /// they are neither and passages follow one another.
    /// </remarks>
    public BigInteger? CountReachableStates(StateCountOptions? options = null, CancellationToken cancellationToken = default)
    {
        options ??= StateCountOptions.Default;
        ArgumentOutOfRangeException.ThrowIfNegative(options.MaxCosets, nameof(options));
        return ReachableStates.Count(VertexGroupAt(0, cancellationToken), options, cancellationToken);
    }
}
