namespace Fusecraft.Groupoids;

/// <summary>How far a comparison of two mechanisms may go.</summary>
public sealed class ComparisonOptions
{
    /// <summary>No limit but memory on shapes; searches give up after some seconds.</summary>
    public static ComparisonOptions Default { get; } = new();

    /// <summary>How far each exploration may go, in shapes; at least 1.</summary>
    public int MaxShapes { get; init; } = ExplorationOptions.Default.MaxShapes;

    /// <summary>
    /// How many small things each search may try before it says that it does not know: partial bijections of sites, images of home, arrows of shape graphs, pairings of group members; at least 1.
    /// </summary>
    public long MaxTries { get; init; } = 50_000_000;
}
