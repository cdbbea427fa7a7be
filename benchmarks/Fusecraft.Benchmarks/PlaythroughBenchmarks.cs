using BenchmarkDotNet.Attributes;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Benchmarks;

/// <summary>One thousand tried steps of a playthrough, free and barred ones. The setup proves the end state against immutable states.</summary>
[MemoryDiagnoser]
public class PlaythroughBenchmarks
{
    private const int Count = 1000;
    private readonly Mechanism _mechanism = MechanismBuilder.Cube("Fused", 3).Block("UFR", "UF").Block("DBL", "DB").Block("UBL", "UL").Block("DFR", "DR").Build();
    private readonly int[] _steps = new int[Count];
    private Playthrough _play = null!;

    [GlobalSetup]
    public void Setup()
    {
        var random = new SeededRandom(1);
        var state = _mechanism.HomeState;
        for (var i = 0; i < Count; i++)
        {
            _steps[i] = random.NextInt32(_mechanism.Steps.Length);
            state = state.TryStep(_mechanism.Steps[_steps[i]], out var next) ? next : state;
        }

        _play = new Playthrough(_mechanism.HomeState, Count);
        if (TrySteps() == 0 || _play.State != state)
        {
            throw new InvalidOperationException("The playthrough is wrong.");
        }
    }

    [Benchmark(OperationsPerInvoke = Count)]
    public int TrySteps()
    {
        _play.Reset();
        var free = 0;
        foreach (var step in _steps)
        {
            free += _play.TryStep(step) ? 1 : 0;
        }

        return free;
    }
}
