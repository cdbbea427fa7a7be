using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// What a level is like, as facts: a level is a state to start from, with the goal of its mechanism. How long the shortest words are and how many there are; and along the first of them, by the order of the steps, how
/// many moves are free, how many of them are right, and what each wrong one costs.
/// </summary>
/// <remarks>All figures are exact or not given. Immutable, safe to share.</remarks>
public sealed class LevelMeasures
{
    private LevelMeasures(State start, Metric metric, bool? isSolvable, int? length, BigInteger? wordCount, ImmutableArray<LevelStage> stages)
    {
        Start = start;
        Metric = metric;
        IsSolvable = isSolvable;
        ShortestLength = length;
        ShortestWordCount = wordCount;
        Stages = stages;
    }

    /// <summary>The state to start from.</summary>
    public State Start { get; }

    /// <summary>How lengths are counted.</summary>
    public Metric Metric { get; }

    /// <summary>True when a way leads to the goal, false when it is proven that none does, null when a budget ended before either was known.</summary>
    public bool? IsSolvable { get; }

    /// <summary>The length of a shortest word to the goal; null where there is none, or none is known.</summary>
    public int? ShortestLength { get; }

    /// <summary>The number of shortest words; where runs are counted, runs that lead to the same state count as one. Null where <see cref="ShortestLength"/> is.</summary>
    public BigInteger? ShortestWordCount { get; }

    /// <summary>The moves of the first shortest word by the order of the steps; empty where there is none, or nothing is to be done.</summary>
    public ImmutableArray<LevelStage> Stages { get; }

    /// <summary>How often the shape changes along that word.</summary>
    public int ShapeChangeCount => Stages.Sum(stage => stage.ShapeChanges);

    /// <summary>How many steps of that word lead where no turn path leads back from, labels ignored: one-way passages that the solution has to take.</summary>
    public int PassageCount => Stages.Sum(stage => stage.Passages);

    /// <summary>That word.</summary>
    /// <exception cref="InvalidOperationException">There is none, or none is known.</exception>
    public TurnPath Path => IsSolvable == true
        ? TurnPath.Follow(Start.Shape!, Stages.SelectMany(stage => stage.Steps))
        : throw new InvalidOperationException("No way to the goal is known.");

