using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Random walks against plain matrices over the states of random small mechanisms, one-way steps among them.</summary>
public class RandomWalkTests
{
    private const int MostStates = 150;
    private const int Turns = 40;

    [Property(MaxTest = 40)]
    public void Distances_turn_by_turn_are_those_of_a_plain_matrix(ulong seed) => CheckAgainstMatrix(seed);

    [Fact]
    public void Distances_turn_by_turn_are_those_of_a_plain_matrix_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckAgainstMatrix);

    [Fact]
    public void Watching_all_labels_is_the_walk_itself_and_watching_fewer_never_shows_more()
    {
        var strict = 0;
        RandomMechanisms.ForFixedSeeds(seed =>
        {
            if (Region(seed) is not { } group)
            {
                return;
            }

            var mechanism = group.Groupoid.Mechanism;
            var all = RandomWalk.FromBase(group);
            var watched = RandomWalk.Watching(mechanism, Enumerable.Range(0, mechanism.SiteCount));
            var some = RandomWalk.Watching(mechanism, [(int)(seed % (ulong)mechanism.SiteCount)]);
            Assert.Equal(all.StateCount, watched.StateCount);
            Assert.Equal(all.Period, watched.Period);
            Assert.True(watched.IsWatched && !all.IsWatched);
            var (left, right, less) = (all.Distances(Turns).ByTurns, watched.Distances(Turns).ByTurns, some.Distances(Turns).ByTurns);
            for (var i = 0; i < Math.Min(left.Length, right.Length); i++)
            {
                Assert.Equal(left[i].FromUniform, right[i].FromUniform, 1e-12);
                Assert.Equal(left[i].FromStationary, right[i].FromStationary, 1e-12);
                Assert.Equal(left[i].FromLimit, right[i].FromLimit, 1e-12);
                if (i < less.Length)
                {
                    Assert.True(less[i].FromUniform <= left[i].FromUniform + 1e-12 && less[i].FromStationary <= left[i].FromStationary + 1e-12);
                    strict += less[i].FromUniform < left[i].FromUniform - 0.01 ? 1 : 0;
                }
            }
        });
        Assert.True(strict > 100);
    }

    [Fact]
    public void Nothing_depends_on_the_number_of_threads()
    {
        foreach (var choice in Enum.GetValues<WalkChoice>())
        {
            WalkOptions Options(int threads) => new() { Choice = choice, DegreeOfParallelism = threads };
            var one = RandomWalk.Of(Make.Board(3, 3), Options(1));
            var (distances, spectrum) = (one.Distances(25), one.Extreme(1e-6, 60, default));
            foreach (var threads in (int[])[2, 3, 7])
            {
                var other = RandomWalk.Of(Make.Board(3, 3), Options(threads));
                Assert.Equal(distances.ByTurns.AsEnumerable(), other.Distances(25).ByTurns);
                Assert.Equal(spectrum.Eigenvalues.AsEnumerable(), other.Extreme(1e-6, 60, default).Eigenvalues);
                Assert.Equal(spectrum.ErrorBound, other.Extreme(1e-6, 60, default).ErrorBound);
            }
        }
    }

    [Theory]
    [InlineData(WalkChoice.FreeSteps)]
    [InlineData(WalkChoice.AllSteps)]
    public void The_iteration_finds_the_extreme_eigenvalues_of_the_dense_method(WalkChoice choice)
    {
        Mechanism[] mechanisms =
        [
            Make.Board(3, 2), Make.Cube(2, "U2 R2"), Make.GraphBoard(7, Graphs.Theta(1, 2, 2).Edges, 1),
            Mechanism.FromGenerators("s5", Permutation.Parse("(1 2)"), Permutation.Parse("(2 3)"), Permutation.Parse("(3 4 5)")),
        ];
        foreach (var mechanism in mechanisms)
        {
            var walk = RandomWalk.Of(mechanism, new WalkOptions { Choice = choice });
            var (whole, extreme) = (walk.Spectrum(), walk.Extreme(1e-9, 500, default));
            Assert.True(whole.IsComplete && !extreme.IsComplete);
            Assert.Equal(walk.StateCount, whole.Eigenvalues.Sum(eigenvalue => eigenvalue.Multiplicity));
            Assert.InRange(extreme.ErrorBound, 0, 2e-9);
            Assert.Equal(whole.Second, extreme.Second, 1e-8);
            Assert.Equal(whole.Least, extreme.Least, 1e-8);
            Assert.Equal(whole.Rate, extreme.Rate, 1e-8);
        }
    }

    [Fact]
    public void The_gap_bounds_the_turns_from_both_sides()
    {
        string[][] groups = [["(1 2)", "(1 2 3 4 5)"], ["(1 2)", "(2 3)", "(3 4)"], ["(1 2 3)", "(3 4 5)"], ["(1 2)(3 4)", "(1 3)", "(1 2 3 4 5 6)"]];
        foreach (var generators in groups)
        {
            foreach (var holding in (double[])[0, 0.2, 0.5])
            {
                var walk = RandomWalk.Of(Mechanism.FromGenerators("group", generators.Select(text => Permutation.Parse(text))), new WalkOptions { Holding = holding });
                var (spectrum, distances) = (walk.Spectrum(), walk.Distances(2000, 1e-4));
                foreach (var distance in (double[])[0.4, 0.25, 0.1, 0.01, 0.001])
                {
                    Assert.InRange(distances.TurnsTo(distance)!.Value, spectrum.TurnsNecessary(distance)!.Value, spectrum.TurnsSufficient(distance)!.Value);
                }
            }
        }
    }

    [Fact]
    public void On_a_sliding_board_a_state_is_as_likely_as_the_gap_has_neighbours()
    {
        var board = Make.Board(3, 3);
        var walk = RandomWalk.Of(board);
        var groupoid = ShapeGroupoid.Explore(board);

        // 24 pairs of a cell and a neighbour; 4 corners with 2, 4 edges with 3, a centre with 4. Even numbers of turns leave the gap on a corner or the centre.
        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            var free = board.Steps.Count(step => groupoid.After(shape, step) >= 0);
            Assert.Equal(free / 24.0 / 20160, walk.StationaryProbability(groupoid.ShapeAt(shape)), 1e-15);
        }

        Assert.True(walk.IsReversible && !walk.IsUniform);
        Assert.Equal(2, walk.Period);
        Assert.Equal(((4 * ((1 / 9.0) - (1 / 12.0))) + ((1 / 6.0) - (1 / 9.0)) + (4 * ((1 / 8.0) - (1 / 9.0)))) / 2, walk.StationaryFromUniform, 1e-14);
        Assert.Equal(4 / 9.0, walk.LeastFromUniform, 1e-12);
        var all = RandomWalk.Of(board, new WalkOptions { Choice = WalkChoice.AllSteps });
        Assert.True(all.IsReversible && all.IsUniform);
        Assert.Equal((1, 0.0, 0.0), (all.Period, all.LeastFromUniform, all.StationaryFromUniform));
    }

    [Fact]
    public void Iteration_and_elimination_agree_on_the_stationary_distribution_of_one_way_walks()
    {
        var compared = 0;
        RandomMechanisms.ForFixedSeeds(seed =>
        {
            if (Region(seed) is { } group)
            {
                var rates = new WalkRates(new RegionShapes(group.Groupoid, 0), WalkOptions.Default);
                var iterated = StationaryShapes.Of(rates, mostEliminated: 0);
                for (var place = 0; place < rates.PlaceCount; place++)
                {
                    Assert.Equal(rates.Stationary[place], iterated[place], 1e-12);
                }

                compared += rates.IsReversible ? 0 : 1;
                Assert.InRange(StationaryShapes.Residual(rates, rates.Stationary), 0, 1e-14);
            }
        });
        Assert.True(compared > 5);
    }

    [Fact]
    public void Half_of_the_states_are_out_of_reach_after_an_even_number_of_quarter_turns()
    {
        var walk = RandomWalk.Of(Make.Cube(2, "U R"));
        Assert.Equal((29160, 1, 2), (walk.StateCount, walk.ShapeCount, walk.Period));
        Assert.True(walk.IsReversible && walk.IsUniform);
        Assert.Equal(0.5, walk.LeastFromUniform, 1e-12);
        var distances = walk.Distances(until: 0.01);

        // Own computation, a regression figure.
        Assert.Equal((53, 145, null), (distances.TurnsTo(0.25), distances.TurnsTo(0.01), distances.TurnsToUniform(0.25)));
        Assert.All(distances.ByTurns, entry => Assert.True(entry.FromUniform >= 0.5 - distances.ErrorBound));
        Assert.InRange(distances.ErrorBound, 0, 1e-12);
    }

    [Fact]
    public void Bad_arguments_and_too_many_states_are_refused()
    {
        var board = Make.Board(3, 2);
        Assert.Throws<ArgumentException>(() => RandomWalk.Of(board, new WalkOptions { Weights = new Dictionary<string, double> { ["Q"] = 1 } }));
        Assert.Throws<ArgumentException>(() => RandomWalk.Of(board, new WalkOptions { Weights = new Dictionary<string, double> { ["U"] = -1 } }));
        Assert.Throws<ArgumentException>(() => RandomWalk.Of(board, new WalkOptions { Weights = new Dictionary<string, double> { ["U"] = double.NaN } }));
        Assert.Throws<ArgumentOutOfRangeException>(() => RandomWalk.Of(board, new WalkOptions { Holding = 1 }));
        Assert.Throws<ArgumentOutOfRangeException>(() => RandomWalk.Of(board, new WalkOptions { DegreeOfParallelism = 0 }));
        Assert.Contains("360 states", Assert.Throws<InvalidOperationException>(() => RandomWalk.Of(board, new WalkOptions { MaxStates = 359 })).Message, StringComparison.Ordinal);
        Assert.Equal(360, RandomWalk.Of(board, new WalkOptions { MaxStates = 360 }).StateCount);
        Assert.Throws<InvalidOperationException>(() => RandomWalk.Watching(board, [0, 1, 2], new WalkOptions { MaxStates = 30 }));
        Assert.Throws<ArgumentException>(() => RandomWalk.Watching(board, [0, 0]));
        Assert.Throws<ArgumentException>(() => RandomWalk.Watching(board, [6]));
        var walk = RandomWalk.Of(board);
        Assert.Throws<ArgumentOutOfRangeException>(() => walk.Distances(-1));
        Assert.Throws<ArgumentOutOfRangeException>(() => walk.Distances(until: double.NaN));
        Assert.Throws<ArgumentOutOfRangeException>(() => walk.Distances(1).TurnsTo(2));
        Assert.Throws<ArgumentOutOfRangeException>(() => walk.Spectrum(0));
        Assert.Throws<ArgumentOutOfRangeException>(() => walk.Spectrum().TurnsSufficient(0));
        Assert.Throws<OperationCanceledException>(() => walk.Distances(cancellationToken: new CancellationToken(canceled: true)));

        // A group that steps of weight 0 are needed for.
        var group = Mechanism.FromGenerators("S3", Permutation.Parse("(1 2)"), Permutation.Parse("(2 3)"));
        Assert.Throws<ArgumentException>(() => RandomWalk.Of(group, new WalkOptions { Weights = new Dictionary<string, double> { ["g2"] = 0, ["g2'"] = 0 } }));
    }

    [Fact]
    public void A_puzzle_that_cannot_move_is_where_it_should_be()
    {
        var walk = RandomWalk.Of(Make.Board(1, 1));
        Assert.Equal((1, 1), (walk.StateCount, walk.Period));
        Assert.Equal(0, walk.Distances().TurnsToUniform(0));
        Assert.Equal((0, 0), (walk.Spectrum().TurnsSufficient(0.01), walk.Spectrum().TurnsNecessary(0.5)));
    }

    private static void CheckAgainstMatrix(ulong seed)
    {
        if (Region(seed) is not { } group)
        {
            return;
        }

        var mechanism = group.Groupoid.Mechanism;
        var random = new SeededRandom(seed);
        foreach (var choice in Enum.GetValues<WalkChoice>())
        {
            var options = new WalkOptions { Choice = choice };
            if (random.NextInt32(2) == 0)
            {
                var weights = mechanism.Steps.Select(step => step.Name).Distinct().ToDictionary(name => name, _ => (random.NextInt32(5) + 0.0) / 3);
                options = options with { Weights = weights, Holding = random.NextInt32(3) / 4.0 };
            }

            var brute = new BruteWalk(mechanism, options);
            if (!brute.IsConnected)
            {
                Assert.Throws<ArgumentException>(() => RandomWalk.FromBase(group, options));
                continue;
            }

            CheckWalk(RandomWalk.FromBase(group, options), brute);
        }
    }

    private static void CheckWalk(RandomWalk walk, BruteWalk brute)
    {
        var numbering = StateNumbering.Of(walk.Mechanism);
        Assert.Equal(brute.States.Count, walk.StateCount);
        Assert.Equal(brute.Period, walk.Period);
        var stationary = brute.Stationary();
        for (var i = 0; i < brute.States.Count; i++)
        {
            Assert.Equal(stationary[i], walk.StationaryProbability(brute.States[i].Shape!), 1e-10);
        }

        Assert.Equal(BruteWalk.Distance(stationary, brute.Uniform()), walk.StationaryFromUniform, 1e-10);
        var matrix = walk.TransitionMatrix();
        var (isReversible, entries) = (true, 0);
        for (var i = 0; i < brute.States.Count; i++)
        {
            for (var j = 0; j < brute.States.Count; j++)
            {
                Assert.Equal(brute.Matrix[i, j], matrix[(int)numbering.Rank(brute.States[i]), (int)numbering.Rank(brute.States[j])], 1e-14);
                isReversible &= Math.Abs((stationary[i] * brute.Matrix[i, j]) - (stationary[j] * brute.Matrix[j, i])) < 1e-10;
                entries += brute.Matrix[i, j] > 0 ? 1 : 0;
            }
        }

        Assert.Equal(entries, matrix.NonZerosCount);
        Assert.Equal(isReversible, walk.IsReversible);
        CheckDistances(walk, brute, stationary);
    }

    private static void CheckDistances(RandomWalk walk, BruteWalk brute, MathNet.Numerics.LinearAlgebra.Vector<double> stationary)
    {
        var distances = walk.Distances(Turns).ByTurns;
        var laps = new List<MathNet.Numerics.LinearAlgebra.Vector<double>> { brute.Start() };
        for (var turns = 0; turns < distances.Length; turns++)
        {
            Assert.Equal(turns, distances[turns].Turns);
            Assert.Equal(BruteWalk.Distance(laps[turns], brute.Uniform()), distances[turns].FromUniform, 1e-12);
            Assert.Equal(BruteWalk.Distance(laps[turns], stationary), distances[turns].FromStationary, 1e-10);
            if (turns > 0)
            {
                Assert.True(distances[turns].FromStationary <= distances[turns - 1].FromStationary + 1e-12);
                Assert.True(distances[turns].FromLimit <= distances[turns - 1].FromLimit + 1e-12);
            }

            // Drawn from as many numbers of turns in a row as the period.
            if (turns + 1 >= walk.Period)
            {
                var some = laps[^walk.Period..];
                var mean = some.Aggregate((sum, lap) => sum + lap) / walk.Period;
                Assert.Equal(BruteWalk.Distance(mean, stationary), distances.AsSpan()[(turns + 1 - walk.Period)..(turns + 1)].ToArray().Average(entry => entry.FromLimit), 1e-10);
            }

            laps.Add(brute.Next(laps[turns]));
        }
    }

    private static VertexGroup? Region(ulong seed)
    {
        var group = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed))).VertexGroupAt(0);
        return group.StateCount > (BigInteger)MostStates ? null : group;
    }
}
