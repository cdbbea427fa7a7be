using BenchmarkDotNet.Attributes;
using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Benchmarks;

/// <summary>Proving shortest words on the 3x3x3 by runs, with tables chosen automatically. The setup builds the tables and proves each answer: the word leads home, and a search one shorter finds none.</summary>
[MemoryDiagnoser]
public class BoundedBenchmarks
{
    private readonly Mechanism _cube = MechanismBuilder.Cube("3x3x3", 3).Build();
    private BoundedSearch _search = null!;
    private State _state = null!;

    /// <summary>The length of the shortest word of the state, by runs.</summary>
    [Params(11, 13, 15)]
    public int Distance { get; set; }

    [GlobalSetup]
    public void Setup()
    {
        _search = new BoundedSearch(_cube, new BoundedOptions { Metric = Metric.Run, MaxNodes = 10_000_000_000 });
        _state = _cube.ParseState(Distance switch
        {
            11 => "R2 B' R' F' L D2 L' D2 L2 U2 B'",
            13 => "F2 D F R2 U B2 R2 U' R B R' F'",
            _ => "F R' U R U R D L2 B' R2 U L B F'",
        });
        var result = _search.Find(_state, _cube.HomeState, 20);
        if (!result.HasPath || _state.Apply(result.Path.Word) != _cube.HomeState || _search.Find(_state, _cube.HomeState, (int)result.LowerBound!.Value - 1).Outcome != BoundedOutcome.NoneWithinBound)
        {
            throw new InvalidOperationException("The word does not lead home, or a shorter one was not ruled out.");
        }
    }

    [Benchmark]
    public long ShortestOn3x3x3() => _search.Find(_state, _cube.HomeState, 20).NodeCount;
}

/// <summary>Building the tables for the 3x3x3 by runs.</summary>
public class PruningBenchmarks
{
    private readonly Mechanism _cube = MechanismBuilder.Cube("3x3x3", 3).Build();

    [Benchmark]
    public int TablesOf3x3x3() => new BoundedSearch(_cube, new BoundedOptions { Metric = Metric.Run }).Prepare().Count;
}
