using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Tests.Solving;

/// <summary>Least costs of states in any metric, by relaxing over pairs of a state and the last step until nothing gets cheaper.</summary>
internal static class NaiveLengths
{
    public static Dictionary<State, long> From(State start, Metric metric)
    {
        var costs = new Dictionary<(State State, string Last), long> { [(start, "")] = 0 };
        var queue = new Queue<(State State, string Last)>(costs.Keys);
        while (queue.TryDequeue(out var entry))
        {
            foreach (var step in entry.State.Shape!.FreeSteps())
            {
                // Names of one run: a turn's own, or on boards both ways along a line.
                var run = step.Name is "L" or "R" ? "LR" : step.Name is "U" or "D" ? "UD" : step.Turn.Name;
                var cost = costs[entry] + metric.Kind switch
                {
                    MetricKind.Step => 1,
                    MetricKind.Run => run == entry.Last ? 0 : 1,
                    _ => metric.WeightsByTurn.GetValueOrDefault(step.Turn.Name, 1),
                };
                (State State, string Last) next = (entry.State.After(step), metric.Kind == MetricKind.Run ? run : "");
                if (!costs.TryGetValue(next, out var known) || cost < known)
                {
                    costs[next] = cost;
                    queue.Enqueue(next);
                }
            }
        }

        return costs.GroupBy(pair => pair.Key.State).ToDictionary(group => group.Key, group => group.Min(pair => pair.Value));
    }
}
