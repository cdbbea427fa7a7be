using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Sporadic simple groups: what publications say of their orders, stabilizers, graphs and element orders. Generators in the folder Data, where their origin is told.</summary>
public class SporadicGroupTests
{
    private static readonly Lazy<PermutationGroup> J1 = new(() => Read("J1_266.txt", 266));
    private static readonly Lazy<PermutationGroup> HS = new(() => Read("HS_100.txt", 100));
    private static readonly Lazy<PermutationGroup> M24 = new(() => Read("M24_24.txt", 24));

    // Z. Janko, J. Algebra 3 (1966) 147-186 (opened): the order. The orbits of the stabilizer, a PSL(2,11): the graph's array below (opened).
    [Fact]
    public void J1_acts_on_266_points_with_stabilizer_of_order_660_and_five_suborbits()
    {
        Assert.Equal(175_560, J1.Value.Order);
        Assert.True(J1.Value.IsPrimitive);
        Assert.True(J1.Value.IsPerfect);

        var stabilizer = J1.Value.PointwiseStabilizer(0);
        Assert.Equal(KnownGroups.ProjectiveSpecial(2, 11).Order, stabilizer.Order);
        Assert.Equal([1, 11, 12, 110, 132], stabilizer.Orbits.Select(orbit => orbit.Length).Order());
        Assert.True(stabilizer.IsPerfect);
    }

    // The graph of degree 11 on 266 vertices with array {11,10,6,1;1,1,5,11}: encyclopedia article "Livingstone graph" (opened).
    [Fact]
    public void The_suborbit_of_length_11_makes_the_distance_regular_graph_of_J1()
    {
        Assert.Equal(["11/0", "10/1", "6/1", "1/5", "0/11"], IntersectionArray(J1.Value, 11));
    }

    // D. G. Higman, C. C. Sims, Math. Z. 105 (1968) 110-113 (opened): order and the strongly regular graph (100,22,0,6).
    [Fact]
    public void The_Higman_Sims_group_acts_on_the_strongly_regular_graph_100_22_0_6()
    {
        Assert.Equal(44_352_000, HS.Value.Order);
        Assert.True(HS.Value.IsPrimitive);
        Assert.True(HS.Value.IsPerfect);

        // The stabilizer of a vertex is M22, which acts on the 22 neighbours and on the 77 hexads.
        var stabilizer = HS.Value.PointwiseStabilizer(0);
        Assert.Equal(KnownGroups.MathieuM22().Order, stabilizer.Order);
        Assert.Equal([1, 22, 77], stabilizer.Orbits.Select(orbit => orbit.Length).Order());

        // No triangles: a neighbour has the 21 other neighbours beyond. Six common neighbours of vertices that are not joined.
        Assert.Equal(["22/0", "21/1", "0/6"], IntersectionArray(HS.Value, 22));
    }

    // Order: Atlas of Finite Groups (1985); opened in Encyclopedia of Mathematics, "Sporadic simple group". 759 octads of S(5,8,24): quoted; their stabilizer 2^4:A8 of order 322,560: from memory.
    [Fact]
    public void M24_carries_an_octad_to_759_sets()
    {
        Assert.Equal(244_823_040, M24.Value.Order);
        Assert.True(M24.Value.SameGroupAs(KnownGroups.MathieuM24()));

        // Five points lie in one octad: it is the set of them and the orbit of three points under the members that fix the five.
        int[] five = [0, 1, 2, 3, 4];
        int[] octad = [.. five, .. M24.Value.PointwiseStabilizer(five).Orbits.Single(orbit => orbit.Length == 3)];
        var stabilizer = M24.Value.SetwiseStabilizer(octad);
        Assert.Equal(322_560, stabilizer.Order);
        Assert.Equal(759, M24.Value.OrbitSizeOfSet(octad));
        Assert.Equal(759, M24.Value.OrbitOfSet(octad).Count());
        Assert.Equal(20_160, stabilizer.ActionOn([.. octad.Order()]).Image.Order);
        Assert.Equal(16, stabilizer.ActionOn([.. octad.Order()]).Kernel.Order);

        // The dodecads: complements have the same number of points, 2576 in all.
        Assert.Equal([2576], DodecadOrbitSizes());
    }

