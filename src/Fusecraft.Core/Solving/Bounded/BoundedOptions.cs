using System.Collections.Immutable;

namespace Fusecraft.Solving;

/// <summary>How a bounded search counts length and how far it may go.</summary>
public sealed class BoundedOptions
{
    /// <summary>The defaults.</summary>
    public static BoundedOptions Default { get; } = new();

    /// <summary>How the length of words is counted.</summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>A search ends when it has tried this many nodes: states held by the search from both ends, and moves tried by iterative deepening.</summary>
    public long MaxNodes { get; init; } = 2_000_000_000;

    /// <summary>
    /// A search ends after this time; null for none. The one thing that makes answers depend on the machine: <see cref="BoundedResult.NodeCount"/> then says which <see cref="MaxNodes"/> gives the same answer without a clock.
    /// Building tables counts too, but is not cut short.
    /// </summary>
    public TimeSpan? TimeLimit { get; init; }

    /// <summary>The search from both ends, which needs no tables, holds at most this many states before tables are built. About 40 bytes each on a cube of 54 sites.</summary>
    public int MaxMeetingStates { get; init; } = 200_000;

    /// <summary>What pruning tables may take, where they are chosen automatically; their threads are those of the search too.</summary>
    public PruningOptions Pruning { get; init; } = PruningOptions.Default;

    /// <summary>Tables made by hand, to be used instead of automatic ones. Those whose base shape or metric do not fit are left aside; where none is left, tables are chosen automatically. Empty for automatic ones.</summary>
    public ImmutableArray<PruningTable> Tables { get; init; } = [];

    /// <summary>False to read tables as they are only, not also through the symmetries of the mechanism.</summary>
    public bool UsesSymmetry { get; init; } = true;
}
