using System.Numerics;
using Fusecraft.Groupoids;

namespace Fusecraft.Solving;

/// <summary>Chooses the stages of a descent by size: the fewest whose searches are short, and of those the ones whose largest is smallest.</summary>
internal static class StagePlan
{
    /// <summary>A search of a stage may have so many times as many states as its table has entries.</summary>
    private const int SearchFactor = 1 << 17;

    /// <summary>So many arcs are looked at in the search for subgroups.</summary>
    private const long MaxArcs = 4_000_000;

    /// <summary>The stages; null where none were found that fit.</summary>
    public static List<Stage>? Make(VertexGroup vertexGroup, Metric metric, int maxComponent, int maxTable, CancellationToken cancellation)
    {
        StageMove[] moves = [.. RunMoves.Of(vertexGroup.Groupoid, vertexGroup.BaseShape, metric)];
        var subgroups = PowerSubgroup.Find(vertexGroup, moves, MaxArcs, cancellation);
        if (subgroups.Count == 0 || Shortest(subgroups, new BigInteger(maxTable) * SearchFactor) is not { } chain)
        {
            return null;
        }

        var stages = new List<Stage>();
        for (var i = 0; i < chain.Count; i++)
        {
            int[] goal = i + 1 < chain.Count ? chain[i + 1].Colours : [.. Enumerable.Range(0, vertexGroup.Groupoid.Mechanism.SiteCount)];
            if (Stage.Build(chain[i].Frame, chain[i].Group, goal, maxComponent, maxTable, cancellation) is not { } stage)
            {
                return null;
            }

            stages.Add(stage);
        }

        return stages;
    }

    // Chains from the whole down to nothing, stage by stage: for each subgroup the least size of the largest stage on the way to it.
    private static List<PowerSubgroup>? Shortest(List<PowerSubgroup> subgroups, BigInteger limit)
    {
        var whole = subgroups[0];
        var chains = new List<(BigInteger Largest, List<PowerSubgroup> Chain)> { (BigInteger.One, [whole]) };
        var reached = new HashSet<PowerSubgroup> { whole };
        while (chains.Count > 0)
        {
            List<PowerSubgroup>? best = null;
            var least = BigInteger.Zero;
            foreach (var (largest, chain) in chains)
            {
                var size = BigInteger.Max(largest, chain[^1].StateCount);
                if (chain[^1].StateCount <= limit && (best is null || size < least))
                {
                    (best, least) = (chain, size);
                }
            }

            if (best is not null)
            {
                return best;
            }

            var longer = new List<(BigInteger, List<PowerSubgroup>)>();
            foreach (var next in subgroups)
            {
                if (reached.Contains(next))
                {
                    continue;
                }

                List<PowerSubgroup>? before = null;
                foreach (var (largest, chain) in chains)
                {
                    var size = BigInteger.Max(largest, chain[^1].StateCount / next.Group.Order);
                    if (size <= limit && next.LiesIn(chain[^1]) && (before is null || size < least) && next.IsClosedIn(whole.Group))
                    {
                        (before, least) = (chain, size);
                    }
                }

                if (before is not null)
                {
                    longer.Add((least, [.. before, next]));
                }
            }

            foreach (var (_, chain) in longer)
            {
                reached.Add(chain[^1]);
            }

            chains = longer;
        }

        return null;
    }
}
