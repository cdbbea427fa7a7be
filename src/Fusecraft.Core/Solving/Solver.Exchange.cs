using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

// Loops that exchange given pieces.
public sealed partial class Solver
{
    /// <summary>A loop that brings about an exchange of pieces: from a state back to its shape. Or a proof that there is none, or none as short as the options ask.</summary>
    /// <param name="at">The state; its shape says which steps are free, and its places which pieces are meant.</param>
    /// <param name="exchange">Which piece goes where.</param>
    /// <param name="progress">Told what the solver is doing.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>
    /// Searches from both ends over what matters of the labels, so what it finds within the budget is of the fewest steps. Where the budget ends that, the vertex group says whether there is such a loop at all, and one
    /// of its members that does the exchange is made a path.
    /// </remarks>
    /// <exception cref="ArgumentException">State or exchange belong to another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public SolveResult Exchange(State at, PieceExchange exchange, IProgress<SolveProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        RequireOwn(at);
        ArgumentNullException.ThrowIfNull(exchange);
        if (!ReferenceEquals(exchange.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The exchange is for the mechanism {exchange.Mechanism.Name}, this solver for {Mechanism.Name}.", nameof(exchange));
        }

        lock (_lock)
        {
            return ExchangePieces(at, exchange, progress, cancellationToken);
        }
    }

    private SolveResult ExchangePieces(State at, PieceExchange exchange, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (IsOffBoard(at, "starts", out var reason))
        {
            return SolveResult.Impossible(reason);
        }

        bool IsDone(State end) => end.Shape == at.Shape && exchange.IsDoneBy(Images(at.Labels.Inverse() * end.Labels));
        var (source, target) = (exchange.Source(), exchange.Target());
        var search = new StateSearch(Mechanism, cancellation);
        search.AddStart(at.Shape!, source);
        search.AddGoal(at.Shape!, target);
        progress?.Report(new SolveProgress("searching nearby", 0));
        if (Search(Math.Min(FirstLook, Options.MaxStates)) is { } near)
        {
            return near;
        }

        progress?.Report(new SolveProgress("exploring shapes", 0));
        var groupoid = ShapeGroupoid.ExploreFrom(at.Shape!, new ExplorationOptions { MaxShapes = Options.MaxShapes }, null, cancellation);
        Permutation? member = null;
        if (groupoid.IsComplete)
        {
            var group = groupoid.VertexGroupAt(0, cancellation);
            member = group.Group.FindMemberTaking(source, target, cancellation);
            if (member is null)
            {
                return SolveResult.Impossible($"No member of the vertex group at this shape (order {group.Order}) does that exchange.");
            }
        }

        progress?.Report(new SolveProgress("searching", search.StateCount));
        if (Search(Options.MaxStates) is { } far)
        {
            return far;
        }

        var bound = $"a search found no loop of fewer than {search.LowerBound} steps before its budget of {Options.MaxStates} states ended";
        if (member is null)
        {
            return SolveResult.Unsettled($"There are more than {Options.MaxShapes} shapes, too many to prove anything within the budget; {bound}.");
        }

        return RouteStates(at, Mechanism.StateOf(at.Labels * member.Value), progress, cancellation) is { HasPath: true } found
            ? SolveResult.Found(Replayed(at, found.Path.Steps, IsDone), Options.Metric, $"Made for one of the members of the vertex group that do the exchange; {bound}.")
            : SolveResult.Unsettled($"The vertex group proves that there is such a loop; {bound}.", Options.MaxLength is null ? true : null);

        SolveResult? Search(int maxStates) => search.Run(maxStates, MaxSteps) switch
        {
            StateSearch.Outcome.Found => OfFewestSteps(Replayed(at, search.Path, IsDone)),
            StateSearch.Outcome.NoPath => SolveResult.Impossible("A search has seen every arrangement of these pieces that can be reached; the wanted one is not among them."),
            StateSearch.Outcome.NoneThatShort => TooShort(),
            _ => null,
        };
    }

    private int[] Images(Permutation permutation)
    {
        var images = new int[Mechanism.SiteCount];
        permutation.CopyImages(images);
        return images;
    }
}