    // Atlas class sizes (source not opened, values from memory).
    [Fact]
    public void M11_has_the_element_orders_of_the_atlas()
    {
        (int, int)[] orders = [(1, 1), (2, 165), (3, 440), (4, 990), (5, 1584), (6, 1320), (8, 1980), (11, 1440)];
        var group = PermutationGroup.Generate(MathieuGroups.M11);
        Assert.Equal(orders, group.CycleTypeCounts().GroupBy(count => (int)count.Key.Order).Select(same => (same.Key, same.Sum(count => (int)count.Value))).Order());
        Assert.Equal(orders, group.Elements().GroupBy(member => (int)member.Order).Select(same => (same.Key, same.Count())).Order());
    }

    // The element orders are those of the Atlas (source not opened, from memory); their least common multiple is the exponent.
    [Fact]
    public void The_exponents_are_those_of_the_element_orders_of_the_atlas()
    {
        Assert.Equal(1320, KnownGroups.MathieuM11().FindExponent());
        Assert.Equal(1320, KnownGroups.MathieuM12().FindExponent());
        Assert.Equal(9240, KnownGroups.MathieuM22().FindExponent());
        Assert.Equal(212_520, KnownGroups.MathieuM23().FindExponent());
        Assert.Equal(212_520, M24.Value.FindExponent());
        Assert.Equal(43_890, J1.Value.FindExponent());
        Assert.Equal(9240, HS.Value.FindExponent());
    }

    private static PermutationGroup Read(string file, int degree) => PermutationGroup.Generate(
        File.ReadLines(Repository.PathOf($"tests/Fusecraft.Core.Tests/Data/{file}")).Where(line => line.StartsWith('(')).Select(Permutation.Parse), degree);

    // Joins the base point to a suborbit and carries that about; for each distance from the base point how many neighbours lie further out / further in, which must not depend on the vertex.
    private static IEnumerable<string> IntersectionArray(PermutationGroup group, int valency)
    {
        var neighbours = new ImmutableArray<int>[group.Degree];
        neighbours[0] = group.PointwiseStabilizer(0).Orbits.Single(orbit => orbit.Length == valency);
        var distance = Enumerable.Repeat(-1, group.Degree).ToArray();
        var chain = group.ChainWithBase(0);
        for (var vertex = 0; vertex < group.Degree; vertex++)
        {
            var representative = chain.Representative(0, vertex);
            neighbours[vertex] = [.. neighbours[0].Select(point => representative[point])];
        }

        distance[0] = 0;
        var queue = new Queue<int>([0]);
        while (queue.TryDequeue(out var vertex))
        {
            foreach (var other in neighbours[vertex].Where(other => distance[other] < 0))
            {
                distance[other] = distance[vertex] + 1;
                queue.Enqueue(other);
            }
        }

        return Enumerable.Range(0, distance.Max() + 1).Select(d => Assert.Single(Enumerable.Range(0, group.Degree).Where(vertex => distance[vertex] == d)
            .Select(vertex => $"{neighbours[vertex].Count(other => distance[other] > d)}/{neighbours[vertex].Count(other => distance[other] < d)}").Distinct()));
    }

    // Symmetric differences of two octads that meet in two points.
    private static IEnumerable<int> DodecadOrbitSizes()
    {
        var group = M24.Value;
        int[] five = [0, 1, 2, 3, 4];
        int[] octad = [.. five, .. group.PointwiseStabilizer(five).Orbits.Single(orbit => orbit.Length == 3)];
        var other = group.OrbitOfSet(octad).First(set => set.Count(octad.Contains) == 2);
        int[] dodecad = [.. octad.Except(other), .. other.Except(octad)];
        return [(int)group.OrbitSizeOfSet(dodecad)];
    }
}
