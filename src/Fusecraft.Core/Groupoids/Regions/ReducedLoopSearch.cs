using System.Diagnostics;

namespace Fusecraft.Groupoids;

/// <summary>
/// The shortest closed walks that never undo an arc at once, by searches forwards from the vertex and backwards to it that take turns until they meet.
/// </summary>
/// <remarks>
/// A walk that has come to a vertex may go on along every arc but the one that undoes its last. So two shortest walks with different last arcs stand for all: what the one may not do, the other may. Hence each
/// vertex is seen at most twice in either sense. Not safe to share between threads.
/// </remarks>
internal sealed class ReducedLoopSearch
{
    private const int None = -1;
    private readonly int[] _inverseLabel;
    private readonly Side _ahead;
    private readonly Side _behind;
    private int _best;

    /// <param name="forward">The arcs by their sources.</param>
    /// <param name="backward">The arcs by their targets; the same table where each arc has its undoing.</param>
    /// <param name="inverseLabel">For each label the label of an arc that undoes it, or -1.</param>
    public ReducedLoopSearch(ArcTable forward, ArcTable backward, int[] inverseLabel)
    {
        _inverseLabel = inverseLabel;
        _ahead = new Side(forward, null);

        // In one table an arc that enters is the undoing of one that leaves.
        _behind = new Side(backward, ReferenceEquals(forward, backward) ? inverseLabel : null);
    }

    /// <summary>The number of arcs of a shortest reduced loop at a vertex; -1 where there is none.</summary>
    public int LengthAt(int vertex)
    {
        _best = int.MaxValue;
        _ahead.Begin(vertex);
        _behind.Begin(vertex);

        // All loops as long as both depths together have been seen; all loops at all, once one side has come to its end.
        while (_best > _ahead.Depth + _behind.Depth && Grow(_ahead, _behind) && _best > _ahead.Depth + _behind.Depth && Grow(_behind, _ahead))
        {
        }

        _ahead.End();
        _behind.End();
        return _best == int.MaxValue ? -1 : _best;
    }

    // One level more; false where nothing was left to go on from.
    private bool Grow(Side side, Side other)
    {
        var (level, levelEnd) = side.NextLevel();
        for (var i = level; i < levelEnd; i++)
        {
            // The first walk goes on along all arcs but one, the second along that one. The walk of no arcs at the start may go on along all.
            var (vertex, isSecond) = side.Walks[i];
            var label = side.First(vertex).Label;
            var barred = label == None ? None : _inverseLabel[label];
            for (var arc = side.Arcs.Start(vertex); arc < side.Arcs.Start(vertex + 1); arc++)
            {
                var next = side.LabelOf(arc);
                if ((next == barred) == isSecond && side.Arrive(side.Arcs.Ends[arc], next))
                {
                    Join(side, next, other.First(side.Arcs.Ends[arc]));
                    Join(side, next, other.Second(side.Arcs.Ends[arc]));
                }
            }
        }

        return level < levelEnd;
    }

    private void Join(Side side, int label, (int Length, int Label) rest)
    {
        if (rest.Length >= 0 && (rest.Label == None || rest.Label != _inverseLabel[label]))
        {
            _best = Math.Min(_best, side.Depth + rest.Length);
        }
    }

    /// <summary>One of the two searches: for each vertex the lengths of its two walks, and the labels of their last arcs (backwards: of their first).</summary>
    private sealed class Side
    {
        private readonly int[]? _relabel;
        private readonly (int Length, int Label)[] _first;
        private readonly (int Length, int Label)[] _second;
        private int _levelStart;

        public Side(ArcTable arcs, int[]? relabel)
        {
            Arcs = arcs;
            _relabel = relabel;
            _first = new (int, int)[arcs.VertexCount];
            _second = new (int, int)[arcs.VertexCount];
            Array.Fill(_first, (-1, None));
            Array.Fill(_second, (-1, None));
        }

        public ArcTable Arcs { get; }

        /// <summary>The walks found, shortest first, by the vertices they have come to.</summary>
        public List<(int Vertex, bool IsSecond)> Walks { get; } = [];

        public int Depth { get; private set; }

        public (int Length, int Label) First(int vertex) => _first[vertex];

        public (int Length, int Label) Second(int vertex) => _second[vertex];

        public int LabelOf(int arc) => _relabel is null ? Arcs.Labels[arc] : _relabel[Arcs.Labels[arc]];

        public void Begin(int root)
        {
            _first[root] = (0, None);
            Walks.Add((root, false));
            (Depth, _levelStart) = (0, 0);
        }

        public (int Start, int End) NextLevel()
        {
            Depth++;
            var level = (_levelStart, Walks.Count);
            _levelStart = Walks.Count;
            return level;
        }

        /// <summary>Takes a walk of as many arcs as the depth; false where the vertex has its two walks.</summary>
        public bool Arrive(int vertex, int label)
        {
            var isSecond = _first[vertex].Length >= 0;
            if (isSecond && _second[vertex].Length >= 0)
            {
                return false;
            }

            Debug.Assert(!isSecond || _first[vertex].Label != label, "An arc is walked once.");
            (isSecond ? _second : _first)[vertex] = (Depth, label);
            Walks.Add((vertex, isSecond));
            return true;
        }

        public void End()
        {
            foreach (var (vertex, _) in Walks)
            {
                _first[vertex] = _second[vertex] = (-1, None);
            }

            Walks.Clear();
        }
    }
}
