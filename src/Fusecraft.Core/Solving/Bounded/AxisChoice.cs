using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>Colourings that make good coordinates.</summary>
internal static class AxisChoice
{
    /// <summary>For each point the least of those that some permutations can bring it to.</summary>
    public static int[] OrbitColours(IEnumerable<Permutation> generators, int degree)
    {
        int[] least = [.. Enumerable.Range(0, degree)];
        foreach (var generator in generators)
        {
            for (var point = 0; point < degree; point++)
            {
                Join(point, generator[point]);
            }
        }

        return [.. least.Select((_, point) => Find(point))];

        int Find(int point)
        {
            while (least[point] != point)
            {
                point = least[point] = least[least[point]];
            }

            return point;
        }

        void Join(int one, int other)
        {
            (one, other) = (Find(one), Find(other));
            least[Math.Max(one, other)] = Math.Min(one, other);
        }
    }
}
