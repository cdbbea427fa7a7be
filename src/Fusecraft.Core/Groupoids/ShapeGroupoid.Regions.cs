using System.Collections.Immutable;

namespace Fusecraft.Groupoids;

// Regions: shapes that can all reach each other.
public sealed partial class ShapeGroupoid
{
    /// <summary>The regions in the order of their first shapes; number 0, the region of the first shape, is the home region.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration, so the regions are not known.</exception>
    public ImmutableArray<Region> Regions => _regions.Value.Regions;

    /// <summary>The region of the first shape.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    public Region HomeRegion => Regions[0];

    /// <summary>The number of pairs (shape, free step) that leave their region.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    public long PassageCount => Regions.Sum(region => region.PassageCount);

    /// <summary>The number of regions that are traps: not the home region, and no passage leads out.</summary>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    public int TrapCount => Regions.Count(region => region.IsTrap);

    /// <summary>The number of the region that a shape lies in.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such shape.</exception>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    public int RegionOf(int shape)
    {
        RequireShape(shape);
        return _regions.Value.RegionOf(shape);
    }
}
