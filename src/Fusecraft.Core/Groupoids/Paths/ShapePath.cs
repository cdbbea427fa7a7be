using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>Shortest paths between two shapes, by breadth-first search from the first until the second is found.</summary>
internal static class ShapePath
{
    /// <summary>A shortest path, or null where there is none.</summary>
    public static ImmutableArray<Step>? Find(Shape from, Shape to, CancellationToken cancellation = default)
    {
        var explorer = new ShapeExplorer(from.Mechanism, ExplorationOptions.Default, null, cancellation) { StopAt = to.Key.ToArray() };
        explorer.Run(from.Key);
        var found = explorer.Shapes.Find(to.Key);
        return found < 0 ? null : explorer.PathTo(found);
    }
}
