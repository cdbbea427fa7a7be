using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving.Stages;

/// <summary>The parts of a staged descent, each by itself.</summary>
public class StagePartsTests
{
    // The chain's classic member and its orders are from memory; that they agree with this library is an own computation too.
    [Fact]
    public void Among_the_subgroups_of_powers_are_those_of_the_3x3x3_and_their_colours_tell_cosets_apart()
    {
        var cube = Make.Cube(3);
        var group = ShapeGroupoid.Explore(cube).VertexGroupAt(0);
        StageMove[] moves = [.. RunMoves.Of(group.Groupoid, 0, Metric.Run)];
        var whole = PowerSubgroup.Whole(group, moves, 1_000_000, default)!;
        var found = PowerSubgroup.Find(group, whole, 4_000_000, default);

        Assert.Equal(18, moves.Length);
        Assert.All(new[] { 21119142223872000, 19508428800 }, order => Assert.Contains(found, subgroup => subgroup.Group.Order == order && subgroup.IsClosedIn(group.Group)));

        // The half turns alone: 663552 (from memory), fewer than keep the colours of their orbits.
        Assert.Contains(found, subgroup => subgroup.Group.Order == 663552 && !subgroup.IsClosedIn(group.Group));
        Assert.All(found, subgroup => Assert.True(subgroup.LiesIn(whole) && BigInteger.Remainder(group.Order, subgroup.Group.Order).IsZero));
    }

    [Theory]
    [InlineData("cube 3")]
    [InlineData("pair")]
    [InlineData("docs/workshop/weir-gate.fuse.json")]
    [InlineData("cube 4")]
    public void Bounds_of_a_stage_are_0_at_its_goal_alone_and_no_move_lowers_them_by_more_than_it_costs(string name)
    {
        var mechanism = StagedSolverTests.Named(name);
        var plan = StagePlan.Make(ShapeGroupoid.Explore(mechanism).VertexGroupAt(0), Metric.Run, 1 << 24, default)!;
        var random = new SeededRandom(4);
        Assert.NotEmpty(plan.Stages);
        foreach (var stage in plan.Stages)
        {
            var frame = stage.Frame;
            var (shape, labels) = (0, Permutation.Identity);
            var (here, there) = (new int[stage.Components.Length], new int[stage.Components.Length]);
            for (var i = 0; i < 300; i++)
            {
                var move = random.NextInt32(frame.Moves.Length);
                var next = frame.Targets[(shape * frame.Moves.Length) + move];
                if (next < 0)
                {
                    continue;
                }

                Assert.True(stage.TryRank(shape, Sites(labels, frame.SiteCount), here));
                Assert.True(stage.TryRank(next, Sites(labels * frame.Moves[move].Permutation, frame.SiteCount), there));
                Assert.True(stage.LeastCost(shape, here) - stage.LeastCost(next, there) <= frame.Moves[move].Cost);
                Assert.Equal(there, here.Select((arrangement, i) => stage.Components[i].After[(arrangement * frame.Loops.Count) + frame.LoopOf[(shape * frame.Moves.Length) + move]]));
                Assert.Equal(next == 0 && there.All(arrangement => arrangement == 0), stage.LeastCost(next, there) == 0);
                (shape, labels) = (next, labels * frame.Moves[move].Permutation);
            }
        }
    }

    [Theory]
    [InlineData("cube 3", 40)]
    [InlineData("cube 4", 6)]
    [InlineData("docs/workshop/weir-gate.fuse.json", 20)]
    [InlineData("docs/workshop/mill-race.fuse.json", 60)]
    [InlineData("docs/workshop/lock-basin.fuse.json", 60)]
    [InlineData("board", 60)]
    [InlineData("one-way wheels", 20)]
    public void Shortened_words_do_the_same_and_are_no_longer(string name, int count)
    {
        var mechanism = StagedSolverTests.Named(name);
        var groupoid = ShapeGroupoid.Explore(mechanism);
        foreach (var metric in (Metric[])[Metric.Step, Metric.Run])
        {
            var frame = StageFrame.Explore(groupoid, 0, [.. RunMoves.Of(groupoid, 0, metric)], int.MaxValue, default)!;
            var shortening = new WindowShortening(mechanism, frame, metric);
            for (var seed = 0; seed < count; seed++)
            {
                var word = Walk(groupoid, 10 + seed, (ulong)seed);
                var shortened = TurnPath.Follow(mechanism.Home, shortening.Shorten(0, [.. word.Steps], default));

                Assert.Equal(word.Permutation, shortened.Permutation);
                Assert.Equal(word.Target, shortened.Target);
                Assert.True(metric.LengthOf(shortened) <= metric.LengthOf(word));
            }
        }
    }

    [Theory]
    [InlineData("U D U", "U2 D")]
    [InlineData("R L R' L' F", "F")]
    [InlineData("U R R' U", "U2")]
    [InlineData("U R2 D2 U2 D2 R2 U2", "U R2 U2 R2 U2")]
    public void Turns_that_commute_and_words_twice_as_long_as_the_table_are_shortened(string word, string expected)
    {
        var cube = Make.Cube(3);
        var groupoid = ShapeGroupoid.Explore(cube);
        var frame = StageFrame.Explore(groupoid, 0, [.. RunMoves.Of(groupoid, 0, Metric.Run)], 1, default)!;
        var path = TurnPath.Follow(cube.Home, cube.ParseWord(word));

        var shortened = TurnPath.Follow(cube.Home, new WindowShortening(cube, frame, Metric.Run).Shorten(0, [.. path.Steps], default));

        Assert.Equal(path.Permutation, shortened.Permutation);
        Assert.True(Metric.Run.LengthOf(shortened) <= Metric.Run.LengthOf(TurnPath.Follow(cube.Home, cube.ParseWord(expected))));
    }

    private static ushort[] Sites(Permutation labels, int count) => [.. Enumerable.Range(0, count).Select(label => (ushort)labels[label])];

    // A random walk that stays in the home region.
    private static TurnPath Walk(ShapeGroupoid groupoid, int length, ulong seed)
    {
        var random = new SeededRandom(seed);
        var path = TurnPath.At(groupoid.Mechanism.Home);
        for (var i = 0; i < length; i++)
        {
            var steps = path.Target.FreeSteps().Where(step => groupoid.RegionOf(groupoid.IndexOf(path.Target.After(step)!)) == 0).ToList();
            path = path.Then(TurnPath.Follow(path.Target, steps[random.NextInt32(steps.Count)]));
        }

        return path;
    }
}
