using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groupoids;

/// <summary>Exploration up to symmetry, judged by plain exploration.</summary>
public class ShapeOrbitsTests
{
    public static TheoryData<string> Demos => [.. Directory.EnumerateFiles(Repository.PathOf("docs/workshop"), "*.fuse.json").Select(path => Path.GetFileName(path)!).Order(StringComparer.Ordinal)];

    [Theory]
    [MemberData(nameof(Demos))]
    public void Every_demo_puzzle_has_the_totals_of_plain_exploration(string file) => HasPlainTotals(MechanismFile.Load(Repository.PathOf($"docs/workshop/{file}")));

    [Theory]
    [InlineData(2, 40)]
    [InlineData(3, 40)]
    [InlineData(4, 20)]
    public void Random_fusings_of_cubes_have_the_totals_of_plain_exploration(int size, int count)
    {
        var outOfReach = 0;
        for (var seed = 1UL; seed <= (ulong)count; seed++)
        {
            var mechanism = RandomFusings.From(seed, size);
            var orbits = HasPlainTotals(mechanism);
            outOfReach += orbits.HomeRegionSymmetryCount < orbits.Symmetries.Order ? 1 : 0;
        }

        Assert.True(size == 2 || outOfReach > 0, "no fusing tested that a symmetry moves out of reach");
    }

    [Fact]
    public void Random_mechanisms_have_the_totals_of_plain_exploration()
    {
        var symmetric = 0;
        for (var seed = 1UL; seed <= 1500; seed++)
        {
            symmetric += HasPlainTotals(Mechanism.Create(RandomMechanisms.From(seed))).Symmetries.Order > 1 ? 1 : 0;
        }

        Assert.True(symmetric > 100, $"only {symmetric} of them have a symmetry");
    }

    // Two mirrored ponds, each with a one-way weir into its own basin and a free channel beyond; what leads to the far pond, and whether back, is varied.
    [Theory]
    [InlineData("", false, 4)]
    [InlineData("(a1 b1)", false, 8)]
    [InlineData("(a1 b1)", true, 8)]
    [InlineData("(a3 b3)", false, 2)]
    [InlineData("(a3 b3)", true, 2)]
    public void One_way_weirs_with_mirror_images_have_the_totals_of_plain_exploration(string crossing, bool oneWay, int symmetries)
    {
        var builder = MechanismBuilder.Custom("Ponds", "a1", "a2", "a3", "a4", "b1", "b2", "b3", "b4")
            .Turn("WeirA", "(a1 a2)", turn => turn.Needs("boat@a1").OneWay()).Turn("WeirB", "(b1 b2)", turn => turn.Needs("boat@b1").OneWay())
            .Turn("ChannelA", "(a2 a3 a4)").Turn("ChannelB", "(b2 b3 b4)")
            .Mark("boat", "a1");
        if (crossing.Length > 0)
        {
            builder.Turn("Cross", crossing, turn => _ = oneWay ? turn.OneWay() : turn);
        }

        var orbits = HasPlainTotals(builder.Build());
        Assert.Equal(symmetries, orbits.Symmetries.Order);
    }

    [Fact]
    public void The_mirrored_traps_of_one_fork_count_as_two()
    {
        // From 1 the boat falls to 2 or to 3, mirror images of each other, and stays there.
        var fork = MechanismBuilder.Custom("Fork", 3)
            .Turn("Left", "(1 2)", turn => turn.Needs("boat@1").OneWay()).Turn("Right", "(1 3)", turn => turn.Needs("boat@1").OneWay())
            .Mark("boat", "1").Build();

        var orbits = HasPlainTotals(fork);

        Assert.Equal(2, orbits.RepresentativeCount);
        Assert.Equal(2, orbits.TrapCount);
    }

    [Fact]
    public void Orbits_of_reachable_shapes_are_as_large_as_they_say()
    {
        foreach (var mechanism in (Mechanism[])[RandomFusings.From(5, 3), RandomFusings.From(3, 2), MechanismFile.Load(Repository.PathOf("docs/workshop/mill-race.fuse.json"))])
        {
            var groupoid = ShapeGroupoid.Explore(mechanism);
            var orbits = ShapeOrbits.Explore(mechanism);
            var sizes = Enumerable.Range(0, groupoid.ShapeCount).GroupBy(shape => orbits.RepresentativeOf(groupoid.ShapeAt(shape))).ToDictionary(orbit => orbit.Key, orbit => orbit.Count());
            Assert.Equal(Enumerable.Range(0, orbits.RepresentativeCount).ToDictionary(i => i, orbits.OrbitSize), sizes);
        }
    }

    [Fact]
    public void A_subgroup_of_the_symmetries_gives_the_same_totals_with_more_representatives()
    {
        var mechanism = Make.Cube(3, "", "UFR UF");
        var all = SymmetryGroup.Of(mechanism);
        var few = SymmetryGroup.Generate(mechanism, all.Generators[0].Sites);

        var orbits = HasPlainTotals(mechanism, few);

        Assert.Equal(1, ShapeOrbits.Explore(mechanism, all).RepresentativeCount);
        Assert.Equal(24 / (int)few.Order, orbits.RepresentativeCount);
    }

    [Fact]
    public void Symmetries_of_another_mechanism_are_refused()
    {
        var exception = Assert.Throws<ArgumentException>(() => ShapeOrbits.Explore(Make.Cube(3), SymmetryGroup.Of(Make.Cube(3))));
        Assert.Equal("symmetries", exception.ParamName);
    }

    [Fact]
    public void An_ended_budget_leaves_the_totals_unknown()
    {
        var orbits = ShapeOrbits.Explore(MechanismFile.Load(Repository.PathOf("docs/workshop/weir-gate.fuse.json")), options: new ExplorationOptions { MaxShapes = 10 });

        Assert.False(orbits.IsComplete);
        Assert.Equal(10, orbits.RepresentativeCount);
        Assert.Null(orbits.ShapeCount);
        Assert.Null(orbits.FreeTurnCount);
        Assert.Throws<InvalidOperationException>(() => orbits.OrbitSize(0));
        Assert.Throws<InvalidOperationException>(() => orbits.VertexGroupAtHome());
    }

    private static ShapeOrbits HasPlainTotals(Mechanism mechanism, SymmetryGroup? symmetries = null)
    {
        var plain = ShapeGroupoid.Explore(mechanism);
        var orbits = ShapeOrbits.Explore(mechanism, symmetries);
        Assert.True(orbits.IsComplete);
        Assert.Equal(
            (plain.ShapeCount, plain.FreeTurnCount, plain.DeadEndCount, plain.StuckShapeCount, plain.Regions.Length, plain.PassageCount, plain.TrapCount, plain.HomeRegion.ShapeCount),
            (orbits.ShapeCount, orbits.FreeTurnCount, orbits.DeadEndCount, orbits.StuckShapeCount, orbits.RegionCount, orbits.PassageCount, orbits.TrapCount, orbits.HomeRegionShapeCount));
        Assert.True(orbits.RepresentativeCount * (long)orbits.Symmetries.Order >= plain.ShapeCount);
        Assert.True(plain.VertexGroupAt(0).Group.SameGroupAs(orbits.VertexGroupAtHome()), $"another vertex group in {mechanism.Name}");
        return orbits;
    }
}
