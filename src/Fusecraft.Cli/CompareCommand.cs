using System.CommandLine;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Reporting;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft compare FILE [FILE] [--with-block PIECES]… [--json] [--max-shapes N]</c></summary>
internal static class CompareCommand
{
    public static Command Create(Terminal terminal)
    {
        var files = new Argument<string[]>("FILE") { Description = "Two mechanism files, or one that is compared with itself after --with-block.", Arity = new ArgumentArity(1, 2) };
        var json = CommonOptions.Json("Prints the comparison as one JSON object.");
        var maxShapes = CommonOptions.Number("--max-shapes", 1, "Ends each exploration when it has found N shapes and there are more.");
        var withBlock = CommonOptions.WithBlock("Fuses these pieces, named with spaces between, in the second mechanism before comparing; may be given several times.");
        var command = new ExampleCommand(
            "compare",
            "Says whether two mechanisms are one puzzle, differently held or written, and if not, where they first differ.",
            "fusecraft compare one.fuse.json other.fuse.json",
            "fusecraft compare cube.fuse.json --with-block \"UFR UF\"")
        {
            files, withBlock, json, maxShapes,
        };
        command.Validators.Add(result =>
        {
            if (result.GetResult(files)?.Tokens.Count == 1 && result.GetResult(withBlock) is null)
            {
                result.AddError("One file alone is compared with nothing: give a second one, or a block with --with-block.");
            }
        });
        command.SetAction((parsed, cancellation) =>
        {
            var paths = parsed.GetRequiredValue(files);
            var options = new ComparisonOptions { MaxShapes = parsed.GetValue(maxShapes) ?? ComparisonOptions.Default.MaxShapes };
            var first = MechanismInput.Load(paths[0]);
            var second = MechanismInput.Load(paths[^1], parsed.GetValue(withBlock) ?? []);
            return Task.FromResult(Run(terminal, paths, first, second, options, parsed.GetValue(json), cancellation));
        });
        return command;
    }

    private static int Run(Terminal terminal, string[] paths, Mechanism first, Mechanism second, ComparisonOptions options, bool json, CancellationToken cancellation)
    {
        MechanismComparison comparison;
        using (var progress = new ProgressLine<ExplorationProgress>(terminal, state => $"{Wording.Count(state.ShapesFound, "shape")} found, {Wording.Number(state.ShapesExplored)} explored"))
        {
            comparison = MechanismInput.Checked(string.Join(" and ", paths), () => MechanismComparison.Of(first, second, options, progress, cancellation));
        }

        if (json)
        {
            terminal.Out.WriteLine(ComparisonReport.ToJson(comparison));
        }
        else
        {
            ComparisonText.Write(terminal, comparison);
        }

        if (!comparison.FirstGroupoid.IsComplete || !comparison.SecondGroupoid.IsComplete)
        {
            terminal.Error.WriteLine($"--max-shapes {options.MaxShapes} ended an exploration; there are more shapes");
        }

        return comparison.Verdict switch
        {
            ComparisonVerdict.SamePuzzle => ExitCodes.Done,
            ComparisonVerdict.Undecided => ExitCodes.BudgetEnded,
            _ => ExitCodes.Negative,
        };
    }
}
