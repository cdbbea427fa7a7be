using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>Shows that two mechanisms are one puzzle: where the sites of the first lie in the second, which step plays which part, and how the second gets from its home to the first one's.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class HomeMatch
{
    internal HomeMatch(Permutation sites, ImmutableArray<Step> steps, bool isRepinned, int shape, TurnPath path)
    {
        Sites = sites;
        Steps = steps;
        IsRepinned = isRepinned;
        Shape = shape;
        Path = path;
    }

    /// <summary>For each site of the first mechanism the site of the second where it lies.</summary>
    public Permutation Sites { get; }

    /// <summary>For each step of the first mechanism, by number, the step of the second that it becomes.</summary>
    public ImmutableArray<Step> Steps { get; }

    /// <summary>
    /// True when the first puzzle has to be held by another corner: a step then does what the other does up to a rotation of the whole. Shapes are relative to the corner held, so the numbers of
    /// shapes and the vertex groups need not agree; totals of states do.
    /// </summary>
    public bool IsRepinned { get; }

    /// <summary>The number, among the shapes of the second mechanism, of the first one's home.</summary>
    public int Shape { get; }

    /// <summary>A shortest path of the second mechanism from its home to that shape.</summary>
    public TurnPath Path { get; }
}
