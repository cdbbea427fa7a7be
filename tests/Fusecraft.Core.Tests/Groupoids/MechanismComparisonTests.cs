using System.Collections.Immutable;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>Sameness of two mechanisms.</summary>
public class MechanismComparisonTests
{
    [Theory]
    [InlineData(2, 40)]
    [InlineData(3, 40)]
    [InlineData(4, 25)]
    public void Fusings_made_by_walking_turning_over_and_holding_otherwise_are_one_puzzle(int size, int count)
    {
        var solid = Make.Cube(size);
        var repinned = 0;
        for (var seed = 1UL; seed <= (ulong)count; seed++)
        {
            var random = new SeededRandom(seed);
            var first = RandomFusings.From(seed, size);
            var second = Mechanism.Create(Held(RandomFusings.DefinitionFrom(seed, size), Walked(first, random), solid.BuiltSymmetries[random.NextInt32(48)], solid));

            var there = MechanismComparison.Of(first, second);
            var back = MechanismComparison.Of(second, first);

            Assert.Equal((ComparisonVerdict.SamePuzzle, ComparisonVerdict.SamePuzzle), (there.Verdict, back.Verdict));
            MovesHome(there);
            MovesHome(back);
            repinned += there.HomeMatch!.IsRepinned ? 1 : 0;
        }

        Assert.Equal(size % 2 == 0, repinned > 0);
    }

