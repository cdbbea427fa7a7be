using System.Text.Json;
using Fusecraft.Groups;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Reference;

/// <summary>Random groups against SymPy, a general-purpose library that shares no code with this one. Each test says of every group on which the two disagree what its generators are.</summary>
[Trait("Category", "Reference")]
public class GroupComparisonTests
{
    private const int Count = 200;

    // One run of Python answers all questions.
    private static readonly Lazy<SymPyAnswer[]> _answers = new(AskSymPy);

    [SymPyFact]
    public void Orders_agree() => Compare(group => $"{group.Order}", answer => answer.Order);

    [SymPyFact]
    public void Orbits_agree() => Compare(group => Text(group.Orbits.Select(orbit => orbit.AsEnumerable())), answer => Text(answer.Orbits));

    [SymPyFact]
    public void Orders_along_the_derived_series_agree() => Compare(
        group => string.Join(' ', group.DerivedSeries().Select(subgroup => subgroup.Order)), answer => string.Join(' ', answer.DerivedOrders));

    [SymPyFact]
    public void Orders_of_the_centre_agree() => Compare(group => $"{group.Centre().Order}", answer => answer.CentreOrder);

    [SymPyFact]
    public void Abelian_invariants_agree() => Compare(group => string.Join(' ', group.AbelianInvariants()), answer => string.Join(' ', answer.AbelianInvariants));

    [SymPyFact]
    public void Solvable_and_nilpotent_groups_agree() => Compare(group => $"{group.IsSolvable} {group.IsNilpotent}", answer => $"{answer.IsSolvable} {answer.IsNilpotent}");

    [SymPyFact]
    public void Block_systems_that_join_two_points_agree() => Compare(
        group => group.IsTransitive ? Lines(Enumerable.Range(1, group.Degree - 1).Select(point => group.BlockSystemJoining(0, point).ToString())) : "",
        answer => Lines((answer.Joins ?? []).Select(Parts)));

    // SymPy gives a primitive group the one part of all points as its only minimal system; here it has none.
    [SymPyFact]
    public void Minimal_block_systems_agree() => Compare(
        group => group.IsTransitive ? Lines(group.MinimalBlockSystems(0).Select(system => system.ToString()).Order(StringComparer.Ordinal)) : "",
        answer => Lines((answer.MinimalSystems ?? []).Where(labels => labels.Distinct().Count() > 1).Select(Parts).Order(StringComparer.Ordinal)));

    private static void Compare(Func<PermutationGroup, string> ours, Func<SymPyAnswer, string> theirs)
    {
        Assert.Equal(Count, _answers.Value.Length);
        List<string> disagreements =
        [
            .. from pair in ReferenceGroups.All.Zip(_answers.Value)
               let our = ours(pair.First.Group)
               let their = theirs(pair.Second)
               where our != their
               select $"{pair.First.Kind}, degree {pair.First.Group.Degree}, generators {string.Join("; ", pair.First.Group.Generators)}: {our} here, {their} from SymPy",
        ];
        Assert.True(disagreements.Count == 0, Lines(disagreements));
    }

    private static SymPyAnswer[] AskSymPy()
    {
        var groups = ReferenceGroups.All.Select(pair => new { pair.Group.Degree, Generators = pair.Group.Generators.Select(generator => Enumerable.Range(0, pair.Group.Degree).Select(point => generator[point])) });
        var input = JsonSerializer.Serialize(groups, JsonSerializerOptions.Web);
        return JsonSerializer.Deserialize<SymPyAnswer[]>(SymPy.Run(Repository.PathOf("tests/Fusecraft.Core.Tests/Reference/groups.py"), input), JsonSerializerOptions.Web)!;
    }

    private static string Lines(IEnumerable<string> texts) => string.Join('\n', texts);

    private static string Text(IEnumerable<IEnumerable<int>> orbits) => string.Join(' ', orbits.Select(orbit => "{" + string.Join(' ', orbit.Select(point => point + 1)) + "}"));

    // The labels of the points as parts, written as BlockSystem writes them.
    private static string Parts(int[] labels) => Text(Enumerable.Range(0, labels.Length).GroupBy(point => labels[point]));
}
