using System.Diagnostics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Benchmarks;

/// <summary>
/// Complete distance tables against what the memory can do at most: the time in which as many threads make as many independent random reads of two bits as there are pairs of a state and a move, in a table of the same
/// size, backed by huge pages and touched before. Both are measured in turns within one run, and by processor time too, which tells more on a machine that others use. The counts are held against published ones.
/// </summary>
internal static class DistanceTables
{
    /// <summary>Runs <c>distance-tables [small|large] [rounds] [threads]</c>.</summary>
    public static void Run(string[] args)
    {
        var rounds = int.Parse(args.ElementAtOrDefault(1) ?? "3");
        var threads = int.Parse(args.ElementAtOrDefault(2) ?? $"{Environment.ProcessorCount}");
        if (args.ElementAtOrDefault(0) == "large")
        {
            // Own figures: 25 shapes of three fused triples.
            Measure("fused 3x3x3", MechanismBuilder.Cube("Three triples", 3).Block("DFL", "DL", "FL").Block("UBL", "UL", "U").Block("DBL", "BL", "DB").Build(), Metric.Step, 2799360000, 30, 118, 1, threads);
            return;
        }

        // OEIS A079761, A079762, A080628, A090166: the number of states, the greatest distance, and the states there.
        var cube = MechanismBuilder.Cube("2x2x2", 2).Build();
        Measure("2x2x2, runs", cube, Metric.Run, 3674160, 11, 2644, rounds, threads);
        Measure("2x2x2, steps", cube, Metric.Step, 3674160, 14, 276, rounds, threads);
        Measure("3x3x3, <U,R>, steps", MechanismBuilder.Cube("U and R", 3).Use("U", "R").Build(), Metric.Step, 73483200, 25, 87, rounds, threads);
        Measure("board 3x4, steps", MechanismBuilder.Board("3x4", 4, 3).Build(), Metric.Step, 239500800, 53, 18, rounds, threads);
    }

    private static void Measure(string name, Mechanism mechanism, Metric metric, long states, int greatest, long farthest, int rounds, int threads)
    {
        for (var round = 0; round < rounds; round++)
        {
            GC.Collect();
            var before = Environment.CpuUsage.TotalTime;
            var watch = Stopwatch.StartNew();
            var table = DistanceTable.Build(
                StateNumbering.Of(mechanism), new DistanceOptions { Metric = metric, Origin = DistanceOrigin.FromBase, DegreeOfParallelism = threads });
            var built = watch.Elapsed;
            var builtCpu = Environment.CpuUsage.TotalTime - before;
            if ((table.StateCount, table.Greatest, table.Counts[^1]) != (states, greatest, farthest))
            {
                throw new InvalidOperationException($"{table.StateCount} states, {table.Counts[^1]} at {table.Greatest}: a figure is wrong.");
            }

            // Each state is asked for along each free move.
            var moves = MoveSet.Of(table.Numbering.Region, metric, default);
            var free = Enumerable.Range(0, table.Numbering.ShapeCount).Sum(place => Enumerable.Range(0, moves.Width).LongCount(slot => moves.Target(place, slot) >= 0));
            var reads = states / table.Numbering.ShapeCount * free;
            var bytes = table.Bytes;
            table = null;
            GC.Collect();
            var (random, randomCpu) = RandomReads(bytes, reads, threads);
            Console.WriteLine(
                $"{name}: {states} states, {reads} pairs of a state and a move; all from the mechanism to the table in {built.TotalMilliseconds:F0} ms (processor {builtCpu.TotalMilliseconds:F0} ms), {bytes / 1e6:F1} MB; "
                + $"as many random reads of 2 bits {random.TotalMilliseconds:F0} ms (processor {randomCpu.TotalMilliseconds:F0} ms): the table is made {random / built:F2} times as fast (by processor time {randomCpu / builtCpu:F2}); "
                + $"peak {Process.GetCurrentProcess().PeakWorkingSet64 >> 20} MB");
        }
    }

    private static (TimeSpan Wall, TimeSpan Processor) RandomReads(long bytes, long reads, int threads)
    {
        var table = HugePages.AllocateZeroed<ulong>((int)(bytes / sizeof(ulong)));
        var sums = new ulong[threads];
        var workers = new Thread[threads];
        var before = Environment.CpuUsage.TotalTime;
        var watch = Stopwatch.StartNew();
        for (var i = 0; i < threads; i++)
        {
            var thread = i;
            workers[i] = new Thread(() => sums[thread] = Read(table, reads / threads, (ulong)thread));
            workers[i].Start();
        }

        Array.ForEach(workers, worker => worker.Join());
        return sums.All(sum => sum == 0) ? (watch.Elapsed, Environment.CpuUsage.TotalTime - before) : throw new InvalidOperationException("The table is not empty.");
    }

    // Where a random state's two bits stand: one product for the place, as cheap as it gets.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private static ulong Read(ulong[] table, long reads, ulong seed)
    {
        ref var start = ref MemoryMarshal.GetArrayDataReference(table);
        var (state, sum, length) = (seed, 0UL, (ulong)table.Length * 32);
        for (; reads > 0; reads--)
        {
            state += 0x9E3779B97F4A7C15;
            var place = Math.BigMul((state ^ (state >> 29)) * 0xBF58476D1CE4E5B9, length, out _);
            sum += (Unsafe.Add(ref start, (nint)(place >> 5)) >> (int)((place & 31) * 2)) & 3;
        }

        return sum;
    }
}
