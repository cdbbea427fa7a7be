namespace Fusecraft.Groupoids;

/// <summary>A breadth-first spanning tree of the arcs of a region.</summary>
internal sealed class LoopTree
{
    private readonly int[] _distances;
    private readonly int[] _parents;
    private readonly ushort[] _labels;

    public LoopTree(int root, ArcTable arcs)
    {
        var count = arcs.VertexCount;
        Order = new int[count];
        _distances = new int[count];
        _parents = new int[count];
        _labels = new ushort[count];
        Depth = arcs.Search(root, _distances, Order, out _);
        Array.Fill(_parents, -1);
        foreach (var vertex in Order)
        {
            for (var arc = arcs.Start(vertex); arc < arcs.Start(vertex + 1); arc++)
            {
                var end = arcs.Ends[arc];
                if (_parents[end] < 0 && _distances[end] == _distances[vertex] + 1)
                {
                    _parents[end] = vertex;
                    _labels[end] = arcs.Labels[arc];
                }
            }
        }
    }

    /// <summary>All vertices, nearest first.</summary>
    public int[] Order { get; }

    /// <summary>The largest distance from the root.</summary>
    public int Depth { get; }

    public int Distance(int vertex) => _distances[vertex];

    /// <summary>The vertex before this one; -1 for the root.</summary>
    public int Parent(int vertex) => _parents[vertex];

    /// <summary>The label of the arc by which the vertex is found from its parent.</summary>
    public ushort Label(int vertex) => _labels[vertex];
}
