using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>The shapes of a region by their places in it: place 0 is the base shape's. Knows the path from the base shape to each.</summary>
internal sealed class RegionShapes
{
    private readonly RegionTree _tree;
    private readonly int[] _placeOf;

    public RegionShapes(ShapeGroupoid groupoid, int baseShape)
    {
        Groupoid = groupoid;
        _tree = RegionTree.Of(groupoid, baseShape);
        _placeOf = new int[groupoid.ShapeCount];
        Array.Fill(_placeOf, -1);
        for (var place = 0; place < _tree.Order.Length; place++)
        {
            _placeOf[_tree.Order[place]] = place;
        }
    }

    public ShapeGroupoid Groupoid { get; }

    public Mechanism Mechanism => Groupoid.Mechanism;

    public int Count => _tree.Order.Length;

    /// <summary>The number in the groupoid of the shape at a place.</summary>
    public int ShapeAt(int place) => _tree.Order[place];

    /// <summary>The place of a shape by its number in the groupoid; -1 where it lies in another region.</summary>
    public int PlaceOf(int shape) => shape < 0 ? -1 : _placeOf[shape];

    /// <summary>The place of the shape after a step; -1 where the step is barred or leaves the region.</summary>
    public int After(int place, int step) => PlaceOf(Groupoid.Target(_tree.Order[place], step));

    /// <summary>For each place the permutation of the path to it, as padded lanes one after the other.</summary>
    public T[] Labels<T>(int stride)
        where T : unmanaged, IBinaryInteger<T>
    {
        var steps = new T[Mechanism.Steps.Length * stride];
        foreach (var step in Mechanism.Steps)
        {
            step.Permutation.CopyLanes(steps.AsSpan(step.Index * stride, stride));
        }

        var labels = new T[checked(Count * stride)];
        Lanes.Identity(labels.AsSpan(0, stride));
        for (var place = 1; place < Count; place++)
        {
            var shape = _tree.Order[place];
            Lanes.ComposePadded<T>(
                labels.AsSpan(_placeOf[_tree.Parent(shape)] * stride, stride), steps.AsSpan(_tree.Step(shape) * stride, stride), labels.AsSpan(place * stride, stride));
        }

        return labels;
    }
}
