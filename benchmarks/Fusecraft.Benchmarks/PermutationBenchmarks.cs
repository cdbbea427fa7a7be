using BenchmarkDotNet.Attributes;
using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>Permutations at the degree of the 3x3x3, at the last degree of one byte a point, and at one of two bytes a point.</summary>
[MemoryDiagnoser]
public class PermutationBenchmarks
{
    private Permutation _p;
    private Permutation _q;
    private string _text = "";

    [Params(48, 256, 1000)]
    public int Degree { get; set; }

    /// <summary>Makes the operands from a fixed seed and checks every answer before it is timed.</summary>
    [GlobalSetup]
    public void Setup()
    {
        var random = new SeededRandom(1);
        (_p, _q) = (random.NextPermutation(Degree), random.NextPermutation(Degree));
        _text = _p.ToString();
        var (product, inverse, cube, conjugate) = (Multiply(), Inverse(), Power(), Conjugate());
        for (var i = 0; i < Degree; i++)
        {
            Require(product[i] == _q[_p[i]]);
            Require(inverse[_p[i]] == i);
            Require(cube[i] == _p[_p[_p[i]]]);
            Require(conjugate[_q[i]] == _q[_p[i]]);
        }

        Require(Parse() == _p);
        Require(Format() == _text.Length);
    }

    [Benchmark(Baseline = true)]
    public Permutation Multiply() => _p * _q;

    [Benchmark]
    public Permutation Inverse() => _p.Inverse();

    [Benchmark]
    public Permutation Power() => _p.Power(3);

    [Benchmark]
    public Permutation Conjugate() => _p.ConjugateBy(_q);

    [Benchmark]
    public Permutation Parse() => Permutation.Parse(_text);

    [Benchmark]
    public int Format() => _p.ToString().Length;

    private static void Require(bool holds)
    {
        if (!holds)
        {
            throw new InvalidOperationException("A benchmark gave a wrong answer.");
        }
    }
}
