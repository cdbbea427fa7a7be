using Fusecraft.Core.Tests.Mechanisms.Files;
using Fusecraft.Mechanisms;

namespace Fusecraft.Core.Tests.Mechanisms;

public class MechanismBuilderTests
{
    [Fact]
    public void A_fused_cube_is_the_same_in_code_and_in_a_file() => AssertWrites(
        GoodMechanismFiles.WeirGate,
        MechanismBuilder.Cube("Weir gate", 3)
            .About("free text")
            .Use("U", "R", "F2")
            .Block("UFR", "UF")
            .Block("DL", "DLB", "LB"));

    [Fact]
    public void A_custom_mechanism_is_the_same_in_code_and_in_a_file() => AssertWrites(
        GoodMechanismFiles.LockBasin,
        MechanismBuilder.Custom("Lock basin", 6)
            .Turn("A", "(1 2 3)", turn => turn.Needs("gap@1"))
            .Turn("B", "(3 4)(5 6)", turn => turn.Carries("2").BarredBy("pin@6").OneWay())
            .Turn("C", "(2 5)", turn => turn.AnyOf(first => first.Needs("gap@2"), second => second.BarredBy("pin@1")).Back(back => back.Needs("gap@5")))
            .Block("1", "2")
            .Mark("gap", "1")
            .Mark("pin", "4", "5"));

    [Fact]
    public void Every_member_of_a_custom_mechanism_can_be_built() => AssertWrites(
        GoodMechanismFiles.FerryLandings,
        MechanismBuilder.Custom("Ferry landings – Fähre", "N1", "N2", "N3", "S1", "S2", "S3", "S:4", "pier_5", "6.6", "7,7")
            .Schema("mechanism-1.schema.json")
            .About("Two landings \"North\" and \"South\";\nthe ferry is a mark.")
            .Piece("N1", "N2")
            .Piece("S1", "S2")
            .Turn("north", "(N1 S1)(N2 S2)", turn => turn.Carries("pier_5").WrittenAs("go", "come"))
            .Turn("2nd", "(N3 S3)", turn => turn
                .Needs("ferry@N3")
                .BarredBy("ferry@S3")
                .AnyOf(a => a.Needs("ferry@N3"), b => b.AnyOf(c => c.BarredBy("ferry@6.6"), d => d.Needs("ferry@7,7", "ferry@S:4")))
                .Back(_ => { })
                .WrittenAs("N", "N'"))
            .Turn("drop", "(6.6 7,7)", turn => turn.OneWay())
            .Block("N1", "N3")
            .Block("S:4", "pier_5", "6.6")
            .Mark("ferry", "N3")
            .Goal(Goal.MarksAt("ferry@S3"))
            .Colours(ColourScheme.Alike(["N1", "N2", "N3"], ["S1", "S2"])));

    [Fact]
    public void Boards_are_the_same_in_code_and_in_a_file()
    {
        AssertWrites(
            """
            {
              "format": "fusecraft/mechanism/1",
              "name": "Tiles",
              "family": { "kind": "board", "columns": 4, "rows": 3, "gaps": ["1", "12"] },
              "goal": { "marks": ["gap@1", "gap@2"] }
            }

            """,
            MechanismBuilder.Board("Tiles", 4, 3, "1", "12").Goal(Goal.MarksAt("gap@1", "gap@2")));
        AssertWrites(
            """
            {
              "format": "fusecraft/mechanism/1",
              "name": "Sidings",
              "family": {
                "kind": "graph-board",
                "vertices": ["hub", "west", "east"],
                "edges": [["hub", "west"], ["hub", "east"]],
                "gaps": ["hub"]
              },
              "goal": "shape"
            }

            """,
            MechanismBuilder.GraphBoard("Sidings", ["hub", "west", "east"], [("hub", "west"), ("hub", "east")], "hub").Goal(Goal.Shape));
    }

    [Fact]
    public void Building_reports_all_mistakes_at_once()
    {
        var builder = MechanismBuilder.Custom("Wrong", 3).Turn("A", "(1 4)").Block("2");

        var exception = Assert.Throws<MechanismFormatException>(builder.Build);

        Assert.Equal(["$.turns.A.moves", "$.blocks[0]"], exception.Problems.Select(problem => problem.Path));
        Assert.All(exception.Problems, problem => Assert.Equal((null, null), (problem.Line, problem.Column)));
    }

    [Fact]
    public void What_was_built_does_not_change_with_the_builder()
    {
        var builder = MechanismBuilder.Cube("Cube", 3).Block("UF", "UFR");
        var before = builder.ToDefinition();

        builder.Block("DL", "DLB").Use("U");

        Assert.Single(before.Blocks);
        Assert.Empty(before.Use);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(65_537)]
    public void A_count_of_sites_out_of_range_is_refused(int siteCount) =>
        Assert.Throws<ArgumentOutOfRangeException>(nameof(siteCount), () => MechanismBuilder.Custom("Wrong", siteCount));

    private static void AssertWrites(string json, MechanismBuilder builder)
    {
        Assert.Equal(json, MechanismFile.Write(builder.Build()));
        Assert.Equal(json, MechanismFile.Write(MechanismFile.Parse(json)));
    }
}
