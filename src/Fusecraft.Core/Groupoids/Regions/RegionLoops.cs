using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>The vertex group at the first shape of a region, and for each of its shapes the permutation of a path from there.</summary>
internal sealed class RegionLoops
{
    /// <summary>So small regions are looked at by themselves, with nothing that takes time or memory for all shapes of the groupoid: there may be many.</summary>
    private const int FewShapes = 1024;

    private RegionLoops(PermutationGroup group, Func<int, Permutation> label)
    {
        Group = group;
        Label = label;
    }

    /// <summary>The vertex group at the first shape of the region.</summary>
    public PermutationGroup Group { get; }

    /// <summary>The permutation of some path within the region from its first shape to another.</summary>
    public Func<int, Permutation> Label { get; }

    public static RegionLoops Of(VertexGroup group) => new(group.Group, group.Label);

    public static RegionLoops Of(ShapeGroupoid groupoid, Region region, CancellationToken cancellation) =>
        region.ShapeCount > FewShapes ? Of(groupoid.VertexGroupAt(region.FirstShape, cancellation)) : OfSmall(groupoid, region, cancellation);

    // Breadth-first through the region, in which each arc to a shape met before closes a loop.
    private static RegionLoops OfSmall(ShapeGroupoid groupoid, Region region, CancellationToken cancellation)
    {
        var labels = new Dictionary<int, Permutation> { [region.FirstShape] = Permutation.Identity };
        var queue = new Queue<int>(labels.Keys);
        var group = PermutationGroup.Generate([], groupoid.Mechanism.SiteCount);
        while (queue.TryDequeue(out var shape))
        {
            cancellation.ThrowIfCancellationRequested();
            foreach (var step in groupoid.Mechanism.Steps)
            {
                var target = groupoid.After(shape, step);
                if (target < 0 || groupoid.RegionOf(target) != region.Index)
                {
                    continue;
                }

                var there = labels[shape] * step.Permutation;
                if (!labels.TryGetValue(target, out var label))
                {
                    labels.Add(target, there);
                    queue.Enqueue(target);
                }
                else if (there != label && there * label.Inverse() is var loop && !group.Contains(loop))
                {
                    group = PermutationGroup.Generate(group.Generators.Add(loop), group.Degree);
                }
            }
        }

        return new RegionLoops(group, shape => labels[shape]);
    }
}
