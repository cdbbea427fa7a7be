using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Tests.Support;

/// <summary>Distances between states by plain search, without a group or a numbering. In the run metric a node is a state with the name that a run may go on with.</summary>
internal static class BruteDistances
{
    /// <summary>All states that can be reached from one; not more than about so many.</summary>
    public static List<State> Reachable(State from, int most = int.MaxValue)
    {
        var seen = new HashSet<State> { from };
        var states = new List<State> { from };
        for (var i = 0; i < states.Count && states.Count <= most; i++)
        {
            foreach (var step in from.Mechanism.Steps)
            {
                if (states[i].TryStep(step, out var next) && seen.Add(next))
                {
                    states.Add(next);
                }
            }
        }

        return states;
    }

    /// <summary>The least cost from some states to each that can be reached; or, backwards, from each that is given to the nearest of them.</summary>
    public static Dictionary<State, int> From(IEnumerable<State> starts, IReadOnlyCollection<State> all, Metric metric, bool backwards)
    {
        var classes = metric.Kind == MetricKind.Run ? RunClasses(all.First().Mechanism) : null;
        var arrows = new Dictionary<State, List<(State To, Step Step)>>();
        foreach (var state in all)
        {
            foreach (var step in state.Mechanism.Steps)
            {
                if (state.TryStep(step, out var next) && all.Contains(next))
                {
                    var (from, to) = backwards ? (next, state) : (state, next);
                    (arrows.TryGetValue(from, out var list) ? list : arrows[from] = []).Add((to, step));
                }
            }
        }

        var distances = new Dictionary<(State State, int Run), int>();
        var queue = new PriorityQueue<(State State, int Run), int>();
        foreach (var start in starts)
        {
            distances[(start, -1)] = 0;
            queue.Enqueue((start, -1), 0);
        }

        while (queue.TryDequeue(out var node, out var distance))
        {
            if (distance > distances[node])
            {
                continue;
            }

            foreach (var (to, step) in arrows.GetValueOrDefault(node.State) ?? [])
            {
                var run = classes is null ? -1 : classes[step];
                var cost = classes is null ? (metric.Kind == MetricKind.Weights ? metric.WeightsByTurn.GetValueOrDefault(step.Turn.Name, 1) : 1) : run == node.Run ? 0 : 1;
                if (!distances.TryGetValue((to, run), out var known) || known > distance + cost)
                {
                    distances[(to, run)] = distance + cost;
                    queue.Enqueue((to, run), distance + cost);
                }
            }
        }

        return distances.GroupBy(pair => pair.Key.State).ToDictionary(group => group.Key, group => group.Min(pair => pair.Value));
    }

    // Names and the names of opposites, joined until nothing changes.
    private static Dictionary<Step, int> RunClasses(Mechanism mechanism)
    {
        var classes = mechanism.Steps.ToDictionary(step => step, step => step.Index);
        bool Join(Step a, Step b)
        {
            var (least, other) = (Math.Min(classes[a], classes[b]), Math.Max(classes[a], classes[b]));
            foreach (var step in mechanism.Steps.Where(step => classes[step] == other))
            {
                classes[step] = least;
            }

            return least != other;
        }

        bool changed;
        do
        {
            changed = false;
            foreach (var a in mechanism.Steps)
            {
                foreach (var b in mechanism.Steps)
                {
                    changed |= (a.Name == b.Name || a.Opposite == b) && Join(a, b);
                }
            }
        }
        while (changed);

        return classes;
    }
}
