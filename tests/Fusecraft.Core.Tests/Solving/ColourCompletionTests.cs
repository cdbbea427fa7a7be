using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>States given by their colours alone, against all that can be reached, tried one by one.</summary>
public class ColourCompletionTests
{
    [Fact]
    public void Every_colouring_is_completed_exactly_where_a_reachable_state_shows_it() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var plain = RandomMechanisms.From(seed);
        var random = new SeededRandom(seed);
        var classes = Enumerable.Range(0, plain.Sites.Length).GroupBy(_ => random.NextInt32(3)).Select(sites => sites.Select(site => plain.Sites[site]).ToImmutableArray()).ToList();
        var mechanism = Mechanism.Create(new MechanismDefinition
        {
            Name = plain.Name,
            Sites = plain.Sites,
            Pieces = plain.Pieces,
            Turns = plain.Turns,
            Blocks = plain.Blocks,
            Marks = plain.Marks,
            Colours = ColourScheme.Alike([.. classes]),
        });
        var naive = new NaiveMechanism(plain);
        var reachable = naive.Arrangements([.. naive.Shapes().Keys]).Select(labels => Key([.. labels.Split(' ').Select(label => mechanism.ColourOfSite[plain.Sites.IndexOf(label)])])).ToHashSet();
        var solver = new Solver(mechanism);
        foreach (var colours in Arrangements([.. mechanism.ColourOfSite]))
        {
            var result = solver.Complete(ColouredState.Of(mechanism, colours));

            Assert.Equal(reachable.Contains(Key(colours)), result.IsPossible);
            Assert.Equal(result.IsPossible, result.HasState);
            if (result.HasState)
            {
                Assert.Equal(colours, mechanism.ColoursOf(result.State).ColourOn);
                Assert.True(solver.Route(mechanism.HomeState, result.State).HasPath);
            }
        }
    });

    [Theory]
    [InlineData(2, "")]
    [InlineData(3, "")]
    [InlineData(3, "UFR UF")]
    [InlineData(3, "DL DLB LB|UFR UF")]
    [InlineData(4, "")]
    public void Scrambles_are_completed_from_their_colours(int size, string blocks)
    {
        var mechanism = Faces(size, blocks.Split('|', StringSplitOptions.RemoveEmptyEntries));
        var solver = new Solver(mechanism);
        for (var seed = 1UL; seed <= 12; seed++)
        {
            var colours = mechanism.ColoursOf(SolverTests.RandomState(mechanism, 40, seed));

            var result = solver.Complete(colours);

            Assert.True(result.HasState, result.Reason);
            Assert.Equal(colours, mechanism.ColoursOf(result.State));
            Assert.Equal(colours, mechanism.ParseColours(colours.ToString()));
        }
    }

    // What parity and twist forbid on the cubes is common knowledge in the trade.
    [Theory]
    [InlineData(2, "UFR:U=F UFR:F=R UFR:R=U")]
    [InlineData(3, "UFR:U=F UFR:F=R UFR:R=U")]
    [InlineData(3, "UF:U=F UF:F=U")]
    [InlineData(3, "UF:F=R UR:R=F")]
    [InlineData(3, "UFR:F=R UFR:R=B UBR:R=F UBR:B=R")]
    public void A_twisted_corner_a_flipped_edge_and_a_swapped_pair_are_proven_impossible(int size, string colours)
    {
        var mechanism = Faces(size);

        var result = new Solver(mechanism).Complete(mechanism.ParseColours(colours));

        Assert.False(result.IsPossible);
        Assert.StartsWith("No member of the vertex group", result.Reason, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("UFR:U=F UFR:F=R UFR:R=U UBR:U=B UBR:B=R UBR:R=U")]
    [InlineData("UF:U=F UF:F=U UR:U=R UR:R=U")]
    [InlineData("UF:F=R UR:R=F UFR:F=R UFR:R=B UBR:R=F UBR:B=R")]
    public void Two_such_faults_that_make_up_for_each_other_are_possible(string colours)
    {
        var mechanism = Faces(3);

        var result = new Solver(mechanism).Complete(mechanism.ParseColours(colours));

        Assert.True(result.HasState, result.Reason);
        Assert.Equal(colours.Split(' ').Order(), mechanism.ColoursOf(result.State).ToString().Split(' ').Order());
    }

    [Theory]
    [InlineData("UF:F=U", "The place of UF shows U U, which no piece does.")]
    [InlineData("UF:F=R", "More places show R U than the 1 there is of such pieces; one of them is that of UR.")]
    [InlineData("U:U=D", "More places show D than the 1 there is of such pieces; one of them is that of U.")]
    public void Colours_that_no_whole_pieces_show_are_refused_at_sight(string colours, string reason)
    {
        var mechanism = Faces(3);

        var result = new Solver(mechanism).Complete(mechanism.ParseColours(colours));

        Assert.Equal((false, reason), (result.IsPossible, result.Reason));
    }

    [Fact]
    public void A_shape_is_found_with_the_labels()
    {
        var mechanism = Faces(3, "UFR UF", "DL DLB LB");
        var scramble = SolverTests.RandomState(mechanism, 30, 7);
        var solver = new Solver(mechanism);

        var solved = solver.SolveColours(mechanism.ColoursOf(scramble));

        Assert.True(solved.HasPath, solved.Reason);
        var state = solver.Complete(mechanism.ColoursOf(scramble)).State!;
        Assert.Equal("home", mechanism.ColoursOf(state.Apply(solved.Path.Word)).ToString());
    }

    [Fact]
    public void Too_many_shapes_are_not_guessed_at()
    {
        var mechanism = Faces(3, "UFR UF");

        var result = new Solver(mechanism, new SolveOptions { MaxShapes = 5 }).Complete(mechanism.ParseColours("UFR:U=F UFR:F=R UFR:R=U"));

        Assert.Null(result.IsPossible);
        Assert.StartsWith("There are more than 5 shapes", result.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Colours_are_read_in_three_ways()
    {
        var cube = Faces(2);
        var turned = cube.ColoursOf(cube.HomeState.Apply(cube.ParseWord("U")));
        var letters = string.Concat(turned.ColourOn.Select(colour => "LRDUBF"[colour]));

        Assert.Equal(turned, cube.ParseColours(letters));
        Assert.Equal(turned, cube.ParseColours(string.Join(' ', letters.Chunk(3).Select(three => new string(three)))));
        Assert.Equal(turned, cube.ParseColours(turned.ToString()));
        Assert.Equal(cube.ColoursOf(cube.HomeState), cube.ParseColours(" home "));

        var small = MechanismBuilder.Custom("Small", 4).Turn("A", "(1 2 3 4)").Colours(ColourScheme.Alike(["1", "2"], ["3", "4"])).Build();
        Assert.Equal([0, 2, 2, 0], [.. small.ParseColours("1 4 3 2").ColourOn]);
        Assert.Equal("2=3 4=1", small.ParseColours("4=2 2=4").ToString());
    }

    [Theory]
    [InlineData("1=2 2", "found \"2\"; a site that differs from home is written site=colour")]
    [InlineData("x=2", "found \"x=2\"; \"x\" is not the name of a site")]
    [InlineData("1=2 1=3", "found \"1=3\"; the site 1 was given before")]
    [InlineData("1=x", "found \"1=x\"; \"x\" is no colour: a colour goes by the name of a site that shows it at home")]
    [InlineData("1 2 3", "found 3 colours; there are 4 sites")]
    [InlineData("1 2 3 x", "found \"x\" for the site 4; \"x\" is no colour: a colour goes by the name of a site that shows it at home")]
    public void What_is_no_colouring_is_refused(string text, string problem)
    {
        var small = MechanismBuilder.Custom("Small", 4).Turn("A", "(1 2 3 4)").Build();

        Assert.Equal(problem, Assert.Throws<FormatException>(() => small.ParseColours(text)).Message);
    }

    [Fact]
    public void Foreign_colours_are_refused()
    {
        var cube = Faces(2);

        Assert.Throws<ArgumentException>(() => ColouredState.Of(cube, 1, 2));
        Assert.Throws<ArgumentException>(() => ColouredState.Of(cube, [.. cube.ColourOfSite[1..], 9]));
        Assert.Throws<ArgumentException>(() => new Solver(Faces(3)).Complete(cube.ParseColours("home")));
        Assert.Throws<ArgumentException>(() => Faces(3).ColoursOf(cube.HomeState));
    }

    private static Mechanism Faces(int size, params string[] blocks) => Mechanism.Create(new MechanismDefinition
    {
        Name = "cube",
        Family = new CubeFamily(size),
        Blocks = [.. blocks.Select(Make.Split)],
        Colours = ColourScheme.Faces,
        Goal = Goal.Colours,
    });

    private static string Key(int[] colours) => string.Join(' ', colours);

    // All distinct orders of the colours.
    private static IEnumerable<int[]> Arrangements(int[] colours)
    {
        if (colours.Length == 0)
        {
            yield return [];
            yield break;
        }

        foreach (var first in colours.Distinct())
        {
            int[] rest = [.. colours];
            var at = Array.IndexOf(rest, first);
            foreach (var others in Arrangements([.. rest[..at], .. rest[(at + 1)..]]))
            {
                yield return [first, .. others];
            }
        }
    }
}
