using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

// States given by their colours alone.
public sealed partial class Solver
{
    private VertexGroup? _homeGroup;

    /// <summary>Finds a state that can be reached from home and shows given colours, its labels and its shape, or proves that there is none.</summary>
    /// <param name="colours">Which colour each site shows.</param>
    /// <param name="progress">Told what the solver is doing.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">The colours are of another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// In the home region the vertex group answers, shape by shape (<see cref="PermutationGroup.FindMemberTaking"/>). Where there are other regions they are searched, from home and back from the colours, over all that
    /// can be seen: shapes with the colours on the sites.
    /// </remarks>
    public CompletionResult Complete(ColouredState colours, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        RequireOwn(colours);
        lock (_lock)
        {
            return CompleteColours(colours, progress, cancellationToken);
        }
    }

    /// <summary>A turn path to the mechanism's goal from a state given by its colours: the one that <see cref="Complete"/> finds.</summary>
    /// <inheritdoc cref="Complete"/>
    public SolveResult SolveColours(ColouredState colours, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        var completion = Complete(colours, progress, cancellationToken);
        return completion switch
        {
            { HasState: true } => Solve(completion.State, progress, cancellationToken),
            { IsPossible: false } => SolveResult.Impossible(completion.Reason),
            _ => SolveResult.Unsettled(completion.Reason),
        };
    }

    private CompletionResult CompleteColours(ColouredState colours, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (VisiblePieces.WhyImpossible(colours) is { } reason)
        {
            return CompletionResult.Impossible(reason);
        }

        progress?.Report(new SolveProgress("exploring shapes", 0));
        var groupoid = _fromHome ??= ShapeGroupoid.Explore(Mechanism, new ExplorationOptions { MaxShapes = Options.MaxShapes }, null, cancellation);
        if (!groupoid.IsComplete)
        {
            return CompletionResult.Unsettled($"There are more than {Options.MaxShapes} shapes, too many to look for the colours in all of them within the budget.");
        }

        progress?.Report(new SolveProgress("asking the vertex group", 0));
        _homeGroup ??= groupoid.VertexGroupAt(0, cancellation);
        if (new ColourCompletion(_homeGroup, cancellation).Find(colours) is { } state)
        {
            return CompletionResult.Found(Shown(state, colours), $"A member of the vertex group at home (order {_homeGroup.Order}) and a path to the shape make it.");
        }

        return groupoid.Regions.Length == 1
            ? CompletionResult.Impossible(groupoid.ShapeCount == 1
                ? $"No member of the vertex group (order {_homeGroup.Order}) brings the colours there."
                : $"In none of the {groupoid.ShapeCount} shapes that can be reached does a member of the vertex group (order {_homeGroup.Order}) bring the colours there.")
            : SearchColours(colours, groupoid, progress, cancellation);
    }

    // Beyond passages no group answers: all that can be seen is searched, to any shape.
    private CompletionResult SearchColours(ColouredState colours, ShapeGroupoid groupoid, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (groupoid.ShapeCount > MaxGoalShapes)
        {
            return CompletionResult.Unsettled($"No state of the home region shows the colours; beyond its passages there are too many shapes ({groupoid.ShapeCount}) to search.");
        }

        progress?.Report(new SolveProgress("searching colours", 0));
        var search = new StateSearch(Mechanism, cancellation);
        search.AddStart(Mechanism.Home, Mechanism.ColourOfSite.AsSpan());
        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            search.AddGoal(groupoid.ShapeAt(shape), colours.ColourOn.AsSpan());
        }

        return search.Run(Options.MaxStates, null) switch
        {
            StateSearch.Outcome.Found => CompletionResult.Found(
                Shown(Replayed(Mechanism.HomeState, search.Path, end => Mechanism.ColoursOf(end) == colours), colours), "A search from home found it beyond a passage."),
            StateSearch.Outcome.NoPath => CompletionResult.Impossible("No state of the home region shows the colours, and a search beyond its passages has seen everything without finding them."),
            _ => CompletionResult.Unsettled($"No state of the home region shows the colours; beyond its passages the budget of {Options.MaxStates} states ended the search."),
        };
    }

    private State Shown(TurnPath path, ColouredState colours) => Shown(Mechanism.HomeState.Apply(path.Word), colours);

    private State Shown(State state, ColouredState colours) => state.Shape is not null && Mechanism.ColoursOf(state) == colours
        ? state
        : throw new InvalidOperationException("A state found does not show the colours asked for.");

    private void RequireOwn(ColouredState colours)
    {
        ArgumentNullException.ThrowIfNull(colours);
        if (!ReferenceEquals(colours.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The colours are of the mechanism {colours.Mechanism.Name}, this solver is for {Mechanism.Name}.", nameof(colours));
        }
    }
}
