using System.Diagnostics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;

namespace Fusecraft.Benchmarks;

/// <summary>Mean lengths of the words that a staged descent finds for uniformly random states; each is replayed.</summary>
internal static class ShortWords
{
    /// <summary>Runs <c>short-words</c>.</summary>
    public static void Run(string[] args)
    {
        var nodes = long.Parse(args[0]);
        var count = int.Parse(args[1]);
        foreach (var file in args[2..])
        {
            Measure(Mechanism(file), nodes, count);
        }
    }

    private static Mechanism Mechanism(string name)
    {
        var parts = name.Split(':');
        switch (parts[0])
        {
            case "cube":
                var cube = MechanismBuilder.Cube(name, int.Parse(parts[1]));
                foreach (var block in parts.Skip(2))
                {
                    cube.Block(block.Split(','));
                }

                return cube.Build();
            case "board":
                return MechanismBuilder.Board(name, int.Parse(parts[1]), int.Parse(parts[2])).Build();
            default:
                return MechanismFile.Load(name);
        }
    }

    private static void Measure(Mechanism mechanism, long nodes, int count)
    {
        var watch = Stopwatch.StartNew();
        var groupoid = ShapeGroupoid.Explore(mechanism);
        var group = groupoid.VertexGroupAt(0);
        Console.WriteLine($"{mechanism.Name}: {groupoid.ShapeCount} shapes, group {(double)group.Order:E3}, {watch.Elapsed.TotalSeconds:F2} s");
        watch.Restart();
        var stages = StagePlan.Make(group, Metric.Run, 250_000, 1 << 24, default);
        Console.WriteLine($"  plan in {watch.Elapsed.TotalSeconds:F2} s");
        if (stages is null)
        {
            return;
        }

        foreach (var stage in stages)
        {
            Console.WriteLine($"  stage: {stage.Frame.ShapeCount} shapes, {stage.Frame.Loops.Count} loops, {stage.Frame.Moves.Length} moves, components {string.Join(' ', stage.Components.ToArray().Select(c => c.Count))}, tables {string.Join(' ', stage.Tables.ToArray().Select(t => t.Length))}");
        }

        var random = new SeededRandom(1);
        var lengths = new List<long>();
        watch.Restart();
        for (var i = 0; i < count; i++)
        {
            var path = groupoid.PathTo(random.NextInt32(groupoid.ShapeCount));
            var state = mechanism.StateOf(group.Group.RandomElement(random) * path.Permutation);
            var descent = new StagedDescent(stages, default);
            var local = stages[0].Frame.LocalOf(groupoid.IndexOf(state.Shape!));
            var word = descent.Run(local, state.Labels, nodes, _ => true);
            if (word is null)
            {
                Console.WriteLine("  none");
                continue;
            }

            var found = TurnPath.Follow(state.Shape!, word.Select(step => mechanism.Steps[step]));
            if (state.Apply(found.Word) != mechanism.HomeState)
            {
                throw new InvalidOperationException("wrong");
            }

            lengths.Add(Metric.Run.LengthOf(found));
        }

        Console.WriteLine($"  mean {lengths.Average():F2}, {lengths.Min()}..{lengths.Max()}, {watch.Elapsed.TotalSeconds / count:F3} s each");
    }
}
