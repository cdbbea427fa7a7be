using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>The moves of a region in a metric: the steps, and the runs of steps of one class that do what no single step does, such as half turns and tiles sliding as one.</summary>
internal static class RunMoves
{
    /// <summary>Runs are looked for at so many shapes, and no more than so many of one class at one shape.</summary>
    private const int MaxShapes = 2_000;
    private const int MaxRuns = 12;

    /// <summary>With more moves than this only single steps are moves.</summary>
    private const int MaxMoves = 160;

    /// <summary>Weights are scaled so that none costs more than this.</summary>
    private const int GreatestCost = 20;

    /// <summary>All moves that are free at some of the first shapes of the region, shortest first within each class.</summary>
    public static List<StageMove> Of(ShapeGroupoid groupoid, int baseShape, Metric metric)
    {
        var mechanism = groupoid.Mechanism;
        var classes = Metric.RunClasses(mechanism);
        var costs = Costs(mechanism, metric);
        var moves = new List<StageMove>();
        var seen = new HashSet<string>();
        var region = groupoid.RegionOf(baseShape);

        // In a class that is open some run may be missing, so its moves may follow each other.
        var isLarge = groupoid.Regions[region].ShapeCount > MaxShapes;
        var open = mechanism.Steps.Where(step => isLarge && (step.Turn.HasGuard || !step.Turn.IsReversible)).Select(step => classes[step.Index]).ToHashSet();
        for (int shape = 0, tried = 0; shape < groupoid.ShapeCount && tried < MaxShapes; shape++)
        {
            if (groupoid.RegionOf(shape) != region)
            {
                continue;
            }

            tried++;
            foreach (var runClass in classes.Distinct())
            {
                var runs = RunsAt(groupoid, shape, runClass, classes);
                if (runs.Count > MaxRuns)
                {
                    open.Add(runClass);
                }

                runs.ForEach(Add);
            }
        }

        if (isLarge)
        {
            // Steps that are free at none of the shapes looked at may be at others.
            mechanism.Steps.Select(step => new[] { step.Index }).ToList().ForEach(Add);
        }

        if (moves.Count > MaxMoves)
        {
            open.UnionWith(moves.Where(move => move.Steps.Length > 1).Select(move => move.Class));
            moves.RemoveAll(move => move.Steps.Length > 1);
        }

        var kept = moves.ConvertAll(move => open.Contains(move.Class) ? move with { Class = -1 } : move);
        return [.. kept.OrderBy(move => move.Class).ThenBy(move => move.Cost).ThenBy(move => move.Steps.Length)];

        void Add(int[] run)
        {
            if (seen.Add(string.Join(' ', run)))
            {
                moves.Add(new StageMove(run, Product(mechanism, run), metric.Kind == MetricKind.Run ? 1 : run.Sum(step => costs[step]), classes[run[0]]));
            }
        }
    }

    /// <summary>The product of the permutations of some steps.</summary>
    public static Permutation Product(Mechanism mechanism, IEnumerable<int> steps) =>
        steps.Aggregate(Permutation.Identity, (product, step) => product * mechanism.Steps[step].Permutation);

    // What each step costs in the search: its weight, scaled; steps without weight cost little, for a search must get on.
    private static int[] Costs(Mechanism mechanism, Metric metric)
    {
        int[] weights = [.. mechanism.Steps.Select(metric.WeightOf)];
        var (least, greatest) = weights.Length == 0 ? (1, 1) : (weights.Min(), weights.Max());
        return least == 1 && greatest <= GreatestCost ? weights : [.. weights.Select(weight => Math.Max(1, weight * GreatestCost / Math.Max(1, greatest)))];
    }

    // Breadth-first over the permutations that steps of one class bring about from a shape.
    private static List<int[]> RunsAt(ShapeGroupoid groupoid, int shape, int runClass, int[] classes)
    {
        var runs = new List<(int[] Steps, int Shape, Permutation Permutation)> { ([], shape, Permutation.Identity) };
        var seen = new HashSet<Permutation> { Permutation.Identity };
        for (var i = 0; i < runs.Count && runs.Count <= MaxRuns; i++)
        {
            for (var step = 0; step < classes.Length; step++)
            {
                if (classes[step] == runClass && groupoid.Target(runs[i].Shape, step) is >= 0 and var target && groupoid.RegionOf(target) == groupoid.RegionOf(shape)
                    && runs[i].Permutation * groupoid.Mechanism.Steps[step].Permutation is var permutation && seen.Add(permutation))
                {
                    runs.Add(([.. runs[i].Steps, step], target, permutation));
                }
            }
        }

        return runs.ConvertAll(run => run.Steps)[1..];
    }
}
