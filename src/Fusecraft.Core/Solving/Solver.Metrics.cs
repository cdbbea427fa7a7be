using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

// Lengths of paths to goals that leave some labels free. These are searched for by steps; by another metric what is found is measured.
public sealed partial class Solver
{
    /// <summary>The greatest number of steps that a search by steps need look at: known only where length is counted by steps.</summary>
    private int? MaxSteps => Options.Metric.Kind == MetricKind.Step ? Options.MaxLength : null;

    // By another metric than steps: distances back from the goal, over all that it tells apart, while these are few.
    private SolveResult? ByGoalDistances(State from, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        var metric = Options.Metric;
        if (metric.Kind == MetricKind.Step || Mechanism.Goal.Kind == GoalKind.Home || from.Shape is null || Mechanism.Steps.Any(step => metric.WeightOf(step) == 0))
        {
            return null;
        }

        progress?.Report(new SolveProgress("searching back from the goal", 0));
        var distances = new SearchedDistances(from.Shape, new LevelOptions { Metric = metric, MaxStates = Options.MaxStates, MaxShapes = Options.MaxShapes }, cancellation);
        if (distances.DistanceOf(from) is not { } length)
        {
            return null;
        }

        if (length < 0)
        {
            return SolveResult.Impossible("A search back from the goal has seen everything from which it can be reached.");
        }

        if (length > Options.MaxLength)
        {
            return TooShort();
        }

        var (classes, weights) = MetricMoves.Classes(Mechanism, metric);
        var steps = new List<Step>();
        for (var (state, left) = (from, length); left > 0;)
        {
            var move = MetricMoves.At(state, classes, weights, metric.Kind == MetricKind.Run).First(move => distances.DistanceOf(move.Next) == left - move.Cost);
            steps.AddRange(move.Steps);
            (state, left) = (move.Next, left - move.Cost);
        }

        return SolveResult.Shortest(Replayed(from, steps, end => distances.DistanceOf(end) == 0), metric);
    }

    private SolveResult OfFewestSteps(TurnPath path)
    {
        var metric = Options.Metric;
        var length = metric.LengthOf(path);
        return metric.Kind == MetricKind.Step || path.Length == 0 ? SolveResult.Shortest(path, metric)
            : length <= (Options.MaxLength ?? long.MaxValue) ? SolveResult.Found(path, metric, $"A search proved that no path has fewer steps; counted by {metric} one may be shorter.")
            : SolveResult.Unsettled($"A path of the fewest steps is too long: {Measured(length)} where at most {Options.MaxLength} was asked for. Whether a path of more steps is shorter was not searched.");
    }

    private SolveResult TooShort() => SolveResult.Impossible($"A search over all paths of at most {Measured(Options.MaxLength!.Value)} found none.");

    private string Measured(long length) => Options.Metric.Kind switch
    {
        MetricKind.Step => $"{length} step{(length == 1 ? "" : "s")}",
        MetricKind.Run => $"{length} run{(length == 1 ? "" : "s")}",
        _ => $"weight {length}",
    };
}
