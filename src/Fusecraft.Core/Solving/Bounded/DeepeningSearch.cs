using System.Diagnostics;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Iterative deepening over words from a shape with labels to a goal shape with none displaced. Each round tries all words within a limit; beginnings of words are shared out among threads in a fixed order, and what counts is what
/// one thread would have found, so the answer and the number of nodes are the same for any number of threads.
/// </summary>
internal sealed class DeepeningSearch
{
    /// <summary>So many beginnings are wanted to share out.</summary>
    private const int WantedTasks = 200;

    private readonly BoundedOptions _options;
    private readonly CancellationToken _cancellation;
    private readonly long _started = Stopwatch.GetTimestamp();
    private readonly int _unit;
    private volatile int _first = int.MaxValue;
    private volatile bool _isOutOfTime;

    public DeepeningSearch(DeepeningGround ground, BoundTables tables, Shape from, Permutation labels, Shape goal, BoundedOptions options, CancellationToken cancellation)
    {
        Mechanism = from.Mechanism;
        Metric = options.Metric;
        Pairs = ground.Pairs;
        Automaton = ground.Automaton;
        Tables = tables;
        From = from;
        Labels = labels;
        Goal = goal;
        _unit = ground.Unit;
        _options = options;
        _cancellation = cancellation;
        RootValues = new int[tables.Coordinates.Length];
        HasRoot = tables.TryRank(from, labels, RootValues);
        RootBound = HasRoot ? tables.Bound(RootValues) : PruningTable.Never;
        HasRoot &= RootBound != PruningTable.Never;
        RootBound = HasRoot ? InUnits(RootBound) : 0;
        IsStepParityKept = ground.IsStepParityKept;
    }

    public Mechanism Mechanism { get; }

    public Metric Metric { get; }

    public PairRules Pairs { get; }

    public WordAutomaton? Automaton { get; }

    public BoundTables Tables { get; }

    public Shape From { get; }

    /// <summary>Labels counted from the goal.</summary>
    public Permutation Labels { get; }

    public Shape Goal { get; }

    public int[] RootValues { get; }

    public int RootBound { get; }

    /// <summary>False where a table tells that the goal cannot be reached.</summary>
    public bool HasRoot { get; }

    /// <summary>True where every step costs the same and is an odd permutation, so that lengths of words with one effect differ by even numbers.</summary>
    private bool IsStepParityKept { get; }

    public int InUnits(int bound) => _unit == 1 ? bound : bound / _unit;

    /// <summary>True where a part need not go on: the time is over, or a part before it has settled the round.</summary>
    public bool IsOver(int task)
    {
        _cancellation.ThrowIfCancellationRequested();
        if (_options.TimeLimit is { } limit && Stopwatch.GetElapsedTime(_started) >= limit)
        {
            _isOutOfTime = true;
        }

        return _isOutOfTime || task > _first;
    }

    /// <summary>Searches words of up to so many units.</summary>
    /// <param name="least">Proven: none is shorter.</param>
    /// <param name="most">The bound.</param>
    /// <param name="maxNodes">The budget.</param>
    public Answer Run(int least, int most, long maxNodes)
    {
        var nodes = 0L;
        if (!HasRoot)
        {
            return new Answer(BoundedOutcome.NoneAtAll, null, 0, nodes);
        }

        var workers = Enumerable.Range(0, Math.Max(1, _options.Pruning.DegreeOfParallelism)).Select(_ => new Lazy<DeepeningWorker>(() => new DeepeningWorker(this))).ToArray();
        var limit = Fitting(Math.Max(least, RootBound));
        while (limit <= most)
        {
            var round = Round(workers, limit, maxNodes - nodes);
            if (round.End is DeepeningWorker.End.OutOfNodes or DeepeningWorker.End.Stopped)
            {
                // What the rounds before have cost is the budget that ends at this very place.
                return new Answer(BoundedOutcome.BudgetEnded, null, limit, _isOutOfTime ? nodes : maxNodes);
            }

            nodes += round.Nodes;
            if (round.End == DeepeningWorker.End.Found)
            {
                return new Answer(BoundedOutcome.Found, round.Word, limit, nodes);
            }

            if (round.NextLimit == int.MaxValue)
            {
                return new Answer(BoundedOutcome.NoneAtAll, null, limit, nodes);
            }

            limit = Fitting(round.NextLimit);
        }

        return new Answer(BoundedOutcome.NoneWithinBound, null, limit, nodes);
    }

