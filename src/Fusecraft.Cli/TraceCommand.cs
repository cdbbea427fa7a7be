using System.CommandLine;
using System.Globalization;
using Fusecraft.Mechanisms;
using Fusecraft.Reporting;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft trace FILE --word WORD [--from STATE]</c></summary>
internal static class TraceCommand
{
    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var word = CommonOptions.Text("--word", "WORD", "The word to follow, in quotes, such as \"U R' (F U2)3\".");
        var from = CommonOptions.Text("--from", "STATE", $"Where to start: {CommonOptions.StateForms}; home when not given.");
        from.Required = false;
        var command = new ExampleCommand("trace", "Follows a word step by step: the shape after each step, and what it moved.", "fusecraft trace lock.fuse.json --word \"A B A' B'\"")
        {
            file, word, from,
        };
        command.SetAction(parsed =>
        {
            var mechanism = MechanismInput.Load(parsed.GetRequiredValue(file));
            var start = MechanismInput.State(mechanism, "--from", parsed.GetValue(from) ?? "home");
            return Run(terminal, start, MechanismInput.Word(mechanism, "--word", parsed.GetRequiredValue(word)));
        });
        return command;
    }

    private static int Run(Terminal terminal, State start, Word word)
    {
        if (start.Shape is null)
        {
            terminal.Out.WriteLine("No step is free: no turns can ever bring the puzzle into this state.");
            return ExitCodes.Negative;
        }

        var trace = WordTrace.Of(start, word);
        var numbers = trace.Steps.Length.ToString(CultureInfo.InvariantCulture).Length;
        var names = Math.Max("start".Length, trace.Steps.Select(step => step.Step.Name.Length).DefaultIfEmpty().Max());
        Line(0, "start", "shape", start.Shape.ToString());
        for (var i = 0; i < trace.Steps.Length; i++)
        {
            var step = trace.Steps[i];
            Line(i + 1, step.Step.Name, "moved", step.Moved);
            terminal.Out.WriteLine($"{new string(' ', numbers + names + 4)}shape  {step.Shape}");
        }

        terminal.Out.WriteLine();
        terminal.Out.WriteLine($"labels after {Wording.Count(trace.Steps.Length, "step")}: {trace.End}");
        if (trace.Barred is null)
        {
            return ExitCodes.Done;
        }

        terminal.Out.WriteLine($"{trace.Barred}");
        return ExitCodes.Negative;

        void Line(int number, string name, string what, string text) =>
            terminal.Out.WriteLine($"{number.ToString(CultureInfo.InvariantCulture).PadLeft(numbers)}  {name.PadRight(names)}  {what}  {text}");
    }
}
