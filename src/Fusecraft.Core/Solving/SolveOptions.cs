namespace Fusecraft.Solving;

/// <summary>How far a solver may go.</summary>
public sealed class SolveOptions
{
    /// <summary>The defaults.</summary>
    public static SolveOptions Default { get; } = new();

    /// <summary>Only paths of at most this length, by the metric, count; null for any length.</summary>
    public int? MaxLength { get; init; }

    /// <summary>How the length of paths is counted. It matters for paths between states; paths between shapes and to goals that leave labels free are counted by steps.</summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>Where a greatest length is asked for, or another metric than steps, a bounded search goes on when that from both ends has run out of states; it ends when it has tried this many nodes.</summary>
    public long MaxNodes { get; init; } = 200_000_000;

    /// <summary>The bounded search ends after this time; null for none. See <see cref="BoundedOptions.TimeLimit"/>.</summary>
    public TimeSpan? TimeLimit { get; init; }

    /// <summary>A search ends when it holds this many states. Takes about 100 bytes a state on a cube of 54 sites.</summary>
    public int MaxStates { get; init; } = 1_000_000;

    /// <summary>
    /// Where a search ended, so many moves are tried for a short word by stages; more find shorter ones. 0 to do without stages, whose tables take seconds to fill, and be content with a longer word.
    /// </summary>
    public long MaxStagedMoves { get; init; } = 1_000_000;

    /// <summary>Where a search ended and all states of the region fit a distance table of this many bytes, one is made and kept; 0 to do without. See <see cref="DistanceTable"/>.</summary>
    public long MaxTableBytes { get; init; } = 100_000_000;

    /// <summary>The exploration that proofs rest on ends when it has found this many shapes.</summary>
    public int MaxShapes { get; init; } = 5_000_000;

    /// <summary>The seed of the random products by which words for a stabilizer chain are found: same seed, same word.</summary>
    public ulong Seed { get; init; } = 1;
}
