using System.Diagnostics.CodeAnalysis;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>What a solver found: a turn path, a proof that there is none, or that a budget ended before either.</summary>
public sealed class SolveResult
{
    private SolveResult(bool? isSolvable, TurnPath? path, bool isProvenShortest, string reason)
    {
        IsSolvable = isSolvable;
        Path = path;
        IsProvenShortest = isProvenShortest;
        Reason = reason;
    }

    /// <summary>True: there is a path as asked for. False: proven that there is none, or none within the greatest length asked for. Null: a budget ended before either was settled.</summary>
    public bool? IsSolvable { get; }

    /// <summary>A path as asked for, replayed before it was given; null where there is none, or where a budget ended before one was found.</summary>
    public TurnPath? Path { get; }

    /// <summary>How the length of the path was counted.</summary>
    public Metric Metric { get; private init; } = Metric.Step;

    /// <summary>True when it is proven that no path is shorter, by the metric. A path within the greatest length asked for answers the question without being the shortest.</summary>
    public bool IsProvenShortest { get; }

    /// <summary>In one sentence, how the answer was settled or what ended the work.</summary>
    public string Reason { get; }

    /// <summary>True when a path was found.</summary>
    [MemberNotNullWhen(true, nameof(Path))]
    public bool HasPath => Path is not null;

    internal static SolveResult Shortest(TurnPath path, Metric metric) =>
        new(true, path, true, path.Length == 0 ? "Nothing needs to be done." : "A search over all shorter paths found none.") { Metric = metric };

    internal static SolveResult Found(TurnPath path, Metric metric, string reason) => new(true, path, false, reason) { Metric = metric };

    internal static SolveResult Impossible(string reason) => new(false, null, false, reason);

    /// <summary>A budget ended the work.</summary>
    /// <param name="reason">Which one.</param>
    /// <param name="isSolvable">True when it is proven that a path exists, although none was found.</param>
    internal static SolveResult Unsettled(string reason, bool? isSolvable = null) => new(isSolvable, null, false, reason);
}
