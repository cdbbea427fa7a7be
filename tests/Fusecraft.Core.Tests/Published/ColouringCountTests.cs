using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Numbers of colourings up to the members of a group, by the Cauchy-Frobenius lemma.</summary>
public class ColouringCountTests
{
    // The rotations of the cube on points of space, by how many of the coordinates are not 0: 1 faces, 2 edges, 3 corners.
    private static PermutationGroup Cube(int coordinates) => OnPoints(
        [.. from x in (int[])[-1, 0, 1] from y in (int[])[-1, 0, 1] from z in (int[])[-1, 0, 1] where Math.Abs(x) + Math.Abs(y) + Math.Abs(z) == coordinates select (x, y, z)],
        point => (point.X, point.Z, -point.Y),
        point => (point.Z, point.Y, -point.X));

    // OEIS A047780 (opened).
    [Fact]
    public void Faces_of_a_cube() => RequireCounts(Cube(1), 24, 1, 10, 57, 240, 800, 2226);

    // OEIS A000543 (opened).
    [Fact]
    public void Corners_of_a_cube() => RequireCounts(Cube(3), 24, 1, 23, 333, 2916, 16725, 70911);

    // OEIS A060530 (source not seen, values from memory).
    [Fact]
    public void Edges_of_a_cube() => RequireCounts(Cube(2), 24, 1, 218, 22815, 703760, 10194250, 90775566);

    // OEIS A006008 (source not opened, values from memory).
    [Fact]
    public void Corners_of_a_tetrahedron() => RequireCounts(Tetrahedron([(1, 1, 1), (1, -1, -1), (-1, 1, -1), (-1, -1, 1)]), 12, 1, 5, 15, 36, 75, 141);

    // Own figures, for regression. The middles of the edges are the middles of the faces of a cube.
    [Fact]
    public void Edges_of_a_tetrahedron() => RequireCounts(Tetrahedron([(1, 0, 0), (-1, 0, 0), (0, 1, 0), (0, -1, 0), (0, 0, 1), (0, 0, -1)]), 12, 1, 12, 87, 416, 1475, 4236);

    // OEIS A000031, A001867 (sources not opened, values from memory).
    [Theory]
    [InlineData(2, "2 3 4 6 8 14 20 36 60 108 188 352")]
    [InlineData(3, "3 6 11 24 51 130 315 834 2195 5934 16107 44368")]
    public void Necklaces_of_1_to_12_beads(int colours, string counts) =>
        Assert.Equal(counts, string.Join(' ', Enumerable.Range(1, 12).Select(n => KnownGroups.Cyclic(n).CountColourings(colours))));

    // OEIS A000029 (opened through A056342 = A000029 - 2), A027671 (source not opened, values from memory). Turning over one or two beads changes nothing.
    [Theory]
    [InlineData(2, "2 3 4 6 8 13 18 30 46 78 126 224")]
    [InlineData(3, "3 6 10 21 39 92 198 498 1219 3210 8418 22913")]
    public void Bracelets_of_1_to_12_beads(int colours, string counts) =>
        Assert.Equal(counts, string.Join(' ', Enumerable.Range(1, 12).Select(n => (n < 3 ? KnownGroups.Cyclic(n) : KnownGroups.Dihedral(n)).CountColourings(colours))));

    // OEIS A000088 (source not opened, values from memory): a graph is a colouring of the pairs of vertices in two colours.
    [Fact]
    public void Graphs_on_1_to_7_vertices() =>
        Assert.Equal([1, 2, 4, 11, 34, 156, 1044], Enumerable.Range(1, 7).Select(n => (int)OnPairs(KnownGroups.Symmetric(n)).CountColourings(2)));

    private static void RequireCounts(PermutationGroup group, int order, params int[] counts)
    {
        Assert.Equal(order, group.Order);
        Assert.Equal(counts, Enumerable.Range(1, counts.Length).Select(colours => (int)group.CountColourings(colours)));
    }

    private static PermutationGroup Tetrahedron((int X, int Y, int Z)[] points) => OnPoints(points, point => (point.Y, point.Z, point.X), point => (point.X, -point.Y, -point.Z));

    private static PermutationGroup OnPoints((int X, int Y, int Z)[] points, params Func<(int X, int Y, int Z), (int, int, int)>[] rotations) =>
        PermutationGroup.Generate(rotations.Select(rotation => Permutation.FromImages([.. points.Select(point => Array.IndexOf(points, rotation(point)))])), points.Length);

    private static PermutationGroup OnPairs(PermutationGroup group)
    {
        var degree = group.Degree;
        (int A, int B)[] pairs = [.. from b in Enumerable.Range(0, degree) from a in Enumerable.Range(0, b) select (a, b)];
        return PermutationGroup.Generate(
            group.Generators.Select(p => Permutation.FromImages([.. pairs.Select(pair => Array.IndexOf(pairs, (Math.Min(p[pair.A], p[pair.B]), Math.Max(p[pair.A], p[pair.B]))))])), pairs.Length);
    }
}
