using System.Collections.Immutable;

namespace Fusecraft.Groups;

/// <summary>The finest block system of an orbit in which given points are in one part: points are united, and with them their images under each generator, until nothing changes.</summary>
/// <remarks>Source: M. D. Atkinson, <em>An algorithm for finding the blocks of a permutation group</em>, Math. Comp. 29 (1975) (from memory). Nearly linear in points times generators.</remarks>
internal static class AtkinsonBlocks
{
    public static BlockSystem Join(PermutationGroup group, ImmutableArray<int> orbit, IEnumerable<(int A, int B)> pairs)
    {
        int[][] generators = [.. group.Generators.Select(generator =>
        {
            var images = new int[group.Degree];
            generator.CopyImages(images);
            return images;
        })];
        var parent = Join(generators, group.Degree, pairs, out _);
        return new BlockSystem([.. orbit.GroupBy(point => Root(parent, point)).Select(part => part.Order().ToImmutableArray()).OrderBy(part => part[0])]);
    }

    /// <summary>The same for image lists: gives for each point another one of its part, or itself; following these leads to the part's root.</summary>
    /// <param name="generators">Image lists.</param>
    /// <param name="size">Points are 0 … size-1.</param>
    /// <param name="pairs">Points to unite.</param>
    /// <param name="unions">How many fewer parts there are than points.</param>
    public static int[] Join(int[][] generators, int size, IEnumerable<(int A, int B)> pairs, out int unions)
    {
        var parent = new int[size];
        for (var point = 0; point < size; point++)
        {
            parent[point] = point;
        }

        unions = 0;
        var open = new Stack<(int A, int B)>(pairs);
        while (unions < size - 1 && open.TryPop(out var pair))
        {
            var (a, b) = (Root(parent, pair.A), Root(parent, pair.B));
            if (a == b)
            {
                continue;
            }

            parent[b] = a;
            unions++;
            foreach (var generator in generators)
            {
                open.Push((generator[pair.A], generator[pair.B]));
            }
        }

        return parent;
    }

    public static int Root(int[] parent, int point)
    {
        while (parent[point] != point)
        {
            parent[point] = parent[parent[point]];
            point = parent[point];
        }

        return point;
    }
}
