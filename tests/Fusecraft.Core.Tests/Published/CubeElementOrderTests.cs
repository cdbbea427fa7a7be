using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>
/// The orders of the elements of the 3x3x3 group: OEIS A338883 (opened): 73 different ones, the greatest 1260, and their least common multiple, the exponent, 55440. The set is found here from the law of the
/// cube (the twists of the corners add up to whole turns, the edges flipped are even in number, corners and edges have one parity), which the group of the turns is then asked about.
/// </summary>
public class CubeElementOrderTests
{
    private static readonly CubeFacelets Cube = new(3);
    private static readonly PermutationGroup Turns = PermutationGroup.Generate("URFDLB".Select(Cube.Turn), Cube.Stickers.Count);

    // For each order one element that has it: the cycles of corners and of edges, each with whether it twists or flips.
    private static readonly Lazy<SortedDictionary<int, (Cycle[] Corners, Cycle[] Edges)>> Elements = new(() =>
    {
        var elements = new SortedDictionary<int, (Cycle[], Cycle[])>();
        var edges = Arrangements(12).Where(cycles => cycles.Count(cycle => cycle.Turns) % 2 == 0).DistinctBy(cycles => (Order(cycles, 2), IsOdd(cycles))).ToList();
        foreach (var corners in Arrangements(8).Where(cycles => cycles.Count(cycle => cycle.Turns) != 1).DistinctBy(cycles => (Order(cycles, 3), IsOdd(cycles))))
        {
            foreach (var other in edges.Where(other => IsOdd(other) == IsOdd(corners)))
            {
                elements.TryAdd(Lcm(Order(corners, 3), Order(other, 2)), (corners, other));
            }
        }

        return elements;
    });

    [Fact]
    public void There_are_73_orders_of_which_the_greatest_is_1260()
    {
        Assert.Equal(73, Elements.Value.Count);
        Assert.Equal(1260, Elements.Value.Keys.Max());
        Assert.Equal(990, Elements.Value.Keys.SkipLast(1).Last());
        Assert.Equal(55_440, Elements.Value.Keys.Aggregate(Lcm));
    }

    [Fact]
    public void The_exponent_is_55440() => Assert.Equal(55_440, PermutationGroup.Generate(CubeFacelets.LayerTurns(3, 1)).FindExponent());

    [Fact]
    public void The_turns_make_an_element_of_each_order()
    {
        foreach (var (order, (corners, edges)) in Elements.Value)
        {
            var element = OnStickers(corners, 3) * OnStickers(edges, 2);
            Assert.Equal(order, element.Order);
            Assert.True(Turns.Contains(element), $"Order {order}: {element}");
        }
    }

    [Fact]
    public void No_element_drawn_has_another_order()
    {
        var random = new SeededRandom(28);
        for (var i = 0; i < 3000; i++)
        {
            Assert.Contains((int)Turns.RandomElement(random).Order, (IDictionary<int, (Cycle[], Cycle[])>)Elements.Value);
        }
    }

    // A single corner twisted or edge flipped, or two corners exchanged: the law of the cube, D. Singmaster, Notes on the Magic Cube, 1981 (source not opened, from memory).
    [Fact]
    public void The_turns_make_no_single_twist_flip_or_exchange()
    {
        Assert.False(Turns.Contains(OnStickers([new Cycle(1, true)], 3)));
        Assert.False(Turns.Contains(OnStickers([new Cycle(1, true)], 2)));
        Assert.False(Turns.Contains(OnStickers([new Cycle(2, false)], 3)));
        Assert.True(Turns.Contains(OnStickers([new Cycle(2, false)], 3) * OnStickers([new Cycle(2, false)], 2)));
    }

    // Pieces in their own order, cycle after cycle.
    private static Permutation OnStickers(Cycle[] cycles, int stickers)
    {
        var pieces = Pieces(stickers);
        var images = Enumerable.Range(0, Cube.Stickers.Count).ToArray();
        var (first, left, sum) = (0, cycles.Count(cycle => cycle.Turns), 0);
        foreach (var (length, turns) in cycles)
        {
            // Twists of corners are by one sticker, or by two to bring the sum to a whole turn at the end; a lone one stays.
            var twist = !turns ? 0 : stickers == 3 && ((left == 1 && sum == 1) || (left == 2 && sum == 2)) ? 2 : 1;
            (left, sum) = turns ? (left - 1, (sum + twist) % stickers) : (left, sum);
            for (var i = 0; i < length; i++)
            {
                for (var k = 0; k < stickers; k++)
                {
                    images[pieces[first + i][k]] = i + 1 < length ? pieces[first + i + 1][k] : pieces[first][(k + twist) % stickers];
                }
            }

            first += length;
        }

        return Permutation.FromImages(images);
    }

    // The stickers of each corner (3) or edge (2), clockwise seen from outside.
    private static List<int[]> Pieces(int stickers)
    {
        var pieces = new List<int[]>();
        int[] three = [-2, 0, 2];
        foreach (var (x, y, z) in from x in three from y in three from z in three where (x, y, z).ToString().Count(c => c == '2') == stickers select (x, y, z))
        {
            var sides = new List<(int, int, int)>();
            foreach (var (side, coordinate) in new[] { ((Math.Sign(x) * 3, y, z), x), ((x, Math.Sign(y) * 3, z), y), ((x, y, Math.Sign(z) * 3), z) })
            {
                if (coordinate != 0)
                {
                    sides.Add(side);
                }
            }

            if (x * y * z < 0)
            {
                sides.Reverse();
            }

            pieces.Add([.. sides.Select(side => Cube.Stickers.ToList().IndexOf(side))]);
        }

        return pieces;
    }

    private static IEnumerable<Cycle[]> Arrangements(int pieces, int greatest = 12)
    {
        if (pieces == 0)
        {
            yield return [];
        }

        for (var length = Math.Min(pieces, greatest); length >= 1; length--)
        {
            foreach (var rest in Arrangements(pieces - length, length))
            {
                yield return [new Cycle(length, false), .. rest];
                yield return [new Cycle(length, true), .. rest];
            }
        }
    }

    private static bool IsOdd(Cycle[] cycles) => cycles.Sum(cycle => cycle.Length - 1) % 2 != 0;

    // A cycle of pieces has the order of its length, times 3 or 2 where going round once twists or flips.
    private static int Order(Cycle[] cycles, int stickers) => cycles.Aggregate(1, (order, cycle) => Lcm(order, cycle.Turns ? stickers * cycle.Length : cycle.Length));

    private static int Lcm(int a, int b) => a / (int)BigInteger.GreatestCommonDivisor(a, b) * b;

    private sealed record Cycle(int Length, bool Turns);
}
