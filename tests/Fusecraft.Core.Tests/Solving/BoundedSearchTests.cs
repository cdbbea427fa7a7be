using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Shortest words within a bound, and proofs that there is none, against distances found by trying everything.</summary>
public class BoundedSearchTests
{
    private static readonly Mechanism SmallCube = Make.Cube(2);
    private static readonly Mechanism Cube = Make.Cube(3);

    [Fact]
    public void Iterative_deepening_gives_every_distance_of_random_mechanisms_and_proves_every_bound_below_it() => CheckDistances(1);

    [Fact]
    public void The_search_from_both_ends_does_so_too() => CheckDistances(200_000);

    // The search from both ends, itself compared with trying everything, is the judge where there are too many states for that.
    [Fact]
    public void On_fused_cubes_iterative_deepening_agrees_with_the_search_from_both_ends()
    {
        foreach (var metric in (Metric[])[Metric.Step, Metric.Run])
        {
            foreach (var blocks in (string[][])[["UFR UF"], ["UFR UF", "DL DLB LB"]])
            {
                var mechanism = Make.Cube(3, "", blocks);
                var pruning = new PruningOptions { MaxBytes = 1 << 20 };
                var deepening = new BoundedSearch(mechanism, new BoundedOptions { Metric = metric, MaxMeetingStates = 1, Pruning = pruning });
                var meeting = new BoundedSearch(mechanism, new BoundedOptions { Metric = metric, MaxMeetingStates = 10_000_000 });
                var random = new SeededRandom(9);
                for (var i = 0; i < 4; i++)
                {
                    var start = Walk(mechanism.HomeState, 20);
                    var end = Walk(start, 7);
                    var wanted = meeting.Find(start, end, 7);
                    var found = deepening.Find(start, end, 7);
                    Assert.Equal((BoundedOutcome.Found, wanted.LowerBound), (found.Outcome, found.LowerBound));
                    Assert.Equal(BoundedOutcome.NoneWithinBound, deepening.Find(start, end, (int)wanted.LowerBound!.Value - 1).Outcome);
                }

                State Walk(State state, int steps)
                {
                    for (var k = 0; k < steps; k++)
                    {
                        var free = state.Shape!.FreeSteps();
                        state = state.After(free[random.NextInt32(free.Length)]);
                    }

                    return state;
                }
            }
        }
    }

    // All pairs of a mechanism whose words are short and full of identities: nothing may be lost by leaving out redundant words.
    [Theory]
    [InlineData("(1 2)", "(2 3)", "(3 4)", "(1 2)(3 4)")]
    [InlineData("(1 2 3)", "(3 4 5)", "(1 2)", "(4 5)")]
    [InlineData("(1 2 3 4)", "(5 6)", "(1 3)", "(1 2)(3 4)")]
    public void No_distance_is_lost_by_leaving_out_redundant_words(params string[] generators)
    {
        var mechanism = Make.Custom(6, generators.Select((moves, i) => Make.Turn($"T{(char)('a' + i)}", moves)));
        var random = new SeededRandom(1);
        foreach (var metric in PruningTableTests.MetricsOf(mechanism, random))
        {
            // A table that knows nothing, so that the automaton alone cuts.
            var blind = PruningTable.OfPieces(mechanism, [], metric)!;
            var search = new BoundedSearch(mechanism, new BoundedOptions { Metric = metric, MaxMeetingStates = 1, Tables = [blind] });
            foreach (var (state, distance) in NaiveDistances.From(mechanism.HomeState, metric).Where(pair => pair.Value <= 7))
            {
                var result = search.Find(mechanism.HomeState, state, 20);
                Assert.Equal((BoundedOutcome.Found, (long?)distance), (result.Outcome, result.LowerBound));
            }
        }
    }

    [Fact]
    public void The_answer_does_not_depend_on_the_number_of_threads()
    {
        var state = Cube.ParseState("U R2 F B' L D2 R U'");
        var results = ((int[])[1, 2, 5]).Select(threads =>
        {
            var options = new BoundedOptions
            {
                Metric = Metric.Run,
                MaxMeetingStates = 1,
                Pruning = new PruningOptions { MaxBytes = 1 << 20, DegreeOfParallelism = threads },
            };
            var result = new BoundedSearch(Cube, options).Find(state, Cube.HomeState, 20);
            return (result.Outcome, result.Path!.ToString(), result.LowerBound, result.NodeCount);
        }).ToList();
        Assert.Equal(results[0], results[1]);
        Assert.Equal(results[0], results[2]);
        Assert.True(results[0].LowerBound <= 8);
    }