    /// <summary>Measures a level by a search back from the goal over all that the goal tells apart.</summary>
    /// <param name="start">The state to start from; the goal is that of its mechanism.</param>
    /// <param name="options">The metric and the budgets; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes the states about as near to the goal as the start and its neighbours. Where some neighbours lead nowhere, it takes all states from which the goal can be reached to prove that.</remarks>
    /// <exception cref="ArgumentException">The state has no shape; the metric weighs a turn that the mechanism does not have, or has a turn that weighs nothing.</exception>
    /// <exception cref="ArgumentOutOfRangeException">A budget is below 1.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static LevelMeasures Of(State start, LevelOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(start);
        options ??= LevelOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxStates, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxShapes, 1, nameof(options));
        options.Metric.RequireTurnsOf(start.Mechanism, nameof(options));
        RequireCosts(start.Mechanism, options.Metric, nameof(options));
        RequireShape(start);
        return Measure(start, new SearchedDistances(start.Shape!, options, cancellationToken), cancellationToken);
    }

    /// <summary>Measures a level with a table of the distances to the goal, for spaces too large to search.</summary>
    /// <param name="start">A state of the table's region; the goal is that of its mechanism, and lies in the region too.</param>
    /// <param name="table">A table that measures to the goal.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>The metric is that of the table. The figures are those of <see cref="Of"/>.</remarks>
    /// <exception cref="ArgumentException">The state belongs to another mechanism or lies outside the table's region; the table measures from its base state, or counts a turn that weighs nothing; or the goal might be reached beyond the region as well.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static LevelMeasures FromTable(State start, DistanceTable table, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(start);
        ArgumentNullException.ThrowIfNull(table);
        RequireShape(start);
        RequireCosts(start.Mechanism, table.Metric, nameof(table));
        if (table.Origin != DistanceOrigin.ToGoal || table.Numbering.Rank(start) < 0)
        {
            throw new ArgumentException("The table has to measure to the goal, and the state has to lie in its region.", nameof(table));
        }

        if (table.Numbering.Group.Region.PassageCount > 0 && start.Mechanism.Goal.Kind is (GoalKind.Marks or GoalKind.Sites))
        {
            throw new ArgumentException("Passages leave the table's region, and the goal might be reached beyond them too, of which the table knows nothing.", nameof(table));
        }

        return Measure(start, new TableDistances(table), cancellationToken);
    }

    private static LevelMeasures Measure(State start, IGoalDistances distances, CancellationToken cancellation)
    {
        var metric = distances.Metric;
        if (distances.DistanceOf(start) is not (>= 0 and var length))
        {
            return new LevelMeasures(start, metric, distances.DistanceOf(start) is null ? null : false, null, null, []);
        }

        var (classes, weights) = MetricMoves.Classes(start.Mechanism, metric);
        List<(Step[] Steps, int Cost, State Next)> MovesAt(State state) => MetricMoves.At(state, classes, weights, metric.Kind == MetricKind.Run);
        var stages = ImmutableArray.CreateBuilder<LevelStage>();
        for (var (state, left) = (start, length); left > 0;)
        {
            cancellation.ThrowIfCancellationRequested();
            var moves = MovesAt(state);
            (Step[] Steps, int Cost, State Next)? first = null;
            var best = 0;
            var wrong = ImmutableArray.CreateBuilder<LevelMove>();
            foreach (var move in moves)
            {
                var rest = distances.DistanceOf(move.Next);
                if (rest >= 0 && move.Cost + rest == left)
                {
                    best++;
                    first ??= move;
                }
                else
                {
                    wrong.Add(new LevelMove([.. move.Steps], rest >= 0 ? move.Cost + rest - left : null, rest is null ? null : rest < 0));
                }
            }

            var (steps, cost, next) = first ?? throw new InvalidOperationException("The distances do not fit together.");
            var (changes, passages) = Shapes(state.Shape!, steps, cancellation);
            stages.Add(new LevelStage(state, left, [.. steps], moves.Count, best, wrong.DrainToImmutable(), changes, passages));
            (state, left) = (next, left - cost);
        }

        return new LevelMeasures(start, metric, true, length, CountWords(start, length, distances, MovesAt, cancellation), stages.DrainToImmutable());
    }

    // Level by level, with the words that lead to each state; states alike to the goal are taken together.
    private static BigInteger CountWords(
        State start, int length, IGoalDistances distances, Func<State, List<(Step[] Steps, int Cost, State Next)>> movesAt, CancellationToken cancellation)
    {
        var view = new GoalView(start.Mechanism);
        var levels = new Dictionary<NodeKey, (State State, BigInteger Words)>[length + 1];
        levels[length] = new() { [new NodeKey(view.Node(start))] = (start, BigInteger.One) };
        for (var left = length; left > 0; left--)
        {
            foreach (var (state, words) in levels[left]?.Values.ToArray() ?? [])
            {
                cancellation.ThrowIfCancellationRequested();
                foreach (var (_, cost, next) in movesAt(state))
                {
                    if (cost > left || distances.DistanceOf(next) != left - cost)
                    {
                        continue;
                    }

                    var level = levels[left - cost] ??= [];
                    var key = new NodeKey(view.Node(next));
                    level[key] = level.TryGetValue(key, out var known) ? (known.State, known.Words + words) : (next, words);
                }
            }

            levels[left] = [];
        }

        return levels[0].Values.Aggregate(BigInteger.Zero, (sum, entry) => sum + entry.Words);
    }

    private static (int Changes, int Passages) Shapes(Shape shape, Step[] steps, CancellationToken cancellation)
    {
        var (changes, passages) = (0, 0);
        foreach (var step in steps)
        {
            var next = shape.After(step)!;
            changes += next == shape ? 0 : 1;
            passages += shape.Mechanism.IsReversible || next == shape || ShapePath.Find(next, shape, cancellation) is not null ? 0 : 1;
            shape = next;
        }

        return (changes, passages);
    }

    private static void RequireShape(State start)
    {
        if (start.Shape is null)
        {
            throw new ArgumentException("No turns can bring the puzzle into this state: it is no level.", nameof(start));
        }
    }

    private static void RequireCosts(Mechanism mechanism, Metric metric, string parameter)
    {
        if (mechanism.Turns.FirstOrDefault(turn => metric.WeightOf(turn.Forward) == 0) is { } turn)
        {
            throw new ArgumentException($"The metric gives the turn {turn} no weight; then there is no end of shortest words.", parameter);
        }
    }

    private readonly struct NodeKey(ulong[] words) : IEquatable<NodeKey>
    {
        private readonly ulong[] _words = words;

        public bool Equals(NodeKey other) => _words.AsSpan().SequenceEqual(other._words);

        public override bool Equals(object? obj) => obj is NodeKey other && Equals(other);

        public override int GetHashCode()
        {
            var hash = default(HashCode);
            foreach (var word in _words)
            {
                hash.Add(word);
            }

            return hash.ToHashCode();
        }
    }
}
