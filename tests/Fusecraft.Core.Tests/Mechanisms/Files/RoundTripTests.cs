using System.Text.Json;
using FsCheck.Xunit;
using Fusecraft.Mechanisms;

namespace Fusecraft.Core.Tests.Mechanisms.Files;

[Properties(Arbitrary = [typeof(MechanismDefinitions)])]
public class RoundTripTests
{
    [Property]
    public void A_definition_that_was_written_is_read_back_the_same(MechanismDefinition definition)
    {
        var written = MechanismFile.Write(Mechanism.Create(definition));
        var read = MechanismFile.Parse(written);

        Assert.Equal(written, MechanismFile.Write(read));
        AssertSame(definition, read.Definition);
    }

    [Property]
    public void A_written_definition_passes_the_schema(MechanismDefinition definition) =>
        Assert.True(SchemaCheck.Passes(MechanismFile.Write(definition)), MechanismFile.Write(definition));

    [Property]
    public void Written_text_does_not_depend_on_how_the_file_was_laid_out(MechanismDefinition definition)
    {
        var written = MechanismFile.Write(definition);
        var squeezed = JsonSerializer.Serialize(JsonDocument.Parse(written).RootElement);

        Assert.Equal(written, MechanismFile.Write(MechanismFile.Parse(squeezed)));
    }

    [Property]
    public void Lines_stay_short_where_they_can(MechanismDefinition definition)
    {
        // Only texts, which are never broken, reach beyond; those of these definitions are short.
        Assert.All(MechanismFile.Write(definition).Split('\n'), line => Assert.InRange(line.Length, 0, 100));
    }

    private static void AssertSame(MechanismDefinition expected, MechanismDefinition actual)
    {
        // Compared member by member, so that something the writer forgets does not go unseen.
        Assert.Equal((expected.Schema, expected.Name, expected.About), (actual.Schema, actual.Name, actual.About));
        Assert.Equal(expected.Use.AsEnumerable(), actual.Use);
        Assert.Equal(expected.Sites.AsEnumerable(), actual.Sites);
        Assert.Equal(expected.Pieces.Select(piece => piece.ToArray()), actual.Pieces.Select(piece => piece.ToArray()));
        Assert.Equal(expected.Blocks.Select(block => block.ToArray()), actual.Blocks.Select(block => block.ToArray()));
        Assert.Equal(expected.Marks.Select(mark => (mark.Name, string.Join(' ', mark.Sites))), actual.Marks.Select(mark => (mark.Name, string.Join(' ', mark.Sites))));
        Assert.Equal((expected.Goal.Kind, expected.Colours.Kind), (actual.Goal.Kind, actual.Colours.Kind));
        Assert.Equal(expected.Goal.Names.AsEnumerable(), actual.Goal.Names);
        Assert.Equal(expected.Colours.AlikeSites.Select(list => list.ToArray()), actual.Colours.AlikeSites.Select(list => list.ToArray()));
        Assert.Equal(Describe(expected.Family), Describe(actual.Family));
        Assert.Equal(expected.Turns.Select(Describe), actual.Turns.Select(Describe));
    }

    private static string Describe(MechanismFamily? family) => family switch
    {
        null => "none",
        CubeFamily cube => $"cube {cube.Size} {cube.CentreTwist}",
        BoardFamily board => $"board {board.Columns} {board.Rows} {string.Join(' ', board.Gaps)}",
        GraphBoardFamily graph => $"graph {string.Join(' ', graph.Vertices)} | {string.Join(' ', graph.Edges)} | {string.Join(' ', graph.Gaps)}",
        _ => throw new InvalidOperationException(),
    };

    private static string Describe(TurnDefinition turn) =>
        $"{turn.Name} {turn.Moves} [{string.Join(' ', turn.Carries)}] {Describe(turn.Guard)} {turn.IsOneWay} {(turn.Back is null ? "derived" : Describe(turn.Back))} {turn.As} {turn.BackAs}";

    private static string Describe(GuardDefinition guard) =>
        $"({string.Join(' ', guard.Needs)} | {string.Join(' ', guard.BarredBy)} | {string.Join(' ', guard.AnyOf.Select(Describe))})";
}
