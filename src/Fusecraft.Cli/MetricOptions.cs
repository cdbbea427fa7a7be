using System.CommandLine;
using System.Globalization;
using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary><c>--metric step|run|weights</c> and <c>--weight TURN=N</c>.</summary>
internal sealed class MetricOptions
{
    private const int MostWeight = 1000;
    private readonly Option<string> _metric = new("--metric")
    {
        Description = "How lengths are counted: every step 1 (step, the default), consecutive steps of one name 1 (run), or by --weight (weights).",
        HelpName = "step|run|weights",
        DefaultValueFactory = static _ => "step",
    };

    private readonly Option<string[]> _weights = new("--weight")
    {
        Description = $"With --metric weights: what a turn costs, 0 to {MostWeight}; turns not named cost 1. May be given several times.",
        HelpName = "TURN=N",
        Arity = ArgumentArity.OneOrMore,
        AllowMultipleArgumentsPerToken = false,
    };

    public MetricOptions()
    {
        _metric.AcceptOnlyFromAmong("step", "run", "weights");
        _metric.HelpName = "step|run|weights";
    }

    public void AddTo(Command command)
    {
        command.Add(_metric);
        command.Add(_weights);
    }

    public Metric Read(ParseResult parsed, Mechanism mechanism)
    {
        var kind = parsed.GetValue(_metric);
        var weights = parsed.GetValue(_weights) ?? [];
        if (weights.Length > 0 && kind != "weights")
        {
            throw new InputException($"--weight has no meaning with --metric {kind}; say --metric weights");
        }

        return kind switch
        {
            "run" => Metric.Run,
            "weights" => Metric.Weights(Weights(weights, mechanism)),
            _ => Metric.Step,
        };
    }

    private static Dictionary<string, int> Weights(string[] texts, Mechanism mechanism)
    {
        var weights = new Dictionary<string, int>();
        foreach (var text in texts)
        {
            var at = text.LastIndexOf('=');
            var turn = at < 0 ? text : text[..at];
            if (at < 0 || !int.TryParse(text.AsSpan(at + 1), NumberStyles.None, CultureInfo.InvariantCulture, out var weight) || weight > MostWeight)
            {
                throw new InputException($"--weight: \"{text}\" is not of the form TURN=N with N from 0 to {MostWeight}");
            }

            if (mechanism.FindTurn(turn) is null)
            {
                throw new InputException($"--weight: {mechanism.Name} has no turn {turn}; it has {string.Join(", ", mechanism.Turns.Select(known => known.Name))}");
            }

            if (!weights.TryAdd(turn, weight))
            {
                throw new InputException($"--weight: turn {turn} is given two weights");
            }
        }

        return weights;
    }
}
