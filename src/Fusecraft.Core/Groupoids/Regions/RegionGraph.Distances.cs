using System.Collections.Immutable;
using System.Runtime.InteropServices;

namespace Fusecraft.Groupoids;

// How far it is from one shape to another.
public sealed partial class RegionGraph
{
    /// <summary>The smallest number of steps from a shape to each shape of the region, in the order of <see cref="Shapes"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The region has no such shape.</exception>
    /// <remarks>Linear in the number of arrows.</remarks>
    public ImmutableArray<int> DistancesFrom(int shape) => Distances(Out, Place(shape));

    /// <summary>The smallest number of steps to a shape from each shape of the region, in the order of <see cref="Shapes"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The region has no such shape.</exception>
    /// <remarks>Linear in the number of arrows.</remarks>
    public ImmutableArray<int> DistancesTo(int shape) => Distances(In, Place(shape));

    /// <summary>The largest number of steps that a shape of the region may need to be reached from a given one.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The region has no such shape.</exception>
    /// <remarks>Linear in the number of arrows.</remarks>
    public int Eccentricity(int shape) => Out.Search(Place(shape), new int[_shapes.Length], new int[_shapes.Length], out _);

    /// <summary>The largest distance from one shape of the region to another: exact where the budget of work suffices, else between bounds.</summary>
    /// <param name="options">How much work it may take; null for some seconds' work.</param>
    /// <param name="progress">Told after each search what is known.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentOutOfRangeException">The budget is negative.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// Searches from well-chosen shapes bound the eccentricities of all others (F. W. Takes, W. A. Kosters, <em>Determining the diameter of small world networks</em>, CIKM 2011; here also for
    /// one-way steps). What they leave open is searched from 256 shapes at a time (M. Then et al., <em>The more the merrier: efficient multi-source graph traversal</em>, VLDB 2014). Sources not
    /// opened, methods from memory. Takes 20 bytes a shape meanwhile, 120 where it comes to many shapes at a time.
    /// </remarks>
    public DiameterBounds Diameter(DiameterOptions? options = null, IProgress<DiameterBounds>? progress = null, CancellationToken cancellationToken = default)
    {
        options ??= DiameterOptions.Default;
        ArgumentOutOfRangeException.ThrowIfNegative(options.MaxArrowsSeen, nameof(options));
        var found = new DiameterSearch(Out, In, options.MaxArrowsSeen, progress is null ? null : bounds => progress.Report(InNumbers(bounds)), cancellationToken).Run();
        return InNumbers(found);
    }

    private DiameterBounds InNumbers(DiameterBounds bounds) => bounds with { From = _shapes[bounds.From], To = _shapes[bounds.To] };

    private ImmutableArray<int> Distances(ArcTable arcs, int root)
    {
        var distances = new int[_shapes.Length];
        arcs.Search(root, distances, new int[_shapes.Length], out _);
        return ImmutableCollectionsMarshal.AsImmutableArray(distances);
    }
}
