using Fusecraft.Reporting;
using Spectre.Console;

namespace Fusecraft.Cli;

/// <summary>Several examinations, one a row.</summary>
internal sealed class ExaminationTable
{
    private static readonly string[] Figures = ["shapes", "dead ends", "stuck", "regions", "farthest", "vertex group", "states"];
    private readonly List<string[]> _rows = [];
    private bool _someUnknown;

    public void Add(string file, Examination examination)
    {
        var home = examination.HomeRegion;
        _someUnknown |= home is null || examination.ReachableStateCount is null;
        _rows.Add(
        [
            file,
            (examination.IsComplete ? "" : "> ") + Wording.Number(examination.ShapeCount),
            Known(examination.DeadEndCount),
            Known(examination.StuckShapeCount),
            Known(examination.RegionCount),
            Known(home?.Eccentricity),
            home?.VertexGroup.FactoredOrder.ToString() ?? "?",
            examination.ReachableStateCount is { } states ? Wording.Number(states) : "?",
        ]);
    }

    public void Write(Terminal terminal)
    {
        if (_rows.Count == 0)
        {
            return;
        }

        var table = new Table().Border(TableBorder.None);
        table.AddColumn(new TableColumn("file").PadRight(2));
        foreach (var figure in Figures)
        {
            table.AddColumn(new TableColumn(figure).RightAligned().PadRight(figure == Figures[^1] ? 0 : 2));
        }

        foreach (var row in _rows)
        {
            table.AddRow([.. row.Select(cell => new Text(cell))]);
        }

        PlainTable.Write(terminal, table);
        terminal.Out.WriteLine();
        terminal.Out.WriteLine("The vertex group is given by its order, the farthest shape by its steps from home; states are those reachable from home.");
        if (_someUnknown)
        {
            terminal.Out.WriteLine("A question mark stands for what is not known: --max-shapes ended the work, or states of several regions would take too long to count.");
        }
    }

    private static string Known(int? count) => count is { } known ? Wording.Number(known) : "?";
}
