using System.Numerics;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Double;

namespace Fusecraft.Tests.Published;

/// <summary>Eigenvalues and distances of random walks on groups that are known in closed form.</summary>
public class RandomWalkSpectrumTests
{
    // P. Diaconis, M. Shahshahani, Generating a random permutation with random transpositions, Z. Wahrsch. verw. Geb. 57 (1981) 159-179 (as quoted by later authors): gap 2/n, multiplicity (n-1)^2.
    [Theory]
    [InlineData(3, 0.666667)]
    [InlineData(4, 0.5)]
    [InlineData(5, 0.4)]
    [InlineData(6, 0.333333)]
    public void Random_transpositions_with_holding(int n, double gap)
    {
        // The identity with probability 1/n, each transposition with 2/n².
        var walk = RandomWalk.Of(Interchange(Graphs.Complete(n)), new WalkOptions { Holding = 1.0 / n });
        var spectrum = walk.Spectrum();
        Assert.Equal(gap, spectrum.Gap, 6);
        Assert.Equal(2.0 / n, spectrum.Gap, 1e-10);
        Assert.Equal((n - 1) * (n - 1), spectrum.Eigenvalues[1].Multiplicity);
        Assert.Equal(1, walk.Period);
    }

    // Characters of the symmetric group (source not opened, value from memory).
    [Fact]
    public void Transpositions_of_five_without_holding()
    {
        var walk = RandomWalk.Of(Interchange(Graphs.Complete(5)));
        Has(walk, (1, 1), (0.5, 16), (0.2, 25), (0, 36), (-0.2, 25), (-0.5, 16), (-1, 1));
        Assert.Equal(2, walk.Period);
        Assert.Equal(0.5, walk.Spectrum().Rate, 1e-10);
    }

    // R. Bacher, Valeur propre minimale du laplacien de Coxeter pour le groupe symétrique, J. Algebra 167 (1994) (source not opened, value from memory): 2(1 - cos(pi/n))/(n-1).
    [Theory]
    [InlineData(3, 0.5)]
    [InlineData(4, 0.195262146)]
    [InlineData(5, 0.095491503)]
    [InlineData(6, 0.053589838)]
    public void Adjacent_transpositions(int n, double gap)
    {
        var spectrum = RandomWalk.Of(Interchange(Graphs.Path(n))).Spectrum();
        Assert.Equal(gap, spectrum.Gap, 9);
        Assert.Equal(2 * (1 - Math.Cos(Math.PI / n)) / (n - 1), spectrum.Gap, 1e-10);
        Assert.Equal(n - 1, spectrum.Eigenvalues[1].Multiplicity);
    }

    // P. Caputo, T. M. Liggett, T. Richthammer, Proof of Aldous' spectral gap conjecture, J. Amer. Math. Soc. 23 (2010) 831-851 (abstract opened): the gap of exchanging labels along the edges is that of one label's walk.
    [Theory]
    [InlineData("cycle of five", 1.381966011 / 5)]
    [InlineData("triangle with a tail", 0.518805696 / 5)]
    [InlineData("two by three", 2.0 / 6)]
    [InlineData("cycle of six with a long chord", 1.0 / 7)]
    public void Exchanges_along_the_edges_of_a_graph(string name, double gap)
    {
        var graph = name switch
        {
            "cycle of five" => Graphs.Cycle(5),
            "triangle with a tail" => Graphs.Cycle(3).With((3, 4), (4, 5)),
            "two by three" => Graphs.CompleteBipartite(2, 3),
            _ => Graphs.Cycle(6).With((1, 4)),
        };
        var walk = RandomWalk.Of(Interchange(graph));
        Assert.Equal(gap, walk.Spectrum().Gap, 9);
        Assert.Equal(Connectivity(graph) / graph.Edges.Count, walk.Spectrum().Gap, 1e-10);

        // Watching one label only shows the same gap.
        Assert.Equal(gap, RandomWalk.Watching(walk.Mechanism, [0]).Spectrum().Gap, 9);
    }

    // Elementary; P. Diaconis, Group Representations in Probability and Statistics, 1988 (source not opened, value from memory): cos(2 pi k/n).
    [Theory]
    [InlineData(3)]
    [InlineData(5)]
    [InlineData(8)]
    [InlineData(12)]
    [InlineData(31)]
    public void The_walk_round_a_cycle(int n)
    {
        var walk = RandomWalk.Of(Mechanism.FromGenerators("cycle", Permutation.FromCycle([.. Enumerable.Range(0, n)])));
        Has(walk, [.. Enumerable.Range(0, (n / 2) + 1).Select(k => (Math.Cos(2 * Math.PI * k / n), k == 0 || 2 * k == n ? 1 : 2))]);
        Assert.Equal(1 - Math.Cos(2 * Math.PI / n), walk.Spectrum().Gap, 1e-10);
        Assert.Equal(n % 2 == 0 ? 2 : 1, walk.Period);
    }

    // As for the cycle: eigenvalues 1 - 2k/n with multiplicities C(n, k), gap 2/n; with holding 1/(n+1), gap 2/(n+1).
    [Theory]
    [InlineData(1)]
    [InlineData(4)]
    [InlineData(7)]
    [InlineData(9)]
    public void The_walk_on_the_corners_of_a_cube(int n)
    {
        var mechanism = Mechanism.FromGenerators("cube", Enumerable.Range(0, n).Select(i => Permutation.FromCycle(2 * i, (2 * i) + 1)));
        var walk = RandomWalk.Of(mechanism);
        Has(walk, [.. Enumerable.Range(0, n + 1).Select(k => (1 - (2.0 * k / n), (int)Choose(n, k)))]);
        Assert.Equal(2.0 / n, walk.Spectrum().Gap, 1e-10);
        Assert.Equal(2.0 / (n + 1), RandomWalk.Of(mechanism, new WalkOptions { Holding = 1.0 / (n + 1) }).Spectrum().Gap, 1e-10);
    }

