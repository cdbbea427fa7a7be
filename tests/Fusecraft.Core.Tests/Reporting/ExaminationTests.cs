using System.Globalization;
using System.Numerics;
using System.Text.Json;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Reporting;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Reporting;

public class ExaminationTests
{
    // A boat leaves 1, may go to and fro between 2 and 3, and is lost once it has gone to 4.
    private static readonly Mechanism OneWayCanal = MechanismBuilder.Custom("One-way canal", 4)
        .Turn("A", "(1 2)", turn => turn.Needs("boat@1").OneWay())
        .Turn("B", "(2 3)", turn => turn.Needs("boat@2"))
        .Turn("C", "(3 4)", turn => turn.Needs("boat@3").OneWay())
        .Mark("boat", "1")
        .Build();

    // R. M. Wilson, Graph puzzles, homotopy, and the alternating group, J. Combin. Theory B 16 (1974) 86-96 (as quoted by later authors): the vertex group of the 2x3 board is A5,
    // so there are 6 · 60 = 360 positions.
    [Fact]
    public void A_board_is_examined_to_the_letter() => Assert.Equal(
        """
        {"format":"fusecraft/examination/1","mechanism":{"name":"board","sites":6,"pieces":6,"turns":7,"blocks":0},"isComplete":true,"shapes":6,"freeTurns":7,"deadEnds":0,"stuckShapes":0,"regions":1,"passages":0,"traps":0,"homeRegion":{"shapes":6,"eccentricity":3,"states":"360","vertexGroup":{"order":"60","factors":"2^2·3·5","proof":"proven","degree":5,"orbits":[["1","2","3","4","5"]]}},"reachableStates":"360"}
        """,
        Examination.Of(Make.Board(3, 2)).ToJson());

    // Counted by hand.
    [Fact]
    public void Regions_passages_traps_dead_ends_and_stuck_shapes_are_told_apart() => Assert.Equal(
        """
        {"format":"fusecraft/examination/1","mechanism":{"name":"One-way canal","sites":4,"pieces":4,"turns":3,"blocks":0},"isComplete":true,"shapes":4,"freeTurns":3,"deadEnds":2,"stuckShapes":1,"regions":3,"passages":2,"traps":1,"homeRegion":{"shapes":1,"eccentricity":0,"states":"1","vertexGroup":{"order":"1","factors":"1","proof":"proven","degree":0,"orbits":[]}},"reachableStates":"4"}
        """,
        Examination.Of(OneWayCanal).ToJson());

    [Fact]
    public void An_ended_budget_leaves_unknown_what_rests_on_all_shapes()
    {
        var examination = Examination.Of(OneWayCanal, new ExplorationOptions { MaxShapes = 1 });

        Assert.False(examination.IsComplete);
        Assert.Null(examination.HomeRegion);
        Assert.Null(examination.ReachableStateCount);
        Assert.Equal(
            """
            {"format":"fusecraft/examination/1","mechanism":{"name":"One-way canal","sites":4,"pieces":4,"turns":3,"blocks":0},"isComplete":false,"shapes":1,"freeTurns":0,"deadEnds":null,"stuckShapes":null,"regions":null,"passages":null,"traps":null,"homeRegion":null,"reachableStates":null}
            """,
            examination.ToJson());
    }

    [Fact]
    public void A_budget_that_just_suffices_is_not_ended() =>
        Assert.Equal(Examination.Of(OneWayCanal).ToJson(), Examination.Of(OneWayCanal, new ExplorationOptions { MaxShapes = 4 }).ToJson());

    // OEIS A075152 and A080602: the order of the 3x3x3 group on its 48 moving facelets.
    [Fact]
    public void Orders_of_any_size_are_given_exactly()
    {
        var examination = Examination.Of(Make.Cube(3));

        var group = examination.HomeRegion!.VertexGroup;
        Assert.Equal(BigInteger.Parse("43252003274489856000", CultureInfo.InvariantCulture), group.Order);
        Assert.Equal("2^27·3^14·5^3·7^2·11", group.FactoredOrder.ToString());
        Assert.Equal(48, group.MovedSiteCount);
        Assert.Equal([24, 24], group.Orbits.Select(orbit => orbit.Length));
        using var json = JsonDocument.Parse(examination.ToJson());
        Assert.Equal("43252003274489856000", json.RootElement.GetProperty("reachableStates").GetString());
    }

    [Fact]
    public void Orbits_name_only_moved_sites_in_site_order()
    {
        var mechanism = MechanismBuilder.Custom("order", "weir", "mill", "still", "dock", "quay").Turn("a", "(quay mill)").Turn("b", "(dock weir)").Build();

        Assert.Equal([["weir", "dock"], ["mill", "quay"]], Examination.Of(mechanism).HomeRegion!.VertexGroup.Orbits.Select(orbit => orbit.ToArray()));
    }

    [Fact]
    public void States_of_one_region_number_its_shapes_times_the_order_of_the_vertex_group()
    {
        var examination = Examination.Of(Make.Cube(2, "", "UFR UFL"));

        var home = examination.HomeRegion!;
        Assert.True(home.ShapeCount > 1);
        Assert.Equal(home.ShapeCount * home.VertexGroup.Order, home.StateCount);
        Assert.Equal(home.StateCount, examination.ReachableStateCount);
    }

    [Fact]
    public void Names_keep_all_their_characters_on_one_line()
    {
        const string name = "Fähre \"Nord\" <1>\n2";

        var json = Examination.Of(MechanismBuilder.Custom(name, 2).Turn("a", "(1 2)").Build()).ToJson();

        Assert.DoesNotContain('\n', json);
        using var parsed = JsonDocument.Parse(json);
        Assert.Equal(name, parsed.RootElement.GetProperty("mechanism").GetProperty("name").GetString());
    }

    [Fact]
    public void An_examination_can_be_interrupted() =>
        Assert.ThrowsAny<OperationCanceledException>(() => Examination.Of(Make.Board(4, 4), cancellationToken: new CancellationToken(canceled: true)));

    [Fact]
    public void Without_a_mechanism_there_is_nothing_to_examine() => Assert.Throws<ArgumentNullException>(() => Examination.Of(null!));
}
