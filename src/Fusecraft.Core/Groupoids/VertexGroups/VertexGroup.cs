using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// The permutations of the sites that loops at a base shape bring about, proven: every arc of the region was taken into account. Shapes of one region have vertex groups that are conjugate
/// to each other by the permutation of any path between them.
/// </summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed partial class VertexGroup
{
    private readonly RegionTree _tree;
    private readonly ImmutableArray<Arc> _arcs;

    internal VertexGroup(ShapeGroupoid groupoid, RegionTree tree, PermutationGroup group, ImmutableArray<Arc> arcs)
        : this(groupoid, tree, group, arcs, tree.Root)
    {
    }

    private VertexGroup(ShapeGroupoid groupoid, RegionTree tree, PermutationGroup group, ImmutableArray<Arc> arcs, int baseShape)
    {
        Groupoid = groupoid;
        Group = group;
        BaseShape = baseShape;
        _tree = tree;
        _arcs = arcs;
    }

    /// <summary>The groupoid.</summary>
    public ShapeGroupoid Groupoid { get; }

    /// <summary>The number of the base shape.</summary>
    public int BaseShape { get; }

    /// <summary>The region of the base shape.</summary>
    public Region Region => Groupoid.Regions[Groupoid.RegionOf(BaseShape)];

    /// <summary>The group, acting on all sites; its order is proven.</summary>
    public PermutationGroup Group { get; }

    /// <summary>The number of its members.</summary>
    public BigInteger Order => Group.Order;

    /// <summary>The number of states of the region that can be reached from the base shape's own: its shapes times the order of the group.</summary>
    public BigInteger StateCount => Order * Region.ShapeCount;

    /// <summary>Loops whose permutations are the generators of <see cref="Group"/>, in their order; made of free steps only. Computed anew at each call.</summary>
    /// <exception cref="InvalidOperationException">A loop would be too long to write out, because one-way steps on it can only be undone by going round.</exception>
    public ImmutableArray<TurnPath> GeneratorLoops() => [.. _arcs.Select(arc => Loop(arc))];

    /// <summary>A path from the base shape to a shape of its region along the spanning tree: τ(shape).</summary>
    /// <remarks>From the base at the tree's root it goes down the tree; from a base that the group was <see cref="MovedTo"/>, up to where the two branches part and down again.</remarks>
    /// <exception cref="ArgumentException">The shape lies in another region.</exception>
    /// <exception cref="InvalidOperationException">The way up would be too long to write out, because one-way steps on it can only be undone by going round.</exception>
    public TurnPath TreePath(int shape) => PathBetween(BaseShape, shape);

    private TurnPath Loop(Arc arc)
    {
        var there = TreePath(arc.Shape);
        var across = TurnPath.Follow(there.Target, Groupoid.Mechanism.Steps[arc.Step]);
        return there.Then(across).Then(PathBetween(Groupoid.IndexOf(across.Target), BaseShape));
    }

    /// <summary>A free step at a shape.</summary>
    internal readonly record struct Arc(int Shape, int Step);
}
