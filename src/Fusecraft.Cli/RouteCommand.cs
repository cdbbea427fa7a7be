using System.CommandLine;
using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft route FILE --from STATE --to STATE|goal [--shape-only] [--max-length N] [--metric M] [--weight TURN=N]… [--nodes N] [--time N] [--json]</c></summary>
internal static class RouteCommand
{
    private const string Goal = "goal";

    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var from = CommonOptions.Text("--from", "STATE", $"Where to start: {CommonOptions.StateForms}.");
        var to = CommonOptions.Text("--to", "STATE", "Where to get: a state as for --from, or \"goal\", the mechanism's own goal.");
        var shapeOnly = new Option<bool>("--shape-only") { Description = "Only the blocks and marks have to get there; labels may end anywhere." };
        var search = new SearchOptions();
        var json = CommonOptions.Json("Prints the answer as one JSON object.");
        var command = new ExampleCommand(
            "route",
            "Finds a word of free steps from one state to another, or proves that there is none.",
            "fusecraft route lock.fuse.json --from home --to \"A B\"",
            "fusecraft route lock.fuse.json --from \"(1 2 3)\" --to goal --max-length 12")
        {
            file, from, to, shapeOnly, json,
        };
        search.AddTo(command);
        command.SetAction((parsed, cancellation) =>
        {
            var path = parsed.GetRequiredValue(file);
            var mechanism = MechanismInput.Load(path);
            var start = MechanismInput.State(mechanism, "--from", parsed.GetRequiredValue(from));
            var target = parsed.GetRequiredValue(to);
            var end = target.Trim() == Goal ? null : MechanismInput.State(mechanism, "--to", target);
            var solver = new Solver(mechanism, search.Read(parsed, mechanism));
            if (parsed.GetValue(shapeOnly))
            {
                end ??= GoalShape(mechanism);
                return Task.FromResult(SolveOutput.Run(terminal, path, parsed.GetValue(json), progress => end is null
                    ? solver.Solve(start, progress, cancellation)
                    : solver.RouteShapes(start, end, progress, cancellation)));
            }

            return Task.FromResult(SolveOutput.Run(terminal, path, parsed.GetValue(json), progress => end is null
                ? solver.Solve(start, progress, cancellation)
                : solver.Route(start, end, progress, cancellation)));
        });
        return command;
    }

    // The state whose shape is the goal's; null where the goal asks for marks, so for several shapes and for no labels.
    private static State? GoalShape(Mechanism mechanism) => mechanism.Goal.Kind switch
    {
        GoalKind.Marks => null,
        GoalKind.Sites => throw new InputException($"--shape-only: the goal of {mechanism.Name} asks for labels, not for a shape; give a state with --to"),
        _ => mechanism.HomeState,
    };
}
