using System.Diagnostics;

namespace Fusecraft.Groupoids;

/// <summary>
/// The arcs of a directed graph on the vertices 0 … n-1, written out vertex by vertex. Each arc has a label: the number of the permutation it stands for. Of one vertex no two arcs have the same label.
/// </summary>
internal sealed class ArcTable
{
    private readonly int[] _starts;

    private ArcTable(int[] starts, int[] ends, ushort[] labels)
    {
        _starts = starts;
        Ends = ends;
        Labels = labels;
    }

    public int VertexCount => _starts.Length - 1;

    public int ArcCount => _starts[^1];

    /// <summary>The other end of each arc.</summary>
    public int[] Ends { get; }

    public ushort[] Labels { get; }

    /// <summary>The number of a vertex's first arc; its last one stands before the first of the next vertex.</summary>
    public int Start(int vertex) => _starts[vertex];

    public ReadOnlySpan<int> EndsAt(int vertex) => Ends.AsSpan(_starts[vertex], _starts[vertex + 1] - _starts[vertex]);

    /// <summary>The same arcs, seen from their ends, with the same labels.</summary>
    public ArcTable Reversed()
    {
        var starts = new int[_starts.Length];
        for (var arc = 0; arc < ArcCount; arc++)
        {
            starts[Ends[arc] + 1]++;
        }

        for (var vertex = 0; vertex < VertexCount; vertex++)
        {
            starts[vertex + 1] += starts[vertex];
        }

        var next = starts.AsSpan(0, VertexCount).ToArray();
        var (ends, labels) = (new int[ArcCount], new ushort[ArcCount]);
        for (var vertex = 0; vertex < VertexCount; vertex++)
        {
            for (var arc = _starts[vertex]; arc < _starts[vertex + 1]; arc++)
            {
                var place = next[Ends[arc]]++;
                ends[place] = vertex;
                labels[place] = Labels[arc];
            }
        }

        return new ArcTable(starts, ends, labels);
    }

    /// <summary>Breadth-first search: writes the distance of each vertex from a root, -1 where there is no path, and gives the largest.</summary>
    /// <param name="root">Where the search starts.</param>
    /// <param name="distances">One for each vertex; written anew.</param>
    /// <param name="queue">Room for all vertices; holds those found, nearest first.</param>
    /// <param name="found">How many were found, the root included.</param>
    public int Search(int root, Span<int> distances, Span<int> queue, out int found)
    {
        distances.Fill(-1);
        distances[root] = 0;
        queue[0] = root;
        found = 1;
        for (var i = 0; i < found; i++)
        {
            var next = distances[queue[i]] + 1;
            foreach (var end in EndsAt(queue[i]))
            {
                if (distances[end] < 0)
                {
                    distances[end] = next;
                    queue[found++] = end;
                }
            }
        }

        return distances[queue[found - 1]];
    }

    /// <summary>Takes the arcs in the order of their vertices.</summary>
    internal sealed class Builder
    {
        private readonly int[] _starts;
        private int[] _ends;
        private ushort[] _labels;
        private int _vertices;
        private int _arcs;

        public Builder(int vertices, long arcsExpected)
        {
            _starts = new int[vertices + 1];
            _ends = new int[Math.Min(arcsExpected, Array.MaxLength)];
            _labels = new ushort[_ends.Length];
        }

        public void Add(int end, int label)
        {
            if (_arcs == _ends.Length)
            {
                if (_arcs == Array.MaxLength)
                {
                    throw new InvalidOperationException($"The region has more than {Array.MaxLength} arrows, too many to be written out.");
                }

                var larger = (int)Math.Min(Array.MaxLength, 16 + (_arcs * 3L / 2));
                Array.Resize(ref _ends, larger);
                Array.Resize(ref _labels, larger);
            }

            _ends[_arcs] = end;
            _labels[_arcs++] = (ushort)label;
        }

        public void EndVertex() => _starts[++_vertices] = _arcs;

        public ArcTable Build()
        {
            Debug.Assert(_vertices == _starts.Length - 1, "Every vertex has been ended.");
            Array.Resize(ref _ends, _arcs);
            Array.Resize(ref _labels, _arcs);
            return new ArcTable(_starts, _ends, _labels);
        }
    }
}
