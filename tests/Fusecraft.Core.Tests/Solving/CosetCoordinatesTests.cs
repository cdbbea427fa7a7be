using FsCheck.Xunit;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Coset coordinates against counts that follow from theory, and against states that are coloured one by one.</summary>
public class CosetCoordinatesTests
{
    private static readonly Mechanism SmallCube = Make.Cube(2);
    private static readonly Mechanism Cube = Make.Cube(3);

    // One corner stays, so seven twists with a fixed sum: 3^6; seven corners in 7! orders.
    [Fact]
    public void Twists_and_orders_of_the_2x2x2_are_counted_exactly()
    {
        Assert.Equal(729, CosetCoordinates.OfColouring(SmallCube, UpAndDownAgainstSides(SmallCube))!.Count);
        Assert.Equal(5040, CosetCoordinates.OfColouring(SmallCube, [.. SmallCube.PieceOfSite])!.Count);
        Assert.Equal(3674160, CosetCoordinates.OfPieces(SmallCube, Enumerable.Range(0, SmallCube.PieceCount))!.Count);
    }

    // 3^7 twists of corners; 2^11 flips of edges; C(12, 4) ways to have the middle edges; 12·11·10 · 2^3 for three edges told apart.
    [Theory]
    [InlineData("twists", 2187)]
    [InlineData("flips", 2048)]
    [InlineData("slice", 495)]
    [InlineData("three edges", 10560)]
    [InlineData("nothing", 1)]
    public void Colourings_of_the_3x3x3_have_the_number_of_coordinates_that_theory_says(string what, int count) =>
        Assert.Equal(count, CosetCoordinates.OfColouring(Cube, Colouring(what))!.Count);

    [Theory]
    [InlineData("twists")]
    [InlineData("three edges")]
    public void Steps_of_coordinates_are_steps_of_states(string what)
    {
        var coordinates = CosetCoordinates.OfColouring(Cube, Colouring(what))!;
        var random = new SeededRandom(5);
        var state = Cube.HomeState;
        Assert.Equal(0, coordinates.Rank(state));
        for (var i = 0; i < 1000; i++)
        {
            var step = Cube.Steps[random.NextInt32(Cube.Steps.Length)];
            var next = state.After(step);
            Assert.Equal(coordinates.Rank(next), coordinates.After(coordinates.Rank(state), step));
            Assert.Equal(coordinates.Rank(next), coordinates.StepTable[(coordinates.Rank(state) * coordinates.StepCount) + step.Index]);
            state = next;
        }
    }

    [Fact]
    public void Fused_pieces_bar_steps_of_coordinates()
    {
        var mechanism = Make.Cube(3, "U R F", "UFR UF");
        var coordinates = CosetCoordinates.OfColouring(mechanism, new int[mechanism.SiteCount])!;
        Assert.Equal(ShapeGroupoid.Explore(mechanism).ShapeCount, coordinates.Count);
        Assert.Equal(mechanism.Steps.Select(step => mechanism.HomeState.IsFree(step)), mechanism.Steps.Select(step => coordinates.After(0, step) >= 0));
    }

    [Fact]
    public void The_budget_gives_no_coordinates_rather_than_some()
    {
        Assert.Null(CosetCoordinates.OfColouring(SmallCube, UpAndDownAgainstSides(SmallCube), new CosetOptions { MaxCoordinates = 728 }));
        Assert.NotNull(CosetCoordinates.OfColouring(SmallCube, UpAndDownAgainstSides(SmallCube), new CosetOptions { MaxCoordinates = 729 }));
    }

    [Fact]
    public void Wrong_arguments_are_named()
    {
        Assert.Throws<ArgumentException>("colourOfLabel", () => CosetCoordinates.OfColouring(Cube, [1, 2]));
        Assert.Throws<ArgumentOutOfRangeException>("pieces", () => CosetCoordinates.OfPieces(Cube, [Cube.PieceCount]));
        Assert.Throws<ArgumentException>("options", () => CosetCoordinates.OfPieces(Cube, [], new CosetOptions { BaseShape = SmallCube.Home }));
        Assert.Throws<ArgumentOutOfRangeException>("options", () => CosetCoordinates.OfPieces(Cube, [], new CosetOptions { MaxCoordinates = 0 }));
        var coordinates = CosetCoordinates.OfPieces(Cube, [])!;
        Assert.Throws<ArgumentException>("state", () => coordinates.Rank(SmallCube.HomeState));
        Assert.Throws<ArgumentOutOfRangeException>("coordinate", () => coordinates.After(1, Cube.Steps[0]));
        Assert.Throws<ArgumentException>("step", () => coordinates.After(0, SmallCube.Steps[0]));
    }

