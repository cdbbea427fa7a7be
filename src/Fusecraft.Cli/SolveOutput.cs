using Fusecraft.Reporting;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary>Runs a solver and prints what it found.</summary>
internal static class SolveOutput
{
    public static int Run(Terminal terminal, string file, bool json, Func<IProgress<SolveProgress>, SolveResult> solve)
    {
        SolveResult result;
        using (var progress = new ProgressLine<SolveProgress>(terminal, state => $"{state.Stage}: {Wording.Number(state.Count)} seen"))
        {
            result = MechanismInput.Checked(file, () => solve(progress));
        }

        if (json)
        {
            terminal.Out.WriteLine(SolveReport.ToJson(result));
        }
        else
        {
            Write(terminal.Out, result);
        }

        return result.HasPath ? ExitCodes.Done : result.IsSolvable == false ? ExitCodes.Negative : ExitCodes.BudgetEnded;
    }

    private static void Write(TextWriter output, SolveResult result)
    {
        if (result.HasPath)
        {
            output.WriteLine(result.Path.Length == 0 ? "(no steps)" : result.Path.Word.ToString());
            var length = result.Metric.LengthOf(result.Path);
            var measured = result.Metric.Kind switch
            {
                MetricKind.Run => $"{Wording.Count((int)length, "run")}, ",
                MetricKind.Weights => $"weight {Wording.Number(length)}, ",
                _ => "",
            };
            output.WriteLine($"{measured}{Wording.Count(result.Path.Length, "step")}{(result.IsProvenShortest ? ", proven shortest" : ", perhaps not the shortest")}. {result.Reason}");
        }
        else
        {
            var answer = result.IsSolvable switch
            {
                true => "There is a way, but none was found.",
                false => "There is no such way.",
                null => "Not settled.",
            };
            output.WriteLine($"{answer} {result.Reason}");
        }
    }
}
