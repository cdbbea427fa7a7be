using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Lower bounds against distances found by trying everything, and against published counts; files that are not what they should be.</summary>
public class PruningTableTests
{
    private static readonly Mechanism SmallCube = Make.Cube(2);

    [Fact]
    public void No_bound_exceeds_a_distance_and_with_all_labels_apart_it_is_the_distance() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var states = BruteDistances.Reachable(mechanism.HomeState);
        var random = new SeededRandom(seed);
        foreach (var metric in MetricsOf(mechanism, random))
        {
            var goal = states[random.NextInt32(states.Count)];
            CosetCoordinates Coordinates(int colours, bool ignoresShapes) => CosetCoordinates.OfColouring(
                mechanism,
                [.. Enumerable.Range(0, mechanism.SiteCount).Select(site => colours == 0 ? site : random.NextInt32(colours))],
                new CosetOptions { BaseShape = goal.Shape, TowardsBase = true, IgnoresShapes = ignoresShapes })!;
            var exact = PruningTable.Build(Coordinates(0, false), null, metric)!;
            PruningTable[] weaker =
            [
                PruningTable.Build(Coordinates(2, false), null, metric)!,
                PruningTable.Build(Coordinates(2, false), Coordinates(3, false), metric)!,
                PruningTable.Build(Coordinates(3, true), Coordinates(1, false), metric)!,
                PruningTable.Build(Coordinates(2, true), Coordinates(2, true), metric)!,
            ];
            for (var i = 0; i < 6; i++)
            {
                var from = states[random.NextInt32(states.Count)];
                var distance = NaiveDistances.From(from, metric).GetValueOrDefault(goal, PruningTable.Never);
                Assert.Equal(distance, exact.Bound(from, goal));
                Assert.All(weaker, table => Assert.InRange(table.Bound(from, goal), 0, distance));
            }
        }
    });

    // OEIS A079761 and A079762, value from memory: positions of the 2x2x2 at each distance, by runs and by quarter turns.
    [Fact]
    public void The_product_of_twists_and_orders_gives_the_depths_of_the_2x2x2()
    {
        int[] twists = [.. SmallCube.SiteNames.Select(name => name[^1] is 'U' or 'D' ? 1 : 0)];
        var first = CosetCoordinates.OfColouring(SmallCube, [.. SmallCube.PieceOfSite])!;
        var second = CosetCoordinates.OfColouring(SmallCube, twists)!;
        Assert.Equal([1, 9, 54, 321, 1847, 9992, 50136, 227536, 870072, 1887748, 623800, 2644], PruningTable.Build(first, second, Metric.Run)!.Counts.AsEnumerable());
        Assert.Equal(
            [1, 6, 27, 120, 534, 2256, 8969, 33058, 114149, 360508, 930588, 1350852, 782536, 90280, 276],
            PruningTable.Build(first, second, Metric.Step, new PruningOptions { DegreeOfParallelism = 1 })!.Counts.AsEnumerable());
    }

    [Fact]
    public void A_subgroup_gives_the_table_of_its_orbits()
    {
        // Half turns keep the colours of opposite faces apart.
        var halfTurns = PermutationGroup.Generate(SmallCube.Turns.Select(turn => turn.Permutation.Power(2)), SmallCube.SiteCount);
        var table = PruningTable.OfSubgroup(SmallCube, halfTurns)!;
        Assert.Equal(SmallCube.UnguardedGroup.OrbitSizeOfColouring([.. table.First.ColourOfLabel]), table.Counts.Sum());
        Assert.Equal(0, table.Bound(SmallCube.ParseState("U2 R2 F2")));
        Assert.Equal(1, table.Bound(SmallCube.ParseState("R")));
    }

    [Fact]
    public void A_table_that_does_not_fit_is_not_built() =>
        Assert.Null(PruningTable.OfPieces(SmallCube, Enumerable.Range(0, 4), Metric.Run, new PruningOptions { MaxBytes = 1000 }));

    [Fact]
    public void Bounds_need_coordinates_towards_the_base_where_a_step_cannot_be_undone()
    {
        var mechanism = MechanismBuilder.Custom("Ratchet", 5).Turn("A", "(1 2 3)", turn => turn.OneWay()).Turn("B", "(3 4 5)").Build();
        Assert.Throws<ArgumentException>("first", () => PruningTable.Build(CosetCoordinates.OfPieces(mechanism, [0])!));
        Assert.NotNull(PruningTable.OfPieces(mechanism, [0]));
    }

    [Fact]
    public void A_file_gives_the_table_again_and_anything_else_one_clear_error()
    {
        var first = CosetCoordinates.OfPieces(SmallCube, [0, 1, 2])!;
        var other = CosetCoordinates.OfPieces(SmallCube, [0, 1, 3])!;
        var table = PruningTable.Build(first, null, Metric.Run)!;
        using var file = new MemoryStream();
        table.Save(file);
        var bytes = file.ToArray();
        var again = PruningTable.Load(first, null, Metric.Run, new MemoryStream(bytes));
        Assert.Equal(table.Counts.AsEnumerable(), again.Counts.AsEnumerable());
        Assert.Equal(table.Mean, again.Mean);
        var state = SmallCube.ParseState("U R F U2 R'");
        Assert.Equal(table.Bound(state), again.Bound(state));

        // Foreign: another metric, another colouring, another mechanism.
        Assert.Contains("another", Refusal(bytes, first, Metric.Step), StringComparison.Ordinal);
        Assert.Contains("another", Refusal(bytes, other, Metric.Run), StringComparison.Ordinal);
        var turned = Make.Cube(2, "R U F");
        Assert.Contains("another", Refusal(bytes, CosetCoordinates.OfPieces(turned, [0, 1, 2])!, Metric.Run), StringComparison.Ordinal);
        Assert.Contains("no file", Refusal([.. "{}"u8], first, Metric.Run), StringComparison.Ordinal);

        // Truncated anywhere, or with any one bit wrong.
        var random = new SeededRandom(3);
        for (var i = 0; i < 200; i++)
        {
            Assert.Contains("truncated", Refusal(bytes[..(8 + random.NextInt32(bytes.Length - 8))], first, Metric.Run), StringComparison.Ordinal);
            var damaged = (byte[])bytes.Clone();
            damaged[i < 100 ? i : random.NextInt32(bytes.Length)] ^= (byte)(1 << random.NextInt32(8));
            Assert.NotEmpty(Refusal(damaged, first, Metric.Run));
        }
    }

    private static string Refusal(byte[] bytes, CosetCoordinates coordinates, Metric metric) =>
        Assert.Throws<InvalidDataException>(() => PruningTable.Load(coordinates, null, metric, new MemoryStream(bytes))).Message;

    internal static Metric[] MetricsOf(Mechanism mechanism, SeededRandom random) =>
        [Metric.Step, Metric.Run, Metric.Weights(mechanism.Turns.Select(turn => KeyValuePair.Create(turn.Name, random.NextInt32(4))))];
}
