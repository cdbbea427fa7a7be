using System.CommandLine;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft solve FILE --from STATE [--max-length N] [--json]</c></summary>
internal static class SolveCommand
{
    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var from = CommonOptions.Text("--from", "STATE", $"Where to start: {CommonOptions.StateForms}.");
        var maxLength = CommonOptions.Number("--max-length", 0, "Only words of at most N steps count.");
        var json = CommonOptions.Json("Prints the answer as one JSON object.");
        var command = new ExampleCommand("solve", "Finds a word of free steps to the mechanism's goal, or proves that there is none.", "fusecraft solve lock.fuse.json --from \"A B A'\"")
        {
            file, from, maxLength, json,
        };
        command.SetAction((parsed, cancellation) =>
        {
            var path = parsed.GetRequiredValue(file);
            var mechanism = MechanismInput.Load(path);
            var start = MechanismInput.State(mechanism, "--from", parsed.GetRequiredValue(from));
            var solver = new Solver(mechanism, new SolveOptions { MaxLength = parsed.GetValue(maxLength) });
            return Task.FromResult(SolveOutput.Run(terminal, path, parsed.GetValue(json), progress => solver.Solve(start, progress, cancellation)));
        });
        return command;
    }
}
