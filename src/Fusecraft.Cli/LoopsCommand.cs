using System.CommandLine;
using System.Globalization;
using Fusecraft.Reporting;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft loops FILE [--from STATE] [--max-length N] [--max-moved N] [--metric M] [--json]</c></summary>
internal static class LoopsCommand
{
    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var from = CommonOptions.Text("--from", "STATE", $"In whose shape the loops start and end: {CommonOptions.StateForms}; home when not given.");
        from.Required = false;
        var maxLength = CommonOptions.Number("--max-length", 0, "Only loops of at most this length; as long as memory allows when not given.");
        var maxMoved = CommonOptions.Number("--max-moved", 1, "Only loops that move or turn at most N blocks and single pieces; default 4.");
        var metric = new MetricOptions();
        var json = CommonOptions.Json("Prints the list as one JSON object.");
        var command = new ExampleCommand(
            "loops",
            "Lists short words that leave the shape as it is and move little: three-cycles, double swaps, twists.",
            "fusecraft loops cube.fuse.json --max-length 8 --max-moved 3")
        {
            file, from, maxLength, maxMoved, json,
        };
        metric.AddTo(command);
        command.SetAction((parsed, cancellation) =>
        {
            var mechanism = MechanismInput.Load(parsed.GetRequiredValue(file));
            var start = MechanismInput.State(mechanism, "--from", parsed.GetValue(from) ?? "home");
            if (start.Shape is null)
            {
                terminal.Error.WriteLine("No step is free: no turns can ever bring the puzzle into this state.");
                return Task.FromResult(ExitCodes.Negative);
            }

            var options = new LoopCatalogueOptions
            {
                Metric = metric.Read(parsed, mechanism),
                MaxLength = parsed.GetValue(maxLength),
                MaxMoved = parsed.GetValue(maxMoved) ?? LoopCatalogueOptions.Default.MaxMoved,
            };
            var catalogue = LoopCatalogue.Of(start.Shape, options, cancellation);
            if (parsed.GetValue(json))
            {
                terminal.Out.WriteLine(LoopReport.ToJson(catalogue));
            }
            else
            {
                Write(terminal.Out, catalogue);
            }

            return Task.FromResult(catalogue.CompleteLength < options.MaxLength ? ExitCodes.BudgetEnded : ExitCodes.Done);
        });
        return command;
    }

    private static void Write(TextWriter output, LoopCatalogue catalogue)
    {
        var loops = catalogue.Loops;
        var lengths = loops.Select(loop => loop.Length.ToString(CultureInfo.InvariantCulture).Length).DefaultIfEmpty().Max();
        var effects = loops.Select(loop => loop.Effect.ToString().Length).DefaultIfEmpty().Max();
        foreach (var loop in loops)
        {
            output.WriteLine($"{loop.Length.ToString(CultureInfo.InvariantCulture).PadLeft(lengths)}  {loop.Effect.ToString().PadRight(effects)}  {loop.Path.Word.ToFoldedString()}");
        }

        var moved = $"that move at most {Wording.Count(catalogue.Options.MaxMoved, "block")} and single pieces";
        output.WriteLine(catalogue.CompleteLength is { } complete
            ? $"{Wording.Count(loops.Length, "loop")}, among them all of length {complete} or less {moved}."
            : $"{Wording.Count(loops.Length, "loop")}: all there are {moved}.");
    }
}
