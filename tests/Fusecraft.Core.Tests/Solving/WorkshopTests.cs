using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>The demo puzzles: what their descriptions claim, and that every state of them that is asked for is solved. All figures are own computations.</summary>
public class WorkshopTests
{
    public static TheoryData<string> Files => [.. Directory.EnumerateFiles(Repository.PathOf("docs/workshop"), "*.fuse.json").Select(path => Path.GetFileName(path)).Order(StringComparer.Ordinal)];

    [Fact]
    public void There_are_six_demo_puzzles() => Assert.Equal(6, Files.Count);

    [Theory]
    [MemberData(nameof(Files))]
    public void Each_is_marked_as_invented(string file) => Assert.Contains("Invented demo puzzle of the invented", Load(file).About, StringComparison.Ordinal);

    [Theory]
    [MemberData(nameof(Files))]
    public void Random_walks_in_the_home_region_are_solved_and_the_paths_replay(string file)
    {
        var mechanism = Load(file);
        var groupoid = ShapeGroupoid.Explore(mechanism);
        var solver = new Solver(mechanism, new SolveOptions { MaxStates = 100_000 });
        var random = new SeededRandom(11);
        foreach (var length in new[] { 0, 1, 5, 40 })
        {
            var state = mechanism.HomeState;
            for (var i = 0; i < length; i++)
            {
                var steps = state.Shape!.FreeSteps().Where(step => groupoid.RegionOf(groupoid.IndexOf(state.Shape.After(step)!)) == 0).ToList();
                state = state.After(steps[random.NextInt32(steps.Count)]);
            }

            var result = solver.Solve(state);

            Assert.True(result.IsSolvable, result.Reason);
            Assert.Equal(mechanism.HomeState, state.Apply(result.Path!.Word));
            Assert.True(!result.IsProvenShortest || !mechanism.IsReversible || result.Path.Length <= length);
        }
    }

    [Fact]
    public void The_weir_gate_has_284_dead_ends_and_no_trap()
    {
        var groupoid = ShapeGroupoid.Explore(Load("weir-gate.fuse.json"));

        Assert.Equal((2244, 284, 0), (groupoid.ShapeCount, groupoid.DeadEndCount, groupoid.TrapCount));
    }

    [Fact]
    public void The_flood_tower_has_945_shapes_and_no_dead_end()
    {
        var groupoid = ShapeGroupoid.Explore(Load("flood-tower.fuse.json"));

        Assert.Equal((945, 0), (groupoid.ShapeCount, groupoid.DeadEndCount));
    }

    [Fact]
    public void The_pair_on_the_ferry_board_is_an_island_around_which_half_of_all_arrangements_can_be_reached()
    {
        var group = ShapeGroupoid.Explore(Load("ferry-board.fuse.json")).VertexGroupAt(0);

        Assert.Equal(181440, group.Order); // 9!/2
        Assert.Equal(9, Assert.Single(group.Group.MovedOrbits).Length);
    }

    [Theory]
    [InlineData("seven-piers.fuse.json")]
    [InlineData("lock-basin.fuse.json")]
    public void Six_labels_have_120_of_720_arrangements(string file)
    {
        var group = ShapeGroupoid.Explore(Load(file)).VertexGroupAt(0);

        Assert.Equal(120, group.Order);
        Assert.Equal(6, Assert.Single(group.Group.MovedOrbits).Length);
    }

    [Fact]
    public void The_mill_race_has_one_passage_into_one_trap_from_which_nobody_comes_home()
    {
        var mechanism = Load("mill-race.fuse.json");
        var groupoid = ShapeGroupoid.Explore(mechanism);
        var trapped = mechanism.HomeState.Apply(mechanism.ParseWord("Gate Gate Wheel Chute"));

        Assert.Equal((1L, 1), (groupoid.PassageCount, groupoid.TrapCount));
        Assert.Equal(1, groupoid.RegionOf(groupoid.IndexOf(trapped.Shape!)));
        Assert.False(new Solver(mechanism).Solve(trapped).IsSolvable);
    }

    private static Mechanism Load(string file) => MechanismFile.Load(Repository.PathOf("docs/workshop/" + file));
}
