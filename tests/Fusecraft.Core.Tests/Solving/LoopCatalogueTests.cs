using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Catalogues of useful loops, against all states of small mechanisms.</summary>
public class LoopCatalogueTests
{
    public static TheoryData<string> Metrics => ["step", "run", "weights"];

    [Theory]
    [MemberData(nameof(Metrics))]
    public void Every_loop_that_moves_few_is_listed_with_its_least_length(string metric) => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var random = new SeededRandom(seed);
        var start = SolverTests.RandomStateIfFree(mechanism, random.NextInt32(4), seed);
        CheckAll(start, MetricOf(metric, mechanism, random), 1 + random.NextInt32(4));
    });

    [Theory]
    [MemberData(nameof(Metrics))]
    public void On_a_board_runs_of_tiles_count_as_the_metric_says(string metric) =>
        CheckAll(Make.Board(3, 2).HomeState, MetricOf(metric, Make.Board(3, 2), new SeededRandom(1)), 4);

    [Fact]
    public void What_budgets_leave_out_is_longer_than_the_complete_length()
    {
        var mechanism = Make.Board(3, 2);
        var lengths = NaiveLengths.From(mechanism.HomeState, Metric.Step);
        foreach (var options in (LoopCatalogueOptions[])[new() { MaxStates = 40 }, new() { MaxLoops = 3 }, new() { MaxPairs = 50 }, new() { MaxLength = 9 }])
        {
            var catalogue = LoopCatalogue.Of(mechanism.Home, options);

            Assert.NotNull(catalogue.CompleteLength);
            var expected = lengths.Count(pair => pair.Key.Shape == mechanism.Home && pair.Value > 0 && pair.Value <= catalogue.CompleteLength && Moved(mechanism.Home, pair.Key.Labels) <= 4);
            Assert.Equal(expected, catalogue.Loops.Count(loop => loop.Length <= catalogue.CompleteLength));
        }
    }

    // Common practice in the trade: a commutator of two things that meet in one piece is a three-cycle; for corners of the 3x3x3 eight quarter turns do it (source not opened, from memory). That no fewer do is our own computing.
    [Fact]
    public void The_shortest_three_cycles_of_corners_of_the_cube_take_eight_quarter_turns()
    {
        var cube = Make.Cube(3);
        var catalogue = LoopCatalogue.Of(cube.Home, new LoopCatalogueOptions { MaxLength = 8, MaxMoved = 3 });

        Assert.Equal(8, catalogue.CompleteLength);
        var threeCycles = catalogue.Loops.Where(loop => loop.Effect.Kind == LoopEffectKind.ThreeCycle).ToList();
        Assert.All(threeCycles, loop => Assert.Equal(8, loop.Length));
        Assert.Contains(threeCycles, loop => loop.Permutation == cube.HomeState.Apply(cube.ParseWord("[R U' R', D]")).Labels);
        Assert.All(threeCycles, loop => Assert.Equal(cube.HomeState.Apply(loop.Path.Word).Labels, loop.Permutation));
    }

    [Fact]
    public void Fused_blocks_are_moved_as_one()
    {
        var mechanism = MechanismFile.Load(Repository.PathOf("docs/workshop/weir-gate.fuse.json"));
        var catalogue = LoopCatalogue.Of(mechanism.Home, new LoopCatalogueOptions { MaxMoved = 6, MaxLength = 6 });

        Assert.NotEmpty(catalogue.Loops);
        foreach (var loop in catalogue.Loops)
        {
            Assert.Equal(Moved(mechanism.Home, loop.Permutation), loop.Effect.MovedCount);
            Assert.Equal(loop.Path.Length, loop.Length);
            var blocksMove = mechanism.Home.Blocks.Any(block => block.Any(piece => mechanism.SitesOfPiece[piece].Any(site => loop.Permutation[site] != site)));
            Assert.Equal(blocksMove, loop.Effect.Cycles.Any(cycle => cycle.Bodies.Any(body => body.Length > 1)));
        }
    }

    [Fact]
    public void Effects_are_told_apart_by_cycles_and_twists()
    {
        var cube = Make.Cube(3);
        var two = Make.Custom(2, [Make.Turn("A", "(1 2)")]);

        Assert.Equal(("3", LoopEffectKind.ThreeCycle), Effect("[R U' R', D]"));
        Assert.Equal(("1x3 1x3", LoopEffectKind.Twist), Effect("R U R' U R U2 R' L' U' L U' L' U2 L"));
        Assert.Equal(LoopEffectKind.Swap, UsefulLoop.Of(TurnPath.Follow(two.Home, two.Steps[0])).Effect.Kind);
        Assert.Equal("(1 2)", UsefulLoop.Of(TurnPath.Follow(two.Home, two.Steps[0])).Effect.ToString());
        Assert.Equal("nothing", UsefulLoop.Of(TurnPath.At(cube.Home)).Effect.ToString());
        Assert.Equal(LoopEffectKind.None, UsefulLoop.Of(TurnPath.At(cube.Home)).Effect.Kind);
        Assert.Equal("4 4", UsefulLoop.Of(TurnPath.Follow(cube.Home, cube.ParseWord("U"))).Effect.Signature);

        (string Signature, LoopEffectKind Kind) Effect(string word)
        {
            var effect = UsefulLoop.Of(TurnPath.Follow(cube.Home, cube.ParseWord(word))).Effect;
            return (effect.Signature, effect.Kind);
        }
    }

    [Fact]
    public void A_conjugate_does_the_same_to_other_pieces()
    {
        var cube = Make.Cube(3);
        var loop = UsefulLoop.Of(TurnPath.Follow(cube.Home, cube.ParseWord("[R U' R', D]")));
        var setup = TurnPath.Follow(cube.Home, cube.ParseWord("F B2"));

        var elsewhere = loop.ConjugateBy(setup);

        Assert.Equal(loop.Effect.Signature, elsewhere.Effect.Signature);
        Assert.Equal(setup.Permutation * loop.Permutation * setup.Permutation.Inverse(), elsewhere.Permutation);
        Assert.Equal(3, elsewhere.Effect.MovedCount);
        Assert.NotEqual(loop.Permutation, elsewhere.Permutation);
        Assert.Throws<ArgumentException>(() => UsefulLoop.Of(TurnPath.Follow(Make.Board(2, 2).Home, Make.Board(2, 2).Home.FreeSteps()[0])));
    }

    [Fact]
    public void The_number_of_conjugates_is_that_of_a_plain_count()
    {
        var mechanism = Make.Board(3, 2);
        var group = ShapeGroupoid.Explore(mechanism).VertexGroupAt(0);
        var members = SolverTests.Depths(mechanism.HomeState).Keys.Where(state => state.Shape == mechanism.Home).Select(state => state.Labels).ToList();
        foreach (var loop in LoopCatalogue.Of(mechanism.Home).Loops.Take(8))
        {
            Assert.Equal(members.Select(member => loop.Permutation.ConjugateBy(member)).Distinct().Count(), (int)loop.ConjugateCount(group));
        }
    }

    [Fact]
    public void Exchanges_are_shortest_or_proven_impossible() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var random = new SeededRandom(seed);
        var at = SolverTests.RandomStateIfFree(mechanism, random.NextInt32(4), seed);
        var depths = SolverTests.Depths(at);
        var solver = new Solver(mechanism);
        for (var round = 0; round < 4; round++)
        {
            var alike = mechanism.SitesOfPiece.Select((sites, piece) => (sites.Length, piece)).GroupBy(entry => entry.Length).Select(group => group.Select(entry => entry.piece).ToList()).ToList();
            var pool = alike[random.NextInt32(alike.Count)];
            var order = random.NextPermutation(pool.Count);
            var cycle = Enumerable.Range(0, 1 + random.NextInt32(Math.Min(3, pool.Count))).Select(i => pool[order[i]]).ToList();
            var exchange = PieceExchange.Parse(mechanism, $"({string.Join(' ', cycle.Select(piece => mechanism.PieceNames[piece]))})", random.NextInt32(2) == 0);

            var nearest = depths.Where(pair => pair.Key.Shape == at.Shape && Does(at.Labels.Inverse() * pair.Key.Labels)).Min(pair => (int?)pair.Value);
            var result = solver.Exchange(at, exchange);

            Assert.Equal(nearest, result.Path?.Length);
            Assert.Equal(nearest is not null, result.IsSolvable);
            Assert.True(!result.HasPath || (result.Path.IsLoop && Does(result.Path.Permutation)));

            bool Does(Permutation moves) => Enumerable.Range(0, mechanism.SiteCount).All(site =>
                cycle.IndexOf(mechanism.PieceOfSite[site]) is >= 0 and var place
                    ? mechanism.PieceOfSite[moves[site]] == cycle[(place + 1) % cycle.Count]
                    : !exchange.KeepsOthers || moves[site] == site);
        }
    });

    [Fact]
    public void An_exchange_beyond_the_search_is_made_from_the_vertex_group()
    {
        var cube = Make.Cube(3);
        var exchange = PieceExchange.Parse(cube, "(UFR UBR UBL)", keepsOthers: true);

        var result = new Solver(cube, new SolveOptions { MaxStates = 200 }).Exchange(cube.HomeState, exchange);

        Assert.True(result.HasPath, result.Reason);
        Assert.Equal("(UBL UFR UBR)", UsefulLoop.Of(result.Path).Effect.ToString().Split(" turned")[0]);
    }

    [Fact]
    public void A_lone_swap_of_pieces_is_refused_by_the_vertex_group()
    {
        var cube = Make.Cube(3);

        var result = new Solver(cube, new SolveOptions { MaxStates = 1000 }).Exchange(cube.HomeState, PieceExchange.Parse(cube, "(UF UR)", keepsOthers: true));

        Assert.False(result.IsSolvable);
        Assert.Equal("No member of the vertex group at this shape (order 43252003274489856000) does that exchange.", result.Reason);
        Assert.True(new Solver(cube).Exchange(cube.HomeState, PieceExchange.Parse(cube, "(UF UR)", keepsOthers: false)).HasPath);
    }

    [Theory]
    [InlineData("UF UR", "\"UF UR\" is no list of cycles of pieces, such as (a b c).")]
    [InlineData("(UF UR", "\"(UF UR\" is no list of cycles of pieces, such as (a b c).")]
    [InlineData("", "\"\" is no list of cycles of pieces, such as (a b c).")]
    [InlineData("(UF UX)", "\"UX\" is not a piece of cube.")]
    [InlineData("(UF UFR)", "UF cannot go to the place of UFR: they have different numbers of sites.")]
    [InlineData("(UF UR)(UR UB)", "UR is named twice.")]
    public void What_is_no_exchange_is_refused(string cycles, string problem) =>
        Assert.Equal(problem, Assert.Throws<FormatException>(() => PieceExchange.Parse(Make.Cube(3), cycles, true)).Message);

    private static Metric MetricOf(string metric, Mechanism mechanism, SeededRandom random) => metric switch
    {
        "step" => Metric.Step,
        "run" => Metric.Run,
        _ => Metric.Weights(mechanism.Turns.Select(turn => KeyValuePair.Create(turn.Name, random.NextInt32(4)))),
    };

    private static void CheckAll(State start, Metric metric, int maxMoved)
    {
        var shape = start.Shape!;
        var expected = NaiveLengths.From(start, metric)
            .Where(pair => pair.Key.Shape == shape)
            .Select(pair => (Labels: start.Labels.Inverse() * pair.Key.Labels, Length: pair.Value))
            .Where(loop => !loop.Labels.IsIdentity && Moved(shape, loop.Labels) <= maxMoved)
            .ToDictionary(loop => loop.Labels, loop => loop.Length);

        var catalogue = LoopCatalogue.Of(shape, new LoopCatalogueOptions { Metric = metric, MaxMoved = maxMoved, MaxLoops = 100_000 });

        Assert.Null(catalogue.CompleteLength);
        Assert.Equal(expected.Count, catalogue.Loops.Length);
        Assert.Equal(catalogue.Loops.Select(loop => loop.Length).Order(), catalogue.Loops.Select(loop => loop.Length));
        foreach (var loop in catalogue.Loops)
        {
            Assert.Equal(expected[loop.Permutation], loop.Length);
            Assert.Equal(loop.Length, metric.LengthOf(loop.Path));
            Assert.Equal(Moved(shape, loop.Permutation), loop.Effect.MovedCount);
            Assert.Equal(start.Labels * loop.Permutation, start.Apply(loop.Path.Word).Labels);
        }
    }

    // Blocks and pieces outside blocks that have a label elsewhere than before.
    private static int Moved(Shape shape, Permutation labels)
    {
        var mechanism = shape.Mechanism;
        var blocks = shape.Blocks;
        return Enumerable.Range(0, mechanism.SiteCount).Where(site => labels[site] != site).Select(site => mechanism.PieceOfSite[site])
            .Select(piece => blocks.FirstOrDefault(block => block.Contains(piece)) is { IsDefault: false } block ? block[0] : piece).Distinct().Count();
    }
}
