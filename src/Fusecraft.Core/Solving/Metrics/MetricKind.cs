namespace Fusecraft.Solving;

/// <summary>What is counted as the length of a word.</summary>
public enum MetricKind
{
    /// <summary>Every step costs 1; on cubes the quarter-turn metric.</summary>
    Step,

    /// <summary>A run costs 1: consecutive steps written with the same name or its opposite; on cubes the half-turn metric, on boards straight rows of tiles slide as one.</summary>
    Run,

    /// <summary>Every step costs the weight of its turn.</summary>
    Weights,
}
