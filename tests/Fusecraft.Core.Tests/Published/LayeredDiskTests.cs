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
    internal const string Disk = """
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

    // 29: from memory, no source opened; 24: own figure.
    [Fact]
    public void A_layer_has_29_shapes_up_to_rotation_and_24_up_to_reflection_too()
    {
        var layers = Layers().SelectMany(pair => (int[])[pair.Top, pair.Bottom]).ToHashSet();
        Assert.Equal(29, layers.Count);
        Assert.Equal(24, layers.Select(layer => Math.Min(layer, Reflected(layer))).Distinct().Count());
    }

    // Widely printed; value from memory, no source opened: by the number of wide wedges above, 2 … 6.
    [Fact]
    public void There_are_170_pairs_of_layer_shapes()
    {
        var pairs = Layers();
        Assert.Equal(170, pairs.Count);
        Assert.Equal([5, 30, 100, 30, 5], pairs.GroupBy(pair => BitOperations.PopCount((uint)pair.Top)).OrderBy(group => group.Key).Select(group => group.Count()));
    }

    // From memory, no source opened.
    [Fact]
    public void There_are_90_pairs_up_to_exchange_and_65_up_to_mirror_images_too()
    {
        var pairs = Layers();
        Assert.Equal(90, pairs.Select(Sorted).Distinct().Count());
        Assert.Equal(65, pairs.Select(pair => Least(Sorted(pair), Sorted((Reflected(pair.Top), Reflected(pair.Bottom))))).Distinct().Count());

        static (int, int) Sorted((int Top, int Bottom) pair) => (Math.Min(pair.Top, pair.Bottom), Math.Max(pair.Top, pair.Bottom));
        static (int, int) Least((int, int) one, (int, int) other) => one.CompareTo(other) <= 0 ? one : other;
    }

    // 3678 x 2 x 8!^2: from memory, no source opened; only positions in which the slice can turn.
    [Fact]
    public void Positions_that_let_the_slice_turn_are_fewer()
    {
        var groupoid = ShapeGroupoid.Explore(MechanismFile.Parse(Disk));
        var slice = groupoid.Mechanism.FindTurn("S")!.Forward;
        var free = Enumerable.Range(0, groupoid.ShapeCount).Count(shape => groupoid.After(shape, slice) >= 0);
        Assert.Equal(3678, free);
        Assert.Equal(new BigInteger(11958666854400), groupoid.VertexGroupAt(0).Order * free);
    }

    // The pairs of layer shapes, each layer up to rotation: a bit for each place that a wide wedge shares with the next one.
    private static HashSet<(int Top, int Bottom)> Layers()
    {
        var groupoid = ShapeGroupoid.Explore(MechanismFile.Parse(Disk));
        return [.. Enumerable.Range(0, groupoid.ShapeCount).Select(shape =>
        {
            int[] layers = [0, 0];
            foreach (var block in groupoid.ShapeAt(shape).Blocks)
            {
                var (first, second) = (block.Min() % 12, block.Max() % 12);
                layers[block[0] / 12] |= 1 << (second == first + 1 ? first : 11);
            }

            return (LeastRotation(layers[0]), LeastRotation(layers[1]));
        })];
    }

    private static int LeastRotation(int layer) => Enumerable.Range(0, 12).Min(by => ((layer << by) | (layer >> (12 - by))) & 0xFFF);

    private static int Reflected(int layer) => LeastRotation(Enumerable.Range(0, 12).Sum(place => (layer >> place & 1) << (11 - place)));
}
