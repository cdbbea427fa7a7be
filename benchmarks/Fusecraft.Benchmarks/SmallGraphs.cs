using System.Diagnostics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Benchmarks;

/// <summary>The least time of many explorations of small graphs, warm: it tells most on a machine that others use. The figures of the graphs are own ones.</summary>
internal static class SmallGraphs
{
    /// <summary>Runs <c>small-graphs</c>.</summary>
    public static void Run()
    {
        Measure(24, 20_000, "UFR UF");
        Measure(5310, 500, "UFR UF UR", "DBL DB", "UBL UL", "DFR DR", "BR B");
        Measure(7344, 500, "UFR UF", "DBL DB", "UBR UR", "DFL DL", "UBL UL");
    }

    private static void Measure(int shapes, int rounds, params string[] blocks)
    {
        var builder = MechanismBuilder.Cube($"{shapes} shapes", 3);
        Array.ForEach(blocks, block => builder.Block(block.Split(' ')));
        var mechanism = builder.Build();
        var least = TimeSpan.MaxValue;
        for (var round = 0; round < rounds; round++)
        {
            var watch = Stopwatch.StartNew();
            var count = ShapeGroupoid.Explore(mechanism).ShapeCount;
            least = watch.Elapsed < least ? watch.Elapsed : least;
            if (count != shapes)
            {
                throw new InvalidOperationException($"{count} shapes instead of {shapes}.");
            }
        }

        Console.WriteLine($"{shapes} shapes: {least.TotalMicroseconds:F1} µs at least");
    }
}
