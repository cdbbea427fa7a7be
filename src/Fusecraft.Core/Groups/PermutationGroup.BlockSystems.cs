using System.Collections.Immutable;

namespace Fusecraft.Groups;

// Block systems of orbits, and primitivity.
public sealed partial class PermutationGroup
{
    /// <summary>True when the group is transitive on two or more points and no non-trivial division of them into equal parts is kept by every member.</summary>
    public bool IsPrimitive => IsTransitive && Degree > 1 && MinimalBlockSystems(0).IsEmpty;

    /// <summary>The finest block system of an orbit in which the given points are in one part.</summary>
    /// <param name="points">One or more points of one orbit.</param>
    /// <exception cref="ArgumentException">There is no point, or they are not in one orbit.</exception>
    public BlockSystem BlockSystemJoining(params ReadOnlySpan<int> points)
    {
        if (points.IsEmpty)
        {
            throw new ArgumentException("At least one point is needed.", nameof(points));
        }

        var orbit = OrbitOf(points[0]);
        var pairs = new List<(int, int)>();
        foreach (var point in points)
        {
            if (!orbit.Contains(point))
            {
                throw new ArgumentException($"Point {point} is not in the orbit of point {points[0]}.", nameof(points));
            }

            pairs.Add((points[0], point));
        }

        return AtkinsonBlocks.Join(this, orbit, pairs);
    }

    /// <summary>The minimal block systems of the orbit of a point: non-trivial, and with no other one in between. Empty when the action on the orbit is primitive.</summary>
    /// <remarks>Joins the point with one point of each orbit of its stabilizer.</remarks>
    public ImmutableArray<BlockSystem> MinimalBlockSystems(int point)
    {
        var systems = PairSystems(point);
        return [.. systems.Where(system => !systems.Exists(finer => finer != system && Refines(finer, system)))];
    }

    /// <summary>All non-trivial block systems of the orbit of a point, finest first.</summary>
    /// <remarks>Every one is a join of those that join the point with one other point. There can be many.</remarks>
    public ImmutableArray<BlockSystem> BlockSystems(int point)
    {
        var orbit = OrbitOf(point);
        var pairs = PairSystems(point);
        var all = new List<BlockSystem>(pairs);
        var seen = new HashSet<BlockSystem>(pairs);
        for (var i = 0; i < all.Count; i++)
        {
            foreach (var pair in pairs)
            {
                var joined = AtkinsonBlocks.Join(this, orbit, Links(all[i], point).Concat(Links(pair, point)));
                if (!joined.IsTrivial && seen.Add(joined))
                {
                    all.Add(joined);
                }
            }
        }

        return [.. all.OrderBy(system => system.PartSize).ThenBy(system => string.Join(' ', system.Parts[0]), StringComparer.Ordinal)];
    }

    private static bool Refines(BlockSystem finer, BlockSystem coarser) =>
        finer.Parts.All(part => part.All(point => coarser.PartOf(point) == coarser.PartOf(part[0])));

    private static IEnumerable<(int, int)> Links(BlockSystem system, int point) => system.Parts[system.PartOf(point)].Select(other => (point, other));

    // The non-trivial systems that join the point with one other; points that the stabilizer takes to each other give the same system.
    private List<BlockSystem> PairSystems(int point)
    {
        var orbit = OrbitOf(point);
        var stabilizer = PointwiseStabilizer(point);
        var systems = new List<BlockSystem>();
        foreach (var suborbit in stabilizer.Orbits.Where(suborbit => suborbit[0] != point && orbit.Contains(suborbit[0])))
        {
            var system = AtkinsonBlocks.Join(this, orbit, [(point, suborbit[0])]);
            if (!system.IsTrivial && !systems.Contains(system))
            {
                systems.Add(system);
            }
        }

        return systems;
    }
}
