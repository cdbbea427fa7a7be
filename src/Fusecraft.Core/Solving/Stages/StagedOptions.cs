namespace Fusecraft.Solving;

/// <summary>How far a staged descent may go, and how the length of its words is counted.</summary>
public sealed class StagedOptions
{
    /// <summary>The defaults.</summary>
    public static StagedOptions Default { get; } = new();

    /// <summary>How the length of a word is counted.</summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>How many moves may be tried for one word; more find shorter ones. Some ten million take a second. Up to 25 times as many are tried where there is no word yet.</summary>
    public long MaxNodes { get; init; } = 1_000_000;

    /// <summary>
    /// How long to look for one word, instead of <see cref="MaxNodes"/>; null to count moves. The one option by which an answer depends on more than the question: the result says by which number of moves the same word is found
    /// again. The first budget of moves is always used up, however short the time.
    /// </summary>
    public TimeSpan? TimeLimit { get; init; }

    /// <summary>The greatest number of bytes of one table of distances; a stage has a few.</summary>
    public int MaxTableBytes { get; init; } = 1 << 24;

    /// <summary>The exploration ends when it has found this many shapes.</summary>
    public int MaxShapes { get; init; } = 5_000_000;

    /// <summary>The seed of the random products by which words for a stabilizer chain are found, where stages do not fit: same seed, same word.</summary>
    public ulong Seed { get; init; } = 1;
}
