using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>How many states lie at each distance from home. Each list stands with its source; the tables behind them are made by the library from the mechanism alone.</summary>
public class DepthListTests
{
    // 2x2: own list, greatest depth 6 in OEIS A151944 (opened). 2x3: OEIS A090034, from L. Karlemo, P. Ostergard 2000 (opened). 2x4: OEIS A090035 (opened). 3x3: OEIS A089473 (opened);
    // A. Reinefeld, IJCAI 1993, 248-253, misprints 749 for 748. The gap starts in a corner.
    [Fact]
    public void Boards_in_single_slides()
    {
        Has([1, 2, 2, 2, 2, 2, 1], Make.Board(2, 2));
        Has([1, 2, 3, 5, 6, 7, 10, 12, 12, 16, 23, 25, 28, 39, 44, 40, 29, 21, 18, 12, 6, 1], Make.Board(3, 2));
        Has([1, 2, 3, 6, 10, 14, 19, 28, 42, 61, 85, 119, 161, 215, 293, 396, 506, 632, 788, 985, 1194, 1414, 1664, 1884, 1999, 1958, 1770, 1463, 1076, 667, 361,
            190, 88, 39, 19, 7, 1], Make.Board(4, 2));
        var nine = Has([1, 2, 4, 8, 16, 20, 39, 62, 116, 152, 286, 396, 748, 1024, 1893, 2512, 4485, 5638, 9529, 10878, 16993, 17110, 23952, 20224, 24047, 15578, 14560, 6274,
            3910, 760, 221, 2], Make.Board(3, 3));
        Assert.Equal(21.972399, nine.Mean, 6);
    }

    // OEIS A090036 (opened): its greatest depth, last terms and number of positions.
    [Fact]
    public void The_2x5_board_in_single_slides()
    {
        var table = Table(Make.Board(5, 2), Metric.Step);
        Assert.Equal(55, table.Greatest);
        Assert.Equal([225, 75, 20, 2], table.Counts[^4..].ToArray());
        Assert.Equal(1814400, table.StateCount);
    }

    // OEIS A090166 (opened); L. Karlemo, P. Ostergard, On sliding block puzzles, JCMCC 34 (2000) 97-107.
    [Fact]
    public void The_3x4_board_in_single_slides()
    {
        var table = Has([1, 2, 4, 9, 20, 37, 63, 122, 232, 431, 781, 1392, 2494, 4442, 7854, 13899, 24215, 41802, 71167, 119888, 198363, 323206, 515778, 811000, 1248011,
            1885279, 2782396, 4009722, 5621354, 7647872, 10065800, 12760413, 15570786, 18171606, 20299876, 21587248, 21841159, 20906905, 18899357, 16058335,
            12772603, 9515217, 6583181, 4242753, 2503873, 1350268, 643245, 270303, 92311, 27116, 5390, 1115, 86, 18], Make.Board(4, 3));
        Assert.InRange(table.Bytes, 1, 62_000_000);
    }

    // Own list: the 2006 paper (see ThirteenPointGameTests) has this metric in tables that could not be opened.
    [Fact]
    public void The_thirteen_point_game() => Has([1, 12, 108, 918, 7344, 57852, 344925, 733500, 90852, 8], ThirteenPointGame.Create());

    // OEIS A079762 (quarter turns) and A079761 (runs), opened; the means too.
    [Fact]
    public void The_2x2x2_in_quarter_turns_and_in_runs()
    {
        Assert.Equal(10.666386, Has([1, 6, 27, 120, 534, 2256, 8969, 33058, 114149, 360508, 930588, 1350852, 782536, 90280, 276], Make.Cube(2)).Mean, 6);
        Assert.Equal(8.755576, Has([1, 9, 54, 321, 1847, 9992, 50136, 227536, 870072, 1887748, 623800, 2644], Make.Cube(2), Metric.Run).Mean, 6);
    }

    // Own list.
    [Fact]
    public void The_2x2x2_in_half_turns_alone() => Has([1, 3, 6, 9, 5], Make.Cube(2, "U2 R2 F2"));

    // OEIS A080630 (quarter turns, opened) and A080629 (runs, entry not seen).
    [Fact]
    public void The_corners_of_the_3x3x3_alone()
    {
        var cube = Make.Cube(3);
        bool IsCorner(int site) => cube.SitesOfPiece[cube.PieceOfSite[site]].Length == 3;
        var corners = Mechanism.FromGenerators(
            "corners", cube.SiteCount, cube.Turns.Select(turn => (turn.Name, Permutation.FromImages([.. Enumerable.Range(0, cube.SiteCount).Select(site => IsCorner(site) ? turn.Permutation[site] : site)]))));
        Has([1, 12, 114, 924, 6539, 39528, 199926, 806136, 2761740, 8656152, 22334112, 32420448, 18780864, 2166720, 6624], corners);
        Has([1, 18, 243, 2874, 28000, 205416, 1168516, 5402628, 20776176, 45391616, 15139616, 64736], corners, Metric.Run);
    }

