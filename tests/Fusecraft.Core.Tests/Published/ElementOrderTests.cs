using System.Numerics;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Orders of single permutations against published figures.</summary>
public class ElementOrderTests
{
    /// <summary>
    /// Well known: the order of 2 modulo 51 and modulo 53. The out-shuffle as in P. Diaconis, R. L. Graham, W. M. Kantor, <em>The mathematics of
    /// perfect shuffles</em>, Adv. Appl. Math. 4 (1983) 175-196; figures seen quoted.
    /// </summary>
    [Fact]
    public void Eight_out_shuffles_or_52_in_shuffles_restore_52_cards()
    {
        var outShuffle = Permutation.FromImages([.. Enumerable.Range(0, 52).Select(i => i < 26 ? 2 * i : (2 * (i - 26)) + 1)]);
        var inShuffle = Permutation.FromImages([.. Enumerable.Range(0, 52).Select(i => i < 26 ? (2 * i) + 1 : 2 * (i - 26))]);
        Assert.Equal(8, outShuffle.Order);
        Assert.Equal(52, inShuffle.Order);
    }

    /// <summary>E. Landau, 1903; OEIS A000793. The terms were seen quoted.</summary>
    [Fact]
    public void The_greatest_order_of_a_permutation_of_n_points_is_Landaus_function()
    {
        int[] landau = [1, 2, 3, 4, 6, 6, 12, 15, 20, 30, 30, 60, 60, 84, 105, 140, 210, 210, 420, 420];
        for (var n = 1; n <= landau.Length; n++)
        {
            Assert.Equal(landau[n - 1], Partitions(n, n, repeats: true).Max(lengths => WithCycles(lengths).Order));
        }
    }

    /// <summary>W. D. Joyner, web article, 2021, on orders of shuffles of 52 cards; the figure was seen quoted.</summary>
    [Fact]
    public void The_greatest_order_of_a_permutation_of_52_cards_is_180180()
    {
        // A length that occurs twice never raises the least common multiple, so different lengths are enough.
        Assert.Equal(180_180, Enumerable.Range(1, 52).SelectMany(n => Partitions(n, n, repeats: false)).Max(lengths => WithCycles(lengths).Order));
    }

    /// <summary>
    /// First word: D. Singmaster, 1981 (source not opened, value from memory). Last word: OEIS A338883. The others are common knowledge of the
    /// trade (source not opened, values from memory).
    /// </summary>
    [Theory]
    [InlineData("R U2 D' B D'", 1260)]
    [InlineData("R U", 105)]
    [InlineData("R U'", 63)]
    [InlineData("R U R' U'", 6)]
    [InlineData("R2 U2", 6)]
    [InlineData("R2 U", 30)]
    [InlineData("U R U' F2", 10)]
    public void Orders_of_words_on_the_3x3x3(string word, int order) => Assert.Equal(order, new CubeFacelets(3).Word(word).Order);

    private static Permutation WithCycles(IEnumerable<int> lengths)
    {
        var images = new List<int>();
        foreach (var length in lengths)
        {
            var first = images.Count;
            images.AddRange(Enumerable.Range(0, length).Select(i => first + ((i + 1) % length)));
        }

        return Permutation.FromImages([.. images]);
    }

    private static IEnumerable<int[]> Partitions(int sum, int greatest, bool repeats)
    {
        if (sum == 0)
        {
            yield return [];
        }

        for (var part = Math.Min(sum, greatest); part >= 1; part--)
        {
            foreach (var rest in Partitions(sum - part, repeats ? part : part - 1, repeats))
            {
                yield return [part, .. rest];
            }
        }
    }
}
