using System.Numerics;
using BenchmarkDotNet.Attributes;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>Stabilizer chains and what is asked of them. Each setup proves the answers first.</summary>
public class ChainBenchmarks
{
    private Permutation[] _cube2 = null!;
    private Permutation[] _cube3 = null!;
    private Permutation[] _cube5 = null!;
    private Permutation[] _m24 = null!;
    private Permutation[] _symmetric = null!;
    private PermutationGroup _group = null!;
    private Permutation _member;
    private SeededRandom _random = null!;

    [GlobalSetup]
    public void Setup()
    {
        _cube2 = CubeTurns.OfLayers(2, 0);
        _cube3 = CubeTurns.OfLayers(3, 0);
        _cube5 = CubeTurns.OfLayers(5, 0, 1);
        _m24 =
        [
            Permutation.Parse("(1,2,3,4,5,6,7,8,9,10,11,12,13,14,15,16,17,18,19,20,21,22,23)"),
            Permutation.Parse("(3,17,10,7,9)(4,13,14,19,5)(8,18,11,12,23)(15,20,22,21,16)"),
            Permutation.Parse("(1,24)(2,23)(3,12)(4,16)(5,18)(6,10)(7,20)(8,14)(9,21)(11,17)(13,22)(15,19)"),
        ];
        _symmetric = [Permutation.FromCycle([.. Enumerable.Range(0, 27)]), Permutation.FromCycle(0, 1)];
        Require(Chain2x2x2(), "88179840");
        Require(Chain3x3x3(), "43252003274489856000");
        Require(Chain5x5x5(), "2582636272886959379162819698174683585918088940054237132144778804568925405184000000000000000");
        Require(ChainM24(), "244823040");
        Require(ChainS27(), "10888869450418352160768000000");
        _random = new SeededRandom(1);
        _group = PermutationGroup.Generate(_cube3);
        _member = _group.RandomElement(_random);
        if (!_group.Contains(_member) || _group.Contains(Permutation.FromCycle(0, 1)) || _group.Unrank(_group.Rank(_member)) != _member)
        {
            throw new InvalidOperationException("Membership or rank is wrong.");
        }
    }

    [Benchmark]
    public BigInteger Chain2x2x2() => PermutationGroup.Generate(_cube2).Order;

    [Benchmark]
    public BigInteger Chain3x3x3() => PermutationGroup.Generate(_cube3).Order;

    [Benchmark]
    public BigInteger Chain5x5x5() => PermutationGroup.Generate(_cube5).Order;

    [Benchmark]
    public BigInteger ChainM24() => PermutationGroup.Generate(_m24).Order;

    [Benchmark]
    public BigInteger ChainS27() => PermutationGroup.Generate(_symmetric).Order;

    [Benchmark]
    public bool Membership3x3x3() => _group.Contains(_member);

    [Benchmark]
    public Permutation RandomElement3x3x3() => _group.RandomElement(_random);

    [Benchmark]
    public BigInteger Rank3x3x3() => _group.Rank(_member);

    private static void Require(BigInteger order, string expected)
    {
        if (order != BigInteger.Parse(expected, null))
        {
            throw new InvalidOperationException($"The order is {order}, not {expected}.");
        }
    }
}
