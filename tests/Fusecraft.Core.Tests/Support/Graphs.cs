namespace Fusecraft.Tests.Support;

/// <summary>Graphs on the vertices 1 … n, as lists of edges.</summary>
internal static class Graphs
{
    public static (int Vertices, List<(int A, int B)> Edges) Cycle(int n) => (n, [.. Enumerable.Range(1, n).Select(i => (i, (i % n) + 1))]);

    public static (int Vertices, List<(int A, int B)> Edges) Path(int n) => (n, [.. Enumerable.Range(1, n - 1).Select(i => (i, i + 1))]);

    /// <summary>Vertices 1 and 2 joined by three paths with so many inner vertices.</summary>
    public static (int Vertices, List<(int A, int B)> Edges) Theta(params int[] inner)
    {
        var edges = new List<(int, int)>();
        var next = 3;
        foreach (var count in inner)
        {
            var at = 1;
            for (var i = 0; i < count; i++)
            {
                edges.Add((at, next));
                at = next++;
            }

            edges.Add((at, 2));
        }

        return (next - 1, edges);
    }

    public static (int Vertices, List<(int A, int B)> Edges) Complete(int n) =>
        (n, [.. from a in Enumerable.Range(1, n) from b in Enumerable.Range(a + 1, n - a) select (a, b)]);

    public static (int Vertices, List<(int A, int B)> Edges) CompleteBipartite(int m, int n) =>
        (m + n, [.. from a in Enumerable.Range(1, m) from b in Enumerable.Range(m + 1, n) select (a, b)]);

    /// <summary>The grid of unit cells of a box, numbered with the first coordinate fastest.</summary>
    public static (int Vertices, List<(int A, int B)> Edges) Grid(int width, int height, int depth)
    {
        var edges = new List<(int, int)>();
        for (var z = 0; z < depth; z++)
        {
            for (var y = 0; y < height; y++)
            {
                for (var x = 0; x < width; x++)
                {
                    var cell = x + (width * (y + (height * z))) + 1;
                    if (x + 1 < width)
                    {
                        edges.Add((cell, cell + 1));
                    }

                    if (y + 1 < height)
                    {
                        edges.Add((cell, cell + width));
                    }

                    if (z + 1 < depth)
                    {
                        edges.Add((cell, cell + (width * height)));
                    }
                }
            }
        }

        return (width * height * depth, edges);
    }

    public static (int Vertices, List<(int A, int B)> Edges) Petersen()
    {
        var edges = new List<(int, int)>();
        for (var i = 0; i < 5; i++)
        {
            edges.Add((i + 1, ((i + 1) % 5) + 1));
            edges.Add((i + 1, i + 6));
            edges.Add((i + 6, ((i + 2) % 5) + 6));
        }

        return (10, edges);
    }

    /// <summary>A hub, the last vertex, joined to every vertex of a cycle.</summary>
    public static (int Vertices, List<(int A, int B)> Edges) Wheel(int spokes)
    {
        var (n, edges) = Cycle(spokes);
        edges.AddRange(Enumerable.Range(1, n).Select(i => (i, n + 1)));
        return (n + 1, edges);
    }

    public static (int Vertices, List<(int A, int B)> Edges) With(this (int Vertices, List<(int A, int B)> Edges) graph, params (int A, int B)[] more) =>
        (Math.Max(graph.Vertices, more.Max(edge => Math.Max(edge.A, edge.B))), [.. graph.Edges, .. more]);

    public static bool IsBipartite((int Vertices, List<(int A, int B)> Edges) graph)
    {
        var side = new int[graph.Vertices + 1];
        side[1] = 1;
        for (var round = 0; round < graph.Vertices; round++)
        {
            foreach (var (a, b) in graph.Edges)
            {
                side[a] = side[a] == 0 ? -side[b] : side[a];
                side[b] = side[b] == 0 ? -side[a] : side[b];
            }
        }

        return graph.Edges.TrueForAll(edge => side[edge.A] != side[edge.B]);
    }
}
