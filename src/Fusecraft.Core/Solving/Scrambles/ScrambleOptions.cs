namespace Fusecraft.Solving;

/// <summary>Which states are drawn, and how their words are searched.</summary>
public sealed record ScrambleOptions
{
    /// <summary>The defaults: all states of the home region.</summary>
    public static ScrambleOptions Default { get; } = new();

    /// <summary>Only states at this distance or farther from home; 0 for all. Above 0 a distance table is made.</summary>
    public int LeastDistance { get; init; }

    /// <summary>Only states at this distance from home or nearer; null for all. If given, a distance table is made.</summary>
    public int? GreatestDistance { get; init; }

    /// <summary>How distances are counted.</summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>The most memory that a distance table may take, in bytes.</summary>
    public long MaxBytes { get; init; } = DistanceOptions.Default.MaxBytes;

    /// <summary>How far the search for a word may go where there is no distance table.</summary>
    public SolveOptions Search { get; init; } = SolveOptions.Default;
}
