namespace Fusecraft.Core.Tests.Mechanisms.Files;

/// <summary>Mechanism files of every form, as the writer lays them out.</summary>
public static class GoodMechanismFiles
{
    /// <summary>The fused cube of the format's reference page.</summary>
    public const string WeirGate = """
        {
          "format": "fusecraft/mechanism/1",
          "name": "Weir gate",
          "about": "free text",
          "family": { "kind": "cube", "size": 3 },
          "use": ["U", "R", "F2"],
          "blocks": [["UFR", "UF"], ["DL", "DLB", "LB"]]
        }

        """;

    /// <summary>The custom mechanism of the format's reference page.</summary>
    public const string LockBasin = """
        {
          "format": "fusecraft/mechanism/1",
          "name": "Lock basin",
          "sites": 6,
          "turns": {
            "A": { "moves": "(1 2 3)", "needs": ["gap@1"] },
            "B": { "moves": "(3 4)(5 6)", "carries": ["2"], "barredBy": ["pin@6"], "oneWay": true },
            "C": {
              "moves": "(2 5)",
              "anyOf": [{ "needs": ["gap@2"] }, { "barredBy": ["pin@1"] }],
              "back": { "needs": ["gap@5"] }
            }
          },
          "blocks": [["1", "2"]],
          "marks": { "gap": ["1"], "pin": ["4", "5"] }
        }

        """;

    /// <summary>Every member that a custom mechanism can have.</summary>
    public const string FerryLandings = """
        {
          "$schema": "mechanism-1.schema.json",
          "format": "fusecraft/mechanism/1",
          "name": "Ferry landings – Fähre",
          "about": "Two landings \"North\" and \"South\";\nthe ferry is a mark.",
          "sites": ["N1", "N2", "N3", "S1", "S2", "S3", "S:4", "pier_5", "6.6", "7,7"],
          "pieces": [["N1", "N2"], ["S1", "S2"]],
          "turns": {
            "north": { "moves": "(N1 S1)(N2 S2)", "carries": ["pier_5"], "as": "go", "backAs": "come" },
            "2nd": {
              "moves": "(N3 S3)",
              "needs": ["ferry@N3"],
              "barredBy": ["ferry@S3"],
              "anyOf": [
                { "needs": ["ferry@N3"] },
                { "anyOf": [{ "barredBy": ["ferry@6.6"] }, { "needs": ["ferry@7,7", "ferry@S:4"] }] }
              ],
              "back": {},
              "as": "N",
              "backAs": "N'"
            },
            "drop": { "moves": "(6.6 7,7)", "oneWay": true }
          },
          "blocks": [["N1", "N3"], ["S:4", "pier_5", "6.6"]],
          "marks": { "ferry": ["N3"] },
          "goal": { "marks": ["ferry@S3"] },
          "colours": [["N1", "N2", "N3"], ["S1", "S2"]]
        }

        """;

    public static TheoryData<string, string> Cases { get; } = new()
    {
        { "a fused cube", WeirGate },
        { "a custom mechanism", LockBasin },
        { "all members of a custom mechanism", FerryLandings },
        { "a cube with twisting centres", Members("""{ "family": { "kind": "cube", "size": 3, "centreTwist": true } }""") },
        { "a large cube by coordinates", Members("""{ "family": { "kind": "cube", "size": 5 }, "blocks": [["1,1,1", "1,1,2", "1,2,1"]] }""") },
        { "a cube fused to its core", Members("""{ "family": { "kind": "cube", "size": 3 }, "blocks": [["core", "D"]] }""") },
        { "a board", Members("""{ "family": { "kind": "board", "columns": 4, "rows": 3 } }""") },
        { "a board with two gaps", Members("""{ "family": { "kind": "board", "columns": 4, "rows": 3, "gaps": ["1", "12"] } }""") },
        { "a board with a mark of its own", Members("""{ "family": { "kind": "board", "columns": 2, "rows": 2 }, "marks": { "pin": ["1"] }, "goal": { "marks": ["gap@1", "pin@4"] } }""") },
        { "a graph board", Members("""{ "family": { "kind": "graph-board", "vertices": 4, "edges": [["1", "2"], ["2", "3"], ["3", "4"]] } }""") },
        { "a graph board with names", Members("""{ "family": { "kind": "graph-board", "vertices": ["hub", "a", "b"], "edges": [["hub", "a"], ["hub", "b"]], "gaps": ["hub"] } }""") },
        { "the goal home, written out", Members("""{ "family": { "kind": "cube", "size": 2 }, "goal": "home", "colours": "distinct" }""") },
        { "the goal shape", Members("""{ "family": { "kind": "cube", "size": 2 }, "goal": "shape" }""") },
        { "the goal colours by faces", Members("""{ "family": { "kind": "cube", "size": 2 }, "goal": "colours", "colours": "faces" }""") },
        { "the goal of some sites", Members("""{ "family": { "kind": "cube", "size": 2 }, "goal": { "sites": ["UFR:U", "UFR:F"] } }""") },
        { "whole numbers for names", Members("""{ "sites": 6, "pieces": [[1, 2], [3, 4]], "turns": { "A": { "moves": "(1,3)(2,4)", "carries": [5] } }, "blocks": [[1, 5]], "marks": { "gap": [6] }, "goal": { "sites": [1] }, "colours": [[1, 3]] }""") },
        { "whole numbers for vertices", Members("""{ "family": { "kind": "graph-board", "vertices": [3, 1, 2], "edges": [[1, 2], [2, 3]], "gaps": [2] } }""") },
        { "members in another order", """{ "turns": { "A": { "barredBy": [], "moves": "(1 2)" } }, "name": "Test", "blocks": [], "marks": {}, "sites": 2, "format": "fusecraft/mechanism/1" }""" },
        { "no turns", Members("""{ "sites": ["only"], "turns": {} }""") },
    };

    private static string Members(string json) => """{ "format": "fusecraft/mechanism/1", "name": "Test", """ + json[1..];
}