    [Property(MaxTest = 100)]
    public void Coordinates_are_the_coloured_states(ulong seed) => CheckAgainstColouredStates(seed);

    [Fact]
    public void Coordinates_are_the_coloured_states_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckAgainstColouredStates);

    // Every state that can be reached is coloured by hand; the coordinates must be those colourings, each once, with the same steps.
    private static void CheckAgainstColouredStates(ulong seed)
    {
        var mechanism = Mechanism.Create(RandomMechanisms.From(seed));
        var random = new SeededRandom(seed);
        int[] colours = [.. Enumerable.Range(0, mechanism.SiteCount).Select(_ => random.NextInt32(3))];
        var states = BruteDistances.Reachable(mechanism.HomeState);

        // A base other than home now and then: the labels are then counted from a state with that shape.
        var origin = states[random.NextInt32(states.Count)];
        var options = new CosetOptions { BaseShape = origin.Shape };
        var forward = CosetCoordinates.OfColouring(mechanism, colours, options)!;
        var backward = CosetCoordinates.OfColouring(mechanism, colours, new CosetOptions { BaseShape = origin.Shape, TowardsBase = true })!;
        var arcs = new Dictionary<string, List<string?>>();
        foreach (var state in states)
        {
            arcs[Coloured(state)] = [.. mechanism.Steps.Select(step => state.TryStep(step, out var next) ? Coloured(next) : null)];
        }

        var there = Reach(Coloured(origin), key => arcs[key]);
        var back = Reach(Coloured(origin), key => arcs.Where(pair => pair.Value.Contains(key)).Select(pair => pair.Key));
        Assert.Equal(there.Count, forward.Count);
        Assert.True(backward.Count >= back.Count, "States not reachable from home may lead to the base too.");
        foreach (var state in states)
        {
            var (rank, rankBack) = (forward.Rank(state, origin), backward.Rank(state, origin));
            Assert.Equal(there.Contains(Coloured(state)), rank >= 0);
            Assert.Equal(back.Contains(Coloured(state)), rankBack >= 0);
            foreach (var step in mechanism.Steps)
            {
                var next = state.TryStep(step, out var after) ? after : null;
                if (rank >= 0)
                {
                    Assert.Equal(next is null ? -1 : forward.Rank(next, origin), forward.After(rank, step));
                }

                if (rankBack >= 0)
                {
                    Assert.Equal(next is null ? -1 : backward.Rank(next, origin), backward.After(rankBack, step));
                }
            }
        }

        string Coloured(State state)
        {
            var relative = (origin.Labels.Inverse() * state.Labels).Inverse();
            return state.Shape + "|" + string.Join(' ', Enumerable.Range(0, colours.Length).Select(site => colours[relative[site]]));
        }

        static HashSet<string> Reach(string from, Func<string, IEnumerable<string?>> next)
        {
            var reached = new HashSet<string> { from };
            var queue = new Queue<string>([from]);
            while (queue.TryDequeue(out var key))
            {
                foreach (var other in next(key))
                {
                    if (other is not null && reached.Add(other))
                    {
                        queue.Enqueue(other);
                    }
                }
            }

            return reached;
        }
    }

    private static int[] UpAndDownAgainstSides(Mechanism mechanism) => [.. mechanism.SiteNames.Select(name => name[^1] is 'U' or 'D' ? 1 : 0)];

    private static int[] Colouring(string what) => what switch
    {
        "twists" => Coloured(name => name.Length == 5 && name[^1] is 'U' or 'D'),
        "flips" => Coloured(name => name.Length == 4 && (name[^1] is 'U' or 'D' || (!name.Contains('U', StringComparison.Ordinal) && !name.Contains('D', StringComparison.Ordinal) && name[^1] is 'F' or 'B'))),
        "slice" => Coloured(name => name.Length == 4 && !name.Contains('U', StringComparison.Ordinal) && !name.Contains('D', StringComparison.Ordinal)),
        "three edges" => [.. Cube.SiteNames.Select((name, i) => name.Length == 4 && name[..2] is "UF" or "UR" or "UB" ? i : -1)],
        _ => new int[Cube.SiteCount],
    };

    private static int[] Coloured(Func<string, bool> isMarked) => [.. Cube.SiteNames.Select(name => isMarked(name) ? 1 : 0)];
}
