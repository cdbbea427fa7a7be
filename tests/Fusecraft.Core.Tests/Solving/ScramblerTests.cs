using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;
using MathNet.Numerics.Distributions;

namespace Fusecraft.Tests.Solving;

public class ScramblerTests
{
    // A fair draw fails this once in a million; the seeds are fixed, so a draw that passes always does.
    private const double Doubt = 1e-6;

    public static TheoryData<int> Mechanisms => [0, 1, 2, 3, 4];

    [Theory]
    [MemberData(nameof(Mechanisms))]
    public void Every_state_of_the_home_region_is_drawn_equally_often(int which)
    {
        var scrambler = Scrambler.Of(Which(which));
        IsUniform(scrambler, (int)scrambler.StateCount, 40);
    }

    [Fact]
    public void Every_state_within_bounds_on_the_distance_is_drawn_equally_often()
    {
        var few = Scrambler.Of(Make.Board(3, 2), new ScrambleOptions { LeastDistance = 18 });
        Assert.Equal(12 + 6 + 1 + 18, few.StateCount);
        IsUniform(few, 37, 200);
        var exactly = Scrambler.Of(Make.Board(3, 2), new ScrambleOptions { LeastDistance = 10, GreatestDistance = 10 });
        IsUniform(exactly, 23, 200);
    }

    [Fact]
    public void States_drawn_one_by_one_until_one_is_within_bounds_are_uniform_over_distances()
    {
        // More states than are listed; their distances tell.
        var scrambler = Scrambler.Of(Make.Board(3, 3), new ScrambleOptions { LeastDistance = 20, GreatestDistance = 26 });
        var table = DistanceTable.Build(StateNumbering.Of(scrambler.Mechanism), new DistanceOptions { Origin = DistanceOrigin.FromBase });
        Assert.InRange((long)scrambler.StateCount, 100_000, long.MaxValue);
        var random = new SeededRandom(77);
        var drawn = new double[table.Greatest + 1];
        const int Draws = 4000;
        for (var i = 0; i < Draws; i++)
        {
            drawn[table.DistanceOf(scrambler.NextState(random))]++;
        }

        var expected = table.Counts.Select((count, distance) => distance is >= 20 and <= 26 ? Draws * (double)count / (double)scrambler.StateCount : 0).ToArray();
        IsLikely(drawn, expected);
    }

    [Fact]
    public void Words_are_done_from_home_and_make_the_state()
    {
        for (var which = 0; which < 5; which++)
        {
            var scrambler = Scrambler.Of(Which(which));
            var random = new SeededRandom(9);
            for (var i = 0; i < 50; i++)
            {
                var scramble = scrambler.Next(random);
                Assert.Equal(scramble.State, scrambler.Mechanism.HomeState.Apply(scramble.Path!.Word));
            }
        }
    }

    [Fact]
    public void With_a_table_words_are_as_short_as_the_distance()
    {
        var scrambler = Scrambler.Of(Make.Cube(2), new ScrambleOptions { LeastDistance = 11, Metric = Metric.Run });
        Assert.Equal(2644, scrambler.StateCount);
        var random = new SeededRandom(3);
        for (var i = 0; i < 20; i++)
        {
            var scramble = scrambler.Next(random);
            Assert.Equal(11, Metric.Run.LengthOf(scramble.Path!));
            Assert.Equal(scramble.State, scrambler.Mechanism.HomeState.Apply(scramble.Path!.Word));
        }
    }

    [Fact]
    public void A_seed_draws_the_same_states_again_and_those_of_today()
    {
        var scrambler = Scrambler.Of(Make.Board(3, 2));
        Assert.Equal(Draw(1), Draw(1));
        Assert.NotEqual(Draw(1), Draw(2));

        // Own figures: they hold within a major version.
        Assert.Equal("(1 3 2 5)(4 6) | (3 5)(4 6)", string.Join(" | ", Draw(1).Take(2)));

        List<string> Draw(ulong seed)
        {
            var random = new SeededRandom(seed);
            return [.. Enumerable.Range(0, 10).Select(_ => scrambler.NextState(random).ToString())];
        }
    }

    [Fact]
    public void Bounds_that_no_state_is_within_are_an_error()
    {
        Assert.Contains("the greatest is 21", Assert.Throws<ArgumentException>(() => Scrambler.Of(Make.Board(3, 2), new ScrambleOptions { LeastDistance = 22 })).Message, StringComparison.Ordinal);
        Assert.Throws<ArgumentException>(() => Scrambler.Of(Make.Board(3, 2), new ScrambleOptions { LeastDistance = 9, GreatestDistance = 8 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => Scrambler.Of(Make.Board(3, 2), new ScrambleOptions { LeastDistance = -1 }));
    }

    private static Mechanism Which(int which) => which switch
    {
        0 => Make.Board(3, 2),
        1 => Make.Cube(2, "U2 R2 F2"),
        2 => MechanismFile.Load(Repository.PathOf("docs/workshop/lock-basin.fuse.json")),
        3 => MechanismFile.Load(Repository.PathOf("docs/workshop/seven-piers.fuse.json")),

        // One-way turns: states are drawn from the region that leads back home.
        _ => Make.Custom(5, [new TurnDefinition { Name = "A", Moves = "(1 2 3)", IsOneWay = true }, new TurnDefinition { Name = "B", Moves = "(3 4 5)", IsOneWay = true }]),
    };

    private static void IsUniform(Scrambler scrambler, int states, int drawsAState)
    {
        var random = new SeededRandom(2026);
        var drawn = new Dictionary<State, double>();
        for (var i = 0; i < states * drawsAState; i++)
        {
            var state = scrambler.NextState(random);
            drawn[state] = drawn.GetValueOrDefault(state) + 1;
        }

        Assert.Equal(states, drawn.Count);
        IsLikely([.. drawn.Values], [.. Enumerable.Repeat((double)drawsAState, states)]);
    }

    private static void IsLikely(double[] drawn, double[] expected)
    {
        var statistic = drawn.Zip(expected, (count, mean) => mean == 0 ? 0 : (count - mean) * (count - mean) / mean).Sum();
        var freedom = expected.Count(mean => mean > 0) - 1;
        Assert.InRange(ChiSquared.CDF(freedom, statistic), Doubt, 1 - Doubt);
    }
}
