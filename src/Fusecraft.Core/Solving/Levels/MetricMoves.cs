using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>The moves of a metric: single steps, or where runs are counted whole runs, one for each state that a run can lead to.</summary>
internal static class MetricMoves
{
    /// <summary>Steps that one move can be made of, by their numbers, and what a move of them costs.</summary>
    public static (int[][] Classes, int[] Weights) Classes(Mechanism mechanism, Metric metric)
    {
        if (metric.Kind != MetricKind.Run)
        {
            return ([.. mechanism.Steps.Select(step => (int[])[step.Index])], [.. mechanism.Steps.Select(metric.WeightOf)]);
        }

        var runs = Metric.RunClasses(mechanism);
        int[][] classes = [.. mechanism.Steps.Select(step => step.Index).GroupBy(step => runs[step]).Select(steps => steps.ToArray())];
        return (classes, [.. classes.Select(_ => 1)]);
    }

    /// <summary>The moves that are free in a state, in the order of their first steps. A run that changes nothing is left out.</summary>
    public static List<(Step[] Steps, int Cost, State Next)> At(State state, int[][] classes, int[] weights, bool isRun)
    {
        var moves = new List<(Step[] Steps, int Cost, State Next)>();
        for (var c = 0; c < classes.Length; c++)
        {
            var run = new List<(Step[] Steps, State State)> { ([], state) };
            for (var i = 0; i < (isRun ? run.Count : 1); i++)
            {
                foreach (var step in classes[c])
                {
                    if (run[i].State.TryStep(state.Mechanism.Steps[step], out var next) && (!isRun || !run.Exists(known => known.State == next)))
                    {
                        run.Add(([.. run[i].Steps, state.Mechanism.Steps[step]], next));
                        moves.Add((run[^1].Steps, weights[c], next));
                    }
                }
            }
        }

        return moves;
    }
}