    // OEIS A080628 (opened).
    [Fact]
    public void Two_neighbouring_faces_of_the_3x3x3()
    {
        var table = Has([1, 4, 10, 24, 58, 140, 338, 816, 1970, 4756, 11448, 27448, 65260, 154192, 360692, 827540, 1851345, 3968840, 7891990, 13659821, 18471682, 16586822,
            8039455, 1511110, 47351, 87], Make.Cube(3, "U R"));
        Assert.InRange(table.Bytes, 1, 19_000_000);
    }

    // OEIS A080627 (opened); a half turn is one step.
    [Fact]
    public void The_group_of_half_turns_of_the_3x3x3() => Has([1, 6, 27, 120, 519, 1932, 6484, 20310, 55034, 113892, 178495, 179196, 89728, 16176, 1488, 144], Make.Cube(3, "U2 R2 F2 D2 L2 B2"));

    // OEIS A080615 (opened).
    [Fact]
    public void Half_turns_of_four_faces_of_the_3x3x3() => Has([1, 4, 10, 24, 53, 64, 31, 4, 1], Make.Cube(3, "U2 D2 F2 B2"));

    // OEIS A080619 (opened): a middle layer turns when two opposite faces turn the same way round in space.
    [Fact]
    public void The_slice_group_of_the_3x3x3()
    {
        var cube = Make.Cube(3);
        Permutation Slice(string one, string other) => cube.FindTurn(one)!.Permutation * cube.FindTurn(other)!.Permutation.Inverse();
        Has([1, 6, 27, 120, 287, 258, 69], Mechanism.FromGenerators("slices", cube.SiteCount, ("RL", Slice("R", "L")), ("UD", Slice("U", "D")), ("FB", Slice("F", "B"))));
    }

    // Widely printed; value from memory.
    [Fact]
    public void The_tetrahedral_puzzle_in_third_turns() => Has([1, 8, 48, 288, 1728, 9896, 51808, 220111, 480467, 166276, 2457, 32], Tetrahedron.Create());

    // Own figures, confirmed by a plain search over positions: a 2x2x2 with six layers and one fused domino.
    [Fact]
    public void A_2x2x2_with_a_fused_domino() => Has([1, 8, 44, 208, 832, 2676, 6661, 13444, 24126, 42080, 65560, 93720, 125496, 140352, 115008, 57000, 12192, 432], MechanismFile.Parse(SixLayerCube.File("UFR UBR")));

    // OEIS A092113 (opened).
    [Theory]
    [InlineData(3, "1,2,2,1")]
    [InlineData(4, "1,3,6,11,3")]
    [InlineData(5, "1,4,12,35,48,20")]
    [InlineData(6, "1,5,20,79,199,281,133,2")]
    [InlineData(7, "1,6,30,149,543,1357,1903,1016,35")]
    [InlineData(8, "1,7,42,251,1191,4281,10561,15011,8520,455")]
    [InlineData(9, "1,8,56,391,2278,10666,38015,93585,132697,79379,5804")]
    public void Prefix_reversals(int n, string counts) => Has(
        Numbers(counts), Mechanism.FromGenerators("reversals", Enumerable.Range(2, n - 1).Select(k => Permutation.FromImages([.. Enumerable.Range(0, n).Select(i => i < k ? k - 1 - i : i)]))));

    // OEIS A008302 (opened): inversion counts.
    [Theory]
    [InlineData(4, "1,3,5,6,5,3,1")]
    [InlineData(5, "1,4,9,15,20,22,20,15,9,4,1")]
    [InlineData(6, "1,5,14,29,49,71,90,101,101,90,71,49,29,14,5,1")]
    public void Adjacent_transpositions(int n, string counts) =>
        Has(Numbers(counts), Mechanism.FromGenerators("neighbours", Enumerable.Range(1, n - 1).Select(i => Permutation.Parse($"({i} {i + 1})"))));

    // Stirling numbers of the first kind, OEIS A132393 (not opened).
    [Theory]
    [InlineData(4, "1,6,11,6")]
    [InlineData(5, "1,10,35,50,24")]
    [InlineData(6, "1,15,85,225,274,120")]
    public void All_transpositions(int n, string counts) => Has(
        Numbers(counts), Mechanism.FromGenerators("swaps", from i in Enumerable.Range(1, n) from j in Enumerable.Range(1, n) where i < j select Permutation.Parse($"({i} {j})")));

    private static ImmutableArray<long> Numbers(string counts) => [.. counts.Split(',').Select(long.Parse)];

    private static DistanceTable Has(ImmutableArray<long> counts, Mechanism mechanism, Metric? metric = null)
    {
        var table = Table(mechanism, metric ?? Metric.Step);
        Assert.Equal(counts.ToArray(), table.Counts.ToArray());
        Assert.Equal(table.Numbering.Count, table.StateCount);
        return table;
    }

    private static DistanceTable Table(Mechanism mechanism, Metric metric) => DistanceTable.Build(StateNumbering.Of(mechanism), new DistanceOptions { Metric = metric });
}
