using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Cli;

/// <summary>The mechanisms that <c>fusecraft new</c> writes: small, right, and with an <c>about</c> that says what to change.</summary>
internal static class StarterMechanisms
{
    public static ImmutableArray<string> Kinds { get; } = ["cube", "board", "graph", "custom"];

    public static Mechanism Of(string kind) => Mechanism.Create(kind switch
    {
        "cube" => Cube(),
        "board" => Board(),
        "graph" => Graph(),
        "custom" => Custom(),
        _ => throw new ArgumentException($"There is no kind \"{kind}\"; there are {string.Join(", ", Kinds)}.", nameof(kind)),
    });

    private static MechanismDefinition Cube() => new()
    {
        Name = "My fused cube",
        About = "A cube with two blocks. Change \"size\" (2 to 100) in \"family\". Each list in \"blocks\" fuses pieces, named by the faces they touch: UFR is a corner, UF an edge, "
            + "U a face centre, core the hidden middle of an odd cube. A turn that would take only a part of a block along is barred. Add \"use\": [\"U\", \"R\", \"F2\"] to keep only these turns.",
        Family = new CubeFamily(3),
        Blocks = [["UFR", "UF"], ["DLB", "DL", "LB"]],
    };

    private static MechanismDefinition Board() => new()
    {
        Name = "My sliding board",
        About = "Tiles on a board slide into the gap. Change \"columns\" and \"rows\"; cells are numbered row by row from the top left. \"gaps\" lists the empty cells; without it the last cell is empty. "
            + "Add \"blocks\": [[\"1\", \"2\"]] to fuse tiles: a slide carries one tile, so a block is an island that never moves.",
        Family = new BoardFamily(3, 2, "6"),
    };

    private static MechanismDefinition Graph() => new()
    {
        Name = "My graph board",
        About = "Tiles on the points of a graph slide along its lines into the gap. List the points in \"vertices\" and the lines in \"edges\", each as two points; the turns are called e1, e2, … "
            + "in that order. \"gaps\" lists the empty points.",
        Family = new GraphBoardFamily(
            ["quay", "lock", "basin", "weir", "mill"],
            [("quay", "lock"), ("lock", "basin"), ("basin", "weir"), ("weir", "mill"), ("mill", "quay"), ("lock", "weir")],
            "mill"),
    };

    private static MechanismDefinition Custom() => new()
    {
        Name = "My mechanism",
        About = "Six places and three turns. \"sites\" are the places, a number or a list of names. Each turn's \"moves\" says in cycles where it takes what lies there: (1 2 3) takes 1 to 2, 2 to 3, 3 to 1. "
            + "Marks ride along with the turns, and guards read them: \"needs\": [\"gap@1\"] lets a turn be made only while a gap is at 1, \"barredBy\": [\"pin@6\"] only while no pin is at 6. "
            + "\"oneWay\": true takes away a turn's way back. \"blocks\" fuse places: a turn takes all of a block or none of it.",
        Sites = ["1", "2", "3", "4", "5", "6"],
        Turns =
        [
            new TurnDefinition { Name = "A", Moves = "(1 2 3)" },
            new TurnDefinition { Name = "B", Moves = "(3 4)(5 6)", Guard = new GuardDefinition { BarredBy = ["pin@1"] } },
            new TurnDefinition { Name = "C", Moves = "(2 5)", Guard = new GuardDefinition { Needs = ["pin@3"] } },
        ],
        Marks = [new MarkDefinition("pin", ["1"])],
    };
}
