namespace Fusecraft.Cli.Tests;

/// <summary>Small mechanism files.</summary>
internal static class Files
{
    /// <summary>The 2x3 board. Its vertex group is A5, so it has 6 · 60 = 360 states: R. M. Wilson, J. Combin. Theory B 16 (1974) 86-96 (as quoted by later authors).</summary>
    public const string Board = """{ "format": "fusecraft/mechanism/1", "name": "Two by three", "family": { "kind": "board", "columns": 3, "rows": 2 } }""";

    /// <summary>A boat leaves 1, may go to and fro between 2 and 3, and is lost once it has gone to 4.</summary>
    public const string Canal = """
        { "format": "fusecraft/mechanism/1", "name": "One-way canal", "sites": 4,
          "turns": {
            "A": { "moves": "(1 2)", "needs": ["boat@1"], "oneWay": true },
            "B": { "moves": "(2 3)", "needs": ["boat@2"] },
            "C": { "moves": "(3 4)", "needs": ["boat@3"], "oneWay": true } },
          "marks": { "boat": ["1"] } }
        """;

    public const string FusedCube = """{ "format": "fusecraft/mechanism/1", "name": "Cornerstone", "family": { "kind": "cube", "size": 3 }, "blocks": [["UFR", "UF"]] }""";

    /// <summary>All six turns free: 43252003274489856000 = 2^27·3^14·5^3·7^2·11 states (OEIS A075152).</summary>
    public const string PlainCube = """{ "format": "fusecraft/mechanism/1", "name": "Plain", "family": { "kind": "cube", "size": 3 } }""";

    /// <summary>Steps A and B are written alike and both free at home, which only exploring can find out.</summary>
    public const string WrittenAlike = """
        { "format": "fusecraft/mechanism/1", "name": "Alike", "sites": 4,
          "turns": { "A": { "moves": "(1 2)", "as": "X" }, "B": { "moves": "(3 4)", "as": "X" } } }
        """;

    /// <summary>Two mistakes: an unknown site, and a block of one piece.</summary>
    public const string Bad = """
        { "format": "fusecraft/mechanism/1", "name": "Bad", "sites": 3,
          "turns": { "A": { "moves": "(1 9)" } },
          "blocks": [["1"]] }
        """;
}
