namespace Fusecraft.Groupoids;

/// <summary>What is known of the diameter of a region, the largest distance from one of its shapes to another.</summary>
/// <param name="Lower">The diameter is at least this.</param>
/// <param name="Upper">The diameter is at most this.</param>
/// <param name="From">A shape at distance <paramref name="Lower"/> before <paramref name="To"/>.</param>
/// <param name="To">A shape at distance <paramref name="Lower"/> after <paramref name="From"/>.</param>
public readonly record struct DiameterBounds(int Lower, int Upper, int From, int To)
{
    /// <summary>True when the diameter is known: the bounds meet.</summary>
    public bool IsExact => Lower == Upper;
}
