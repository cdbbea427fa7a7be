using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

// Actions on orbits and on block systems.
public sealed partial class PermutationGroup
{
    /// <summary>The action on some points that the group carries to themselves, such as an orbit: point <c>points[i]</c> is called <c>i</c>.</summary>
    /// <param name="points">Distinct points, closed under the group.</param>
    /// <exception cref="ArgumentException">A point is given twice, or some member takes a point out of the set.</exception>
    public GroupAction ActionOn(IReadOnlyList<int> points)
    {
        ArgumentNullException.ThrowIfNull(points);
        var indexOf = new Dictionary<int, int>();
        foreach (var point in points)
        {
            if (!indexOf.TryAdd(point, indexOf.Count))
            {
                throw new ArgumentException($"Point {point} is given twice.", nameof(points));
            }
        }

        foreach (var generator in Generators)
        {
            foreach (var point in points)
            {
                if (!indexOf.ContainsKey(generator[point]))
                {
                    throw new ArgumentException($"{generator} takes point {point} to {generator[point]}, which is not among the points.", nameof(points));
                }
            }
        }

        return new GroupAction(this, points.Count, member => Permutation.FromTrustedImages<int>([.. points.Select(point => indexOf[member[point]])]));
    }

    /// <summary>The action on the parts of a block system, numbered as in <see cref="BlockSystem.Parts"/>.</summary>
    /// <exception cref="ArgumentException">It is no block system of this group.</exception>
    public GroupAction ActionOn(BlockSystem blockSystem)
    {
        ArgumentNullException.ThrowIfNull(blockSystem);
        foreach (var generator in Generators)
        {
            foreach (var part in blockSystem.Parts)
            {
                var target = blockSystem.PartOf(generator[part[0]]);
                if (target < 0 || part.Any(point => blockSystem.PartOf(generator[point]) != target))
                {
                    throw new ArgumentException($"{generator} takes a part to no part, so this is no block system of the group.", nameof(blockSystem));
                }
            }
        }

        return new GroupAction(
            this, blockSystem.Parts.Length, member => Permutation.FromTrustedImages<int>([.. blockSystem.Parts.Select(part => blockSystem.PartOf(member[part[0]]))]));
    }
}
