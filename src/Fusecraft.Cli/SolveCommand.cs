using System.CommandLine;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft solve FILE --from STATE | --colours COLOURS [--max-length N] [--metric M] [--weight TURN=N]… [--nodes N] [--time N] [--json]</c></summary>
internal static class SolveCommand
{
    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var from = CommonOptions.Text("--from", "STATE", $"Where to start: {CommonOptions.StateForms}.");
        from.Required = false;
        var colours = CommonOptions.Text("--colours", "COLOURS", "Where to start, by what is seen: \"home\", the sites that differ from home as SITE=COLOUR, or the colours of all sites in order.");
        colours.Required = false;
        var search = new SearchOptions();
        var json = CommonOptions.Json("Prints the answer as one JSON object.");
        var command = new ExampleCommand(
            "solve",
            "Finds a word of free steps to the mechanism's goal, or proves that there is none.",
            "fusecraft solve lock.fuse.json --from \"A B A'\"",
            "fusecraft solve cube.fuse.json --colours \"UF:U=F UF:F=U UB:U=B UB:B=U\"")
        {
            file, from, colours, json,
        };
        search.AddTo(command);
        command.Validators.Add(result =>
        {
            if ((result.GetResult(from) is null) == (result.GetResult(colours) is null))
            {
                result.AddError("Give either --from or --colours.");
            }
        });
        command.SetAction((parsed, cancellation) =>
        {
            var path = parsed.GetRequiredValue(file);
            var mechanism = MechanismInput.Load(path);
            var solver = new Solver(mechanism, search.Read(parsed, mechanism));
            if (parsed.GetValue(colours) is { } seen)
            {
                var shown = MechanismInput.Colours(mechanism, "--colours", seen);
                return Task.FromResult(SolveOutput.Run(terminal, path, parsed.GetValue(json), progress => solver.SolveColours(shown, progress, cancellation)));
            }

            var start = MechanismInput.State(mechanism, "--from", parsed.GetRequiredValue(from));
            return Task.FromResult(SolveOutput.Run(terminal, path, parsed.GetValue(json), progress => solver.Solve(start, progress, cancellation)));
        });
        return command;
    }
}
