using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>States with every label told apart as packed keys, and what one move of a metric makes of one. Not safe to share.</summary>
internal sealed class StateNeighbours
{
    private readonly int[][] _groups;
    private readonly int[] _costs;
    private readonly bool[] _isRun;
    private readonly List<(int Parent, int Step)> _origins = [];
    private ulong[] _found;
    private int _count;

    public StateNeighbours(Mechanism mechanism, Metric metric)
    {
        var moves = new PruningMoves(mechanism, metric);
        Keys = new ColouredKeys(mechanism, [.. Enumerable.Range(0, mechanism.SiteCount)]);
        (_groups, _costs, _isRun) = MoveCatalogue.Groups(mechanism, metric, moves);
        Unit = moves.Unit;
        _found = new ulong[Keys.Words * 16];
    }

    public ColouredKeys Keys { get; }

    public int Words => Keys.Words;

    /// <summary>What costs are counted in.</summary>
    public int Unit { get; }

    /// <summary>The groups of steps that are counted together.</summary>
    public int GroupCount => _groups.Length;

    /// <summary>A state found by the last call; number 0 is the one it started from.</summary>
    public ReadOnlySpan<ulong> this[int found] => _found.AsSpan(found * Words, Words);

    public int CostOf(int group) => _costs[group];

    /// <summary>Finds the states one move of a group after a state, or before it; returns how many, itself included. Runs find all that they can lead to.</summary>
    public int Find(ReadOnlySpan<ulong> key, int group, bool isForward)
    {
        key.CopyTo(_found);
        _count = 1;
        _origins.Clear();
        _origins.Add((-1, -1));
        for (var i = 0; i < (_isRun[group] ? _count : 1); i++)
        {
            foreach (var step in _groups[group])
            {
                if ((_count + 1) * Words > _found.Length)
                {
                    Array.Resize(ref _found, 2 * _found.Length);
                }

                var next = _found.AsSpan(_count * Words, Words);
                if ((isForward ? Keys.TryMove<ManyWords>(step, this[i], next) : Keys.TryMoveBack<ManyWords>(step, this[i], next)) && !IsThere(next))
                {
                    _count++;
                    _origins.Add((i, step));
                }
            }
        }

        return _count;
    }

    /// <summary>The fewest steps of a group that lead from one state to another.</summary>
    public List<Step> Steps(ReadOnlySpan<ulong> from, ReadOnlySpan<ulong> to, int group, Mechanism mechanism)
    {
        var at = Find(from, group, isForward: true) - 1;
        while (!this[at].SequenceEqual(to))
        {
            at--;
        }

        var steps = new List<Step>();
        for (; at > 0; at = _origins[at].Parent)
        {
            steps.Add(mechanism.Steps[_origins[at].Step]);
        }

        steps.Reverse();
        return steps;
    }

    private bool IsThere(ReadOnlySpan<ulong> key)
    {
        for (var i = _count - 1; i >= 0; i--)
        {
            if (this[i].SequenceEqual(key))
            {
                return true;
            }
        }

        return false;
    }
}