    [Fact]
    public void A_budget_of_nodes_ends_the_search_with_what_is_proven()
    {
        var state = Cube.ParseState("U R2 F B' L D2 R U' F2 D B' L2 U F");
        var pruning = new PruningOptions { MaxBytes = 1 << 20 };
        var last = 0L;
        foreach (var budget in (long[])[1, 1000, 30_000, 1_000_000])
        {
            var result = new BoundedSearch(Cube, new BoundedOptions { Metric = Metric.Run, MaxNodes = budget, MaxMeetingStates = 1000, Pruning = pruning }).Find(state, Cube.HomeState, 20);
            Assert.Equal((BoundedOutcome.BudgetEnded, budget), (result.Outcome, result.NodeCount));
            Assert.True(result.LowerBound >= last);
            last = result.LowerBound!.Value;
        }

        Assert.InRange(last, 8, 14);
    }

    [Fact]
    public void A_time_limit_reports_the_nodes_that_replay_it()
    {
        var state = Cube.ParseState("U R2 F B' L D2 R U' F2 D B' L2 U F D2 R'");
        var options = new BoundedOptions { Metric = Metric.Run, MaxMeetingStates = 1000, TimeLimit = TimeSpan.FromMilliseconds(300), Pruning = new PruningOptions { MaxBytes = 1 << 20 } };
        var timed = new BoundedSearch(Cube, options).Find(state, Cube.HomeState, 20);
        Assert.Equal(BoundedOutcome.BudgetEnded, timed.Outcome);
        var replayed = new BoundedSearch(Cube, new BoundedOptions { Metric = Metric.Run, MaxMeetingStates = 1000, MaxNodes = timed.NodeCount, Pruning = options.Pruning }).Find(state, Cube.HomeState, 20);
        Assert.Equal((timed.Outcome, timed.LowerBound, timed.NodeCount), (replayed.Outcome, replayed.LowerBound, replayed.NodeCount));
    }

    [Fact]
    public void An_element_of_the_vertex_group_is_a_shortest_loop()
    {
        var group = ShapeGroupoid.Explore(SmallCube).VertexGroupAt(0);
        var search = new BoundedSearch(SmallCube, new BoundedOptions { Metric = Metric.Run });
        var random = new SeededRandom(2);
        for (var i = 0; i < 5; i++)
        {
            var element = group.Group.RandomElement(random);
            var result = search.Factorize(SmallCube.Home, element, 11);
            Assert.Equal(element, result.Path!.Permutation);
            Assert.Equal(result.LowerBound, Metric.Run.LengthOf(result.Path));
            Assert.Equal(BoundedOutcome.NoneWithinBound, search.Factorize(SmallCube.Home, element, (int)result.LowerBound!.Value - 1).Outcome);
        }
    }

    [Fact]
    public void What_no_word_does_is_proven_to_be_so()
    {
        var search = new BoundedSearch(SmallCube);
        var twisted = SmallCube.StateOf(Permutation.FromCycle([.. SmallCube.SitesOfPiece[^1]]));
        var result = search.Find(SmallCube.HomeState, twisted, 100);
        Assert.Equal((BoundedOutcome.NoneAtAll, (long?)null), (result.Outcome, result.LowerBound));
        Assert.Null(result.Path);
    }

