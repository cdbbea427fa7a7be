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
    // 19305: own figure; of these 3678 admit the slice turn: widely printed, value from memory, no source opened.
    [Fact]
    public void There_are_19305_shapes_of_which_3678_let_the_slice_turn()
    {
        var groupoid = ShapeGroupoid.Explore(Disk());
        Assert.Equal(19305, groupoid.ShapeCount);
        Assert.Equal((2 * 19305) + 3678, groupoid.FreeTurnCount);
        Assert.Equal(0, groupoid.PassageCount);
    }

    // Own figure: all permutations of the wide wedges among themselves, of the narrow ones among themselves, and the middle: 2 x 8!^2.
    [Fact]
    public void All_wedges_of_a_kind_and_the_middle_can_be_exchanged_at_any_shape()
    {
        var groupoid = ShapeGroupoid.Explore(Disk());
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

    private static Mechanism Disk() => Mechanism.Create(new MechanismDefinition
    {
        Name = "layered disk",
        Sites = [.. Places('t'), .. Places('b'), "m1", "m2"],
        Turns =
        [
            Make.Turn("T", $"({string.Join(' ', Places('t'))})"),
            Make.Turn("B", $"({string.Join(' ', Places('b'))})"),
            Make.Turn("S", string.Concat(Enumerable.Range(1, 6).Select(i => $"(t{i} b{7 - i})")) + "(m1 m2)"),
        ],
        Blocks = [.. from layer in "tb" from place in (int[])[1, 4, 7, 10] select Make.Split($"{layer}{place} {layer}{place + 1}")],
    });

    private static IEnumerable<string> Places(char layer) => Enumerable.Range(1, 12).Select(i => $"{layer}{i}");
}
