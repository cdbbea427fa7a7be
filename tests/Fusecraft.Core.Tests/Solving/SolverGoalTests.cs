using Fusecraft.Mechanisms;
using Fusecraft.Solving;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Solving;

/// <summary>Goals that leave labels free: every answer against a search over all states.</summary>
public class SolverGoalTests
{
    [Fact]
    public void The_shape_goal_is_reached_by_a_shortest_path_of_shapes() =>
        Check(Custom().Goal(Goal.Shape).Build(), state => state.Shape == state.Mechanism.Home);

    [Fact]
    public void The_marks_goal_is_reached_by_a_shortest_path() =>
        Check(Custom().Goal(Goal.MarksAt("pin@6")).Build(), state => state.Shape!.Marks.Contains(("pin", 5)));

    [Fact]
    public void The_sites_goal_is_reached_by_a_shortest_path() =>
        Check(Custom().Goal(Goal.SitesHome("1", "4")).Build(), state => state.Labels[0] == 0 && state.Labels[3] == 3);

    [Fact]
    public void The_colours_goal_is_reached_by_a_shortest_path() =>
        Check(
            Custom().Goal(Goal.Colours).Colours(ColourScheme.Alike(["1", "2", "3"], ["5", "6"])).Build(),
            state => state.Shape == state.Mechanism.Home && Enumerable.Range(0, 6).All(site => Colour(state.Labels[site]) == Colour(site)));

    [Fact]
    public void The_sites_goal_is_reached_through_the_vertex_group_where_the_search_ends()
    {
        var mechanism = MechanismBuilder.Cube("Fused", 3).Block("UFR", "UF").Goal(Goal.SitesHome("DBL:D", "DB:D", "DF:D", "DR:D", "DL:D")).Build();
        var state = SolverTests.RandomState(mechanism, 80, 4);

        var result = new Solver(mechanism, new SolveOptions { MaxStates = 300 }).Solve(state);

        Assert.True(result.IsSolvable, result.Reason);
        var end = state.Apply(result.Path!.Word);
        Assert.All(["DBL:D", "DB:D", "DF:D", "DR:D", "DL:D"], name => Assert.Equal(mechanism.FindSite(name), end.Labels[mechanism.FindSite(name)!.Value]));
    }

    [Fact]
    public void A_sites_goal_that_no_state_meets_is_refused_by_the_vertex_group()
    {
        // On a ring, tiles keep their cyclic order.
        var ring = MechanismBuilder.GraphBoard("Ring", ["a", "b", "c", "d", "e"], [("a", "b"), ("b", "c"), ("c", "d"), ("d", "e"), ("e", "a")], ["e"])
            .Goal(Goal.SitesHome("a", "b", "c", "d")).Build();

        var result = new Solver(ring, new SolveOptions { MaxStates = 4 }).Solve(ring.ParseState("(a b)"));

        Assert.False(result.IsSolvable);
        Assert.StartsWith("In none of the 5 shapes", result.Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void A_colours_goal_beyond_the_search_is_reached_by_bringing_labels_home()
    {
        var mechanism = MechanismBuilder.Cube("Cube", 3).Goal(Goal.Colours).Colours(ColourScheme.Faces).Build();
        var state = SolverTests.RandomState(mechanism, 60, 9);

        var result = new Solver(mechanism, new SolveOptions { MaxStates = 1_000 }).Solve(state);

        Assert.Equal(mechanism.HomeState, state.Apply(result.Path!.Word));
    }

    private static MechanismBuilder Custom() => MechanismBuilder.Custom("Small", 6)
        .Turn("A", "(1 2 3)", turn => turn.BarredBy("pin@3"))
        .Turn("B", "(3 4 5 6)")
        .Block("1", "2")
        .Mark("pin", "4");

    private static int Colour(int site) => site switch { < 3 => 0, 3 => 1, _ => 2 };

    private static void Check(Mechanism mechanism, Func<State, bool> isGoal)
    {
        var solver = new Solver(mechanism);
        foreach (var start in SolverTests.Depths(mechanism.HomeState).Keys.Take(40))
        {
            var nearest = SolverTests.Depths(start).Where(entry => isGoal(entry.Key)).Min(entry => (int?)entry.Value);
            var result = solver.Solve(start);

            Assert.Equal(nearest, result.Path?.Length);
            Assert.Equal(nearest is not null, result.IsSolvable);
            Assert.True(result.Path is null || (result.IsProvenShortest && isGoal(start.Apply(result.Path.Word))));
        }
    }
}
