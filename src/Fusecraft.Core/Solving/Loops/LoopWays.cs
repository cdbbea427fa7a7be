using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// The ways out from a shape, or the ways back to it, by their cost in a metric: for each permutation of the labels a cheapest one. Cost by cost, each level whole. A way out is held as its permutation, a way back as
/// the inverse of its own, so that a way out and a way back that fit are equal where the loop of the two moves nothing.
/// </summary>
/// <remarks>With runs as moves a link is a whole run: all states that steps of one class reach from another cost one more.</remarks>
internal sealed class LoopWays<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly Mechanism _mechanism;
    private readonly ShapeStore _shapes;
    private readonly bool _isBack;
    private readonly Step[][] _classes;
    private readonly int[] _weights;
    private readonly bool _isRun;
    private readonly PackedPermutations<T> _stepRows;
    private readonly PermutationIndex<T> _rows;
    private readonly List<Way> _ways = [];
    private readonly List<List<int>> _levels = [];
    private readonly List<List<int>> _waiting = [];
    private readonly T[] _next;
    private readonly ulong[] _key;
    private readonly Dictionary<(int Shape, int Step), int> _targets = [];

    /// <param name="shape">Where the ways start or end.</param>
    /// <param name="metric">What a step costs.</param>
    /// <param name="shapes">Numbers the shapes, for the ways out and back together.</param>
    /// <param name="isBack">True for the ways back.</param>
    public LoopWays(Shape shape, Metric metric, ShapeStore shapes, bool isBack)
    {
        _mechanism = shape.Mechanism;
        _shapes = shapes;
        _isBack = isBack;
        _isRun = metric.Kind == MetricKind.Run;
        var runs = Metric.RunClasses(_mechanism);
        _classes = _isRun ? [.. _mechanism.Steps.GroupBy(step => runs[step.Index]).Select(steps => steps.ToArray())] : [.. _mechanism.Steps.Select(step => (Step[])[step])];
        _weights = [.. _classes.Select(steps => _isRun ? 1 : metric.WeightOf(steps[0]))];
        GreatestWeight = Math.Max(1, _weights.DefaultIfEmpty(1).Max());
        var stride = Lanes.PaddedLength(_mechanism.SiteCount);
        _stepRows = new PackedPermutations<T>(stride, Math.Max(1, _mechanism.Steps.Length));
        foreach (var step in _mechanism.Steps)
        {
            (isBack ? step.Permutation.Inverse() : step.Permutation).CopyLanes(_stepRows.AddRow());
        }

        _rows = new PermutationIndex<T>(stride);
        _next = new T[stride];
        _key = new ulong[_mechanism.Board.Words];
        Lanes.Identity<T>(_next);
        Offer(shapes.FindOrAdd<ManyWords>(shape.Key), -1, [], 0);
    }

    public int Count => _ways.Count;

    /// <summary>No step costs more; at least 1.</summary>
    public int GreatestWeight { get; }

    /// <summary>So many levels are complete: those of cost 0 … LevelCount - 1.</summary>
    public int LevelCount => _levels.Count;

    /// <summary>True when nothing is left beyond the levels.</summary>
    public bool IsExhausted => LevelCount > 0 && _levels[^1].Count == 0 && _waiting.Skip(LevelCount).All(level => level.TrueForAll(way => _ways[way].IsDone));

    /// <summary>The ways of a cost; none for one beyond all levels.</summary>
    public List<int> Level(int cost) => cost < LevelCount ? _levels[cost] : [];

    public ReadOnlySpan<T> this[int way] => _rows[way];

    /// <summary>The number of the shape where a way out ends, or a way back starts.</summary>
    public int Shape(int way) => _ways[way].Shape;

    /// <summary>Completes the next level; false when there would be more ways than allowed, and then it is not complete.</summary>
    public bool TryGrow(int maxWays, CancellationToken cancellation)
    {
        var cost = LevelCount;
        foreach (var way in cost > 0 ? _levels[cost - 1] : [])
        {
            cancellation.ThrowIfCancellationRequested();
            Extend(way, cost - 1, isFree: false);
            if (Count > maxWays)
            {
                return false;
            }
        }

        // Steps of weight 0 add to the level while it is gone through.
        var level = new List<int>();
        for (var i = 0; cost < _waiting.Count && i < _waiting[cost].Count; i++)
        {
            var way = _waiting[cost][i];
            if (_ways[way].IsDone)
            {
                continue;
            }

            _ways[way] = _ways[way] with { IsDone = true };
            level.Add(way);
            Extend(way, cost, isFree: true);
            if (Count > maxWays)
            {
                return false;
            }
        }

        _levels.Add(level);
        return true;
    }

    /// <summary>The steps of a way in the order in which they are done.</summary>
    public List<Step> Steps(int way)
    {
        var steps = new List<Step>();
        for (; _ways[way].Parent >= 0; way = _ways[way].Parent)
        {
            steps.AddRange(_ways[way].Link.Reverse());
        }

        if (!_isBack)
        {
            steps.Reverse();
        }

        return steps;
    }

    private void Extend(int way, int cost, bool isFree)
    {
        for (var c = 0; c < _classes.Length; c++)
        {
            if (_weights[c] == 0 == isFree)
            {
                Extend(way, _classes[c], cost + _weights[c]);
            }
        }
    }

    // One step, or all that a run can do.
    private void Extend(int way, Step[] steps, int cost)
    {
        if (!_isRun)
        {
            if (Target(_ways[way].Shape, steps[0]) is >= 0 and var shape)
            {
                Lanes.ComposePadded<T>(_rows[way], _stepRows[steps[0].Index], _next);
                Offer(shape, way, steps, cost);
            }

            return;
        }

        var run = new List<(int Shape, T[] Row, Step[] Link)> { (_ways[way].Shape, _rows[way].ToArray(), []) };
        for (var i = 0; i < run.Count; i++)
        {
            foreach (var step in steps)
            {
                if (Target(run[i].Shape, step) is not (>= 0 and var shape))
                {
                    continue;
                }

                Lanes.ComposePadded<T>(run[i].Row, _stepRows[step.Index], _next);
                if (!run.Exists(done => done.Row.AsSpan().SequenceEqual(_next)))
                {
                    Step[] link = [.. run[i].Link, step];
                    run.Add((shape, (T[])_next.Clone(), link));
                    Offer(shape, way, link, cost);
                }
            }
        }
    }

    // Takes _next as a way, unless one at most as dear is known.
    private void Offer(int shape, int parent, Step[] link, int cost)
    {
        if (_rows.TryAdd(_next, out var way))
        {
            _ways.Add(new Way(shape, parent, link, cost, false));
            Wait(way, cost);
        }
        else if (_ways[way] is { IsDone: false } known && known.Cost > cost)
        {
            _ways[way] = new Way(shape, parent, link, cost, false);
            Wait(way, cost);
        }
    }

    private void Wait(int way, int cost)
    {
        while (_waiting.Count <= cost)
        {
            _waiting.Add([]);
        }

        _waiting[cost].Add(way);
    }

    // Where a step leads from a shape, or from where it leads there; -1 where it is barred.
    private int Target(int shape, Step step)
    {
        if (_targets.TryGetValue((shape, step.Index), out var target))
        {
            return target;
        }

        var moves = _mechanism.Board.Moves[step.Index];
        if (_isBack)
        {
            moves.MoveBack(_shapes.Key(shape), _key);
            target = moves.IsFree(_key) ? _shapes.FindOrAdd<ManyWords>(_key) : -1;
        }
        else if (moves.IsFree(_shapes.Key(shape)))
        {
            moves.Move(_shapes.Key(shape), _key);
            target = _shapes.FindOrAdd<ManyWords>(_key);
        }
        else
        {
            target = -1;
        }

        _targets.Add((shape, step.Index), target);
        return target;
    }

    private readonly record struct Way(int Shape, int Parent, Step[] Link, int Cost, bool IsDone);
}
