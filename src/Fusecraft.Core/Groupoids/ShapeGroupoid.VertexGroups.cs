namespace Fusecraft.Groupoids;

public sealed partial class ShapeGroupoid
{
    /// <summary>The vertex group at a shape: the permutations of all loops there.</summary>
    /// <param name="shape">The number of the base shape; 0 for home.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such shape.</exception>
    /// <exception cref="InvalidOperationException">A budget ended the exploration, so not all loops are known.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// Takes time for one test of membership an arc of the region, on as many threads as the exploration was allowed, and memory for one permutation a shape (at most 2.5 GiB; beyond that some are recomputed).
    /// Sources: P. J. Higgins, <em>Categories and Groupoids</em> (1971); R. Brown, <em>From groups to groupoids: a brief survey</em> (1987) (from memory).
    /// </remarks>
    public VertexGroup VertexGroupAt(int shape, CancellationToken cancellationToken = default)
    {
        RequireShape(shape);
        return VertexGroupExtraction.Run(this, RegionTree.Of(this, shape), DegreeOfParallelism, cancellationToken);
    }
}
