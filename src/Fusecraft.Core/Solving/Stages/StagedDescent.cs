using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Goes down through the stages with look-ahead: of each stage the cheapest words from the most promising states are tried, the ends compared by what the next stage's tables say is left, and the best kept.
/// Wider and wider, until a budget of moves tried ends it; each time round only cheaper words count.
/// </summary>
internal sealed class StagedDescent
{
    /// <summary>So many ends are compared for each one that is kept.</summary>
    private const int Choice = 6;

    /// <summary>How much wider each round is.</summary>
    private const int Widening = 4;

    private const int MaxWidth = 1 << 14;

    /// <summary>Where the budget ends before there is any word, it is raised by this factor, and once more.</summary>
    private const int Grace = 5;

    /// <summary>So many ends are kept in the first round: enough that one of them is soon followed to the goal.</summary>
    private const int FirstWidth = 32;

    /// <summary>How much what is left counts, one search after the other: where there is one stage alone, to have some word soon, and else.</summary>
    private static readonly int[] LoneWeights = [4, 2, 1];
    private static readonly int[] LastWeights = [1];
    private static readonly int[] EarlyWeights = [1, 2];

    private readonly IReadOnlyList<Stage> _stages;
    private readonly Func<bool> _isOver;
    private readonly CancellationToken _cancellation;
    private long _nodes;
    private long _maxNodes;
    private int _least;

    /// <param name="stages">The stages, the first one first.</param>
    /// <param name="isOver">Asked now and then; true ends the descent.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public StagedDescent(IReadOnlyList<Stage> stages, Func<bool> isOver, CancellationToken cancellation)
    {
        _stages = stages;
        _isOver = isOver;
        _cancellation = cancellation;
    }

    /// <summary>The moves tried so far.</summary>
    public long Nodes => _nodes;

    /// <summary>Finds words, each cheaper than those before.</summary>
    /// <param name="shape">The number of the shape in the first stage's frame.</param>
    /// <param name="labels">Where the labels are; the word brings all of them home at the base shape.</param>
    /// <param name="maxNodes">How many moves may be tried; more while there is no word at all.</param>
    /// <param name="found">Given the steps of each word.</param>
    public void Run(int shape, Permutation labels, long maxNodes, Action<int[]> found)
    {
        (_nodes, _maxNodes, _least) = (0, maxNodes, int.MaxValue);
        var siteOf = new ushort[_stages[0].Frame.SiteCount];
        for (var label = 0; label < siteOf.Length; label++)
        {
            siteOf[label] = (ushort)labels[label];
        }

        if (Ranked(new End(null, [], siteOf, shape, 0), 0) is not { } start)
        {
            return;
        }

        Rounds(start, found);
        for (var grace = Grace; grace <= Grace * Grace && _least == int.MaxValue && !IsOver(); grace *= Grace)
        {
            _maxNodes = maxNodes * grace;
            Rounds(start, found);
        }
    }

    private void Rounds(End start, Action<int[]> found)
    {
        for (var width = FirstWidth; width <= MaxWidth && _nodes < _maxNodes; width *= Widening)
        {
            List<End> ends = [start];
            for (var stage = 0; stage + 1 < _stages.Count && ends.Count > 0; stage++)
            {
                ends = Next(ends, stage, width);
            }

            foreach (var weight in _stages.Count == 1 ? LoneWeights : LastWeights)
            {
                Finish(ends, weight, found);
            }

            if (_stages.Count == 1)
            {
                break;
            }
        }
    }

    // The most promising ends of a stage.
    private List<End> Next(List<End> starts, int stage, int width)
    {
        foreach (var weight in EarlyWeights)
        {
            if (Next(starts, stage, width, weight) is { Count: > 0 } ends)
            {
                return ends;
            }
        }

        return [];
    }

