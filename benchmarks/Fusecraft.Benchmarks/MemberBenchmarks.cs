using System.Numerics;
using BenchmarkDotNet.Attributes;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>What is asked of a chain once it is there. The setup proves the answers first.</summary>
[MemoryDiagnoser]
public class MemberBenchmarks
{
    private readonly SeededRandom _random = new(1);
    private readonly PermutationGroup _cube3 = PermutationGroup.Generate(CubeTurns.OfLayers(3, 0));
    private readonly Mechanism _cube5 = Mechanism.Create(new MechanismDefinition { Name = "Like centres", Family = new CubeFamily(5), Colours = ColourScheme.Faces });
    private readonly int[] _images = new int[48];
    private int[] _byFace = null!;
    private Permutation _member;

    [GlobalSetup]
    public void Setup()
    {
        _member = _cube3.RandomElement(_random);
        if (!Membership3x3x3() || _cube3.Contains(Permutation.FromCycle(0, 1)) || _cube3.Unrank(_cube3.Rank(_member)) != _member || !_cube3.Contains(Permutation.FromImages(RandomImages3x3x3())))
        {
            throw new InvalidOperationException("Membership, rank or random members are wrong.");
        }

        // The centres of a face alike, all else different: positions by OEIS A075152 (opened).
        _byFace = [.. _cube5.ColourOfSite];
        var positions = _cube5.UnguardedGroup.Order / LikeCentres5x5x5().Order;
        if (positions != BigInteger.Parse("282870942277741856536180333107150328293127731985672134721536000000000000000", null))
        {
            throw new InvalidOperationException($"The like centres leave {positions} positions.");
        }
    }

    [Benchmark]
    public bool Membership3x3x3() => _cube3.Contains(_member);

    [Benchmark]
    public Permutation RandomElement3x3x3() => _cube3.RandomElement(_random);

    [Benchmark]
    public int[] RandomImages3x3x3()
    {
        _cube3.RandomElement(_random, _images);
        return _images;
    }

    [Benchmark]
    public BigInteger Rank3x3x3() => _cube3.Rank(_member);

    [Benchmark]
    public PermutationGroup LikeCentres5x5x5() => _cube5.UnguardedGroup.ColouringStabilizer(_byFace);
}
