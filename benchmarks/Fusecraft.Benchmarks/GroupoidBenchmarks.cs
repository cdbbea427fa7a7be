using System.Numerics;
using BenchmarkDotNet.Attributes;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Benchmarks;

/// <summary>Exploring fused cubes and extracting their vertex groups. The setup proves the answers first; they are own figures.</summary>
public class GroupoidBenchmarks
{
    private readonly Mechanism _small = MechanismBuilder.Cube("24 shapes", 3).Block("UFR", "UF").Build();
    private readonly Mechanism _large = MechanismBuilder.Cube("5310 shapes", 3)
        .Block("UFR", "UF", "UR").Block("DBL", "DB").Block("UBL", "UL").Block("DFR", "DR").Block("BR", "B").Build();

    private readonly Mechanism _larger = MechanismBuilder.Cube("7344 shapes", 3)
        .Block("UFR", "UF").Block("DBL", "DB").Block("UBR", "UR").Block("DFL", "DL").Block("UBL", "UL").Build();

    private ShapeGroupoid _groupoid = null!;

    [GlobalSetup]
    public void Setup()
    {
        _groupoid = ShapeGroupoid.Explore(_large);
        if (ExploreSmall() != 24 || ExploreLarge() != 5310 || ExploreLarger() != 7344 || VertexGroupLarge() != 44789760)
        {
            throw new InvalidOperationException("A figure is wrong.");
        }
    }

    [Benchmark]
    public int ExploreSmall() => ShapeGroupoid.Explore(_small).ShapeCount;

    [Benchmark]
    public int ExploreLarge() => ShapeGroupoid.Explore(_large).ShapeCount;

    [Benchmark]
    public int ExploreLarger() => ShapeGroupoid.Explore(_larger).ShapeCount;

    [Benchmark]
    public BigInteger VertexGroupLarge() => _groupoid.VertexGroupAt(0).Order;
}
