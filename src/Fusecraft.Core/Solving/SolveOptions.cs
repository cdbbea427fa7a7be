namespace Fusecraft.Solving;

/// <summary>How far a solver may go.</summary>
public sealed class SolveOptions
{
    /// <summary>The defaults.</summary>
    public static SolveOptions Default { get; } = new();

    /// <summary>Only paths of at most this many steps count; null for any length.</summary>
    public int? MaxLength { get; init; }

    /// <summary>A search ends when it holds this many states. Takes about 100 bytes a state on a cube of 54 sites.</summary>
    public int MaxStates { get; init; } = 1_000_000;

    /// <summary>
    /// Where a search ended, so many moves are tried for a short word by stages; more find shorter ones. 0 to do without stages, whose tables take seconds to fill, and be content with a longer word.
    /// </summary>
    public long MaxNodes { get; init; } = 1_000_000;

    /// <summary>The exploration that proofs rest on ends when it has found this many shapes.</summary>
    public int MaxShapes { get; init; } = 5_000_000;

    /// <summary>The seed of the random products by which words for a stabilizer chain are found: same seed, same word.</summary>
    public ulong Seed { get; init; } = 1;
}