    // D. Bayer, P. Diaconis, Trailing the dovetail shuffle to its lair, Ann. Appl. Probab. 2 (1992) 294-313 (abstract opened): 2^-k, as often as permutations have n-k cycles.
    [Fact]
    public void Riffle_shuffles_of_four_cards_as_a_walk_that_never_goes_back()
    {
        var walk = Riffle(4);
        Assert.Equal((24, false, true, 1), (walk.StateCount, walk.IsReversible, walk.IsUniform, walk.Period));
        Has(walk, (1, 1), (0.5, 6), (0.25, 11), (0.125, 6));
        Assert.Null(walk.Spectrum().TurnsSufficient(0.1));
    }

    // The same paper: after k shuffles a permutation with r rising sequences has probability C(2^k + n - r, n) / 2^(kn). Its table 1 for 52 cards (quoted by later authors): 0.924, 0.614, 0.334, 0.167 after 5 … 8 shuffles.
    [Fact]
    public void Distances_of_riffle_shuffles_are_those_of_the_formula()
    {
        Assert.Equal([0.924, 0.614, 0.334, 0.167], Enumerable.Range(5, 4).Select(shuffles => Math.Round(RiffleDistance(52, shuffles), 3)));
        foreach (var n in (int[])[3, 4, 5, 6])
        {
            var distances = Riffle(n).Distances(12);
            Assert.Equal(13, distances.ByTurns.Length);
            Assert.All(distances.ByTurns, entry => Assert.InRange(entry.FromUniform - RiffleDistance(n, entry.Turns), -distances.ErrorBound, distances.ErrorBound));
        }
    }

    private static void Has(RandomWalk walk, params ReadOnlySpan<(double Value, int Multiplicity)> expected)
    {
        var spectrum = walk.Spectrum();
        Assert.True(spectrum.IsComplete);
        Assert.Equal(expected.Length, spectrum.Eigenvalues.Length);
        for (var i = 0; i < expected.Length; i++)
        {
            Assert.InRange((spectrum.Eigenvalues[i].Value - expected[i].Value).Magnitude, 0, 1e-10);
            Assert.Equal(expected[i].Multiplicity, spectrum.Eigenvalues[i].Multiplicity);
        }
    }

    private static Mechanism Interchange((int Vertices, List<(int A, int B)> Edges) graph) =>
        Mechanism.FromGenerators("exchanges", graph.Edges.Select(edge => Permutation.FromCycle(edge.A - 1, edge.B - 1)));

    // The second least eigenvalue of the graph's Laplacian.
    private static double Connectivity((int Vertices, List<(int A, int B)> Edges) graph)
    {
        var laplacian = new DenseMatrix(graph.Vertices);
        foreach (var (a, b) in graph.Edges)
        {
            laplacian[a - 1, a - 1]++;
            laplacian[b - 1, b - 1]++;
            laplacian[a - 1, b - 1]--;
            laplacian[b - 1, a - 1]--;
        }

        return laplacian.Evd(Symmetricity.Symmetric).EigenValues.Select(value => value.Real).Order().ElementAt(1);
    }

    // Each of the 2^n ways to mark cards for the upper packet; those marked come from it in their order.
    private static RandomWalk Riffle(int n)
    {
        var ways = new Dictionary<Permutation, int>();
        for (var marks = 0; marks < 1 << n; marks++)
        {
            var upper = BitOperations.PopCount((uint)marks);
            var (next, nextLower) = (0, upper);
            var from = Enumerable.Range(0, n).Select(card => (marks >> card & 1) == 1 ? next++ : nextLower++).ToArray();
            var shuffle = Permutation.FromImages(from).Inverse();
            ways[shuffle] = ways.GetValueOrDefault(shuffle) + 1;
        }

        var moving = ways.Where(way => !way.Key.IsIdentity).OrderBy(way => way.Key.ToString(), StringComparer.Ordinal).ToList();
        var weights = new Dictionary<string, double>();
        for (var i = 0; i < moving.Count; i++)
        {
            weights[$"g{i + 1}"] = moving[i].Value;
            weights[$"g{i + 1}'"] = 0;
        }

        return RandomWalk.Of(Mechanism.FromGenerators("riffle", moving.Select(way => way.Key)), new WalkOptions { Weights = weights, Holding = ways[Permutation.Identity] / (double)(1 << n) });
    }

    // Exact but for the last division.
    private static double RiffleDistance(int n, int shuffles)
    {
        // Eulerian numbers: permutations by rising sequences.
        var risings = new List<BigInteger> { 1 };
        for (var cards = 2; cards <= n; cards++)
        {
            risings = [.. Enumerable.Range(1, cards).Select(r => (r <= risings.Count ? r * risings[r - 1] : 0) + (r > 1 ? (cards - r + 1) * risings[r - 2] : 0))];
        }

        var (packets, all, factorial) = (BigInteger.Pow(2, shuffles), BigInteger.Pow(2, shuffles * n), Make.Factorial(n));
        var sum = BigInteger.Zero;
        for (var r = 1; r <= n; r++)
        {
            sum += risings[r - 1] * BigInteger.Abs((Choose(packets + n - r, n) * factorial) - all);
        }

        return (double)(sum * BigInteger.Pow(10, 20) / (2 * all * factorial)) / 1e20;
    }

    private static BigInteger Choose(BigInteger n, int k)
    {
        var product = BigInteger.One;
        for (var i = 0; i < k; i++)
        {
            product = product * (n - i) / (i + 1);
        }

        return product;
    }
}
