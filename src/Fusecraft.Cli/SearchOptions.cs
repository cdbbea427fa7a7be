using System.CommandLine;
using Fusecraft.Mechanisms;
using Fusecraft.Solving;

namespace Fusecraft.Cli;

/// <summary>What the commands that look for a word share: <c>--max-length N</c>, the metric, <c>--nodes N</c> and <c>--time N</c>.</summary>
internal sealed class SearchOptions
{
    private readonly Option<int?> _maxLength = CommonOptions.Number(
        "--max-length", 0, "Only words of at most this length, by the metric, count: finds one, perhaps not the shortest, or proves that there is none.");

    private readonly MetricOptions _metric = new();
    private readonly Option<int?> _nodes = CommonOptions.Number("--nodes", 1, "The bounded search ends after N nodes.");
    private readonly Option<int?> _time = CommonOptions.Number("--time", 1, "The bounded search ends after N seconds, and says how many nodes give the same answer without a clock.");

    public void AddTo(Command command)
    {
        command.Add(_maxLength);
        _metric.AddTo(command);
        command.Add(_nodes);
        command.Add(_time);
    }

    public SolveOptions Read(ParseResult parsed, Mechanism mechanism) => new()
    {
        MaxLength = parsed.GetValue(_maxLength),
        Metric = _metric.Read(parsed, mechanism),
        MaxNodes = parsed.GetValue(_nodes) ?? SolveOptions.Default.MaxNodes,
        TimeLimit = parsed.GetValue(_time) is { } seconds ? TimeSpan.FromSeconds(seconds) : null,
    };
}
