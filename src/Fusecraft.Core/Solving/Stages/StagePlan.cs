using System.Numerics;
using Fusecraft.Groupoids;

namespace Fusecraft.Solving;

/// <summary>The stages of a descent in one region, chosen by size: the fewest whose searches are short, and of those the ones whose largest is smallest.</summary>
internal sealed class StagePlan
{
    /// <summary>A search of a stage may have so many times as many states as its table may have entries.</summary>
    private const int SearchFactor = 1 << 17;

    /// <summary>Where nothing else fits, one stage may be so much larger still.</summary>
    private const int Stretch = 256;

    /// <summary>Subgroups of powers are not looked for where more of them than this would be needed.</summary>
    private const int MaxPowerStages = 4;

    /// <summary>So many arcs are looked at in the search for subgroups.</summary>
    private const long MaxArcs = 2_000_000;

    /// <summary>The greatest number of arrangements of one coset space.</summary>
    private const int MaxComponent = 250_000;

    private StagePlan(StageFrame whole, IReadOnlyList<Stage> stages)
    {
        Whole = whole;
        Stages = stages;
    }

    /// <summary>All shapes of the region and all moves.</summary>
    public StageFrame Whole { get; }

    /// <summary>The stages; empty where none were found that fit.</summary>
    public IReadOnlyList<Stage> Stages { get; }

    /// <summary>What the stages see beside the labels; null where they see labels alone.</summary>
    public OrbitSigns? Signs { get; private init; }

    /// <summary>Chooses stages and builds their tables; null where the region has too many shapes.</summary>
    /// <param name="vertexGroup">The loops of the region at the base shape, where the descent ends.</param>
    /// <param name="metric">What a move costs.</param>
    /// <param name="maxTable">The greatest number of bytes of one table.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static StagePlan? Make(VertexGroup vertexGroup, Metric metric, int maxTable, CancellationToken cancellation)
    {
        StageMove[] moves = [.. RunMoves.Of(vertexGroup.Groupoid, vertexGroup.BaseShape, metric)];
        if (PowerSubgroup.Whole(vertexGroup, moves, MaxArcs, cancellation) is not { } whole)
        {
            return null;
        }

        var limit = new BigInteger(maxTable) * SearchFactor;
        var chain = whole.StateCount <= limit ? [whole]
            : whole.StateCount > BigInteger.Pow(limit, MaxPowerStages) ? []
            : Shortest([whole, .. PowerSubgroup.Find(vertexGroup, whole, MaxArcs, cancellation)], limit);
        if (chain.Count == 0)
        {
            // A search that goes straight for the goal finds words in one stage that is too large for a thorough one.
            var stretched = whole.StateCount <= limit * Stretch;
            if (stretched && Single(whole, maxTable, cancellation) is { } single)
            {
                return new StagePlan(whole.Frame, single);
            }

            var signs = new OrbitSigns(moves, whole.Frame.SiteCount);
            return new StagePlan(whole.Frame, PieceStages.Make(vertexGroup, whole.Frame, signs, MaxComponent, maxTable, cancellation) ?? []) { Signs = signs };
        }

        var stages = new List<Stage>();
        for (var i = 0; i < chain.Count; i++)
        {
            int[] goal = i + 1 < chain.Count ? chain[i + 1].Colours : [.. Enumerable.Range(0, vertexGroup.Groupoid.Mechanism.SiteCount)];
            if (Stage.Build(chain[i].Frame, chain[i].Group, goal, MaxComponent, maxTable, cancellation) is not { } stage)
            {
                return new StagePlan(whole.Frame, []);
            }

            stages.Add(stage);
        }

        return new StagePlan(whole.Frame, stages);
    }

    private static List<Stage>? Single(PowerSubgroup whole, int maxTable, CancellationToken cancellation) =>
        Stage.Build(whole.Frame, whole.Group, [.. Enumerable.Range(0, whole.Frame.SiteCount)], MaxComponent, maxTable, cancellation) is { } stage ? [stage] : null;

    // Chains from the whole down to nothing, stage by stage: for each subgroup the least size of the largest stage on the way to it.
    private static List<PowerSubgroup> Shortest(List<PowerSubgroup> subgroups, BigInteger limit)
    {
        var whole = subgroups[0];
        var chains = new List<(BigInteger Largest, List<PowerSubgroup> Chain)> { (BigInteger.One, [whole]) };
        var reached = new HashSet<PowerSubgroup> { whole };
        while (chains.Count > 0)
        {
            if (Ending(chains, limit) is { } ending)
            {
                return ending;
            }

            var longer = new List<(BigInteger Largest, List<PowerSubgroup> Chain)>();
            foreach (var next in subgroups)
            {
                if (!reached.Contains(next) && Before(next, chains, whole, limit) is { } found)
                {
                    longer.Add((found.Largest, [.. found.Chain, next]));
                }
            }

            longer.ForEach(chain => reached.Add(chain.Chain[^1]));
            chains = longer;
        }

        return [];
    }

    // The chain whose last subgroup can be searched down to nothing with the smallest largest stage.
    private static List<PowerSubgroup>? Ending(List<(BigInteger Largest, List<PowerSubgroup> Chain)> chains, BigInteger limit)
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

        return best;
    }

    private static (BigInteger Largest, List<PowerSubgroup> Chain)? Before(
        PowerSubgroup next, List<(BigInteger Largest, List<PowerSubgroup> Chain)> chains, PowerSubgroup whole, BigInteger limit)
    {
        (BigInteger Largest, List<PowerSubgroup> Chain)? before = null;
        foreach (var (largest, chain) in chains)
        {
            var size = BigInteger.Max(largest, chain[^1].StateCount / next.Group.Order);
            if (size <= limit && (before is null || size < before.Value.Largest) && next.LiesIn(chain[^1]) && next.IsClosedIn(whole.Group))
            {
                before = (size, chain);
            }
        }

        return before;
    }
}
