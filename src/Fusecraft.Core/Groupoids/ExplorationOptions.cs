namespace Fusecraft.Groupoids;

/// <summary>How far an exploration may go.</summary>
public sealed class ExplorationOptions
{
    /// <summary>No limit but memory.</summary>
    public static ExplorationOptions Default { get; } = new();

    /// <summary>The exploration ends, incomplete, when a shape beyond this number is found; at least 1.</summary>
    public int MaxShapes { get; init; } = Array.MaxLength / 2;
}
