using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;
using Barrier = Fusecraft.Mechanisms.Barrier;

namespace Fusecraft.Tests.Groupoids;

/// <summary>What holds for every mechanism, checked on random small ones against an interpreter that knows no groups and no bitsets.</summary>
public class RandomMechanismLawTests
{
    private const ulong FixedSeeds = RandomMechanisms.FixedSeeds;

    [Property(MaxTest = 100)]
    public void States_by_exhaustive_search_are_shapes_times_vertex_group(ulong seed) => CheckStates(seed);

    [Fact]
    public void States_by_exhaustive_search_are_shapes_times_vertex_group_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckStates);

    [Property(MaxTest = 100)]
    public void Shapes_arrows_and_regions_are_those_of_a_plain_reading(ulong seed) => CheckFigures(seed);

    [Fact]
    public void Shapes_arrows_and_regions_are_those_of_a_plain_reading_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckFigures);

    [Property(MaxTest = 100)]
    public void A_step_is_barred_exactly_where_a_true_reason_is_named(ulong seed) => CheckBarriers(seed);

    [Fact]
    public void A_step_is_barred_exactly_where_a_true_reason_is_named_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckBarriers);

    [Property(MaxTest = 50)]
    public void A_path_has_an_inverse_of_free_steps_exactly_where_there_is_a_way_back(ulong seed) => CheckInverses(seed);

    [Fact]
    public void A_path_has_an_inverse_of_free_steps_exactly_where_there_is_a_way_back_on_fixed_seeds() => RandomMechanisms.ForFixedSeeds(CheckInverses);

    [Fact]
    public void Vertex_groups_of_a_region_are_conjugate_by_any_path() => RandomMechanisms.ForFixedSeeds(CheckVertexGroups);

    [Fact]
    public void Renaming_and_renumbering_sites_changes_no_figure() => RandomMechanisms.ForFixedSeeds(seed =>
    {
        var definition = RandomMechanisms.From(seed);
        var relabelled = RandomMechanisms.Relabelled(definition, new SeededRandom(seed));
        Assert.Equal(Figures(definition), Figures(relabelled));
    });

    [Fact]
    public void The_random_mechanisms_show_everything_that_matters()
    {
        var counts = new Dictionary<string, int>();
        for (var seed = 0UL; seed < FixedSeeds; seed++)
        {
            var definition = RandomMechanisms.From(seed);
            var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
            var group = groupoid.VertexGroupAt(0);
            Count("several shapes", groupoid.ShapeCount > 1);
            Count("more than 50 shapes", groupoid.ShapeCount > 50);
            Count("several regions", groupoid.Regions.Length > 1);
            Count("traps", groupoid.TrapCount > 0);
            Count("a home region of several shapes beside others", groupoid.Regions.Length > 1 && groupoid.HomeRegion.ShapeCount > 1);
            Count("stuck shapes", groupoid.StuckShapeCount > 0);
            Count("dead ends", groupoid.DeadEndCount > 0);
            Count("a non-trivial group with several shapes", group.Order > 1 && groupoid.HomeRegion.ShapeCount > 1);
            Count("wide pieces", !definition.Pieces.IsEmpty);
            Count("blocks", !definition.Blocks.IsEmpty);
            Count("one-way turns", definition.Turns.Any(turn => turn.IsOneWay));
            Count("back guards", definition.Turns.Any(turn => turn.Back is { IsAlways: false }));
            Count("carried pieces", definition.Turns.Any(turn => !turn.Carries.IsEmpty));
            Count("nested alternatives", definition.Turns.Any(turn => turn.Guard.AnyOf.Any(alternative => !alternative.AnyOf.IsEmpty)));
        }

        Assert.All(counts, pair => Assert.True(pair.Value >= 10, $"only {pair.Value} of {FixedSeeds} have {pair.Key}"));

        void Count(string what, bool has) => counts[what] = counts.GetValueOrDefault(what) + (has ? 1 : 0);
    }

    private static void CheckStates(ulong seed)
    {
        var definition = RandomMechanisms.From(seed);
        var naive = new NaiveMechanism(definition);
        var home = naive.Regions()[0];
        var group = ShapeGroupoid.Explore(Mechanism.Create(definition)).VertexGroupAt(0);
        Assert.Equal(naive.Arrangements(home).Count, group.StateCount);
        Assert.Equal(home.Count * group.Order, group.StateCount);
    }

    private static void CheckFigures(ulong seed)
    {
        var definition = RandomMechanisms.From(seed);
        var naive = new NaiveMechanism(definition);
        var shapes = naive.Shapes();
        var regions = naive.Regions();
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
        var read = Enumerable.Range(0, groupoid.ShapeCount).Select(shape => NaiveReading.Of(groupoid.ShapeAt(shape))).ToList();
        Assert.True(groupoid.IsComplete);
        Assert.Equal(shapes.Count, groupoid.ShapeCount);
        Assert.Equal(shapes.Values.Sum(shape => shape.Arrows.Count(arrow => arrow.Step.IsForward)), groupoid.FreeTurnCount);
        Assert.Equal(shapes.Values.Count(shape => shape.Arrows.Select(arrow => arrow.Step.Turn).Distinct().Count() == 1), groupoid.DeadEndCount);
        Assert.Equal(shapes.Values.Count(shape => shape.Arrows.Count == 0), groupoid.StuckShapeCount);
        Assert.Equal(regions.Count, groupoid.Regions.Length);
        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            var (distance, arrows) = shapes[read[shape]];
            Assert.Equal(distance, groupoid.DistanceOf(shape));
            Assert.Equal(distance, groupoid.PathTo(shape).Length);
            Assert.Equal(groupoid.ShapeAt(shape), groupoid.PathTo(shape).Target);
            Assert.Equal(shape, groupoid.IndexOf(groupoid.ShapeAt(shape)));
            for (var step = 0; step < naive.Steps.Count; step++)
            {
                var target = arrows.Find(arrow => arrow.Step == naive.Steps[step]).Target;
                var after = groupoid.After(shape, groupoid.Mechanism.Steps[step]);
                Assert.Equal(target, after < 0 ? null : read[after]);
            }
        }

        var passages = 0;
        var traps = 0;
        foreach (var members in regions)
        {
            var region = groupoid.Regions[groupoid.RegionOf(read.FindIndex(members.Contains))];
            Assert.All(Enumerable.Range(0, read.Count), shape => Assert.Equal(members.Contains(read[shape]), groupoid.RegionOf(shape) == region.Index));
            var leaving = members.Sum(shape => shapes[shape].Arrows.Count(arrow => !members.Contains(arrow.Target)));
            Assert.Equal(members.Count, region.ShapeCount);
            Assert.Equal(leaving, region.PassageCount);
            Assert.Equal(members.Max(shape => shapes[shape].Distance), region.Eccentricity);
            passages += leaving;
            traps += leaving == 0 && region.Index > 0 ? 1 : 0;
        }

        Assert.Equal(passages, groupoid.PassageCount);
        Assert.Equal(traps, groupoid.TrapCount);
        Assert.Equal(0, groupoid.RegionOf(0));
    }

    private static void CheckBarriers(ulong seed)
    {
        var definition = RandomMechanisms.From(seed);
        var naive = new NaiveMechanism(definition);
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
        for (var index = 0; index < groupoid.ShapeCount; index++)
        {
            var shape = groupoid.ShapeAt(index);
            var read = NaiveReading.Of(shape);
            Assert.Equal(naive.Steps.FindAll(step => step.IsFree(read)).ConvertAll(naive.Steps.IndexOf), shape.FreeSteps().Select(step => step.Index));
            foreach (var step in groupoid.Mechanism.Steps)
            {
                var isFree = naive.Steps[step.Index].IsFree(read);
                var barrier = shape.WhyBarred(step);
                Assert.Equal(isFree, shape.IsFree(step));
                Assert.Equal(isFree, barrier is null);
                Assert.Equal(isFree, shape.After(step) is not null);
                if (barrier is not null)
                {
                    IsTrue(barrier, naive.Steps[step.Index].Turn, shape, read);
                }
            }
        }
    }

    private static void IsTrue(Barrier barrier, NaiveTurn turn, Shape shape, NaiveShape read)
    {
        Assert.Equal(turn.Tears(read) ? BarrierKind.TornBlock : BarrierKind.Guard, barrier.Kind);
        if (barrier.Kind == BarrierKind.TornBlock)
        {
            Assert.Contains(shape.Blocks, block => block.SequenceEqual(barrier.TornBlock));
            var sites = barrier.TornBlock.SelectMany(piece => shape.Mechanism.SitesOfPiece[piece]).Select(site => shape.Mechanism.SiteNames[site]).ToList();
            Assert.Contains(sites, turn.Carried.Contains);
            Assert.DoesNotContain(sites, site => sites.TrueForAll(turn.Carried.Contains));
            Assert.All(barrier.TornBlock, piece => Assert.Contains(shape.Mechanism.PieceNames[piece], barrier.ToString(), StringComparison.Ordinal));
            return;
        }

        Assert.Empty(barrier.TornBlock);
        foreach (var claim in barrier.ToString().Split([", or ", " and "], StringSplitOptions.None))
        {
            if (claim.StartsWith("it needs ", StringComparison.Ordinal))
            {
                Assert.DoesNotContain(claim["it needs ".Length..], read.Marks);
            }
            else
            {
                Assert.EndsWith(" is in the way", claim, StringComparison.Ordinal);
                Assert.Contains(claim[..^" is in the way".Length], read.Marks);
            }
        }
    }

    private static void CheckInverses(ulong seed)
    {
        var random = new SeededRandom(seed);
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed)));
        for (var walk = 0; walk < 3; walk++)
        {
            var path = TurnPath.At(groupoid.ShapeAt(random.NextInt32(groupoid.ShapeCount)));
            for (var length = 1 + random.NextInt32(5); length > 0 && path.Target.FreeSteps() is { Length: > 0 } free; length--)
            {
                path = path.Then(TurnPath.Follow(path.Target, free[random.NextInt32(free.Length)]));
            }

            var canReturn = groupoid.RegionOf(groupoid.IndexOf(path.Source)) == groupoid.RegionOf(groupoid.IndexOf(path.Target));
            Assert.Equal(canReturn, path.TryInverse(out var inverse));
            if (!canReturn)
            {
                Assert.Contains("no way back", Assert.Throws<InvalidOperationException>(path.Inverse).Message, StringComparison.Ordinal);
                continue;
            }

            var replayed = TurnPath.Follow(path.Target, inverse!.Steps);
            Assert.Equal(path.Source, replayed.Target);
            Assert.Equal(path.Permutation.Inverse(), replayed.Permutation);
            Assert.True(path.Then(inverse).Permutation.IsIdentity);
        }
    }

    private static void CheckVertexGroups(ulong seed)
    {
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(RandomMechanisms.From(seed)));
        foreach (var region in groupoid.Regions)
        {
            var one = groupoid.VertexGroupAt(region.FirstShape);
            Assert.Equal(one.Group.Generators, one.GeneratorLoops().Select(loop => loop.Permutation));
            Assert.All(one.GeneratorLoops(), loop => Assert.True(loop.IsLoop && groupoid.IndexOf(loop.Source) == region.FirstShape));
            for (var shape = region.FirstShape + 1; shape < Math.Min(groupoid.ShapeCount, region.FirstShape + 40); shape++)
            {
                if (groupoid.RegionOf(shape) == region.Index)
                {
                    Conjugacy.Holds(one, groupoid.VertexGroupAt(shape));
                }
            }
        }
    }

    private static (int Shapes, long FreeTurns, int DeadEnds, int Stuck, int Regions, long Passages, int Traps, int Eccentricity, BigInteger Order, BigInteger States) Figures(MechanismDefinition definition)
    {
        var groupoid = ShapeGroupoid.Explore(Mechanism.Create(definition));
        var group = groupoid.VertexGroupAt(0);
        return (groupoid.ShapeCount, groupoid.FreeTurnCount, groupoid.DeadEndCount, groupoid.StuckShapeCount, groupoid.Regions.Length, groupoid.PassageCount, groupoid.TrapCount,
            groupoid.HomeRegion.Eccentricity, group.Order, group.StateCount);
    }
}
