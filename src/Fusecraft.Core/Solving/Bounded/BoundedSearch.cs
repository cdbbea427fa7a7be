using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Finds shortest words between two states within a bound, or proves that there is none. A search from both ends settles what is near; then iterative deepening goes on with pruning tables, which are chosen and built when
/// first needed, once for each shape of goals.
/// </summary>
/// <remarks>
/// Every word is replayed before it is given. The answers depend on the mechanism, the two states, the bound and the options alone, not on the number of threads; only a time limit makes an exception. Safe to share between
/// threads; calls wait for each other. A search takes time exponential in the length of the word.
/// </remarks>
public sealed class BoundedSearch
{
    private readonly Lock _lock = new();
    private readonly Dictionary<Shape, BoundTables> _tables = [];
    private readonly Lazy<DeepeningGround> _ground;

    /// <summary>Makes a search.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="options">How length is counted and how far to go; null for the defaults.</param>
    /// <exception cref="ArgumentOutOfRangeException">A budget is below 1, or the time limit is negative.</exception>
    /// <exception cref="ArgumentException">The metric weighs turns that the mechanism does not have, or a table belongs to another mechanism.</exception>
    public BoundedSearch(Mechanism mechanism, BoundedOptions? options = null)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        options ??= BoundedOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxNodes, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxMeetingStates, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.Pruning.DegreeOfParallelism, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.TimeLimit ?? TimeSpan.Zero, TimeSpan.Zero, nameof(options));
        options.Metric.RequireTurnsOf(mechanism, nameof(options));
        if (options.Tables.Any(table => !ReferenceEquals(table.Mechanism, mechanism)))
        {
            throw new ArgumentException($"A pruning table belongs to another mechanism than {mechanism.Name}.", nameof(options));
        }

        Mechanism = mechanism;
        Options = options;
        _ground = new Lazy<DeepeningGround>(() => new DeepeningGround(mechanism, options.Metric, default));
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>How length is counted and how far the search may go.</summary>
    public BoundedOptions Options { get; }

    /// <summary>Searches a shortest word that takes the labels at a shape as a permutation says: for a loop there, an element of the vertex group.</summary>
    /// <param name="base">The shape where the word starts.</param>
    /// <param name="permutation">What the word is to do: the label on site <c>i</c> goes to site <c>permutation[i]</c>.</param>
    /// <param name="maxLength">The greatest length that counts, by the metric.</param>
    /// <param name="progress">Told what the search is doing.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">The shape belongs to another mechanism, or the permutation moves points that are no sites.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The greatest length is negative.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public BoundedResult Factorize(Shape @base, Permutation permutation, int maxLength, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(@base);
        ArgumentOutOfRangeException.ThrowIfNegative(maxLength);
        if (!ReferenceEquals(@base.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The shape belongs to another mechanism than {Mechanism.Name}.", nameof(@base));
        }

        if (permutation.SupportEnd > Mechanism.SiteCount)
        {
            throw new ArgumentException($"The permutation moves point {permutation.SupportEnd - 1}; the sites are 0 … {Mechanism.SiteCount - 1}.", nameof(permutation));
        }

        // Backwards from a loop the labels stand as its inverse says.
        lock (_lock)
        {
            return Search(@base, permutation.Inverse(), @base, maxLength, progress, cancellationToken);
        }
    }

    /// <summary>Searches a shortest word from one state to another.</summary>
    /// <param name="from">A state of the mechanism.</param>
    /// <param name="to">A state of the mechanism.</param>
    /// <param name="maxLength">The greatest length that counts, by the metric.</param>
    /// <param name="progress">Told what the search is doing.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">A state belongs to another mechanism.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The greatest length is negative.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public BoundedResult Find(State from, State to, int maxLength, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(from);
        ArgumentNullException.ThrowIfNull(to);
        ArgumentOutOfRangeException.ThrowIfNegative(maxLength);
        if (!ReferenceEquals(from.Mechanism, Mechanism) || !ReferenceEquals(to.Mechanism, Mechanism))
        {
            throw new ArgumentException($"A state belongs to another mechanism than {Mechanism.Name}.", ReferenceEquals(from.Mechanism, Mechanism) ? nameof(to) : nameof(from));
        }

        if (from == to)
        {
            return new BoundedResult(BoundedOutcome.Found, TurnPath.At(from.Shape ?? Mechanism.Home), 0, 0);
        }

        if (from.Shape is null || to.Shape is null)
        {
            return new BoundedResult(BoundedOutcome.NoneAtAll, null, null, 0);
        }

        lock (_lock)
        {
            return Search(from.Shape, to.Labels.Inverse() * from.Labels, to.Shape, maxLength, progress, cancellationToken);
        }
    }

    /// <summary>The tables by which a search for goals of a shape is guided, built now where they are not there yet.</summary>
    /// <param name="goal">The shape of goals; null for the home shape.</param>
    /// <param name="progress">Told what is being built.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">The shape belongs to another mechanism.</exception>
    /// <exception cref="IOException">A table cannot be kept in the cache folder.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public IReadOnlyList<PruningTable> Prepare(Shape? goal = null, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        if (goal is not null && !ReferenceEquals(goal.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The shape belongs to another mechanism than {Mechanism.Name}.", nameof(goal));
        }

        lock (_lock)
        {
            var tables = new HashSet<PruningTable>();
            foreach (var reading in TablesFor(goal ?? Mechanism.Home, progress, cancellationToken).Readings)
            {
                tables.Add(reading.Table);
            }

            return [.. tables];
        }
    }

    // Labels are counted from the goal.
    private BoundedResult Search(Shape from, Permutation labels, Shape goal, int maxLength, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        var (nodes, least) = (0L, 0);
        if (Options.Metric.Kind != MetricKind.Weights)
        {
            progress?.Report(new SolveProgress("searching from both ends", 0));
            var meeting = new MeetingSearch(Mechanism, Options.Metric, cancellation);
            var (outcome, word) = meeting.Run(from, labels, goal, maxLength, (int)Math.Min(Options.MaxMeetingStates, Options.MaxNodes));
            (nodes, least) = (Math.Min(meeting.StateCount, Options.MaxNodes), meeting.LowerBound);
            if (outcome != BoundedOutcome.BudgetEnded || nodes >= Options.MaxNodes)
            {
                return Result(outcome, word, least, nodes, from, labels, goal);
            }
        }

        var tables = TablesFor(goal, progress, cancellation);
        progress?.Report(new SolveProgress("trying words", nodes));
        var unit = _ground.Value.Unit;
        var search = new DeepeningSearch(_ground.Value, tables, from, labels, goal, Options, cancellation);
        var answer = search.Run(least, maxLength / unit, Options.MaxNodes - nodes);
        return Result(answer.Outcome, answer.Word, (long)answer.LowerBound * unit, nodes + answer.Nodes, from, labels, goal);
    }

    private BoundedResult Result(BoundedOutcome outcome, List<Step>? word, long lowerBound, long nodes, Shape from, Permutation labels, Shape goal)
    {
        if (word is null)
        {
            return new BoundedResult(outcome, null, outcome == BoundedOutcome.NoneAtAll ? null : lowerBound, nodes);
        }

        var path = TurnPath.Follow(from, word);
        if (path.Target != goal || !(labels * path.Permutation).IsIdentity || Options.Metric.LengthOf(path) != lowerBound)
        {
            throw new InvalidOperationException($"A word found does not lead to the goal: {path}.");
        }

        return new BoundedResult(outcome, path, lowerBound, nodes);
    }

    private BoundTables TablesFor(Shape goal, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (!_tables.TryGetValue(goal, out var tables))
        {
            List<PruningTable> own = [.. Options.Tables.Where(table => table.BaseShape == goal && IsSameMetric(table.Metric))];
            List<MechanismSymmetry?> symmetries = Options.UsesSymmetry ? BoundTables.SymmetriesFor(goal, Options.Metric, cancellation) : [null];
            if (own.Count == 0)
            {
                progress?.Report(new SolveProgress("building tables", 0));
                own = PruningChoice.Build(goal, Options.Metric, Options.Pruning, symmetries, cancellation);
            }

            tables = new BoundTables(own, symmetries);
            _tables.Add(goal, tables);
        }

        return tables;
    }

    private bool IsSameMetric(Metric other) =>
        other.Kind == Options.Metric.Kind && Mechanism.Steps.All(step => other.WeightOf(step) == Options.Metric.WeightOf(step));
}
