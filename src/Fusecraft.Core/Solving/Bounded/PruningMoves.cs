using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>What a metric counts as one, in the form in which tables are filled.</summary>
internal sealed class PruningMoves
{
    public PruningMoves(Mechanism mechanism, Metric metric)
    {
        var steps = mechanism.Steps;
        var weights = steps.Select(metric.WeightOf).ToArray();
        Unit = Math.Max(1, weights.Aggregate(0, (one, other) => (int)System.Numerics.BigInteger.GreatestCommonDivisor(one, other)));
        Weights = [.. weights.Select(weight => weight / Unit)];
        IsUniform = metric.Kind != MetricKind.Weights || Array.TrueForAll(Weights, weight => weight == 1);
        var chains = new List<Chain>();
        var tangles = new List<int[]>();
        if (metric.Kind != MetricKind.Run)
        {
            chains.AddRange(steps.Select(step => new Chain(step.Index, -1, 1)));
        }
        else
        {
            var classes = Metric.RunClasses(mechanism);
            foreach (var group in steps.GroupBy(step => classes[step.Index]))
            {
                var turn = group.First().Turn;
                var order = turn.Permutation.Order;
                if (group.All(step => step.Turn == turn) && (turn.IsReversible || turn.IsOneWay) && order <= LongestChain)
                {
                    chains.Add(new Chain(turn.Forward.Index, turn.Backward?.Index ?? -1, (int)order - 1));
                }
                else
                {
                    tangles.Add([.. group.Select(step => step.Index)]);
                }
            }
        }

        Chains = [.. chains];
        Tangles = [.. tangles];
    }

    private const int LongestChain = 1000;

    /// <summary>What distances are multiples of.</summary>
    public int Unit { get; }

    /// <summary>For each step its weight in units.</summary>
    public int[] Weights { get; }

    /// <summary>True where every move costs one unit.</summary>
    public bool IsUniform { get; }

    /// <summary>Moves that repeat one step.</summary>
    public Chain[] Chains { get; }

    /// <summary>Sets of steps of which any may follow each other within a move.</summary>
    public int[][] Tangles { get; }

    /// <param name="Step">The step.</param>
    /// <param name="Back">The step that undoes it, to be tried where the first is barred before it has gone all the way round; -1 where there is none.</param>
    /// <param name="Length">How often it may be repeated before it comes round.</param>
    public readonly record struct Chain(int Step, int Back, int Length);
}
