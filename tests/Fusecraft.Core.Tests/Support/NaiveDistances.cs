using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Tests.Support;

/// <summary>Lengths of shortest words by trying everything: Dijkstra's algorithm over states, each with the name of the last step where runs are counted.</summary>
internal static class NaiveDistances
{
    /// <summary>The length of a shortest word from a state to each that can be reached.</summary>
    public static Dictionary<State, int> From(State start, Metric metric)
    {
        var distances = new Dictionary<State, int>();
        var done = new HashSet<(State, string)>();
        var queue = new PriorityQueue<(State State, string Run), int>([((start, ""), 0)]);
        while (queue.TryDequeue(out var node, out var distance))
        {
            if (!done.Add(node))
            {
                continue;
            }

            distances.TryAdd(node.State, distance);
            foreach (var step in start.Mechanism.Steps)
            {
                if (node.State.TryStep(step, out var next))
                {
                    var run = metric.Kind == MetricKind.Run ? step.Turn.Name : "";
                    var cost = metric.Kind switch
                    {
                        MetricKind.Step => 1,
                        MetricKind.Run => run == node.Run ? 0 : 1,
                        _ => metric.WeightsByTurn.GetValueOrDefault(step.Turn.Name, 1),
                    };
                    queue.Enqueue((next, run), distance + cost);
                }
            }
        }

        return distances;
    }
}
