using System.CommandLine;
using System.Globalization;
using System.Numerics;
using Fusecraft.Mechanisms;
using Fusecraft.Reporting;
using Fusecraft.Solving;
using Spectre.Console;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft depths FILE [--metric M] [--weight TURN=N]… [--to-goal] [--max-megabytes N] [--max-states N] [--save TABLE] [--json]</c></summary>
internal static class DepthsCommand
{
    private const int FarthestShown = 3;
    private const int MostStates = 20_000_000;

    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var metric = new MetricOptions();
        var toGoal = new Option<bool>("--to-goal") { Description = "Counts the distances to the mechanism's goal instead of those from home." };
        var megabytes = CommonOptions.Number("--max-megabytes", 1, "Takes at most N megabytes for the table; default 4096.");
        var states = CommonOptions.Number("--max-states", 1, "Where the table would be too large, counts from home as far as N states go; default 20000000.");
        var save = new Option<string?>("--save") { Description = "Keeps the table in a file.", HelpName = "TABLE" };
        var json = CommonOptions.Json("Prints the counts as one JSON object.");
        var command = new ExampleCommand(
            "depths",
            "Counts the states of the home region at each distance, exactly, and shows a farthest one.",
            "fusecraft depths lock.fuse.json",
            "fusecraft depths cube.fuse.json --metric run --json")
        {
            file, toGoal, megabytes, states, save, json,
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
            return Task.FromResult(Run(terminal, path, mechanism, options, parsed.GetValue(states) ?? MostStates, parsed.GetValue(save), parsed.GetValue(json), cancellation));
        });
        return command;
    }

    private static int Run(Terminal terminal, string path, Mechanism mechanism, DistanceOptions options, int maxStates, string? save, bool json, CancellationToken cancellation)
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
            return options.Origin == DistanceOrigin.ToGoal || save is not null
                ? ExitCodes.BudgetEnded
                : Count(terminal, path, DepthCensus.Take(mechanism.HomeState, int.MaxValue, options.Metric, maxStates, cancellation), maxStates, json);
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

    private static int Count(Terminal terminal, string path, DepthCensus census, int maxStates, bool json)
    {
        if (json)
        {
            terminal.Out.WriteLine(DepthsReport.ToJson(census));
        }
        else
        {
            Write(terminal, census);
        }

        if (census.IsWhole)
        {
            return ExitCodes.Done;
        }

        terminal.Error.WriteLine(
            $"{path}: The budget of {Wording.Count(maxStates, "state")} (--max-states) ended the count; how many states are at distance {census.Counts.Length * census.Unit} or farther is not known.");
        return ExitCodes.BudgetEnded;
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
        if (table.Greatest < 0)
        {
            terminal.Out.WriteLine("The goal cannot be reached from any state of the home region.");
            return;
        }

        WriteCounts(terminal, table.Metric, table.Counts.Select((count, distance) => (distance, (BigInteger)count)), table.StateCount);
        terminal.Out.WriteLine();
        terminal.Out.WriteLine($"{Wording.Count(table.StateCount, "state")} {(toGoal ? "from which the goal can be reached" : "can be reached from home")} within the home region.");
        terminal.Out.WriteLine(
            $"Greatest distance {table.Greatest}, mean {table.Mean.ToString("0.######", CultureInfo.InvariantCulture)} {UnitOf(table.Metric)}.");
        foreach (var state in table.StatesAt(table.Greatest).Take(FarthestShown))
        {
            terminal.Out.WriteLine(toGoal ? $"A farthest state: {state}; its way: {table.ShortestPath(state)!.Word.ToFoldedString()}" : $"A farthest state: {table.ShortestPath(state)!.Word.ToFoldedString()}");
        }
    }

    private static void Write(Terminal terminal, DepthCensus census)
    {
        var counts = census.Counts.Select((count, index) => (Distance: index * census.Unit, Count: count)).Where(entry => !entry.Count.IsZero).ToList();
        WriteCounts(terminal, census.Metric, counts, census.StateCount);
        terminal.Out.WriteLine();
        if (census.StateCount is not { } states)
        {
            terminal.Out.WriteLine("How many states can be reached from home is not known.");
            return;
        }

        terminal.Out.WriteLine($"{Wording.Count(states, "state")} can be reached from home.");
        terminal.Out.WriteLine($"Greatest distance {counts[^1].Distance}, mean {census.Mean.ToString("0.######", CultureInfo.InvariantCulture)} {UnitOf(census.Metric)}.");
    }

    // Shares only where it is known of what.
    private static void WriteCounts(Terminal terminal, Metric metric, IEnumerable<(int Distance, BigInteger Count)> counts, BigInteger? all)
    {
        var lines = new Table().Border(TableBorder.None);
        lines.AddColumn(new TableColumn(UnitOf(metric)).RightAligned().PadRight(2));
        lines.AddColumn(new TableColumn("states").RightAligned().PadRight(all is null ? 0 : 2));
        if (all is not null)
        {
            lines.AddColumn(new TableColumn("share").RightAligned().PadRight(0));
        }

        foreach (var (distance, count) in counts)
        {
            List<Text> line = [new Text(distance.ToString(CultureInfo.InvariantCulture)), new Text(Wording.Number(count))];
            if (all is { } total)
            {
                line.Add(new Text(((double)count / (double)total).ToString("P3", CultureInfo.InvariantCulture)));
            }

            lines.AddRow(line);
        }

        PlainTable.Write(terminal, lines);
    }

    private static string UnitOf(Metric metric) => metric.Kind switch
    {
        MetricKind.Run => "runs",
        MetricKind.Step => "steps",
        _ => "weight",
    };
}
