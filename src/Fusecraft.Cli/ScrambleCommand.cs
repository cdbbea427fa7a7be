using System.CommandLine;
using System.Globalization;
using Fusecraft.Permutations;
using Fusecraft.Reporting;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary><c>fusecraft scramble FILE --count N --seed S [--at-least D] [--at-most D] [--metric M] [--json]</c></summary>
internal static class ScrambleCommand
{
    public static Command Create(Terminal terminal)
    {
        var file = CommonOptions.File();
        var count = CommonOptions.Number("--count", 1, "How many; default 1.");
        var seed = new Option<ulong>("--seed")
        {
            Description = "The seed of the random numbers: the same seed gives the same states.",
            HelpName = "S",
            Required = true,
            CustomParser = result =>
            {
                var text = result.Tokens.Count == 1 ? result.Tokens[0].Value : "";
                if (ulong.TryParse(text, NumberStyles.None, CultureInfo.InvariantCulture, out var number))
                {
                    return number;
                }

                result.AddError($"--seed takes a whole number from 0 to {ulong.MaxValue}; found \"{text}\".");
                return 0;
            },
        };
        var atLeast = CommonOptions.Number("--at-least", 0, "Only states at a distance of N or more from home.");
        var atMost = CommonOptions.Number("--at-most", 0, "Only states at a distance of N or less from home.");
        var metric = new MetricOptions();
        var json = CommonOptions.Json("Prints one JSON object for each scramble, one a line.");
        var command = new ExampleCommand(
            "scramble",
            "Draws states of the home region, each with the same probability, and prints a word from home for each.",
            "fusecraft scramble lock.fuse.json --count 5 --seed 7",
            "fusecraft scramble cube.fuse.json --seed 1 --at-least 9 --metric run")
        {
            file, count, seed, atLeast, atMost, json,
        };
        metric.AddTo(command);
        command.SetAction((parsed, cancellation) =>
        {
            var path = parsed.GetRequiredValue(file);
            var mechanism = MechanismInput.Load(path);
            var options = new ScrambleOptions
            {
                LeastDistance = parsed.GetValue(atLeast) ?? 0,
                GreatestDistance = parsed.GetValue(atMost),
                Metric = metric.Read(parsed, mechanism),
            };
            Scrambler scrambler;
            try
            {
                scrambler = MechanismInput.Checked(path, () => Scrambler.Of(mechanism, options, cancellation));
            }
            catch (ArgumentException exception)
            {
                terminal.Error.WriteLine($"{path}: {exception.Message.Split(" (Parameter", 2)[0]}");
                return Task.FromResult(ExitCodes.Negative);
            }
            catch (InvalidOperationException exception)
            {
                terminal.Error.WriteLine($"{path}: {exception.Message}");
                return Task.FromResult(ExitCodes.BudgetEnded);
            }

            return Task.FromResult(Run(terminal, scrambler, parsed.GetValue(count) ?? 1, parsed.GetValue(seed), parsed.GetValue(json), cancellation));
        });
        return command;
    }

    private static int Run(Terminal terminal, Scrambler scrambler, int count, ulong seed, bool json, CancellationToken cancellation)
    {
        var random = new SeededRandom(seed);
        var code = ExitCodes.Done;
        for (var i = 0; i < count; i++)
        {
            var scramble = scrambler.Next(random, cancellation);
            if (json)
            {
                terminal.Out.WriteLine(ScrambleReport.ToJson(scramble, seed, i));
            }
            else if (scramble.Path is { } word)
            {
                terminal.Out.WriteLine(word.Length == 0 ? "(no steps)" : word.Word.ToFoldedString());
            }

            if (scramble.Path is null)
            {
                terminal.Error.WriteLine($"scramble {i + 1}: a budget ended the search for a word; the state is {scramble.State}");
                code = ExitCodes.BudgetEnded;
            }
        }

        return code;
    }
}
