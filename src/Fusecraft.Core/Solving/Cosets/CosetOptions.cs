using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>Where coset coordinates start, which of them are wanted, and how many at most.</summary>
public sealed class CosetOptions
{
    /// <summary>The defaults.</summary>
    public static CosetOptions Default { get; } = new();

    /// <summary>The most coordinates that are enumerated. Each takes 4 bytes a step of the mechanism and about 24 more.</summary>
    public int MaxCoordinates { get; init; } = 20_000_000;

    /// <summary>The shape of coordinate 0, where every label counts as at home; null for the home shape.</summary>
    public Shape? BaseShape { get; init; }

    /// <summary>
    /// True for the coordinates from which coordinate 0 can be reached, false for those that can be reached from it. There is a difference only where some step cannot be undone.
    /// </summary>
    public bool TowardsBase { get; init; }

    /// <summary>
    /// True to leave shapes out: coordinates are colourings alone, and every step counts as free. Bounds that rest on them are weaker, but there are fewer coordinates where there are many shapes.
    /// </summary>
    public bool IgnoresShapes { get; init; }
}