    private int Fitting(int limit) => IsStepParityKept && ((limit & 1) == 1) != (Labels.Parity == Parity.Odd) ? limit + 1 : limit;

    private RoundEnd Round(Lazy<DeepeningWorker>[] workers, int limit, long maxNodes)
    {
        var first = workers[0].Value;
        var prefixes = new List<int[]>();
        var end = DeepeningWorker.End.Exhausted;
        var nextLimit = int.MaxValue;
        _first = int.MaxValue;

        // Deeper until there are enough beginnings, or none is left.
        var nodes = 0L;
        for (var depth = 1; ; depth++)
        {
            prefixes.Clear();
            end = first.Split(limit, depth, maxNodes, prefixes);
            nodes = first.Nodes;
            nextLimit = first.NextLimit;
            if (end != DeepeningWorker.End.Exhausted || prefixes.Count == 0 || prefixes.Count >= WantedTasks || depth == 4)
            {
                break;
            }
        }

        if (end != DeepeningWorker.End.Exhausted || prefixes.Count == 0)
        {
            return new RoundEnd(end, nodes, nextLimit, end == DeepeningWorker.End.Found ? [.. first.Word] : null);
        }

        var parts = new RoundEnd?[prefixes.Count];
        var left = maxNodes - nodes;
        var next = -1;
        void Work(DeepeningWorker worker)
        {
            for (var task = Interlocked.Increment(ref next); task < prefixes.Count && !IsOver(task); task = Interlocked.Increment(ref next))
            {
                var partEnd = worker.Search(prefixes[task], limit, left, task);
                parts[task] = new RoundEnd(partEnd, worker.Nodes, worker.NextLimit, partEnd == DeepeningWorker.End.Found ? [.. worker.Word] : null);
                if (partEnd is DeepeningWorker.End.Found or DeepeningWorker.End.OutOfNodes)
                {
                    int known;
                    while (task < (known = _first) && Interlocked.CompareExchange(ref _first, task, known) != known)
                    {
                    }
                }
            }
        }

        if (workers.Length == 1)
        {
            Work(first);
        }
        else
        {
            Parallel.For(0, workers.Length, new ParallelOptions { MaxDegreeOfParallelism = workers.Length }, worker => Work(workers[worker].Value));
        }

        // As one thread would have gone through them.
        foreach (var part in parts)
        {
            if (part is null || part.End == DeepeningWorker.End.Stopped)
            {
                return new RoundEnd(DeepeningWorker.End.Stopped, nodes, nextLimit, null);
            }

            nodes += part.Nodes;
            if (nodes > maxNodes || part.End == DeepeningWorker.End.OutOfNodes)
            {
                return new RoundEnd(DeepeningWorker.End.OutOfNodes, nodes, nextLimit, null);
            }

            nextLimit = Math.Min(nextLimit, part.NextLimit);
            if (part.End == DeepeningWorker.End.Found)
            {
                return part with { Nodes = nodes };
            }
        }

        return new RoundEnd(DeepeningWorker.End.Exhausted, nodes, nextLimit, null);
    }

    /// <param name="Outcome">How it ended.</param>
    /// <param name="Word">The steps found.</param>
    /// <param name="LowerBound">In units: no word is shorter.</param>
    /// <param name="Nodes">The nodes tried, or the budget that gives the same answer.</param>
    public sealed record Answer(BoundedOutcome Outcome, List<Step>? Word, int LowerBound, long Nodes);

    private sealed record RoundEnd(DeepeningWorker.End End, long Nodes, int NextLimit, List<Step>? Word);
}

/// <summary>What searches of one mechanism by one metric share.</summary>
internal sealed class DeepeningGround
{
    public DeepeningGround(Mechanism mechanism, Metric metric, CancellationToken cancellation)
    {
        Pairs = new PairRules(mechanism, metric);
        Unit = new PruningMoves(mechanism, metric).Unit;
        IsStepParityKept = metric.Kind == MetricKind.Step && mechanism.Steps.All(step => step.Permutation.Parity == Parity.Odd);

        // Without slots there is one shape; a step that is barred there is barred for good, and is not among its moves.
        if (mechanism.Board.SlotCount == 0)
        {
            var catalogue = new MoveCatalogue(mechanism, metric, Pairs);
            Automaton = new WordAutomaton(catalogue.At(catalogue.Number(mechanism.Home.Key)), cancellation);
        }
    }

    public PairRules Pairs { get; }

    public WordAutomaton? Automaton { get; }

    public int Unit { get; }

    public bool IsStepParityKept { get; }
}
