using System.Collections.Immutable;

namespace Fusecraft.Tests.Support;

/// <summary>
/// The 2x2x2 with all six layers turning, made from geometry alone: cells (±1, ±1, ±1), x to the right, y up, z to the viewer; 24 facelets, each a cell with an outward direction.
/// </summary>
internal static class SixLayerCube
{
    private static readonly (string Name, int Axis, int Side)[] Layers = [("U", 1, 1), ("D", 1, -1), ("R", 0, 1), ("L", 0, -1), ("F", 2, 1), ("B", 2, -1)];

    /// <summary>The facelets: the cell's coordinates and the axis of the direction.</summary>
    public static ImmutableArray<(int X, int Y, int Z, int Axis)> Facelets { get; } =
        [.. from x in (int[])[-1, 1] from y in (int[])[-1, 1] from z in (int[])[-1, 1] from axis in (int[])[0, 1, 2] select (x, y, z, axis)];

    public static string CellName(int x, int y, int z) => $"{(y > 0 ? 'U' : 'D')}{(z > 0 ? 'F' : 'B')}{(x > 0 ? 'R' : 'L')}";

    /// <summary>Where each facelet goes in a clockwise quarter turn of each of the six layers.</summary>
    public static ImmutableArray<(string Name, ImmutableArray<int> Images)> Turns { get; } = [.. Layers.Select(layer => (layer.Name, Images(layer.Axis, layer.Side)))];

    /// <summary>The mechanism file, with blocks given as cells separated by spaces.</summary>
    public static string File(params IEnumerable<string> blocks) => $$"""
        { "format": "fusecraft/mechanism/1", "name": "2x2x2 with six layers",
          "sites": {{List(Facelets.Select(SiteName))}},
          "pieces": [{{string.Join(", ", Facelets.Select(SiteName).Chunk(3).Select(List))}}],
          "turns": {
            {{string.Join(",\n    ", Turns.Select(turn => $$"""
            "{{turn.Name}}": { "moves": "{{Cycles(turn.Images)}}" }
            """))}} },
          "blocks": [{{string.Join(", ", blocks.Select(block => List(Make.Split(block).Select(cell => cell + ".0"))))}}] }
        """;

    /// <summary>Disjoint cycles of site names.</summary>
    private static string Cycles(ImmutableArray<int> images)
    {
        var text = "";
        var seen = new HashSet<int>();
        for (var start = 0; start < images.Length; start++)
        {
            if (images[start] == start || !seen.Add(start))
            {
                continue;
            }

            text += $"({SiteName(Facelets[start])}";
            for (var at = images[start]; at != start; at = images[at])
            {
                seen.Add(at);
                text += $" {SiteName(Facelets[at])}";
            }

            text += ")";
        }

        return text;
    }

    private static string List(IEnumerable<string> names) => $"[\"{string.Join("\", \"", names)}\"]";

    private static string SiteName((int X, int Y, int Z, int Axis) facelet) => $"{CellName(facelet.X, facelet.Y, facelet.Z)}.{facelet.Axis}";

    private static ImmutableArray<int> Images(int axis, int side) => [.. Facelets.Select((facelet, i) =>
    {
        int[] cell = [facelet.X, facelet.Y, facelet.Z];
        if (cell[axis] != side)
        {
            return i;
        }

        // Seen from the positive end of an axis a clockwise quarter turn takes the axis after next to the next one, and the next to the negative of the axis after next.
        var (next, afterNext) = ((axis + 1) % 3, (axis + 2) % 3);
        var turned = (int[])cell.Clone();
        turned[next] = side * cell[afterNext];
        turned[afterNext] = -side * cell[next];
        var direction = facelet.Axis == axis ? axis : facelet.Axis == next ? afterNext : next;
        return Facelets.IndexOf((turned[0], turned[1], turned[2], direction));
    })];
}
