using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Support;

/// <summary>The game on the projective plane of order 3: points 0 … 12, lines {i, i+1, i+3, i+9} mod 13. With the gap at p, the counter of q goes to p and the counters on the other two points of the line pq change places.</summary>
internal static class ThirteenPointGame
{
    // The mechanism file of the game, its 78 turns written by the rule.
    public static Mechanism Create()
    {
        var turns = new List<string>();
        for (var i = 0; i < 13; i++)
        {
            int[] line = [i, (i + 1) % 13, (i + 3) % 13, (i + 9) % 13];
            for (var a = 0; a < 4; a++)
            {
                for (var b = a + 1; b < 4; b++)
                {
                    int[] others = [.. line.Where((_, k) => k != a && k != b)];
                    turns.Add($$"""    "{{line[a]}}:{{line[b]}}": { "moves": "({{line[a]}} {{line[b]}})({{others[0]}} {{others[1]}})", "needs": ["gap@{{line[a]}}"] }""");
                }
            }
        }

        Assert.Equal(78, turns.Count);
        return MechanismFile.Parse($$"""
            { "format": "fusecraft/mechanism/1", "name": "Thirteen points",
              "sites": [0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 12],
              "turns": {
            {{string.Join(",\n", turns)}} },
              "marks": { "gap": [0] } }
            """);
    }
}
