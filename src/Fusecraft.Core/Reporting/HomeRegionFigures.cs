using System.Numerics;
using Fusecraft.Groupoids;

namespace Fusecraft.Reporting;

/// <summary>The region of the home shape in figures.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class HomeRegionFigures
{
    internal HomeRegionFigures(VertexGroup group)
    {
        ShapeCount = group.Region.ShapeCount;
        Eccentricity = group.Region.Eccentricity;
        StateCount = group.StateCount;
        VertexGroup = new VertexGroupFigures(group);
    }

    /// <summary>The number of its shapes.</summary>
    public int ShapeCount { get; }

    /// <summary>The largest number of single steps from home to one of its shapes.</summary>
    public int Eccentricity { get; }

    /// <summary>The exact number of its states: its shapes times the order of the vertex group.</summary>
    public BigInteger StateCount { get; }

    /// <summary>The vertex group at the home shape.</summary>
    public VertexGroupFigures VertexGroup { get; }
}
