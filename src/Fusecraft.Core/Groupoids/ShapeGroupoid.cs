using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// All shapes that can be reached from a first one (home, unless another is given), with the steps between them: the objects and arrows of the puzzle's groupoid.
/// </summary>
/// <remarks>
/// Shapes are numbered from 0, the first shape, in the order of a breadth-first search, so by their distance; the numbering depends on the mechanism alone. A shape
/// takes about 15 bytes where shapes can be numbered densely, which is found out on the way, and else the words of its key and 19 to 32 bytes more; steps between shapes are computed when asked for. Immutable, safe to share.
/// </remarks>
public sealed partial class ShapeGroupoid
{
    private readonly ShapeExplorer _explorer;
    private readonly Lazy<RegionTable> _regions;

    private ShapeGroupoid(Mechanism mechanism, ShapeExplorer explorer)
    {
        Mechanism = mechanism;
        _explorer = explorer;
        _regions = new Lazy<RegionTable>(() => RegionTable.Of(this));
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>False when a budget ended the exploration: then there are more shapes than those found.</summary>
    public bool IsComplete => _explorer.IsComplete;

    /// <summary>The number of shapes found.</summary>
    public int ShapeCount => _explorer.Shapes.Count;

    /// <summary>The number of pairs (shape, turn) whose forward step is free; when not complete, at the shapes all of whose steps were tried.</summary>
    public long FreeTurnCount => _explorer.FreeTurns;

    /// <summary>The number of shapes where exactly one turn has a free step, in either sense.</summary>
    public int DeadEndCount => _explorer.DeadEnds;

    /// <summary>The number of shapes where no step is free.</summary>
    public int StuckShapeCount => _explorer.StuckShapes;

    internal ExploredShapes Store => _explorer.Shapes;

    internal int DegreeOfParallelism => _explorer.DegreeOfParallelism;

    /// <summary>The first shape of each distance, and at the end the number of shapes.</summary>
    internal IReadOnlyList<int> LevelStarts => _explorer.LevelStarts;

    /// <summary>Finds all shapes reachable from home.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="options">How far to go; null for no limit but memory.</param>
    /// <param name="progress">Told now and then how far the exploration has come.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="MechanismFormatException">Two steps written alike are free in one reachable shape.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// Takes time for one look-up a free step: some nanoseconds while what is looked up fits the processor's caches. Small graphs are explored on the caller's thread, large ones on as many as the
    /// options allow.
    /// </remarks>
    public static ShapeGroupoid Explore(
        Mechanism mechanism, ExplorationOptions? options = null, IProgress<ExplorationProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        return ExploreFrom(mechanism.Home, options, progress, cancellationToken);
    }

    /// <summary>Finds all shapes reachable from a given one, which becomes number 0.</summary>
    /// <param name="first">The shape to start from.</param>
    /// <param name="options">How far to go; null for no limit but memory.</param>
    /// <param name="progress">Told now and then how far the exploration has come.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="MechanismFormatException">Two steps written alike are free in one reachable shape.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static ShapeGroupoid ExploreFrom(
        Shape first, ExplorationOptions? options = null, IProgress<ExplorationProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(first);
        options ??= ExplorationOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxShapes, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxBytes, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.DegreeOfParallelism, 1, nameof(options));
        var explorer = new ShapeExplorer(first.Mechanism, options, progress, cancellationToken);
        explorer.Run(first.Key);
        return new ShapeGroupoid(first.Mechanism, explorer);
    }

    /// <summary>A shape by its number.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such shape.</exception>
    public Shape ShapeAt(int shape)
    {
        RequireShape(shape);
        return new Shape(Mechanism, Store.Key(shape));
    }

    /// <summary>The number of a shape; -1 where it was not found.</summary>
    public int IndexOf(Shape shape)
    {
        ArgumentNullException.ThrowIfNull(shape);
        return ReferenceEquals(shape.Mechanism, Mechanism) ? Store.Find(shape.Key) : -1;
    }

    /// <summary>The number of the shape after a step; -1 where the step is barred, or leads to a shape that an ended budget left out.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such shape.</exception>
    public int After(int shape, Step step)
    {
        RequireShape(shape);
        Mechanism.Board.Of(step);
        return Target(shape, step.Index);
    }

    /// <summary>The smallest number of steps from the first shape.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such shape.</exception>
    public int DistanceOf(int shape)
    {
        RequireShape(shape);
        return Depth(shape);
    }

    /// <summary>A shortest path from the first shape.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such shape.</exception>
    public TurnPath PathTo(int shape)
    {
        RequireShape(shape);
        return TurnPath.Follow(ShapeAt(0), _explorer.PathTo(shape));
    }

    /// <summary>A shortest path between two shapes; null where there is none.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such shape.</exception>
    public TurnPath? FindPath(int from, int to, CancellationToken cancellationToken = default)
    {
        RequireShape(from);
        RequireShape(to);
        return ShapePath.Find(ShapeAt(from), ShapeAt(to), cancellationToken) is { } steps ? TurnPath.Follow(ShapeAt(from), steps) : null;
    }

    internal int Depth(int shape)
    {
        var level = _explorer.LevelStarts.BinarySearch(shape);
        return level >= 0 ? Math.Min(level, _explorer.LevelStarts.Count - 2) : ~level - 1;
    }

    internal int Parent(int shape) => Store.Parent(shape);

    internal int ParentStep(int shape) => Store.ParentStep(shape);

    /// <summary>The number of the shape after a step; -1 where the step is barred or the shape was left out.</summary>
    internal int Target(int shape, int step) => Store.Target(shape, step);

    private void RequireShape(int shape)
    {
        if ((uint)shape >= (uint)ShapeCount)
        {
            throw new ArgumentOutOfRangeException(nameof(shape), shape, $"There are {ShapeCount} shapes, numbered from 0.");
        }
    }
}
