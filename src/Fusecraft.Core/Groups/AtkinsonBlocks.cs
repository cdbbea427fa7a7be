using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The finest block system of an orbit in which given points are in one part: points are united, and with them their images under each generator, until nothing changes.</summary>
/// <remarks>Source: M. D. Atkinson, <em>An algorithm for finding the blocks of a permutation group</em>, Math. Comp. 29 (1975) (from memory). Nearly linear in points times generators.</remarks>
internal static class AtkinsonBlocks
{
    public static BlockSystem Join(PermutationGroup group, ImmutableArray<int> orbit, IEnumerable<(int A, int B)> pairs)
    {
        var parent = Enumerable.Range(0, group.Degree).ToArray();
        var queue = new Queue<(int A, int B)>(pairs);
        while (queue.TryDequeue(out var pair))
        {
            var (a, b) = (Find(pair.A), Find(pair.B));
            if (a == b)
            {
                continue;
            }

            parent[b] = a;
            foreach (var generator in group.Generators)
            {
                queue.Enqueue((generator[pair.A], generator[pair.B]));
            }
        }

        return new BlockSystem([.. orbit.GroupBy(Find).Select(part => part.Order().ToImmutableArray()).OrderBy(part => part[0])]);

        int Find(int point)
        {
            while (parent[point] != point)
            {
                parent[point] = parent[parent[point]];
                point = parent[point];
            }

            return point;
        }
    }
}
