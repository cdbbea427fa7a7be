using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Reporting;

/// <summary>
/// What a mechanism can do, in figures: its shapes, its regions, the vertex group at home and the number of states. Every count is exact; what a budget left unknown is null.
/// </summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed partial class Examination
{
    private Examination(Mechanism mechanism, ShapeGroupoid groupoid)
    {
        Mechanism = mechanism;
        IsComplete = groupoid.IsComplete;
        ShapeCount = groupoid.ShapeCount;
        FreeTurnCount = groupoid.FreeTurnCount;
    }

    /// <summary>The mechanism examined.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>False when a budget ended the exploration: then there are more shapes than those counted, and all that rests on knowing them all is null.</summary>
    public bool IsComplete { get; }

    /// <summary>The number of shapes reachable from home; of those found so far, when not complete.</summary>
    public int ShapeCount { get; }

    /// <summary>The number of pairs (shape, turn) whose forward step is free; when not complete, at the shapes all of whose steps were tried.</summary>
    public long FreeTurnCount { get; }

    /// <summary>The number of shapes where exactly one turn has a free step, in either sense.</summary>
    public int? DeadEndCount { get; private init; }

    /// <summary>The number of shapes where no step is free.</summary>
    public int? StuckShapeCount { get; private init; }

    /// <summary>The number of regions.</summary>
    public int? RegionCount { get; private init; }

    /// <summary>The number of pairs (shape, free step) that leave their region.</summary>
    public long? PassageCount { get; private init; }

    /// <summary>The number of regions other than the home region that no passage leads out of.</summary>
    public int? TrapCount { get; private init; }

    /// <summary>The region of the home shape, with the vertex group there.</summary>
    public HomeRegionFigures? HomeRegion { get; private init; }

    /// <summary>
    /// The number of states reachable from home, over all regions, as <see cref="ShapeGroupoid.CountReachableStates"/> gives it with its default budget. Null when that does not suffice: with several regions the
    /// number is not a simple product.
    /// </summary>
    public BigInteger? ReachableStateCount { get; private init; }

    /// <summary>Examines a mechanism: explores all shapes from home and extracts the vertex group there, proven.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="options">How far the exploration may go; null for no limit but memory.</param>
    /// <param name="progress">Told now and then how far the exploration has come.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="MechanismFormatException">Two steps written alike are free in one reachable shape.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>Costs what <see cref="ShapeGroupoid.Explore"/> and <see cref="ShapeGroupoid.VertexGroupAt"/> cost, and with several regions what <see cref="ShapeGroupoid.CountReachableStates"/> does.</remarks>
    public static Examination Of(
        Mechanism mechanism, ExplorationOptions? options = null, IProgress<ExplorationProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        var groupoid = ShapeGroupoid.Explore(mechanism, options, progress, cancellationToken);
        if (!groupoid.IsComplete)
        {
            return new Examination(mechanism, groupoid);
        }

        var home = groupoid.VertexGroupAt(0, cancellationToken);
        return new Examination(mechanism, groupoid)
        {
            DeadEndCount = groupoid.DeadEndCount,
            StuckShapeCount = groupoid.StuckShapeCount,
            RegionCount = groupoid.Regions.Length,
            PassageCount = groupoid.PassageCount,
            TrapCount = groupoid.TrapCount,
            HomeRegion = new HomeRegionFigures(home),
            ReachableStateCount = ReachableStates.Count(home, StateCountOptions.Default, cancellationToken),
        };
    }
}
