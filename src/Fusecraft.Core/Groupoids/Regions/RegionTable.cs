using System.Collections.Immutable;

namespace Fusecraft.Groupoids;

/// <summary>The regions of a groupoid: its strongly connected components.</summary>
/// <remarks>Source: R. Tarjan, <em>Depth-first search and linear graph algorithms</em>, SIAM J. Comput. 1 (1972), with a stack of its own. Skipped where every step can be undone.</remarks>
internal sealed class RegionTable
{
    private readonly int[]? _regionOf;

    private RegionTable(ImmutableArray<Region> regions, int[]? regionOf)
    {
        Regions = regions;
        _regionOf = regionOf;
    }

    public ImmutableArray<Region> Regions { get; }

    public int RegionOf(int shape) => _regionOf is null ? 0 : _regionOf[shape];

    public static RegionTable Of(ShapeGroupoid groupoid)
    {
        if (!groupoid.IsComplete)
        {
            throw new InvalidOperationException("A budget ended the exploration, so the regions are not known; explore further.");
        }

        if (groupoid.Mechanism.IsReversible)
        {
            return new RegionTable([new Region(0, 0, groupoid.ShapeCount, groupoid.Depth(groupoid.ShapeCount - 1), 0)], null);
        }

        var regionOf = Tarjan(groupoid);
        return new RegionTable(Summarize(groupoid, regionOf), regionOf);
    }

    private static int[] Tarjan(ShapeGroupoid groupoid)
    {
        var count = groupoid.ShapeCount;
        var steps = groupoid.Mechanism.Steps.Length;
        var order = new int[count];
        var low = new int[count];
        var component = new int[count];
        Array.Fill(component, -1);
        var open = new Stack<int>();
        var path = new Stack<(int Shape, int NextStep)>();
        var visited = 0;
        var components = 0;

        // Every shape is reachable from the first, so one search from there sees all.
        path.Push((0, 0));
        while (path.Count > 0)
        {
            var (shape, step) = path.Pop();
            if (step == 0)
            {
                order[shape] = low[shape] = ++visited;
                open.Push(shape);
            }

            var descended = false;
            for (; step < steps; step++)
            {
                var target = groupoid.Target(shape, step);
                if (target < 0)
                {
                    continue;
                }

                if (order[target] == 0)
                {
                    path.Push((shape, step + 1));
                    path.Push((target, 0));
                    descended = true;
                    break;
                }

                if (component[target] < 0)
                {
                    low[shape] = Math.Min(low[shape], order[target]);
                }
            }

            if (descended)
            {
                continue;
            }

            if (low[shape] == order[shape])
            {
                int member;
                do
                {
                    member = open.Pop();
                    component[member] = components;
                }
                while (member != shape);
                components++;
            }

            if (path.TryPeek(out var parent))
            {
                low[parent.Shape] = Math.Min(low[parent.Shape], low[shape]);
            }
        }

        return Renumber(component, components);
    }

    // Regions in the order of their first shapes.
    private static int[] Renumber(int[] component, int components)
    {
        var number = new int[components];
        Array.Fill(number, -1);
        var next = 0;
        for (var shape = 0; shape < component.Length; shape++)
        {
            if (number[component[shape]] < 0)
            {
                number[component[shape]] = next++;
            }

            component[shape] = number[component[shape]];
        }

        return component;
    }

    private static ImmutableArray<Region> Summarize(ShapeGroupoid groupoid, int[] regionOf)
    {
        var count = regionOf.Max() + 1;
        var first = new int[count];
        Array.Fill(first, -1);
        var sizes = new int[count];
        var farthest = new int[count];
        var passages = new long[count];
        for (var shape = 0; shape < regionOf.Length; shape++)
        {
            var region = regionOf[shape];
            first[region] = first[region] < 0 ? shape : first[region];
            sizes[region]++;
            farthest[region] = shape;
            for (var step = 0; step < groupoid.Mechanism.Steps.Length; step++)
            {
                var target = groupoid.Target(shape, step);
                passages[region] += target >= 0 && regionOf[target] != region ? 1 : 0;
            }
        }

        return [.. Enumerable.Range(0, count).Select(i => new Region(i, first[i], sizes[i], groupoid.Depth(farthest[i]), passages[i]))];
    }
}
