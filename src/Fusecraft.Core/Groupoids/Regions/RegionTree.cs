using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>A spanning tree of a region, breadth-first from its root. Every shape's parent stands before it in <see cref="Order"/>.</summary>
internal sealed class RegionTree
{
    private readonly ShapeGroupoid _groupoid;
    private readonly int[] _parents;
    private readonly int[] _steps;

    private RegionTree(ShapeGroupoid groupoid, int root, int[] order, int[] parents, int[] steps)
    {
        _groupoid = groupoid;
        Root = root;
        Order = order;
        _parents = parents;
        _steps = steps;
    }

    public int Root { get; }

    /// <summary>The shapes of the region in breadth-first order; the root first.</summary>
    public int[] Order { get; }

    /// <summary>True when all shapes are in the order of their numbers.</summary>
    public bool IsInOrder => Order[0] == 0 && Order[^1] == Order.Length - 1;

    /// <summary>Tells the memory that the origin of a shape will be asked for.</summary>
    public void Announce(int shape)
    {
        Memory.Announce(ref _parents[shape]);
        Memory.Announce(ref _steps[shape]);
    }

    public bool Contains(int shape) => shape == Root || _parents[shape] >= 0;

    /// <summary>The shape before this one on the path from the root; -1 for the root.</summary>
    public int Parent(int shape) => shape == Root ? -1 : _parents[shape];

    /// <summary>The step from <see cref="Parent"/>.</summary>
    public int Step(int shape) => _steps[shape];

    public static RegionTree Of(ShapeGroupoid groupoid, int root)
    {
        var region = groupoid.Regions[groupoid.RegionOf(root)];
        var order = new int[region.ShapeCount];
        var parents = new int[groupoid.ShapeCount];
        var steps = new int[groupoid.ShapeCount];
        Array.Fill(parents, -1);
        if (root == 0)
        {
            // The exploration itself was breadth-first from here, and a shortest path to a shape of the home region never leaves that region.
            var count = 0;
            for (var shape = 0; shape < groupoid.ShapeCount; shape++)
            {
                if (groupoid.RegionOf(shape) == 0)
                {
                    order[count++] = shape;
                    parents[shape] = groupoid.Parent(shape);
                    steps[shape] = groupoid.ParentStep(shape);
                }
            }

            return new RegionTree(groupoid, root, order, parents, steps);
        }

        order[0] = root;
        var found = 1;
        for (var i = 0; i < found; i++)
        {
            for (var step = 0; step < groupoid.Mechanism.Steps.Length; step++)
            {
                var target = groupoid.Target(order[i], step);
                if (target >= 0 && target != root && parents[target] < 0 && groupoid.RegionOf(target) == region.Index)
                {
                    parents[target] = order[i];
                    steps[target] = step;
                    order[found++] = target;
                }
            }
        }

        return new RegionTree(groupoid, root, order, parents, steps);
    }

    /// <summary>The tree of the exploration itself, over all regions.</summary>
    public static RegionTree OfAll(ShapeGroupoid groupoid)
    {
        var count = groupoid.ShapeCount;
        var shapes = Enumerable.Range(0, count);
        return new RegionTree(groupoid, 0, [.. shapes], [.. shapes.Select(groupoid.Parent)], [.. shapes.Select(groupoid.ParentStep)]);
    }

    /// <summary>The steps from the root to a shape; null where it lies in another region.</summary>
    public ImmutableArray<Step>? PathTo(int shape)
    {
        if ((uint)shape >= (uint)_parents.Length || !Contains(shape))
        {
            return null;
        }

        var path = new List<Step>();
        for (; shape != Root; shape = _parents[shape])
        {
            path.Add(_groupoid.Mechanism.Steps[_steps[shape]]);
        }

        path.Reverse();
        return [.. path];
    }
}
