using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// States found breadth-first from the base shape, each once: the permutation of the labels, the shape, and how it was come by. With the arcs reversed and their permutations inverted these are the inverses of the
/// paths back to the base.
/// </summary>
internal sealed class LoopStates<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly ArcTable _arcs;
    private readonly PackedPermutations<T> _labels;
    private readonly PermutationIndex<T> _rows;
    private readonly List<(int Vertex, int Parent, ushort Label)> _states = [];
    private readonly List<int> _levels = [0];
    private readonly T[] _next;

    /// <param name="root">The vertex of the base shape.</param>
    /// <param name="arcs">The arcs to follow.</param>
    /// <param name="labels">The permutation that following an arc with a label brings.</param>
    public LoopStates(int root, ArcTable arcs, PackedPermutations<T> labels)
    {
        _arcs = arcs;
        _labels = labels;
        _rows = new PermutationIndex<T>(labels.Stride);
        _next = new T[labels.Stride];
        Lanes.Identity<T>(_next);
        TryAdd(root, -1, 0);
    }

    public int Count => _states.Count;

    /// <summary>True when the last level brought nothing: all states are known.</summary>
    public bool IsExhausted { get; private set; }

    public int LastLevel => _levels[^1];

    public ReadOnlySpan<T> this[int state] => _rows[state];

    public int Vertex(int state) => _states[state].Vertex;

    /// <summary>Finds the states one step farther out; false when there would be more than the budget allows, and then some are missing.</summary>
    public bool TryGrow(int maxStates, CancellationToken cancellation)
    {
        var (first, end) = (_levels[^1], Count);
        for (var state = first; state < end; state++)
        {
            cancellation.ThrowIfCancellationRequested();
            var vertex = Vertex(state);
            for (var arc = _arcs.Start(vertex); arc < _arcs.Start(vertex + 1); arc++)
            {
                Lanes.ComposePadded<T>(_rows[state], _labels[_arcs.Labels[arc]], _next);
                if (TryAdd(_arcs.Ends[arc], state, _arcs.Labels[arc]) && Count > maxStates)
                {
                    return false;
                }
            }
        }

        _levels.Add(end);
        IsExhausted = end == Count;
        return true;
    }

    /// <summary>The labels of the arcs from the root to a state, each with the vertex before it.</summary>
    public List<(int Vertex, ushort Label, int End)> PathTo(int state)
    {
        var path = new List<(int, ushort, int)>();
        for (; _states[state].Parent >= 0; state = _states[state].Parent)
        {
            path.Add((_states[_states[state].Parent].Vertex, _states[state].Label, _states[state].Vertex));
        }

        path.Reverse();
        return path;
    }

    // The permutation tells the shape, so it alone tells states apart.
    private bool TryAdd(int vertex, int parent, ushort label)
    {
        if (!_rows.TryAdd(_next, out _))
        {
            return false;
        }

        _states.Add((vertex, parent, label));
        return true;
    }
}
