using System.CommandLine;
using System.Globalization;
using Fusecraft.Mechanisms;
using Fusecraft.Reporting;
using Fusecraft.Solving;
using Spectre.Console;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft depths FILE [--metric M] [--weight TURN=N]… [--to-goal] [--max-bytes N] [--save TABLE] [--json]</c></summary>
internal static class DepthsCommand
{
    private const int FarthestShown = 3;

    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var metric = new MetricOptions();
        var toGoal = new Option<bool>("--to-goal") { Description = "Counts the distances to the mechanism's goal instead of those from home." };
        var megabytes = CommonOptions.Number("--max-megabytes", 1, "Takes at most N megabytes for the table; default 4096.");
        var save = new Option<string?>("--save") { Description = "Keeps the table in a file.", HelpName = "TABLE" };
        var json = CommonOptions.Json("Prints the counts as one JSON object.");
        var command = new ExampleCommand(
            "depths",
            "Counts the states of the home region at each distance, exactly, and shows a farthest one.",
            "fusecraft depths lock.fuse.json",
            "fusecraft depths cube.fuse.json --metric run --json")
        {
            file, toGoal, megabytes, save, json,
        };
        metric.AddTo(command);
        command.SetAction((parsed, cancellation) =>
        {
            var path = parsed.GetRequiredValue(file);
            var mechanism = MechanismInput.Load(path);
            var options = new DistanceOptions
            {
                Metric = metric.Read(parsed, mechanism),
                Origin = parsed.GetValue(toGoal) ? DistanceOrigin.ToGoal : DistanceOrigin.FromBase,
                MaxBytes = parsed.GetValue(megabytes) is { } most ? most * 1_000_000L : DistanceOptions.Default.MaxBytes,
            };
            return Task.FromResult(Run(terminal, path, mechanism, options, parsed.GetValue(save), parsed.GetValue(json), cancellation));
        });
        return command;
    }

    private static int Run(Terminal terminal, string path, Mechanism mechanism, DistanceOptions options, string? save, bool json, CancellationToken cancellation)
    {
        DistanceTable table;
        try
        {
            using var progress = new ProgressLine<DistanceProgress>(
                terminal, state => $"distance {state.Distance}: {Wording.Number(state.StatesReached)} of {Wording.Number(state.StateCount)} states reached");
            table = MechanismInput.Checked(path, () => DistanceTable.Build(StateNumbering.Of(mechanism, cancellation), options, progress, cancellation));
        }
        catch (InvalidOperationException exception)
        {
            terminal.Error.WriteLine($"{path}: {exception.Message}");
            return ExitCodes.BudgetEnded;
        }

        if (save is not null)
        {
            Save(table, save);
        }

        if (json)
        {
            terminal.Out.WriteLine(DepthsReport.ToJson(table));
        }
        else
        {
            Write(terminal, table);
        }

        return ExitCodes.Done;
    }

    private static void Save(DistanceTable table, string path)
    {
        try
        {
            table.Save(path);
        }
        catch (NotSupportedException exception)
        {
            throw new InputException($"--save: {exception.Message}");
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            throw new InputException($"--save: {path} cannot be written: {exception.Message}");
        }
    }

    private static void Write(Terminal terminal, DistanceTable table)
    {
        var toGoal = table.Origin == DistanceOrigin.ToGoal;
        var unit = table.Metric.Kind == MetricKind.Run ? "runs" : table.Metric.Kind == MetricKind.Step ? "steps" : "weight";
        if (table.Greatest < 0)
        {
            terminal.Out.WriteLine("The goal cannot be reached from any state of the home region.");
            return;
        }

        var lines = new Table().Border(TableBorder.None);
        lines.AddColumn(new TableColumn(unit).RightAligned().PadRight(2));
        lines.AddColumn(new TableColumn("states").RightAligned().PadRight(2));
        lines.AddColumn(new TableColumn("share").RightAligned().PadRight(0));
        for (var distance = 0; distance <= table.Greatest; distance++)
        {
            lines.AddRow(
                new Text(distance.ToString(CultureInfo.InvariantCulture)),
                new Text(Wording.Number(table.Counts[distance])),
                new Text(((double)table.Counts[distance] / table.StateCount).ToString("P3", CultureInfo.InvariantCulture)));
        }

        PlainTable.Write(terminal, lines);
        terminal.Out.WriteLine();
        terminal.Out.WriteLine($"{Wording.Count(table.StateCount, "state")} {(toGoal ? "from which the goal can be reached" : "can be reached from home")} within the home region.");
        terminal.Out.WriteLine(
            $"Greatest distance {table.Greatest}, mean {table.Mean.ToString("0.######", CultureInfo.InvariantCulture)} {unit}.");
        foreach (var state in table.StatesAt(table.Greatest).Take(FarthestShown))
        {
            terminal.Out.WriteLine(toGoal ? $"A farthest state: {state}; its way: {table.ShortestPath(state)!.Word.ToFoldedString()}" : $"A farthest state: {table.ShortestPath(state)!.Word.ToFoldedString()}");
        }
    }
}
