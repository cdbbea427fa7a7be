using System.Collections.Immutable;
using System.Runtime.InteropServices;

namespace Fusecraft.Groupoids;

// Ways round.
public sealed partial class RegionGraph
{
    /// <summary>For each shape of the region the number of steps of its shortest loop, in the order of <see cref="Shapes"/>; -1 where it has none.</summary>
    /// <param name="progress">Told now and then how many shapes are done.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// A loop counts when no step in it undoes the one before at once; so it is a way round in the graph of shapes, though it may come back along the way it went out, and what it does to the labels may be
    /// nothing (a quarter turn done four times). A step that leaves the shape as it is is a loop of length 1. A shape has no loop only where the region is a tree. Each shape costs a search of about half the
    /// loop's length both ways. Takes 32 bytes a shape meanwhile.
    /// </remarks>
    public ImmutableArray<int> ShortestLoops(IProgress<int>? progress = null, CancellationToken cancellationToken = default)
    {
        var lengths = new int[_shapes.Length];
        if (IsTree())
        {
            Array.Fill(lengths, -1);
        }
        else
        {
            var search = new ReducedLoopSearch(Out, In, _inverseLabel);
            for (var vertex = 0; vertex < lengths.Length; vertex++)
            {
                if (vertex % ProgressInterval == 0)
                {
                    progress?.Report(vertex);
                }

                cancellationToken.ThrowIfCancellationRequested();
                lengths[vertex] = search.LengthAt(vertex);
            }
        }

        progress?.Report(lengths.Length);
        return ImmutableCollectionsMarshal.AsImmutableArray(lengths);
    }

    /// <summary>The number of steps of the shortest loop at a shape, as <see cref="ShortestLoops"/> counts it; -1 where there is none.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The region has no such shape.</exception>
    public int ShortestLoopAt(int shape) => new ReducedLoopSearch(Out, In, _inverseLabel).LengthAt(Place(shape));

    // Connected with two arcs for each edge, one edge fewer than vertices.
    private bool IsTree() => IsReversible && ArrowCount == 2L * (_shapes.Length - 1);
}
