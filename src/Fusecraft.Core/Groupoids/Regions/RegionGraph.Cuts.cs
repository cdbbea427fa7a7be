using System.Collections.Immutable;

namespace Fusecraft.Groupoids;

// What holds the region together.
public sealed partial class RegionGraph
{
    /// <summary>The bridges: an arrow with the arrow that undoes it, where there is one, whose removal leaves the shapes of the region unable to all reach each other. In the order of their sources.</summary>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// Where every step can be undone these are the bridges of an undirected graph, found by one depth-first search in time linear in the number of arrows. With one-way steps they are the pairs of which one
    /// arrow alone is a bridge already (a shortest way round one arrow never needs the other), found as the arrows without which a root cannot reach all, or not all can reach it:
    /// G. F. Italiano, L. Laura, F. Santaroni, <em>Finding strong bridges and strong articulation points in linear time</em>, Theoret. Comput. Sci. 447 (2012) (not opened, method from memory).
    /// </remarks>
    public ImmutableArray<Bridge> Bridges(CancellationToken cancellationToken = default)
    {
        var arcs = IsReversible ? LowPoints.Find(Out, cancellationToken).Bridges : StrongBridges(cancellationToken);
        var bridges = new List<Bridge>();
        foreach (var (from, arc) in arcs)
        {
            var back = UndoingArc(arc);
            var there = ArrowOf(from, arc);
            Arrow? undoing = back < 0 ? null : ArrowOf(Out.Ends[arc], back);
            bridges.Add(undoing is { } other && other.Source < there.Source ? new Bridge(other, there) : new Bridge(there, undoing));
        }

        // Both arrows of a pair may have been found.
        return [.. bridges.Distinct().OrderBy(bridge => bridge.There.Source).ThenBy(bridge => bridge.There.Step.Index)];
    }

    /// <summary>The cut shapes: those without which the other shapes of the region could not all reach each other. Ascending.</summary>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>Sources and cost as for <see cref="Bridges"/>.</remarks>
    public ImmutableArray<int> CutShapes(CancellationToken cancellationToken = default)
    {
        if (IsReversible)
        {
            return [.. LowPoints.Find(Out, cancellationToken).CutVertices.Select(vertex => _shapes[vertex])];
        }

        var isCut = new bool[_shapes.Length];
        isCut[0] = !HoldsWithoutFirst();
        foreach (var tree in (DominatorTree[])[new(0, Out, In, cancellationToken), new(0, In, Out, cancellationToken)])
        {
            for (var vertex = 1; vertex < isCut.Length; vertex++)
            {
                isCut[tree.Parent(vertex)] |= tree.Parent(vertex) != 0;
            }
        }

        return [.. Enumerable.Range(0, isCut.Length).Where(vertex => isCut[vertex]).Select(vertex => _shapes[vertex])];
    }

    /// <summary>The gates on the ways to a shape: with home as the target, the shapes that every solution must pass.</summary>
    /// <param name="target">A shape of the region.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentOutOfRangeException">The region has no such shape.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>The dominators of the reversed graph. Source: T. Lengauer, R. E. Tarjan, <em>A fast algorithm for finding dominators in a flowgraph</em>, ACM TOPLAS 1 (1979) (not opened, method from memory).</remarks>
    public GateTree GatesTo(int target, CancellationToken cancellationToken = default) => new(this, new DominatorTree(Place(target), In, Out, cancellationToken));

    private List<(int From, int Arc)> StrongBridges(CancellationToken cancellation)
    {
        var bridges = new List<(int From, int Arc)>();
        var there = new DominatorTree(0, Out, In, cancellation);
        foreach (var (to, arc) in OnlyWaysIn(there, In))
        {
            bridges.Add((In.Ends[arc], ArcWith(In.Ends[arc], In.Labels[arc])));
            System.Diagnostics.Debug.Assert(Out.Ends[bridges[^1].Arc] == to, "An arc is the same seen from both ends.");
        }

        var back = new DominatorTree(0, In, Out, cancellation);
        bridges.AddRange(OnlyWaysIn(back, Out));
        return bridges;
    }

    // The arcs that every path from the root to some vertex takes: the only one that enters the vertex from where it has not been passed. The arcs are given by the vertices that they enter.
    private static IEnumerable<(int Vertex, int Arc)> OnlyWaysIn(DominatorTree tree, ArcTable entering)
    {
        for (var vertex = 0; vertex < tree.VertexCount; vertex++)
        {
            var (only, count) = (-1, 0);
            for (var arc = entering.Start(vertex); arc < entering.Start(vertex + 1) && vertex != tree.Root; arc++)
            {
                if (!tree.Dominates(vertex, entering.Ends[arc]))
                {
                    (only, count) = (arc, count + 1);
                }
            }

            if (count == 1)
            {
                yield return (vertex, only);
            }
        }
    }

    private int ArcWith(int vertex, int label)
    {
        var arc = Out.Start(vertex);
        while (Out.Labels[arc] != label)
        {
            arc++;
        }

        return arc;
    }

    private bool HoldsWithoutFirst() => _shapes.Length < 3 || (ReachesAllWithoutFirst(Out) && ReachesAllWithoutFirst(In));

    private static bool ReachesAllWithoutFirst(ArcTable arcs)
    {
        var (seen, queue, found) = (new bool[arcs.VertexCount], new int[arcs.VertexCount], 1);
        seen[0] = seen[1] = true;
        queue[0] = 1;
        for (var i = 0; i < found; i++)
        {
            foreach (var end in arcs.EndsAt(queue[i]))
            {
                if (!seen[end])
                {
                    seen[end] = true;
                    queue[found++] = end;
                }
            }
        }

        return found == arcs.VertexCount - 1;
    }
}
