using System.CommandLine;
using Fusecraft.Groupoids;
using Fusecraft.Reporting;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft examine FILE… [--json] [--max-shapes N] [--with-block PIECES]…</c></summary>
internal static class ExamineCommand
{
    public static Command Create(Terminal terminal)
    {
        var files = CommonOptions.Files();
        var json = CommonOptions.Json("Prints one JSON object for each file, one a line.");
        var maxShapes = CommonOptions.Number("--max-shapes", 1, "Ends the exploration of a file when it has found N shapes and there are more.");
        var withBlock = CommonOptions.WithBlock("Fuses these pieces, named with spaces between, before examining; may be given several times.");
        var command = new ExampleCommand(
            "examine",
            "Counts shapes, regions and states, and says what loops can do. Several files give a table.",
            "fusecraft examine lock.fuse.json",
            "fusecraft examine cube.fuse.json --with-block \"UFR UF\" --json")
        {
            files, json, maxShapes, withBlock,
        };
        command.SetAction((parsed, cancellation) =>
        {
            var options = new ExplorationOptions { MaxShapes = parsed.GetValue(maxShapes) ?? ExplorationOptions.Default.MaxShapes };
            return Task.FromResult(Run(terminal, parsed.GetRequiredValue(files), parsed.GetValue(withBlock) ?? [], options, parsed.GetValue(json), cancellation));
        });
        return command;
    }

    private static int Run(Terminal terminal, string[] files, string[] blocks, ExplorationOptions options, bool json, CancellationToken cancellation)
    {
        var code = ExitCodes.Done;
        var table = new ExaminationTable();
        foreach (var file in files)
        {
            try
            {
                var examination = Examine(terminal, file, blocks, options, cancellation);
                if (json)
                {
                    terminal.Out.WriteLine(examination.ToJson());
                }
                else if (files.Length > 1)
                {
                    table.Add(file, examination);
                }
                else
                {
                    ExaminationText.Write(terminal.Out, examination);
                }

                if (!examination.IsComplete)
                {
                    terminal.Error.WriteLine($"{file}: --max-shapes {options.MaxShapes} ended the exploration; there are more shapes");
                    code = ExitCodes.MoreSerious(code, ExitCodes.BudgetEnded);
                }
            }
            catch (InputException exception)
            {
                terminal.Complain(exception);
                code = ExitCodes.MoreSerious(code, ExitCodes.BadInput);
            }
        }

        table.Write(terminal);
        return code;
    }

    private static Examination Examine(Terminal terminal, string file, string[] blocks, ExplorationOptions options, CancellationToken cancellation)
    {
        var mechanism = MechanismInput.Load(file, blocks);
        using var progress = new ProgressLine<ExplorationProgress>(
            terminal, state => $"{Wording.Count(state.ShapesFound, "shape")} found, {Wording.Number(state.ShapesExplored)} explored");
        return MechanismInput.Checked(file, () => Examination.Of(mechanism, options, progress, cancellation));
    }
}
