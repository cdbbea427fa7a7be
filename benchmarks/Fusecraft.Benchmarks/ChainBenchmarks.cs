using System.Numerics;
using BenchmarkDotNet.Attributes;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>Proven stabilizer chains from generators. The setup proves each order first.</summary>
public class ChainBenchmarks
{
    private static readonly Lazy<Permutation[]> _cube7 = new(() => CubeTurns.OfLayers(7, 0, 1, 2));
    private static readonly Lazy<Permutation[]> _cube11 = new(() => CubeTurns.OfLayers(11, 0, 1, 2, 3, 4));
    private static readonly BigInteger _cube3Order = BigInteger.Parse("43252003274489856000", null);

    private readonly Permutation[] _cube2 = CubeTurns.OfLayers(2, 0);
    private readonly Permutation[] _cube3 = CubeTurns.OfLayers(3, 0);
    private readonly Permutation[] _cube4 = CubeTurns.OfLayers(4, 0, 1);
    private readonly Permutation[] _cube5 = CubeTurns.OfLayers(5, 0, 1);
    private readonly Permutation[] _m24 = GroupData.Read("M24_24.txt");
    private readonly Permutation[] _higmanSims = GroupData.Read("HS_100.txt");
    private readonly Permutation[] _janko = GroupData.Read("J1_266.txt");
    private readonly Permutation[] _symmetric27 = [Permutation.FromCycle([.. Enumerable.Range(0, 27)]), Permutation.FromCycle(0, 1)];
    private readonly Permutation[] _symmetric1000 = Giant(1000, isAlternating: false);
    private readonly Permutation[] _alternating1000 = Giant(1000, isAlternating: true);
    private readonly Permutation[] _symmetric10000 = Giant(10_000, isAlternating: false);

    // Orders as published: OEIS A075152, A054434, A080656 (all opened); M24, HS and J1 as in their papers. The larger cubes by formula.
    [GlobalSetup]
    public void Setup()
    {
        Require(Chain2x2x2(), 88179840);
        Require(Chain3x3x3(), _cube3Order);
        Require(Chain4x4x4(), BigInteger.Parse("16972688908618238933770849245964147960401887232000000000", null));
        Require(Chain5x5x5(), BigInteger.Parse("2582636272886959379162819698174683585918088940054237132144778804568925405184000000000000000", null));
        Require(Chain7x7x7(), _cube3Order * BigInteger.Pow(Factorial(24), 8) / BigInteger.Pow(2, 6));
        Require(Chain11x11x11(), _cube3Order * BigInteger.Pow(Factorial(24), 24) / BigInteger.Pow(2, 20));
        Require(ChainM24(), 244823040);
        Require(ChainHigmanSims(), 44352000);
        Require(ChainJanko1(), 175560);
        Require(ChainS27(), Factorial(27));
        Require(ChainS1000(), Factorial(1000));
        Require(ChainA1000(), Factorial(1000) / 2);
        Require(ChainS10000(), Factorial(10_000));
    }

    [Benchmark]
    public BigInteger Chain2x2x2() => Order(_cube2);

    [Benchmark]
    public BigInteger Chain3x3x3() => Order(_cube3);

    [Benchmark]
    public BigInteger Chain4x4x4() => Order(_cube4);

    [Benchmark]
    public BigInteger Chain5x5x5() => Order(_cube5);

    [Benchmark]
    public BigInteger Chain7x7x7() => Order(_cube7.Value);

    [Benchmark]
    public BigInteger Chain11x11x11() => Order(_cube11.Value);

    [Benchmark]
    public BigInteger ChainM24() => Order(_m24);

    [Benchmark]
    public BigInteger ChainHigmanSims() => Order(_higmanSims);

    [Benchmark]
    public BigInteger ChainJanko1() => Order(_janko);

    [Benchmark]
    public BigInteger ChainS27() => Order(_symmetric27);

    [Benchmark]
    public BigInteger ChainS1000() => Order(_symmetric1000);

    [Benchmark]
    public BigInteger ChainA1000() => Order(_alternating1000);

    [Benchmark]
    public BigInteger ChainS10000() => Order(_symmetric10000);

    private static BigInteger Order(Permutation[] generators) => PermutationGroup.Generate(generators).Order;

    private static BigInteger Factorial(int number) => Enumerable.Range(1, number).Aggregate(BigInteger.One, (product, factor) => product * factor);

    // Two random permutations; nearly always they make the whole group, and the setup checks it.
    private static Permutation[] Giant(int degree, bool isAlternating)
    {
        var random = new SeededRandom(2);
        while (true)
        {
            Permutation[] pair = [random.NextPermutation(degree), random.NextPermutation(degree)];
            if (isAlternating == pair.All(permutation => permutation.Parity == Parity.Even))
            {
                return pair;
            }
        }
    }

    private static void Require(BigInteger order, BigInteger expected)
    {
        if (order != expected)
        {
            throw new InvalidOperationException($"The order is {order}, not {expected}.");
        }
    }
}