    [Fact]
    public void Mechanisms_made_by_walking_and_renaming_are_one_puzzle()
    {
        var moved = 0;
        for (var seed = 1UL; seed <= 400; seed++)
        {
            var random = new SeededRandom(seed);
            var definition = RandomMechanisms.From(seed);
            var first = Mechanism.Create(definition);
            var groupoid = ShapeGroupoid.Explore(first);
            var home = Enumerable.Range(0, groupoid.ShapeCount).Where(shape => groupoid.RegionOf(shape) == 0).ToList();
            var shape = groupoid.ShapeAt(home[random.NextInt32(home.Count)]);
            var walked = new MechanismDefinition
            {
                Name = definition.Name,
                Sites = definition.Sites,
                Pieces = definition.Pieces,
                Turns = [.. definition.Turns.Reverse()],
                Blocks = shape.Blocks.ConvertAll(block => block.ConvertAll(piece => first.PieceNames[piece])),
                Marks = [.. first.MarkNames.Select(mark => new MarkDefinition(mark, [.. shape.Marks.Where(token => token.Mark == mark).Select(token => first.SiteNames[token.Site])]))],
            };
            var comparison = MechanismComparison.Of(first, Mechanism.Create(RandomMechanisms.Relabelled(walked, random)));

            Assert.True(comparison.Verdict == ComparisonVerdict.SamePuzzle, $"seed {seed}: {comparison.Reason}");
            Assert.True(comparison.VertexGroups.AreAlike);
            MovesHome(comparison);
            moved += comparison.HomeMatch!.Path.Length > 0 ? 1 : 0;
        }

        Assert.True(moved > 20, $"only {moved} of them were walked");
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    public void Fusings_that_differ_in_a_figure_are_never_one_puzzle(int size)
    {
        var fusings = Enumerable.Range(1, size == 4 ? 6 : 9).Select(seed => RandomFusings.From((ulong)seed, size, 2)).ToList();
        var (same, different) = (0, 0);
        foreach (var first in fusings)
        {
            foreach (var second in fusings)
            {
                var comparison = MechanismComparison.Of(first, second);
                var back = MechanismComparison.Of(second, first);
                Assert.Equal(comparison.Verdict, back.Verdict);
                if (comparison.Verdict == ComparisonVerdict.SamePuzzle)
                {
                    same++;
                    MovesHome(comparison);

                    // Held by another corner a puzzle has other shapes, but as many states.
                    Assert.Null(comparison.HomeMatch!.IsRepinned ? null : comparison.FirstDifference);
                    Assert.False(comparison.Figures.Single(figure => figure.Name == "states of the home region").Differs);
                }
                else
                {
                    different++;
                    Assert.NotEqual(ComparisonVerdict.Undecided, comparison.Verdict);
                    Assert.NotSame(first, second);
                }
            }
        }

        Assert.True(same >= fusings.Count && different > 0);
    }

    [Fact]
    public void A_board_turned_on_its_side_is_one_puzzle()
    {
        var comparison = MechanismComparison.Of(Make.Board(3, 2), Make.Board(2, 3));

        Assert.Equal(ComparisonVerdict.SamePuzzle, comparison.Verdict);
        Assert.True(comparison.HaveSameShapeGraph);
        Assert.True(comparison.VertexGroups.AreAlike);
    }

    [Fact]
    public void A_cube_written_out_turn_by_turn_is_the_family_s()
    {
        var cube = Make.Cube(3, "", "UFR UF");
        var written = Mechanism.Create(new MechanismDefinition
        {
            Name = "written out",
            Sites = cube.SiteNames,
            Pieces = [.. cube.SitesOfPiece.Where(sites => sites.Length > 1).Select(sites => sites.ConvertAll(site => cube.SiteNames[site]))],
            Turns = [.. cube.Turns.Select(turn => new TurnDefinition { Name = turn.Name, Moves = cube.Notation.Format(turn.Permutation), Carries = [.. turn.CarriedPieces.Where(piece => turn.Permutation[cube.SitesOfPiece[piece][0]] == cube.SitesOfPiece[piece][0]).Select(piece => cube.SiteNames[cube.SitesOfPiece[piece][0]])] })],
            Blocks = [["UFR:U", "UF:U"]],
        });

        Assert.Equal(ComparisonVerdict.SamePuzzle, MechanismComparison.Of(cube, written).Verdict);
        Assert.Equal(ComparisonVerdict.SamePuzzle, MechanismComparison.Of(written, cube).Verdict);
    }

    [Fact]
    public void Puzzles_with_other_labels_can_have_one_shape_graph()
    {
        // The boat goes round three places; what the wheel does to the other labels is another matter.
        var small = MechanismBuilder.Custom("Small", 3).Turn("Wheel", "(1 2 3)").Mark("boat", "1").Build();
        var large = MechanismBuilder.Custom("Large", 5).Turn("Rim", "(1 2 3)(4 5)").Mark("boat", "1").Build();

        var comparison = MechanismComparison.Of(small, large);

        Assert.Equal(ComparisonVerdict.SameShapeGraph, comparison.Verdict);
        Assert.Equal("Rim", comparison.ShapeGraphMatch!.Steps[0]!.Name);
        Assert.False(comparison.VertexGroups.AreAlike);
        Assert.Equal("sites", comparison.FirstDifference!.Name);
    }

    [Fact]
    public void Shape_graphs_are_alike_just_when_brute_force_finds_a_bijection()
    {
        var small = Enumerable.Range(1, 1200).Select(seed => ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From((ulong)seed))))
            .Where(groupoid => groupoid.ShapeCount is > 1 and < 6 && groupoid.Mechanism.Turns.Length <= 2).Take(100).ToList();
        var (alike, unlike) = (0, 0);
        for (var i = 0; i < small.Count; i++)
        {
            for (var k = 0; k <= i; k++)
            {
                var (one, other) = (small[i], small[k]);
                if (one.ShapeCount != other.ShapeCount || one.Mechanism.Steps.Length != other.Mechanism.Steps.Length)
                {
                    continue;
                }

                var expected = AreAlike(one, other);
                var match = new ShapeGraphMatching(one, other, long.MaxValue, CancellationToken.None).Find();
                Assert.True(expected == match is not null, $"{one.Mechanism.Name} and {other.Mechanism.Name}: brute force says {expected}");
                _ = expected ? alike++ : unlike++;
            }
        }

