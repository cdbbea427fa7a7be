using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// Stages that bring home a few labels each and leave them there, for groups too large for subgroups of powers: the first by all moves, the others by short loops that leave what is home. The labels whose
/// staying leaves the most and shortest moves come first.
/// </summary>
internal static class PieceStages
{
    /// <summary>The tables of a stage take no more than so many look-ups.</summary>
    private const long MaxWork = 12_000_000;

    /// <summary>The stages; null where loops do not suffice.</summary>
    /// <param name="vertexGroup">The loops of the region at the base shape.</param>
    /// <param name="whole">All shapes and all moves.</param>
    /// <param name="signs">The signs of the orbits, which come home first; the stages are about them too.</param>
    /// <param name="maxComponent">The greatest number of arrangements of one coset space.</param>
    /// <param name="maxTable">The greatest number of bytes of a table.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static List<Stage>? Make(VertexGroup vertexGroup, StageFrame whole, OrbitSigns signs, int maxComponent, int maxTable, CancellationToken cancellation)
    {
        var mechanism = vertexGroup.Groupoid.Mechanism;
        if (!mechanism.IsReversible)
        {
            return null;
        }

        var harvest = new StageLoops(mechanism, whole, cancellation);
        var stages = new List<Stage>();
        StageMove[] moves = [.. whole.Moves.Select(signs.Signed)];
        var frame = StageFrame.Explore(vertexGroup.Groupoid, vertexGroup.BaseShape, moves, whole.ShapeCount, cancellation, signs.Count)!;
        var group = PermutationGroup.FromOrder([.. vertexGroup.Group.Generators.Select(signs.Signed)], signs.Count, vertexGroup.Order);
        var labels = new List<int>();
        while (true)
        {
            var limit = stages.Count == 0 ? maxTable / frame.ShapeCount : Math.Min(maxComponent, MaxWork / frame.Moves.Length);
            var (chosen, next) = Choose(frame, group, mechanism, Math.Max(2, limit));
            labels.AddRange(chosen);
            var goal = new int[signs.Count];
            for (var i = 0; i < labels.Count; i++)
            {
                goal[labels[i]] = i + 1;
            }

            if (Stage.Build(frame, group, goal, maxComponent, maxTable, cancellation) is not { } stage)
            {
                return null;
            }

            stages.Add(stage);
            group = next;
            if (group.Order.IsOne)
            {
                return stages;
            }

            if (harvest.Loops(labels, group, signs) is not { } loops || StageFrame.Explore(vertexGroup.Groupoid, vertexGroup.BaseShape, [.. loops], 1, cancellation, signs.Count) is not { } looped)
            {
                return null;
            }

            frame = looped;
        }
    }

    // As many labels as fit, each time one whose staying leaves the most moves, short ones counting more; with the loops that leave them all.
    private static (List<int> Labels, PermutationGroup Stabilizer) Choose(StageFrame frame, PermutationGroup group, Mechanism mechanism, BigInteger limit)
    {
        var chosen = new List<int>();
        var stabilizer = group;
        var moves = new List<StageMove>(frame.Moves);
        while (!stabilizer.Order.IsOne)
        {
            // Signs before all; of the pieces those of the most sites, for the smaller one is, the easier it is moved while all others stay.
            var (best, most) = (-1, -1.0);
            var sites = stabilizer.MovedOrbits.Max(orbit => SitesOf(orbit));
            foreach (var orbit in stabilizer.MovedOrbits)
            {
                if (SitesOf(orbit) < sites)
                {
                    continue;
                }

                foreach (var label in orbit)
                {
                    var left = moves.Where(move => move.Permutation[label] == label).Sum(move => Math.Pow(0.5, move.Cost)) / orbit.Length;
                    if (left > most && (label >= mechanism.SiteCount || mechanism.SitesOfPiece[mechanism.PieceOfSite[label]][0] == label))
                    {
                        (best, most) = (label, left);
                    }
                }
            }

            best = best >= 0 ? best : stabilizer.MovedOrbits[0][0];
            var next = stabilizer.PointwiseStabilizer(best);
            if (group.Order / next.Order > limit && chosen.Count > 0)
            {
                break;
            }

            chosen.Add(best);
            stabilizer = next;
            moves.RemoveAll(move => move.Permutation[best] != best);
        }

        return (chosen, stabilizer);

        int SitesOf(IReadOnlyList<int> orbit) => orbit[0] >= mechanism.SiteCount ? int.MaxValue : mechanism.SitesOfPiece[mechanism.PieceOfSite[orbit[0]]].Length;
    }
}
