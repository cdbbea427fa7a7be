using System.Diagnostics.CodeAnalysis;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Finds turn paths between states of a mechanism, or proves that there is none. A search from both ends finds shortest paths while they are short; exploration and vertex group prove what cannot be
/// reached; where a path exists but is too long to search for, a descent by stages makes a short one (see <see cref="StagedSolver"/>), or else the shape tree and a stabilizer chain with words.
/// </summary>
/// <remarks>
/// Keeps what it has found out about the mechanism, so solving many states with one solver is cheaper than one solver each. Every path is replayed before it is given. The answers depend on the
/// mechanism, the two states and the options alone. Safe to share between threads; calls wait for each other.
/// </remarks>
public sealed partial class Solver
{
    /// <summary>So many states are searched before anything is explored: most questions about nearby states end here.</summary>
    private const int FirstLook = 50_000;

    private readonly Lock _lock = new();
    private readonly Dictionary<int, RegionContext> _contexts = [];
    private readonly Lazy<BoundedSearch> _bounded;
    private readonly StagedOptions _staged;
    private readonly Dictionary<(VertexGroup Group, int Shape), DistanceTable?> _tables = [];
    private ShapeGroupoid? _fromHome;

    /// <summary>Makes a solver.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="options">How far to go; null for the defaults.</param>
    /// <exception cref="ArgumentOutOfRangeException">A budget is below 1, or the greatest length is negative.</exception>
    /// <exception cref="ArgumentException">The metric weighs turns that the mechanism does not have.</exception>
    public Solver(Mechanism mechanism, SolveOptions? options = null)
        : this(mechanism, options, null)
    {
    }

    internal Solver(Mechanism mechanism, SolveOptions? options, StagedOptions? staged)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        options ??= SolveOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxStates, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxShapes, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfNegative(options.MaxLength ?? 0, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxNodes, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfNegative(options.MaxStagedMoves, nameof(options));
        ArgumentOutOfRangeException.ThrowIfNegative(options.MaxTableBytes, nameof(options));
        options.Metric.RequireTurnsOf(mechanism, nameof(options));
        Mechanism = mechanism;
        Options = options;
        _bounded = new Lazy<BoundedSearch>(() => new BoundedSearch(mechanism, new BoundedOptions { Metric = options.Metric, MaxNodes = options.MaxNodes, TimeLimit = options.TimeLimit }));
        _staged = staged ?? new StagedOptions { MaxNodes = Math.Max(1, options.MaxStagedMoves), Metric = options.Metric };
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>How far the solver may go.</summary>
    public SolveOptions Options { get; }

    /// <summary>A turn path from a state to the mechanism's goal.</summary>
    /// <param name="from">A state of the mechanism.</param>
    /// <param name="progress">Told what the solver is doing.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">The state belongs to another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public SolveResult Solve(State from, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        RequireOwn(from);
        lock (_lock)
        {
            return ByGoalDistances(from, progress, cancellationToken) ?? Mechanism.Goal.Kind switch
            {
                GoalKind.Shape => RouteShapes(from, Mechanism.Home, cancellationToken),
                GoalKind.Marks => RouteMarks(from, progress, cancellationToken),
                GoalKind.Sites => RouteSites(from, progress, cancellationToken),
                GoalKind.Colours => RouteColours(from, progress, cancellationToken),
                _ => RouteStates(from, Mechanism.HomeState, progress, cancellationToken),
            };
        }
    }

    /// <summary>A turn path from one state to another.</summary>
    /// <param name="from">A state of the mechanism.</param>
    /// <param name="to">A state of the mechanism.</param>
    /// <param name="progress">Told what the solver is doing.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">A state belongs to another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public SolveResult Route(State from, State to, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        RequireOwn(from);
        RequireOwn(to);
        lock (_lock)
        {
            return RouteStates(from, to, progress, cancellationToken);
        }
    }

    /// <summary>A turn path of the fewest steps from the shape of one state to the shape of another, labels ignored. By another metric than steps it is measured, but not proven shortest.</summary>
    /// <inheritdoc cref="Route"/>
    public SolveResult RouteShapes(State from, State to, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        RequireOwn(from);
        RequireOwn(to);
        if (IsOffBoard(from, "starts", out var reason) || IsOffBoard(to, "ends", out reason))
        {
            return SolveResult.Impossible(reason);
        }

        progress?.Report(new SolveProgress("searching shapes", 0));
        return RouteShapes(from, to.Shape!, cancellationToken);
    }

    private SolveResult RouteShapes(State from, Shape to, CancellationToken cancellation)
    {
        if (IsOffBoard(from, "starts", out var reason))
        {
            return SolveResult.Impossible(reason);
        }

        var colours = new int[Mechanism.SiteCount];
        var search = new StateSearch(Mechanism, cancellation);
        search.AddStart(from.Shape!, colours);
        search.AddGoal(to, colours);
        return search.Run(Options.MaxShapes, MaxSteps) switch
        {
            StateSearch.Outcome.Found => OfFewestSteps(TurnPath.Follow(from.Shape!, search.Path)),
            StateSearch.Outcome.NoPath => SolveResult.Impossible($"No turn path leads from the shape {from.Shape} to the shape {to}."),
            StateSearch.Outcome.NoneThatShort => TooShort(),
            _ => SolveResult.Unsettled($"The budget of {Options.MaxShapes} shapes ended the search; no path is shorter than {search.LowerBound} steps."),
        };
    }

    private static bool IsOffBoard(State state, string what, [NotNullWhen(true)] out string? reason)
    {
        reason = state.Shape is null
            ? $"The path {what} in a state where no turns can bring the puzzle: a piece is taken apart, or a block or mark lies where it can never come."
            : null;
        return reason is not null;
    }

    private void RequireOwn(State state)
    {
        ArgumentNullException.ThrowIfNull(state);
        if (!ReferenceEquals(state.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The state belongs to the mechanism {state.Mechanism.Name}, this solver to {Mechanism.Name}.", nameof(state));
        }
    }

    /// <summary>For each site, the label on it.</summary>
    private int[] LabelsOn(State state)
    {
        var labels = new int[Mechanism.SiteCount];
        state.Labels.Inverse().CopyImages(labels);
        return labels;
    }

    /// <summary>A path that has been replayed and shown to end where it should.</summary>
    private static TurnPath Replayed(State from, IEnumerable<Step> steps, Func<State, bool> isGoal)
    {
        var path = TurnPath.Follow(from.Shape!, steps);
        if (!from.TryApply(path.Word, out var end, out var barred) || !isGoal(end))
        {
            throw new InvalidOperationException($"A path found does not lead to the goal: {barred?.ToString() ?? "it ends elsewhere"}.");
        }

        return path;
    }
}
