using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>Distances by a search back from the goal over all that it tells apart, cost by cost, as far as they are asked for.</summary>
internal sealed class SearchedDistances : IGoalDistances
{
    private readonly GoalView _view;
    private readonly int _maxStates;
    private readonly CancellationToken _cancellation;
    private readonly int[][] _classes;
    private readonly int[] _weights;
    private readonly ShapeStore _nodes;
    private readonly List<int> _costs = [];
    private readonly List<List<int>> _waiting = [];
    private readonly bool _isAble;
    private int _level;
    private bool _isOver;

    public SearchedDistances(Shape from, LevelOptions options, CancellationToken cancellation)
    {
        var mechanism = from.Mechanism;
        Metric = options.Metric;
        _view = new GoalView(mechanism);
        _maxStates = options.MaxStates;
        _cancellation = cancellation;
        (_classes, _weights) = MetricMoves.Classes(mechanism, Metric);
        _nodes = new ShapeStore(_view.Words);
        var goals = _view.Goals(from, options.MaxShapes, cancellation);
        _isAble = goals is not null;
        foreach (var goal in goals ?? [])
        {
            Offer(goal, 0);
        }
    }

    public Metric Metric { get; }

    public int? DistanceOf(State state)
    {
        if (!_isAble)
        {
            return null;
        }

        var node = _view.Node(state);
        while (true)
        {
            // What comes later costs more than the level to be gone through next.
            var index = _nodes.Find<ManyWords>(node);
            if (index >= 0 && _costs[index] <= _level)
            {
                return _costs[index];
            }

            if (_level >= _waiting.Count)
            {
                return -1;
            }

            if (!TryGrow())
            {
                return null;
            }
        }
    }

    private bool TryGrow()
    {
        if (_isOver)
        {
            return false;
        }

        var node = new ulong[_view.Words];
        foreach (var index in _waiting[_level])
        {
            _cancellation.ThrowIfCancellationRequested();
            if (_costs[index] < _level)
            {
                continue;
            }

            for (var c = 0; c < _classes.Length; c++)
            {
                _nodes.Key(index).CopyTo(node);
                Extend(node, _classes[c], _level + _weights[c]);
            }

            if (_nodes.Count > _maxStates)
            {
                _isOver = true;
                return false;
            }
        }

        _level++;
        return true;
    }

    // One step back, or where runs are counted all that a run can bring.
    private void Extend(ulong[] node, int[] steps, int cost)
    {
        var before = new ulong[node.Length];
        if (Metric.Kind != MetricKind.Run)
        {
            if (_view.TryBack(steps[0], node, before))
            {
                Offer(before, cost);
            }

            return;
        }

        var run = new List<ulong[]> { (ulong[])node.Clone() };
        for (var i = 0; i < run.Count; i++)
        {
            foreach (var step in steps)
            {
                if (_view.TryBack(step, run[i], before) && !run.Exists(known => known.AsSpan().SequenceEqual(before)))
                {
                    run.Add((ulong[])before.Clone());
                    Offer(before, cost);
                }
            }
        }
    }

    private void Offer(ulong[] node, int cost)
    {
        var count = _nodes.Count;
        var index = _nodes.FindOrAdd<ManyWords>(node);
        if (index == count)
        {
            _costs.Add(cost);
        }
        else if (cost < _costs[index])
        {
            _costs[index] = cost;
        }
        else
        {
            return;
        }

        while (_waiting.Count <= cost)
        {
            _waiting.Add([]);
        }

        _waiting[cost].Add(index);
    }
}
