using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>
/// Fused cubes: own figures, computed by independent programs, for regression; two of them tie the model to published orders of subgroups. A layer may turn when every block lies
/// inside it or outside it. <c>arrows</c> count quarter turns both ways, that is each free turn twice.
/// </summary>
public class FusedCubeTests
{
    [Theory]
    [InlineData("UFR UF", 24, 240, 75090283462656000)]
    [InlineData("UF U", 4, 40, 1802166803103744000)]

    // The order of <U,R,F> (see CubeOrderTests).
    [InlineData("DBL DB DL BL D B L core", 1, 6, 170659735142400)]

    // The order of <U,R> (see CubeOrderTests): the whole lower left, three long.
    [InlineData("DBL DL DFL BL L FL DB D DF B core F", 1, 4, 73483200)]
    public void One_block_of_a_3x3x3_gives_these_figures(string block, int shapes, int arrows, long order) => Has(Make.Cube(3, "", block), shapes, arrows, order);

    [Fact]
    public void Two_opposite_dominoes_of_a_3x3x3_give_these_figures()
    {
        var group = Has(Make.Cube(3, "", "UFR UF", "DBL DB"), 240, 1992, 325066162176000);
        Assert.Equal(78015878922240000, group.StateCount);
    }

    [Fact]
    public void A_2x2x2_with_six_layers_has_24_times_the_positions_of_one_that_is_held() =>
        Assert.Equal(24 * 3674160, Has(MechanismFile.Parse(SixLayerCube.File()), 1, 12, 88179840).StateCount);

    [Fact]
    public void A_domino_of_a_2x2x2_gives_these_figures() =>
        Assert.Equal(699840, Has(MechanismFile.Parse(SixLayerCube.File("UFR UBR")), 12, 96, 58320).StateCount);

    [Theory]
    [InlineData("UFR UBR DFR DBR", 1, 4, 16, 16)]
    [InlineData("UFR UBR UFL", 4, 16, 4, 16)]
    public void A_slab_and_an_L_of_a_2x2x2_give_these_figures(string block, int shapes, int arrows, int order, int positions) =>
        Assert.Equal(positions, Has(MechanismFile.Parse(SixLayerCube.File(block)), shapes, arrows, order).StateCount);

    // A plain search over positions with no group in it: a position says on which facelet the first facelet of each cell is.
    [Fact]
    public void A_plain_search_finds_exactly_the_positions_of_the_2x2x2_with_a_domino()
    {
        var ufr = SixLayerCube.Facelets.IndexOf((1, 1, 1, 0)) / 3;
        var ubr = SixLayerCube.Facelets.IndexOf((1, 1, -1, 0)) / 3;
        int[][] steps = [.. SixLayerCube.Turns.SelectMany(turn => (int[][])[[.. turn.Images], [.. Enumerable.Range(0, 24).Select(i => turn.Images.IndexOf(i))]])];
        var home = Enumerable.Range(0, 8).Aggregate(0UL, (position, cell) => position | ((ulong)(3 * cell) << (5 * cell)));
        var seen = new HashSet<ulong> { home };
        var shapes = new HashSet<(int, int)>();
        var counts = new List<int>();
        for (List<ulong> level = [home]; level.Count > 0;)
        {
            counts.Add(level.Count);
            var next = new List<ulong>();
            foreach (var position in level)
            {
                var (one, other) = (FaceletAt(position, ufr), FaceletAt(position, ubr));
                shapes.Add((Math.Min(one / 3, other / 3), Math.Max(one / 3, other / 3)));
                foreach (var step in steps)
                {
                    if (IsCarried(step, one) != IsCarried(step, other))
                    {
                        continue;
                    }

                    var after = 0UL;
                    for (var cell = 0; cell < 8; cell++)
                    {
                        after |= (ulong)step[FaceletAt(position, cell)] << (5 * cell);
                    }

                    if (seen.Add(after))
                    {
                        next.Add(after);
                    }
                }
            }

            level = next;
        }

        Assert.Equal(699840, seen.Count);
        Assert.Equal(12, shapes.Count);
        Assert.Equal([1, 8, 44, 208, 832, 2676, 6661, 13444, 24126, 42080, 65560, 93720, 125496, 140352, 115008, 57000, 12192, 432], counts);

        // A layer's turn moves every facelet of its cells.
        static bool IsCarried(int[] step, int facelet) => step[facelet] != facelet;

        static int FaceletAt(ulong position, int cell) => (int)(position >> (5 * cell)) & 31;
    }

    private static VertexGroup Has(Mechanism mechanism, int shapes, int arrows, BigInteger order)
    {
        var groupoid = ShapeGroupoid.Explore(mechanism);
        Assert.Equal(shapes, groupoid.ShapeCount);
        Assert.Equal(arrows, 2 * groupoid.FreeTurnCount);
        var group = groupoid.VertexGroupAt(0);
        Assert.Equal(order, group.Order);
        Assert.Equal(shapes * order, group.StateCount);
        Assert.Equal(ChainProof.Proven, group.Group.Chain.Proof);
        return group;
    }
}
