namespace Fusecraft.Solving;

/// <summary>How far a solver may go.</summary>
/// <remarks>
/// A solver goes on from the cheap to the dear, and each way has a budget of its own. Between two states: a search from both ends by steps (<see cref="MaxStates"/>); a proof by shapes and vertex group
/// (<see cref="MaxShapes"/>); a table of all states, where they are few (<see cref="MaxTableBytes"/>); where a greatest length or another metric than steps is asked for, a bounded search (<see cref="MaxNodes"/>,
/// <see cref="TimeLimit"/>); at last a word that is short but not proven shortest (<see cref="MaxStagedMoves"/>, <see cref="Seed"/>).
/// </remarks>
public sealed class SolveOptions
{
    /// <summary>The defaults.</summary>
    public static SolveOptions Default { get; } = new();

    /// <summary>Only paths of at most this length, by the metric, count; null for any length. The first path found that keeps it is the answer, perhaps not the shortest: see <see cref="SolveResult.IsProvenShortest"/>.</summary>
    public int? MaxLength { get; init; }

    /// <summary>
    /// How the length of paths is counted. Between shapes, and for exchanges of pieces, the solver looks for the fewest steps and only measures what it finds; so too for goals that leave labels free, where turns weigh nothing or
    /// the goal tells more than <see cref="MaxStates"/> states apart.
    /// </summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>A search over states ends when it holds this many. Takes about 100 bytes a state on a cube of 54 sites.</summary>
    public int MaxStates { get; init; } = 1_000_000;

    /// <summary>An exploration of shapes, on which proofs rest, ends when it has found this many.</summary>
    public int MaxShapes { get; init; } = 5_000_000;

    /// <summary>Where all states of the region fit a distance table of this many bytes, one is made and kept; 0 to do without. See <see cref="DistanceTable"/>.</summary>
    public long MaxTableBytes { get; init; } = 100_000_000;

    /// <summary>The bounded search ends when it has tried this many nodes. See <see cref="BoundedOptions.MaxNodes"/>.</summary>
    public long MaxNodes { get; init; } = 200_000_000;

    /// <summary>The bounded search ends after this time; null for none. See <see cref="BoundedOptions.TimeLimit"/>.</summary>
    public TimeSpan? TimeLimit { get; init; }

    /// <summary>So many moves are tried for a short word by stages; more find shorter ones. 0 to do without stages, whose tables take seconds to fill, and be content with a longer word.</summary>
    public long MaxStagedMoves { get; init; } = 1_000_000;

    /// <summary>The seed of the random products by which words for a stabilizer chain are found: same seed, same word.</summary>
    public ulong Seed { get; init; } = 1;
}
