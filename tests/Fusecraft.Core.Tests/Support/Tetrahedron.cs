using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Support;

/// <summary>The tetrahedral puzzle with four turning corners, from geometry alone: vertices and faces 0 … 3, face f opposite vertex f. An edge has a facelet on each of the two faces that it borders, a corner one on each of its three.</summary>
internal static class Tetrahedron
{
    // A third-turn at each vertex, as the cycle of the other three.
    private static readonly ImmutableArray<int[]> Cycles = [[1, 2, 3], [0, 3, 2], [0, 1, 3], [0, 2, 1]];

    /// <summary>A custom mechanism with four turns.</summary>
    public static Mechanism Create()
    {
        var pieces = new List<(int[] Vertices, int[] Faces)>();
        for (var v = 0; v < 4; v++)
        {
            pieces.Add(([v], [.. Others(v)]));
            pieces.AddRange(Enumerable.Range(v + 1, 3 - v).Select(w => ((int[])[v, w], (int[])[.. Others(v, w)])));
        }

        var turns = Enumerable.Range(0, 4).Select(v => $$"""
              "V{{v}}": { "moves": "{{string.Concat(pieces.Where(piece => piece.Vertices.Contains(v)).SelectMany(piece => Moves(piece, v)).Distinct())}}" }
            """);
        return MechanismFile.Parse($$"""
            { "format": "fusecraft/mechanism/1", "name": "tetrahedron",
              "sites": [{{string.Join(", ", pieces.SelectMany(piece => piece.Faces.Select(face => $"\"{Site(piece.Vertices, face)}\"")))}}],
              "pieces": [{{string.Join(", ", pieces.Select(piece => $"[{string.Join(", ", piece.Faces.Select(face => $"\"{Site(piece.Vertices, face)}\""))}]"))}}],
              "turns": {
            {{string.Join(",\n", turns)}} } }
            """);
    }

    private static IEnumerable<int> Others(params int[] vertices) => Enumerable.Range(0, 4).Except(vertices);

    private static string Site(IEnumerable<int> vertices, int face) => $"{string.Concat(vertices.Order())}:{face}";

    // The three-cycles that start at the facelets of a piece, each written from its least facelet.
    private static IEnumerable<string> Moves((int[] Vertices, int[] Faces) piece, int v)
    {
        int Turn(int x) => x == v ? v : Cycles[v][(Array.IndexOf(Cycles[v], x) + 1) % 3];
        foreach (var face in piece.Faces)
        {
            var one = Site(piece.Vertices, face);
            var two = Site(piece.Vertices.Select(Turn), Turn(face));
            var three = Site(piece.Vertices.Select(x => Turn(Turn(x))), Turn(Turn(face)));
            yield return string.CompareOrdinal(one, two) < 0 && string.CompareOrdinal(one, three) < 0 ? $"({one} {two} {three})"
                : string.CompareOrdinal(two, three) < 0 ? $"({two} {three} {one})" : $"({three} {one} {two})";
        }
    }
}
