using System.Collections.Immutable;
using System.Runtime.InteropServices;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// The shapes of one region with the arrows between them written out: distances both ways, bridges and cut shapes, gates, shortest loops, the diameter. Passages out of the region are no
/// part of it.
/// </summary>
/// <remarks>
/// Shapes go by their numbers in the groupoid. Steps that are free in one shape and have the same permutation also lead to the same shape; they count as one arrow here (so a half turn and its
/// opposite are one). An arrow undoes another when it goes back with the inverse permutation. Immutable, safe to share.
/// </remarks>
public sealed partial class RegionGraph
{
    private const int ProgressInterval = 1 << 16;
    private readonly RegionMembers _members;
    private readonly int[] _shapes;

    /// <summary>For each label the label of the inverse permutation, or -1.</summary>
    private readonly int[] _inverseLabel;

    internal RegionGraph(ShapeGroupoid groupoid, Region region, RegionMembers members, IProgress<int>? progress, CancellationToken cancellation)
    {
        Groupoid = groupoid;
        Region = region;
        _members = members;
        _shapes = members.Of(region.Index);
        var labels = LabelsOfSteps(groupoid.Mechanism);
        _inverseLabel = InverseLabels(groupoid.Mechanism, labels);
        Out = WriteArcs(labels, progress, cancellation);
        In = groupoid.Mechanism.IsReversible ? Out : Out.Reversed();
    }

    /// <summary>The groupoid.</summary>
    public ShapeGroupoid Groupoid { get; }

    /// <summary>The region.</summary>
    public Region Region { get; }

    /// <summary>The numbers of the region's shapes, ascending. Lists with one entry for each shape of the region follow this order.</summary>
    public ImmutableArray<int> Shapes => ImmutableCollectionsMarshal.AsImmutableArray(_shapes);

    /// <summary>The number of arrows within the region.</summary>
    public long ArrowCount => Out.ArcCount;

    /// <summary>The arcs by their sources.</summary>
    internal ArcTable Out { get; }

    /// <summary>The arcs by their targets. Where every step can be undone this is the same table: each arc seen from its end is its undoing.</summary>
    internal ArcTable In { get; }

    internal ReadOnlySpan<int> InverseLabel => _inverseLabel;

    internal bool IsReversible => ReferenceEquals(Out, In);

    internal int Place(int shape)
    {
        if ((uint)shape >= (uint)Groupoid.ShapeCount || Groupoid.RegionOf(shape) != Region.Index)
        {
            throw new ArgumentOutOfRangeException(nameof(shape), shape, $"Region {Region.Index} has no such shape.");
        }

        return _members.Place(shape);
    }

    // Steps with equal permutations share a label: the number of the first of them.
    private static int[] LabelsOfSteps(Mechanism mechanism)
    {
        var first = new Dictionary<Permutation, int>();
        return [.. mechanism.Steps.Select(step => first.TryGetValue(step.Permutation, out var label) ? label : first[step.Permutation] = step.Index)];
    }

    private static int[] InverseLabels(Mechanism mechanism, int[] labels)
    {
        var labelOf = new Dictionary<Permutation, int>();
        foreach (var step in mechanism.Steps)
        {
            labelOf[step.Permutation] = labels[step.Index];
        }

        return [.. mechanism.Steps.Select(step => labelOf.GetValueOrDefault(step.Permutation.Inverse(), -1))];
    }

    private ArcTable WriteArcs(int[] labels, IProgress<int>? progress, CancellationToken cancellation)
    {
        var several = Groupoid.Regions.Length > 1;
        var arcs = new ArcTable.Builder(_shapes.Length, several ? 4L * _shapes.Length : 2 * Groupoid.FreeTurnCount);
        var lastWith = new int[labels.Length];
        for (var place = 0; place < _shapes.Length; place++)
        {
            if (place % ProgressInterval == 0)
            {
                cancellation.ThrowIfCancellationRequested();
                progress?.Report(place);
            }

            for (var step = 0; step < labels.Length; step++)
            {
                var target = lastWith[labels[step]] == place + 1 ? -1 : Groupoid.Target(_shapes[place], step);
                if (target < 0)
                {
                    continue;
                }

                lastWith[labels[step]] = place + 1;
                if (!several || Groupoid.RegionOf(target) == Region.Index)
                {
                    arcs.Add(_members.Place(target), labels[step]);
                }
            }

            arcs.EndVertex();
        }

        progress?.Report(_shapes.Length);
        return arcs.Build();
    }

    private Arrow ArrowOf(int source, int arc) => ArrowWith(source, Out.Labels[arc]);

    // A label is the number of a step with its permutation, but at this shape another step with it may be the free one.
    internal Arrow ArrowWith(int source, int label)
    {
        var permutation = Groupoid.Mechanism.Steps[label].Permutation;
        foreach (var step in Groupoid.Mechanism.Steps)
        {
            if (step.Permutation == permutation && Groupoid.Target(_shapes[source], step.Index) is >= 0 and var target)
            {
                return new Arrow(_shapes[source], step, target);
            }
        }

        throw new InvalidOperationException("An arrow of the graph has no free step.");
    }

    // The arc that undoes one, or -1.
    private int UndoingArc(int arc)
    {
        var (end, label) = (Out.Ends[arc], _inverseLabel[Out.Labels[arc]]);
        for (var back = Out.Start(end); back < Out.Start(end + 1); back++)
        {
            if (Out.Labels[back] == label)
            {
                return back;
            }
        }

        return -1;
    }
}
