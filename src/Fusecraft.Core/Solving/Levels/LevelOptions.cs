namespace Fusecraft.Solving;

/// <summary>How a level is measured, and how far the search may go.</summary>
public sealed class LevelOptions
{
    /// <summary>The defaults.</summary>
    public static LevelOptions Default { get; } = new();

    /// <summary>How lengths are counted; with weights every turn weighs at least 1.</summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>The search back from the goal ends when it holds this many states, told apart as far as the goal does.</summary>
    public int MaxStates { get; init; } = 2_000_000;

    /// <summary>For goals that many shapes fulfil: the exploration for these ends when it has found this many shapes.</summary>
    public int MaxShapes { get; init; } = 1_000_000;
}
