using System.Diagnostics;
using System.Numerics;
using System.Text.Json;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Reference;

namespace Fusecraft.Benchmarks;

/// <summary>How long a proven order takes here and in SymPy: same generators, same machine, one straight after the other. Medians; making the group objects and first runs are not counted.</summary>
internal static class SymPyComparison
{
    private const int OurRepeats = 1001;

    public static int Run()
    {
        if (SymPy.WhyMissing is { } reason)
        {
            Console.Error.WriteLine(reason);
            return 1;
        }

        Console.WriteLine($"{"",-58}{"here",12}{"SymPy",12}{"ratio",10}{"goal",8}");

        // OEIS A075152; 24 times the term of OEIS A080656, for nothing is held still; that term itself.
        Compare("3x3x3, 6 face turns, 48 sites", Turns(3), "43252003274489856000", 9, "400");
        Compare("4x4x4, 12 layer turns, 96 sites", CubeTurns.OfLayers(4, 0, 1), "16972688908618238933770849245964147960401887232000000000", 3, "1000");
        Compare("4x4x4, 9 cut turns of the family, corner DBL held", Turns(4), "707195371192426622240452051915172831683411968000000000", 3, "-");
        return 0;
    }

    // The turns of the cube family on the sites that they move.
    private static Permutation[] Turns(int size)
    {
        var group = MechanismBuilder.Cube($"{size}x{size}x{size}", size).Build().UnguardedGroup;
        return [.. group.ActionOn([.. group.MovedOrbits.SelectMany(orbit => orbit)]).Image.Generators];
    }

    private static void Compare(string name, Permutation[] generators, string published, int theirRepeats, string goal)
    {
        var degree = generators.Max(generator => generator.SupportEnd);
        var task = new { Repeats = theirRepeats, Generators = generators.Select(generator => Enumerable.Range(0, degree).Select(point => generator[point])) };
        var answer = JsonSerializer.Deserialize<Answer>(
            SymPy.Run(Path.Combine(AppContext.BaseDirectory, "orders.py"), JsonSerializer.Serialize(task, JsonSerializerOptions.Web)), JsonSerializerOptions.Web)!;
        var times = new double[OurRepeats];
        BigInteger order = 0;

        // Twice: the first round is for the compiler, which takes its time.
        for (var i = 0; i < 2 * OurRepeats; i++)
        {
            var group = PermutationGroup.Generate(generators);
            var start = Stopwatch.GetTimestamp();
            order = group.Order;
            times[i % OurRepeats] = Stopwatch.GetElapsedTime(start).TotalMilliseconds;
            Require(group.Chain.Proof.IsProven, $"{name}: the order is not proven.");
        }

        Require($"{order}" == answer.Order && answer.Order == published, $"{name}: the order is {order} here, {answer.Order} in SymPy, {published} as published.");
        var (ours, theirs) = (Median(times), Median(answer.Milliseconds));
        Console.WriteLine($"{name,-58}{ours,9:F3} ms{theirs,9:F1} ms{theirs / ours,9:F0}x{goal,8}");
    }

    private static double Median(double[] times) => times.Order().ElementAt(times.Length / 2);

    private static void Require(bool holds, string problem)
    {
        if (!holds)
        {
            throw new InvalidOperationException(problem);
        }
    }

    private sealed record Answer(string Order, double[] Milliseconds);
}
