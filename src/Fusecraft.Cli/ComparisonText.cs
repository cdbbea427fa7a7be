using System.Globalization;
using System.Numerics;
using Fusecraft.Groupoids;
using Spectre.Console;

namespace Fusecraft.Cli;

/// <summary>A comparison to be read: the verdict, then the figures side by side, those that differ marked.</summary>
internal static class ComparisonText
{
    public static void Write(Terminal terminal, MechanismComparison comparison)
    {
        var output = terminal.Out;
        output.WriteLine(comparison.Verdict switch
        {
            ComparisonVerdict.SamePuzzle => "The same puzzle.",
            ComparisonVerdict.SameShapeGraph => "Not the same puzzle, but the same shape graph.",
            ComparisonVerdict.Different => "Not the same puzzle.",
            _ => "Not settled.",
        });
        output.WriteLine(comparison.Reason);
        output.WriteLine($"Vertex groups: {Answer(comparison.VertexGroups.AreAlike)}; {comparison.VertexGroups.Reason}.");
        output.WriteLine();
        var table = new Table().Border(TableBorder.None);
        table.AddColumn(new TableColumn("").PadRight(2));
        table.AddColumn(new TableColumn(new Text(comparison.First.Name)).RightAligned().PadRight(2));
        table.AddColumn(new TableColumn(new Text(comparison.Second.Name)).RightAligned().PadRight(2));
        table.AddColumn(new TableColumn("").PadRight(0));
        foreach (var figure in comparison.Figures)
        {
            table.AddRow(new Text(figure.Name), new Text(Readable(figure.First)), new Text(Readable(figure.Second)), new Text(figure.Differs ? "differs" : ""));
        }

        PlainTable.Write(terminal, table);
    }

    private static string Answer(bool? areAlike) => areAlike switch
    {
        true => "alike up to relabelling",
        false => "not alike",
        null => "not decided",
    };

    private static string Readable(string? figure) => figure is null ? "?"
        : BigInteger.TryParse(figure, NumberStyles.None, CultureInfo.InvariantCulture, out var number) ? Wording.Number(number) : figure;
}
