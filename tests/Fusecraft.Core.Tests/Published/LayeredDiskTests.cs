using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>
/// The layered disk: two layers of twelve places, eight wide wedges of two places and eight narrow ones of one, a layer wide, narrow, wide, narrow, … at home. A layer can always
/// turn by one place. The slice turn, barred by any wide wedge across the cut (before places 1 and 7), exchanges places 1 … 6 of the top with those of the bottom in reversed order and flips
/// the middle layer. Wide wedges are blocks of two places, so bonds across the cut bar the slice.
/// </summary>
public class LayeredDiskTests
{
    private const string Disk = """
        { "format": "fusecraft/mechanism/1", "name": "Layered disk",
          "sites": ["t1", "t2", "t3", "t4", "t5", "t6", "t7", "t8", "t9", "t10", "t11", "t12",
                    "b1", "b2", "b3", "b4", "b5", "b6", "b7", "b8", "b9", "b10", "b11", "b12", "m1", "m2"],
          "turns": {
            "T": { "moves": "(t1 t2 t3 t4 t5 t6 t7 t8 t9 t10 t11 t12)" },
            "B": { "moves": "(b1 b2 b3 b4 b5 b6 b7 b8 b9 b10 b11 b12)" },
            "S": { "moves": "(t1 b6)(t2 b5)(t3 b4)(t4 b3)(t5 b2)(t6 b1)(m1 m2)" } },
          "blocks": [["t1", "t2"], ["t4", "t5"], ["t7", "t8"], ["t10", "t11"],
                     ["b1", "b2"], ["b4", "b5"], ["b7", "b8"], ["b10", "b11"]] }
        """;

    // 19305: own figure; of these 3678 admit the slice turn: widely printed, value from memory, no source opened.
    [Fact]
    public void There_are_19305_shapes_of_which_3678_let_the_slice_turn()
    {
        var groupoid = ShapeGroupoid.Explore(MechanismFile.Parse(Disk));
        Assert.Equal(19305, groupoid.ShapeCount);
        Assert.Equal((2 * 19305) + 3678, groupoid.FreeTurnCount);
        Assert.Equal(0, groupoid.PassageCount);
    }

    // Own figure: all permutations of the wide wedges among themselves, of the narrow ones among themselves, and the middle: 2 x 8!^2.
    [Fact]
    public void All_wedges_of_a_kind_and_the_middle_can_be_exchanged_at_any_shape()
    {
        var groupoid = ShapeGroupoid.Explore(MechanismFile.Parse(Disk));
        foreach (var shape in (int[])[0, 1, 9652, 19304])
        {
            var group = groupoid.VertexGroupAt(shape);
            Assert.Equal(3251404800, group.Order);
            Assert.Equal(2 * Make.Factorial(8) * Make.Factorial(8), group.Order);

            // 2 x 8!^2 x 19305: widely printed with 3678 for 19305; this one counts all alignments (own).
            Assert.Equal(new BigInteger(62768369664000), group.StateCount);
            Assert.Equal(ChainProof.Proven, group.Group.Chain.Proof);
        }
    }
}
