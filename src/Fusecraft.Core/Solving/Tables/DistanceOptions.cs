namespace Fusecraft.Solving;

/// <summary>How a distance table is made.</summary>
public sealed record DistanceOptions
{
    /// <summary>The defaults.</summary>
    public static DistanceOptions Default { get; } = new();

    /// <summary>How lengths are counted.</summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>Which way distances are measured.</summary>
    public DistanceOrigin Origin { get; init; } = DistanceOrigin.ToGoal;

    /// <summary>The most memory that the table and what it needs besides may take, in bytes.</summary>
    public long MaxBytes { get; init; } = 4L << 30;

    /// <summary>How many threads work; 1 starts none. The table does not depend on it.</summary>
    public int DegreeOfParallelism { get; init; } = Environment.ProcessorCount;
}
