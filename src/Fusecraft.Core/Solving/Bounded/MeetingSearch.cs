using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>Breadth-first search from both ends over all states, by steps or by runs, without tables: level by level, the smaller side first, so that the first meeting is a shortest word.</summary>
internal sealed class MeetingSearch
{
    private readonly Mechanism _mechanism;
    private readonly StateNeighbours _neighbours;
    private readonly CancellationToken _cancellation;
    private readonly Side _forward;
    private readonly Side _backward;

    public MeetingSearch(Mechanism mechanism, Metric metric, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        _cancellation = cancellation;
        _neighbours = new StateNeighbours(mechanism, metric);
        _forward = new Side(_neighbours.Words);
        _backward = new Side(_neighbours.Words);
    }

    public int StateCount => _forward.Store.Count + _backward.Store.Count;

    /// <summary>Proven: no word is shorter.</summary>
    public int LowerBound { get; private set; }

    /// <summary>Searches words from a shape with labels to a goal shape with none displaced.</summary>
    public (BoundedOutcome Outcome, List<Step>? Word) Run(Shape from, Permutation labels, Shape goal, long most, int maxStates)
    {
        var key = new ulong[_neighbours.Words];
        if (!_neighbours.Keys.TryPack(from.Key, labels, key))
        {
            return (BoundedOutcome.NoneAtAll, null);
        }

        _forward.Add(key, -1, -1);
        _neighbours.Keys.TryPack(goal.Key, Permutation.Identity, key);
        if (_forward.Store.Find(key) >= 0)
        {
            return (BoundedOutcome.Found, []);
        }

        _backward.Add(key, -1, -1);
        for (LowerBound = 1; LowerBound <= most; LowerBound++)
        {
            if (_forward.IsExhausted || _backward.IsExhausted)
            {
                return (BoundedOutcome.NoneAtAll, null);
            }

            var side = _forward.LevelSize <= _backward.LevelSize ? _forward : _backward;
            if (Expand(side, maxStates) is { } end)
            {
                return end;
            }
        }

        return (_forward.IsExhausted || _backward.IsExhausted ? BoundedOutcome.NoneAtAll : BoundedOutcome.NoneWithinBound, null);
    }

    private (BoundedOutcome, List<Step>?)? Expand(Side side, int maxStates)
    {
        var isForward = ReferenceEquals(side, _forward);
        var other = isForward ? _backward : _forward;
        var end = side.Store.Count;
        for (; side.Next < end; side.Next++)
        {
            if (side.Next % 1024 == 0)
            {
                _cancellation.ThrowIfCancellationRequested();
            }

            if (StateCount >= maxStates)
            {
                return (BoundedOutcome.BudgetEnded, null);
            }

            for (var group = 0; group < _neighbours.GroupCount; group++)
            {
                var found = _neighbours.Find(side.Store.Key(side.Next), group, isForward);
                for (var i = 1; i < found; i++)
                {
                    var next = _neighbours[i];
                    var count = side.Store.Count;
                    if (side.Add(next, side.Next, group) < count)
                    {
                        continue;
                    }

                    var meeting = other.Store.Find(next);
                    if (meeting >= 0)
                    {
                        return (BoundedOutcome.Found, isForward ? Join(count, meeting) : Join(meeting, count));
                    }
                }
            }
        }

        return null;
    }

    private List<Step> Join(int forward, int backward)
    {
        var parts = new List<List<Step>>();
        for (; _forward.Parents[forward].Node >= 0; forward = _forward.Parents[forward].Node)
        {
            var (parent, group) = _forward.Parents[forward];
            parts.Add(_neighbours.Steps(_forward.Store.Key(parent), _forward.Store.Key(forward), group, _mechanism));
        }

        parts.Reverse();
        for (; _backward.Parents[backward].Node >= 0; backward = _backward.Parents[backward].Node)
        {
            var (parent, group) = _backward.Parents[backward];
            parts.Add(_neighbours.Steps(_backward.Store.Key(backward), _backward.Store.Key(parent), group, _mechanism));
        }

        return [.. parts.SelectMany(part => part)];
    }

    private sealed class Side(int words)
    {
        public ShapeStore Store { get; } = new(words);

        public List<(int Node, int Group)> Parents { get; } = [];

        public int Next { get; set; }

        public int LevelSize => Store.Count - Next;

        public bool IsExhausted => Next == Store.Count;

        public int Add(ReadOnlySpan<ulong> key, int parent, int group)
        {
            var count = Store.Count;
            var number = Store.FindOrAdd<ManyWords>(key);
            if (number == count)
            {
                Parents.Add((parent, group));
            }

            return number;
        }
    }
}
