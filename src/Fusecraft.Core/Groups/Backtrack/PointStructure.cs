using System.Collections.Immutable;
using System.Diagnostics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// Points with colours and with permutations drawn among them. A permutation <c>g</c> carries one structure to another when it takes each point to one of the same colour and
/// conjugates each permutation <c>a</c> of the first to the corresponding one <c>g⁻¹ * a * g</c> of the second.
/// </summary>
internal sealed class PointStructure
{
    /// <summary>A structure on the points 0 … colours.Length-1; the permutations move none beyond.</summary>
    public PointStructure(int[] colours, params ImmutableArray<Permutation> permutations)
    {
        Permutations = [.. permutations.Select(permutation => Images(permutation, colours.Length))];
        Invariants = new int[1 + permutations.Length][];
        Invariants[0] = colours;
        for (var k = 0; k < permutations.Length; k++)
        {
            Invariants[k + 1] = CycleLengths(permutations[k], colours.Length);
        }
    }

    public int Degree => Invariants[0].Length;

    /// <summary>The images of the points under each permutation.</summary>
    public int[][] Permutations { get; }

    /// <summary>Numbers for the points, equal for points that carry over to each other: the colours, and for each permutation the length of the point's cycle.</summary>
    public int[][] Invariants { get; }

    public static int[] Images(Permutation permutation, int degree)
    {
        Debug.Assert(permutation.SupportEnd <= degree, "The permutation moves points beyond the degree.");
        var images = new int[degree];
        permutation.CopyLanes<int>(images);
        return images;
    }

    private static int[] CycleLengths(Permutation permutation, int degree)
    {
        var lengths = new int[degree];
        lengths.AsSpan().Fill(1);
        foreach (var cycle in new CycleWalk(permutation))
        {
            foreach (var point in cycle)
            {
                lengths[point] = cycle.Length;
            }
        }

        return lengths;
    }
}
