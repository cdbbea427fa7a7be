using System.Collections.Immutable;

namespace Fusecraft.Groupoids;

/// <summary>
/// The gates on the ways to one shape of a region: a shape is a gate of another when every turn path from there to the target passes it. With home as the target these are the shapes that every solution must pass.
/// </summary>
/// <remarks>Shapes go by their numbers in the groupoid. Immutable, safe to share.</remarks>
public sealed class GateTree
{
    private readonly RegionGraph _graph;
    private readonly DominatorTree _tree;

    internal GateTree(RegionGraph graph, DominatorTree tree)
    {
        _graph = graph;
        _tree = tree;
    }

    /// <summary>The shape that the ways lead to.</summary>
    public int Target => _graph.Shapes[_tree.Root];

    /// <summary>The shapes that every turn path from a shape to the target must pass, in the order in which it does, both ends left out.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The region has no such shape.</exception>
    public ImmutableArray<int> GatesOf(int shape)
    {
        var gates = ImmutableArray.CreateBuilder<int>();
        var at = _graph.Place(shape);
        while (at != _tree.Root && (at = _tree.Parent(at)) != _tree.Root)
        {
            gates.Add(_graph.Shapes[at]);
        }

        return gates.DrainToImmutable();
    }

    /// <summary>How many shapes cannot reach the target but through this one, itself not counted; for the target all other shapes.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The region has no such shape.</exception>
    public int CountBehind(int shape) => _tree.Size(_graph.Place(shape)) - 1;
}
