using System.Collections.Immutable;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>How the length of a word is counted: by steps, by runs, or by weights of turns.</summary>
/// <remarks>Immutable, safe to share; not bound to a mechanism.</remarks>
public sealed class Metric
{
    private readonly ImmutableSortedDictionary<string, int> _weights;

    private Metric(MetricKind kind, ImmutableSortedDictionary<string, int> weights)
    {
        Kind = kind;
        _weights = weights;
    }

    /// <summary>Every step costs 1.</summary>
    public static Metric Step { get; } = new(MetricKind.Step, ImmutableSortedDictionary<string, int>.Empty);

    /// <summary>A run costs 1: consecutive steps written with the same name or its opposite.</summary>
    public static Metric Run { get; } = new(MetricKind.Run, ImmutableSortedDictionary<string, int>.Empty);

    /// <summary>What is counted.</summary>
    public MetricKind Kind { get; }

    /// <summary>The weights by names of turns; turns not named weigh 1. Empty unless <see cref="Kind"/> is <see cref="MetricKind.Weights"/>.</summary>
    public IReadOnlyDictionary<string, int> WeightsByTurn => _weights;

    /// <summary>Each step costs the weight of its turn, in either sense.</summary>
    /// <param name="weights">Names of turns with their weights, 0 to 1,000; turns that are not named weigh 1.</param>
    /// <exception cref="ArgumentOutOfRangeException">A weight is outside 0 … 1,000.</exception>
    public static Metric Weights(IEnumerable<KeyValuePair<string, int>> weights)
    {
        ArgumentNullException.ThrowIfNull(weights);
        var sorted = weights.ToImmutableSortedDictionary(StringComparer.Ordinal);
        foreach (var (turn, weight) in sorted)
        {
            if (weight is < 0 or > 1000)
            {
                throw new ArgumentOutOfRangeException(nameof(weights), weight, $"The weight of {turn} is {weight}; it must be in 0 … 1000.");
            }
        }

        return new Metric(MetricKind.Weights, sorted);
    }

    /// <summary>The length of a turn path.</summary>
    public long LengthOf(TurnPath path)
    {
        ArgumentNullException.ThrowIfNull(path);
        return LengthOf(path.Steps, Kind == MetricKind.Run ? RunClasses(path.Mechanism) : []);
    }

    /// <summary>The length of steps in a row.</summary>
    /// <param name="steps">The steps.</param>
    /// <param name="runClasses">The mechanism's <see cref="RunClasses"/>; not looked at unless runs are counted.</param>
    internal long LengthOf(IReadOnlyList<Step> steps, int[] runClasses)
    {
        var length = 0L;
        for (var i = 0; i < steps.Count; i++)
        {
            length += Kind != MetricKind.Run ? WeightOf(steps[i]) : i == 0 || runClasses[steps[i].Index] != runClasses[steps[i - 1].Index] ? 1 : 0;
        }

        return length;
    }

    /// <summary><c>step</c>, <c>run</c> or <c>weights</c>.</summary>
    public override string ToString() => Kind switch
    {
        MetricKind.Step => "step",
        MetricKind.Run => "run",
        _ => "weights",
    };

    /// <summary>What one step costs by itself.</summary>
    internal int WeightOf(Step step) => _weights.GetValueOrDefault(step.Turn.Name, 1);

    /// <summary>For each step the number of its class: steps of one class in a row are one run.</summary>
    internal static int[] RunClasses(Mechanism mechanism)
    {
        // Names are joined with those of the opposites until nothing more joins.
        var classOfName = new Dictionary<string, int>();
        foreach (var step in mechanism.Steps)
        {
            var own = classOfName.GetValueOrDefault(step.Name, classOfName.Count + (2 * mechanism.Steps.Length));
            classOfName[step.Name] = own;
            if (step.Opposite is not { } opposite)
            {
                continue;
            }

            var other = classOfName.GetValueOrDefault(opposite.Name, own);
            classOfName[opposite.Name] = own;
            foreach (var name in classOfName.Where(pair => pair.Value == other).Select(pair => pair.Key).ToList())
            {
                classOfName[name] = own;
            }
        }

        var numbers = new Dictionary<int, int>();
        var classes = new int[mechanism.Steps.Length];
        foreach (var step in mechanism.Steps)
        {
            var own = classOfName[step.Name];
            numbers.TryAdd(own, numbers.Count);
            classes[step.Index] = numbers[own];
        }

        return classes;
    }

    /// <summary>Refuses weights of turns that the mechanism does not have.</summary>
    internal void RequireTurnsOf(Mechanism mechanism, string parameter)
    {
        foreach (var turn in _weights.Keys)
        {
            if (mechanism.FindTurn(turn) is null)
            {
                throw new ArgumentException($"The metric weighs a turn {turn}; the mechanism {mechanism.Name} has no such turn.", parameter);
            }
        }
    }
}