        Assert.True(alike > small.Count && unlike > 20, $"{alike} alike, {unlike} not");
    }

    [Fact]
    public void A_shape_graph_match_takes_arrows_to_arrows()
    {
        var first = Make.Cube(3, "", "UFR UF");
        var second = Make.Cube(3, "", "DBL DL");
        var one = ShapeGroupoid.Explore(first);
        var other = ShapeGroupoid.Explore(second);
        var match = new ShapeGraphMatching(one, other, long.MaxValue, CancellationToken.None).Find()!;
        var image = new Dictionary<int, int> { [match.Shape] = match.Image };
        var queue = new Queue<int>([match.Shape]);
        while (queue.TryDequeue(out var shape))
        {
            foreach (var step in first.Steps.Where(step => one.After(shape, step) >= 0))
            {
                var (target, expected) = (one.After(shape, step), other.After(image[shape], match.Steps[step.Index]!));
                if (image.TryAdd(target, expected))
                {
                    queue.Enqueue(target);
                }

                Assert.Equal(expected, image[target]);
            }
        }

        Assert.Equal(one.ShapeCount, image.Values.Distinct().Count());
    }

    [Fact]
    public void An_ended_budget_leaves_the_verdict_open()
    {
        var first = MechanismFile.Load(Repository.PathOf("docs/workshop/weir-gate.fuse.json"));
        var comparison = MechanismComparison.Of(first, Make.Cube(3, "", "UFR UF", "UBR UB"), new ComparisonOptions { MaxShapes = 5 });

        Assert.Equal(ComparisonVerdict.Undecided, comparison.Verdict);
        Assert.Null(comparison.HaveSameShapeGraph);
        Assert.Null(comparison.Figures.Single(figure => figure.Name == "shapes").First);
        Assert.Equal(ComparisonVerdict.SamePuzzle, MechanismComparison.Of(first, first, new ComparisonOptions { MaxShapes = 5 }).Verdict);
    }

    // The match is checked against blocks and marks alone: moved by it, the first home is where the second one's path leads.
    private static void MovesHome(MechanismComparison comparison)
    {
        var match = comparison.HomeMatch!;
        Assert.Equal(comparison.Second.Home, match.Path.Source);
        var blocks = comparison.First.HomeBlocks.Select(block => block.SelectMany(piece => comparison.First.SitesOfPiece[piece]).Select(site => match.Sites[site]).Order());
        var expected = match.Path.Target.Blocks.Select(block => block.SelectMany(piece => comparison.Second.SitesOfPiece[piece]).Order());
        Assert.Equal(expected.Select(sites => string.Join(' ', sites)).Order(), blocks.Select(sites => string.Join(' ', sites)).Order());
        Assert.Equal(match.Path.Target.Marks.Order(), comparison.First.HomeMarks.Select(mark => (mark.Mark, match.Sites[mark.Site])).Order());
        if (!match.IsRepinned)
        {
            Assert.All(comparison.First.Steps, step => Assert.Equal(match.Steps[step.Index].Permutation, step.Permutation.ConjugateBy(match.Sites)));
        }
    }

    private static Shape Walked(Mechanism mechanism, SeededRandom random)
    {
        var shape = mechanism.Home;
        for (var i = 0; i < 30 && shape.FreeSteps() is { IsEmpty: false } free; i++)
        {
            shape = shape.After(free[random.NextInt32(free.Length)])!;
        }

        return shape;
    }

    private static MechanismDefinition Held(MechanismDefinition definition, Shape shape, Permutation by, Mechanism solid) => new()
    {
        Name = "held otherwise",
        Family = definition.Family,
        Blocks = shape.Blocks.ConvertAll(block => block.ConvertAll(piece => solid.SitesOfPiece[piece] is [var site, ..] ? solid.PieceNames[solid.PieceOfSite[by[site]]] : solid.PieceNames[piece])),
    };

    private static bool AreAlike(ShapeGroupoid one, ShapeGroupoid other)
    {
        var turns = one.Mechanism.Turns.Length;
        return turns == other.Mechanism.Turns.Length && Orders(turns).Any(order => Enumerable.Range(0, 1 << turns).Any(flips => StepImages(order, flips) is { } steps
            && Orders(one.ShapeCount).Any(image => one.Mechanism.Steps.All(step => Enumerable.Range(0, one.ShapeCount).All(shape =>
                (one.After(shape, step) is var target && target < 0 ? -1 : image[target]) == other.After(image[shape], steps[step.Index]))))));

        Step[]? StepImages(int[] order, int flips)
        {
            var images = new Step[one.Mechanism.Steps.Length];
            foreach (var turn in one.Mechanism.Turns)
            {
                var target = other.Mechanism.Turns[order[turn.Index]];
                var isFlipped = (flips >> turn.Index & 1) != 0;
                if (turn.IsOneWay != target.IsOneWay || (isFlipped && turn.IsOneWay))
                {
                    return null;
                }

                images[turn.Forward.Index] = isFlipped ? target.Backward! : target.Forward;
                if (turn.Backward is { } backward)
                {
                    images[backward.Index] = images[turn.Forward.Index].Opposite!;
                }
            }

            return images;
        }
    }

    private static IEnumerable<int[]> Orders(int count) => count == 0
        ? [[]]
        : Orders(count - 1).SelectMany(order => Enumerable.Range(0, count).Select(at => (int[])[.. order[..at], count - 1, .. order[at..]]));
}
