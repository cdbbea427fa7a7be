namespace Fusecraft.Groupoids;

/// <summary>
/// Bridges and cut vertices of a connected undirected graph, each edge given as two arcs, by one depth-first search: an edge down to a child is a bridge when no other edge leads from below the child to above
/// it, a vertex is cut when from below some child none leads to above the vertex.
/// </summary>
/// <remarks>Source: J. Hopcroft, R. Tarjan, <em>Efficient algorithms for graph manipulation</em>, Comm. ACM 16 (1973) (not opened, method from memory). Parallel edges count as several.</remarks>
internal static class LowPoints
{
    /// <summary>The vertices whose removal leaves the others disconnected, ascending, and the bridges as arcs away from vertex 0.</summary>
    public static (List<int> CutVertices, List<(int From, int Arc)> Bridges) Find(ArcTable arcs, CancellationToken cancellation)
    {
        var count = arcs.VertexCount;
        var (order, low, next, parentArc, parent) = (new int[count], new int[count], new int[count], new int[count], new int[count]);
        var (isCut, usedParent) = (new bool[count], new bool[count]);
        var bridges = new List<(int From, int Arc)>();
        var (visited, rootChildren) = (1, 0);
        order[0] = low[0] = 1;
        next[0] = arcs.Start(0);
        parent[0] = -1;
        for (var vertex = 0; vertex >= 0;)
        {
            if (next[vertex] < arcs.Start(vertex + 1))
            {
                var arc = next[vertex]++;
                var end = arcs.Ends[arc];
                if (order[end] == 0)
                {
                    order[end] = low[end] = ++visited;
                    next[end] = arcs.Start(end);
                    (parent[end], parentArc[end]) = (vertex, arc);
                    rootChildren += vertex == 0 ? 1 : 0;
                    vertex = end;
                }
                else if (end == parent[vertex] && !usedParent[vertex])
                {
                    // The edge by which the vertex was found, seen from below; a second one counts.
                    usedParent[vertex] = true;
                }
                else
                {
                    low[vertex] = Math.Min(low[vertex], order[end]);
                }

                continue;
            }

            cancellation.ThrowIfCancellationRequested();
            var above = parent[vertex];
            if (above >= 0)
            {
                low[above] = Math.Min(low[above], low[vertex]);
                isCut[above] |= above > 0 && low[vertex] >= order[above];
                if (low[vertex] > order[above])
                {
                    bridges.Add((above, parentArc[vertex]));
                }
            }

            vertex = above;
        }

        isCut[0] = rootChildren > 1;
        var cutVertices = new List<int>();
        for (var vertex = 0; vertex < count; vertex++)
        {
            if (isCut[vertex])
            {
                cutVertices.Add(vertex);
            }
        }

        return (cutVertices, bridges);
    }
}
