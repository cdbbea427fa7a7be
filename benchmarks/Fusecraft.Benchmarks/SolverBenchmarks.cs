using BenchmarkDotNet.Attributes;
using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Benchmarks;

/// <summary>Solving one state. The setup proves that the word leads home.</summary>
public class SolverBenchmarks
{
    private readonly Mechanism _mechanism = MechanismBuilder.Cube("2x2x2", 2).Build();
    private State _state = null!;

    [GlobalSetup]
    public void Setup()
    {
        _state = _mechanism.ParseState("R U2 R' F U' R2 F2 U R' F");
        if (_state.Apply(new Solver(_mechanism).Solve(_state).Path!.Word) != _mechanism.HomeState)
        {
            throw new InvalidOperationException("The word does not lead home.");
        }
    }

    [Benchmark]
    public int ShortestOn2x2x2() => new Solver(_mechanism).Solve(_state).Path!.Length;
}