    [Fact]
    public void Tables_are_kept_in_a_folder_and_found_there()
    {
        var folder = Directory.CreateTempSubdirectory().FullName;
        try
        {
            var options = new BoundedOptions { Metric = Metric.Run, MaxMeetingStates = 1, Pruning = new PruningOptions { MaxBytes = 1 << 20, CacheFolder = folder } };
            var built = new BoundedSearch(SmallCube, options).Prepare();
            Assert.Equal(built.Count, Directory.GetFiles(folder, "*" + PruningTable.FileExtension).Length);
            var read = new BoundedSearch(SmallCube, options).Prepare();
            Assert.Equal(built.SelectMany(table => table.Counts), read.SelectMany(table => table.Counts));

            // A damaged one is named, not believed.
            var file = Directory.GetFiles(folder)[0];
            var bytes = File.ReadAllBytes(file);
            bytes[^100] ^= 1;
            File.WriteAllBytes(file, bytes);
            Assert.Contains(file, Assert.Throws<InvalidDataException>(() => new BoundedSearch(SmallCube, options).Prepare()).Message, StringComparison.Ordinal);
        }
        finally
        {
            Directory.Delete(folder, recursive: true);
        }
    }

    [Fact]
    public void Wrong_arguments_are_named()
    {
        var search = new BoundedSearch(SmallCube);
        Assert.Throws<ArgumentException>("from", () => search.Find(Cube.HomeState, SmallCube.HomeState, 1));
        Assert.Throws<ArgumentException>("to", () => search.Find(SmallCube.HomeState, Cube.HomeState, 1));
        Assert.Throws<ArgumentOutOfRangeException>("maxLength", () => search.Find(SmallCube.HomeState, SmallCube.HomeState, -1));
        Assert.Throws<ArgumentException>("permutation", () => search.Factorize(SmallCube.Home, Permutation.FromCycle(0, SmallCube.SiteCount), 1));
        Assert.Throws<ArgumentException>("base", () => search.Factorize(Cube.Home, default, 1));
        Assert.Throws<ArgumentException>("options", () => new BoundedSearch(SmallCube, new BoundedOptions { Metric = Metric.Weights([new("X", 1)]) }));
        Assert.Throws<ArgumentOutOfRangeException>("options", () => new BoundedSearch(SmallCube, new BoundedOptions { MaxNodes = 0 }));
    }

    private static void CheckDistances(int maxMeetingStates)
    {
        var (settled, ended) = (0, 0);
        RandomMechanisms.ForFixedSeeds(seed => CheckDistances(seed, maxMeetingStates, ref settled, ref ended));
        Assert.True(settled > 4000 && ended * 50 < settled, $"{settled} were settled, {ended} ended by the budget.");
    }

    private static void CheckDistances(ulong seed, int maxMeetingStates, ref int settled, ref int ended)
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var states = BruteDistances.Reachable(mechanism.HomeState);
        var random = new SeededRandom(seed + 77);
        foreach (var metric in PruningTableTests.MetricsOf(mechanism, random))
        {
            var options = new BoundedOptions { Metric = metric, MaxMeetingStates = maxMeetingStates, Pruning = new PruningOptions { MaxBytes = random.NextInt32(2) == 0 ? 50 : 1 << 16 }, MaxNodes = 300_000 };
            var search = new BoundedSearch(mechanism, options);
            for (var i = 0; i < 2; i++)
            {
                var from = states[random.NextInt32(states.Count)];
                var distances = NaiveDistances.From(from, metric);
                for (var k = 0; k < 3; k++)
                {
                    var to = states[random.NextInt32(states.Count)];
                    if (!distances.TryGetValue(to, out var distance))
                    {
                        Assert.Contains(search.Find(from, to, 6).Outcome, (BoundedOutcome[])[BoundedOutcome.NoneAtAll, BoundedOutcome.NoneWithinBound]);
                        continue;
                    }

                    var found = search.Find(from, to, distance);
                    if (found.Outcome == BoundedOutcome.BudgetEnded)
                    {
                        Assert.InRange(found.LowerBound!.Value, 0, distance);
                        ended++;
                        continue;
                    }

                    settled++;
                    Assert.Equal((BoundedOutcome.Found, (long?)distance), (found.Outcome, found.LowerBound));
                    Assert.Equal(to, from.Apply(found.Path!.Word));
                    Assert.Equal(distance, metric.LengthOf(found.Path));
                    if (distance > 0)
                    {
                        var none = search.Find(from, to, distance - 1);
                        Assert.Equal(BoundedOutcome.NoneWithinBound, none.Outcome);
                        Assert.InRange(none.LowerBound!.Value, 1, distance);
                    }
                }
            }
        }
    }
}
