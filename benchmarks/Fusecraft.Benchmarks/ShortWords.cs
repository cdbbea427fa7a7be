using System.Diagnostics;
using System.Globalization;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;

namespace Fusecraft.Benchmarks;

/// <summary>
/// Mean lengths, in runs, of the words that a staged descent finds for uniformly random states, each replayed by the solver and once more here, beside the mean of what tables of parts prove to be needed at least. The
/// published figure to stand beside for the 3x3x3 is 60 (S. Egner, M. Püschel, <em>Solving puzzles related to permutation groups</em>, ISSAC 1998; abstract opened).
/// </summary>
internal static class ShortWords
{
    /// <summary>Runs <c>short-words [seconds per state | moves tried per state] [states] [puzzle …]</c>, a puzzle being a file, <c>board:4:4</c> or <c>cube:3:UFR,UF:DBL,DB</c>.</summary>
    public static void Run(string[] args)
    {
        var budget = args.Length > 0 ? double.Parse(args[0], CultureInfo.InvariantCulture) : 0.2;
        var count = args.Length > 1 ? int.Parse(args[1], CultureInfo.InvariantCulture) : 100;
        string[] puzzles = args.Length > 2 ? args[2..] : ["cube:3", "cube:3:UFR,UF", "cube:3:UFR,UF:DBL,DB", "cube:3:UFR,UF:UBR,UB:DFR,DR:DL,DBL,BL"];
        foreach (var puzzle in puzzles)
        {
            Measure(puzzle, Mechanism(puzzle), budget, count);
        }
    }

    private static Mechanism Mechanism(string name)
    {
        var parts = name.Split(':');
        int Number(int part) => int.Parse(parts[part], CultureInfo.InvariantCulture);
        switch (parts[0])
        {
            case "cube":
                var cube = MechanismBuilder.Cube(name, Number(1));
                foreach (var block in parts.Skip(2))
                {
                    cube.Block(block.Split(','));
                }

                return cube.Build();
            case "board":
                return MechanismBuilder.Board(name, Number(1), Number(2)).Build();
            default:
                return MechanismFile.Load(name);
        }
    }

    private static void Measure(string puzzle, Mechanism mechanism, double budget, int count)
    {
        var options = budget < 1000
            ? new StagedOptions { Metric = Metric.Run, TimeLimit = TimeSpan.FromSeconds(budget) }
            : new StagedOptions { Metric = Metric.Run, MaxNodes = (long)budget };
        var groupoid = ShapeGroupoid.Explore(mechanism);
        var group = groupoid.VertexGroupAt(0);
        var watch = Stopwatch.StartNew();
        var solver = new StagedSolver(mechanism, options);
        solver.Solve(mechanism.HomeState.After(mechanism.Home.FreeSteps()[0]));
        var building = watch.Elapsed;
        var bounds = LowerBounds(group);
        var random = new SeededRandom(1);
        var (length, bound, longest, time) = (0L, 0L, 0L, TimeSpan.Zero);
        for (var i = 0; i < count; i++)
        {
            var path = group.TreePath(RandomShape(groupoid, random));
            var state = mechanism.StateOf(group.Group.RandomElement(random) * path.Permutation);
            watch.Restart();
            var result = solver.Solve(state);
            time += watch.Elapsed;
            if (result.Path is null || state.Apply(result.Path.Word) != mechanism.HomeState || bounds?.Invoke(state) > result.Length)
            {
                throw new InvalidOperationException($"A word for {state} does not lead home, or is shorter than it can be: {result.Reason}");
            }

            length += result.Length;
            longest = Math.Max(longest, result.Length);
            bound += bounds?.Invoke(state) ?? 0;
        }

        Console.WriteLine(
            $"{puzzle}: {(double)group.StateCount:E2} states, built in {building.TotalSeconds:F1} s; mean of {count}: {(double)length / count:F2} runs, longest {longest}, at least {(double)bound / count:F2}, {time.TotalSeconds / count:F2} s each");
    }

    private static int RandomShape(ShapeGroupoid groupoid, SeededRandom random)
    {
        while (true)
        {
            var shape = random.NextInt32(groupoid.ShapeCount);
            if (groupoid.RegionOf(shape) == 0)
            {
                return shape;
            }
        }
    }

    // What tables over some of the pieces prove.
    private static Func<State, int>? LowerBounds(VertexGroup group)
    {
        StageMove[] moves = [.. RunMoves.Of(group.Groupoid, 0, Metric.Run)];
        var frame = StageFrame.Explore(group.Groupoid, 0, moves, group.Region.ShapeCount, default)!;
        int[] labels = [.. Enumerable.Range(0, group.Groupoid.Mechanism.SiteCount)];
        if (Stage.Build(frame, group.Group, labels, 250_000, 1 << 26, default) is not { } stage)
        {
            return null;
        }

        return state =>
        {
            var shape = frame.LocalOf(group.Groupoid.IndexOf(state.Shape!));
            var coordinates = new int[stage.Components.Length];
            ushort[] siteOf = [.. labels.Select(label => (ushort)state.Labels[label])];
            return stage.TryRank(shape, siteOf, coordinates) ? stage.LeastCost(shape, coordinates) : throw new InvalidOperationException("A state has no coordinates.");
        };
    }
}