    private List<End> Next(List<End> starts, int stage, int width, int weight)
    {
        var wanted = width * Choice;
        var found = new List<End>();
        var seen = new Dictionary<Permutation, int>();
        var words = new StageWords(_stages[stage], IsOver) { Weight = weight };
        var share = _nodes + ((_maxNodes - _nodes) / 2);
        var next = starts.ConvertAll(start => start.Left * weight);
        var done = starts.ConvertAll(_ => -1);
        while (found.Count < wanted && next.Exists(cost => cost < int.MaxValue))
        {
            var limit = Enumerable.Range(0, starts.Count).Min(i => next[i] == int.MaxValue ? int.MaxValue : starts[i].Cost + next[i]);
            if (limit >= _least && weight == 1)
            {
                break;
            }

            for (var i = 0; i < starts.Count && found.Count < 2 * wanted; i++)
            {
                if (next[i] > limit - starts[i].Cost)
                {
                    continue;
                }

                var start = starts[i];
                var before = words.Nodes;
                var budget = share - _nodes;
                words.Visit(start.Shape, start.Coordinates, done[i], limit - start.Cost, before + budget, (moves, cost) =>
                {
                    Add(new End(start, [.. moves], After(start.SiteOf, moves, _stages[stage].Frame), 0, start.Cost + cost));
                    return found.Count >= 2 * wanted;
                });
                _nodes += words.Nodes - before;
                if (words.Nodes - before >= budget || _maxNodes == 0)
                {
                    return Best(found, width);
                }

                done[i] = limit - start.Cost;
                next[i] = words.NextCost;
            }
        }

        return Best(found, width);

        void Add(End end)
        {
            var labels = Permutation.FromTrustedImages<ushort>(end.SiteOf);
            if ((!seen.TryGetValue(labels, out var cost) || end.Cost < cost) && Ranked(end, stage + 1) is { } ranked)
            {
                seen[labels] = end.Cost;
                found.Add(ranked);
            }
        }
    }

    private static List<End> Best(List<End> ends, int width) => [.. ends.OrderBy(end => end.Cost + end.Left).Take(width)];

    // The cheapest words of the last stage.
    private void Finish(List<End> starts, int weight, Action<int[]> found)
    {
        var stage = _stages.Count - 1;
        var words = new StageWords(_stages[stage], IsOver) { Weight = weight };
        var next = starts.ConvertAll(start => start.Left * weight);
        var share = weight == 1 ? _maxNodes : _nodes + ((_maxNodes - _nodes) / 2);
        while (next.Exists(cost => cost < int.MaxValue) && _nodes < Math.Min(share, _maxNodes))
        {
            var limit = Enumerable.Range(0, starts.Count).Min(i => next[i] == int.MaxValue ? int.MaxValue : starts[i].Cost + next[i]);
            if (limit >= _least && weight == 1)
            {
                return;
            }

            var before = _least;
            for (var i = 0; i < starts.Count && _nodes < Math.Min(share, _maxNodes) && (weight > 1 ? _least == before : limit < _least); i++)
            {
                if (next[i] > limit - starts[i].Cost)
                {
                    continue;
                }

                var start = starts[i];
                var nodes = words.Nodes;
                words.Bound = _least == int.MaxValue ? int.MaxValue : _least - start.Cost;
                words.Visit(start.Shape, start.Coordinates, -1, limit - start.Cost, nodes + share - _nodes, (moves, cost) =>
                {
                    _least = start.Cost + cost;
                    found([.. Steps(start, stage), .. moves.SelectMany(move => _stages[stage].Frame.Moves[move].Steps)]);
                    return true;
                });
                _nodes += words.Nodes - nodes;
                next[i] = words.NextCost;
            }

            if (weight > 1 && _least < before)
            {
                return;
            }
        }
    }

    private bool IsOver()
    {
        _cancellation.ThrowIfCancellationRequested();
        if (_isOver())
        {
            _maxNodes = 0;
        }

        return _maxNodes == 0;
    }

    private End? Ranked(End end, int stage)
    {
        end.Coordinates = new int[_stages[stage].Components.Length];
        if (!_stages[stage].TryRank(end.Shape, end.SiteOf, end.Coordinates))
        {
            return null;
        }

        end.Left = _stages[stage].LeastCost(end.Shape, end.Coordinates);
        return end;
    }

    private static ushort[] After(ushort[] siteOf, List<int> moves, StageFrame frame)
    {
        var after = (ushort[])siteOf.Clone();
        foreach (var move in moves)
        {
            var permutation = frame.Moves[move].Permutation;
            for (var label = 0; label < after.Length; label++)
            {
                after[label] = (ushort)permutation[after[label]];
            }
        }

        return after;
    }

    private IEnumerable<int> Steps(End end, int stage) =>
        end.Before is null ? [] : Steps(end.Before, stage - 1).Concat(end.Moves.SelectMany(move => _stages[stage - 1].Frame.Moves[move].Steps));

    /// <summary>Where a word of the stages so far ends.</summary>
    private sealed class End(End? before, int[] moves, ushort[] siteOf, int shape, int cost)
    {
        public End? Before { get; } = before;

        public int[] Moves { get; } = moves;

        public ushort[] SiteOf { get; } = siteOf;

        public int Shape { get; } = shape;

        public int Cost { get; } = cost;

        /// <summary>The coordinates in the next stage.</summary>
        public int[] Coordinates { get; set; } = [];

        /// <summary>No word of the next stage costs less.</summary>
        public int Left { get; set; }
    }
}
