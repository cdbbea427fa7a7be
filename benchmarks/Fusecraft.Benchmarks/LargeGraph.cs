using System.Diagnostics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Benchmarks;

/// <summary>
/// Large shape graphs against what the memory can do at most: the time in which two threads make as many independent random reads of 8 bytes as there are free turns, in a table as large as what
/// the exploration holds, backed by huge pages and touched before. Both are measured in turns within one run, and by processor time too, which tells more on a machine that others use. The figures of the graphs are own ones.
/// </summary>
internal static class LargeGraph
{
    private static readonly string[] Blocks18 = ["5,5,2 5,5,3", "5,4,1 5,5,1", "3,1,5 4,1,5", "1,1,1 2,1,1", "3,5,5 4,5,5", "5,2,1 5,3,1", "5,1,4 5,1,5", "2,5,1 3,5,1"];

    private static readonly string[] Blocks2 = ["1,1,2 1,1,3", "5,2,1 5,3,1", "5,4,5 5,5,5", "5,4,1 5,5,1", "4,1,1 5,1,1", "2,1,5 3,1,5"];

    /// <summary>Runs <c>large-graph [18|2|blocks…] [rounds] [threads]</c>.</summary>
    public static void Run(string[] args)
    {
        var name = args.ElementAtOrDefault(0) ?? "18";
        var rounds = int.Parse(args.ElementAtOrDefault(1) ?? "5");
        var threads = int.Parse(args.ElementAtOrDefault(2) ?? $"{Environment.ProcessorCount}");
        var useProduct = args.ElementAtOrDefault(3) != "keys";
        var (blocks, shapes, turns) = name switch
        {
            "18" => (Blocks18, 18330624, 103482336L),
            "2" => (Blocks2, 1748304, 11903832L),
            _ => (name.Split('+'), 0, 0L),
        };
        var mechanism = Fused(name, blocks);
        Console.WriteLine($"{mechanism.Board.SlotCount} slots, {mechanism.Steps.Length} steps, {threads} threads");
        for (var round = 0; round < rounds; round++)
        {
            GC.Collect();
            var before = Environment.CpuUsage.TotalTime;
            var watch = Stopwatch.StartNew();
            var explorer = new ShapeExplorer(mechanism, new ExplorationOptions { DegreeOfParallelism = threads }, null, default) { MayUseProduct = useProduct };
            explorer.Run(mechanism.Home.Key);
            var explored = watch.Elapsed;
            var exploredCpu = Environment.CpuUsage.TotalTime - before;
            var count = explorer.Shapes.Count;
            if (shapes > 0 && (count, explorer.FreeTurns) != (shapes, turns))
            {
                throw new InvalidOperationException($"{count} shapes, {explorer.FreeTurns} free turns: a figure is wrong.");
            }

            var bytes = explorer.Shapes.BytesFor(count);
            var kind = explorer.Shapes.GetType().Name;
            var freeTurns = explorer.FreeTurns;
            var peak = PeakBytes();
            explorer = null;
            GC.Collect();
            var (reads, readsCpu) = RandomReads(bytes, freeTurns);
            Console.WriteLine(
                $"{kind}: {count} shapes, {freeTurns} free turns in {explored.TotalSeconds:F3} s; as many reads by two threads in {bytes >> 20} MB {reads.TotalSeconds:F3} s; ratio {explored / reads:F2} (by processor time {exploredCpu.TotalSeconds:F3} s, {readsCpu.TotalSeconds:F3} s, {exploredCpu / readsCpu:F2}); "
                + $"{(double)bytes / count:F1} bytes a shape held at most, {(round == 0 ? $"{(double)peak / count:F1} with the whole process at its peak" : "no peak, for the process has done other things before")}");
        }
    }

    /// <summary>Runs <c>large-group [18|2]</c>: the proven vertex group at home, from all shapes and from one shape of each kind up to symmetry, beside the time to explore.</summary>
    public static void RunGroup(string[] args)
    {
        var mechanism = Fused("large", args is ["2"] ? Blocks2 : Blocks18);
        var watch = Stopwatch.StartNew();
        var groupoid = ShapeGroupoid.Explore(mechanism);
        var explored = watch.Elapsed;
        watch.Restart();
        var order = groupoid.VertexGroupAt(0).Order;
        Console.WriteLine($"{groupoid.ShapeCount} shapes explored in {explored.TotalSeconds:F2} s; vertex group proven in {watch.Elapsed.TotalSeconds:F2} s, {watch.Elapsed / explored:F1} times that; {PeakBytes() >> 20} MB at the peak");
        watch.Restart();
        var orbits = ShapeOrbits.Explore(mechanism);
        var represented = watch.Elapsed;
        watch.Restart();
        if (orbits.VertexGroupAtHome().Order != order || orbits.ShapeCount != groupoid.ShapeCount)
        {
            throw new InvalidOperationException("The shapes up to symmetry give another group or another number of shapes.");
        }

        Console.WriteLine($"{orbits.RepresentativeCount} shapes up to symmetry explored in {represented.TotalSeconds:F2} s; the same group proven from them in {watch.Elapsed.TotalSeconds:F2} s");
    }

    private static Mechanism Fused(string name, string[] blocks)
    {
        var builder = MechanismBuilder.Cube(name, 5);
        Array.ForEach(blocks, block => builder.Block(block.Split(' ')));
        return builder.Build();
    }

    private static (TimeSpan Wall, TimeSpan Processor) RandomReads(long bytes, long reads)
    {
        var table = HugePages.AllocateZeroed<ulong>((int)(bytes / sizeof(ulong)));
        var sums = new ulong[2];
        var threads = new Thread[2];
        var before = Environment.CpuUsage.TotalTime;
        var watch = Stopwatch.StartNew();
        for (var i = 0; i < threads.Length; i++)
        {
            var thread = i;
            threads[i] = new Thread(() => sums[thread] = Read(table, reads / 2, (ulong)thread));
            threads[i].Start();
        }

        Array.ForEach(threads, thread => thread.Join());
        return sums[0] + sums[1] == 0 ? (watch.Elapsed, Environment.CpuUsage.TotalTime - before) : throw new InvalidOperationException("The table is not empty.");
    }

    private static ulong Read(ulong[] table, long reads, ulong seed)
    {
        ref var start = ref MemoryMarshal.GetArrayDataReference(table);
        var (state, sum, length) = (seed, 0UL, (ulong)table.Length);
        for (; reads > 0; reads--)
        {
            state += 0x9E3779B97F4A7C15;
            var place = Math.BigMul((state ^ (state >> 29)) * 0xBF58476D1CE4E5B9, length, out _);
            sum += Unsafe.Add(ref start, (nint)place);
        }

        return sum;
    }

    // The system knows it; elsewhere than on Linux the working set now must do.
    private static long PeakBytes()
    {
        using var process = Process.GetCurrentProcess();
        return process.PeakWorkingSet64;
    }
}
