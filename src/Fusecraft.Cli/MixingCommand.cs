using System.CommandLine;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Reporting;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft mixing FILE [--turns N] [--all-steps] [--watch SITES] [--max-states N] [--json]</c></summary>
internal static class MixingCommand
{
    private const double Fine = 0.01;
    private const int MostTurns = 1000;

    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var turns = CommonOptions.Number("--turns", 0, $"Looks at so many turns; else at as many as it takes to come within 1/100, at most {MostTurns}.");
        var allSteps = new Option<bool>("--all-steps") { Description = "Each turn chooses among all steps, and does nothing where the one chosen is barred; else among the free steps." };
        var watch = new Option<string>("--watch") { Description = "Only the labels from these sites, named with spaces between, are watched: a lower bound for puzzles with too many states.", HelpName = "SITES" };
        var maxStates = CommonOptions.Number("--max-states", 1, $"Gives up where there are more than N states ({WalkOptions.Default.MaxStates} when not given).");
        var json = CommonOptions.Json("Prints the answer as one JSON object.");
        var command = new ExampleCommand(
            "mixing",
            "Says how far from uniform random turns are: whether so many are enough to shuffle.",
            "fusecraft mixing lock.fuse.json --turns 23",
            "fusecraft mixing cube.fuse.json --watch \"UF:U UR:U\"")
        {
            file, turns, allSteps, watch, maxStates, json,
        };
        command.SetAction((parsed, cancellation) =>
        {
            var path = parsed.GetRequiredValue(file);
            var mechanism = MechanismInput.Load(path);
            var options = new WalkOptions
            {
                Choice = parsed.GetValue(allSteps) ? WalkChoice.AllSteps : WalkChoice.FreeSteps,
                MaxStates = parsed.GetValue(maxStates) ?? WalkOptions.Default.MaxStates,
            };
            var watched = parsed.GetValue(watch) is { } names ? Sites(mechanism, names) : null;
            return Task.FromResult(Run(terminal, path, () => Walk(mechanism, watched, options, cancellation), parsed.GetValue(turns), parsed.GetValue(json), cancellation));
        });
        return command;
    }

    private static int Run(Terminal terminal, string path, Func<RandomWalk> make, int? turns, bool json, CancellationToken cancellation)
    {
        RandomWalk walk;
        WalkDistances distances;
        try
        {
            walk = MechanismInput.Checked(path, make);
        }
        catch (InvalidOperationException exception)
        {
            terminal.Error.WriteLine(exception.Message);
            return ExitCodes.BudgetEnded;
        }

        using (var progress = new ProgressLine<WalkDistance>(terminal, state => $"{Wording.Count(state.Turns, "turn")}, distance {state.FromLimit:0.0000}"))
        {
            distances = walk.Distances(turns ?? MostTurns, turns is null ? Fine : 0, progress, cancellation);
        }

        var spectrum = walk.IsReversible || walk.StateCount <= RandomWalk.MostStatesOfOneWaySpectrum ? walk.Spectrum(cancellationToken: cancellation) : null;
        if (json)
        {
            terminal.Out.WriteLine(MixingReport.ToJson(distances, spectrum));
        }
        else
        {
            MixingText.Write(terminal, distances, spectrum, turns);
        }

        if (turns is null && distances.TurnsTo(Fine) is null)
        {
            terminal.Error.WriteLine($"{MostTurns} turns do not come within 1/100; --turns looks at more");
            return ExitCodes.BudgetEnded;
        }

        return ExitCodes.Done;
    }

    private static RandomWalk Walk(Mechanism mechanism, int[]? watched, WalkOptions options, CancellationToken cancellation) => watched is null
        ? RandomWalk.FromBase(ShapeGroupoid.Explore(mechanism, cancellationToken: cancellation).VertexGroupAt(0, cancellation), options, cancellation)
        : RandomWalk.Watching(mechanism, watched, options, cancellation);

    private static int[] Sites(Mechanism mechanism, string names)
    {
        var sites = names.Split(' ', StringSplitOptions.RemoveEmptyEntries)
            .Select(name => mechanism.FindSite(name) ?? throw new InputException($"--watch: {mechanism.Name} has no site {name}")).ToArray();
        return sites.Distinct().Count() == sites.Length ? sites : throw new InputException("--watch: a site stands twice");
    }
}
