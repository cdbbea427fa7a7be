using System.Diagnostics.CodeAnalysis;
using Fusecraft.Groupoids;

namespace Fusecraft.Solving;

/// <summary>What a bounded search found out.</summary>
public sealed class BoundedResult
{
    internal BoundedResult(BoundedOutcome outcome, TurnPath? path, long? lowerBound, long nodeCount)
    {
        Outcome = outcome;
        Path = path;
        LowerBound = lowerBound;
        NodeCount = nodeCount;
    }

    /// <summary>How the search ended.</summary>
    public BoundedOutcome Outcome { get; }

    /// <summary>A shortest word, replayed before it was given; null where none was found.</summary>
    public TurnPath? Path { get; }

    /// <summary>Proven: no word is shorter than this, counted by the metric. Where a word was found, its length; null where there is no word at all.</summary>
    public long? LowerBound { get; }

    /// <summary>The nodes tried. As <see cref="BoundedOptions.MaxNodes"/> it gives the same answer again, on any machine and with any number of threads.</summary>
    public long NodeCount { get; }

    /// <summary>True when a word was found.</summary>
    [MemberNotNullWhen(true, nameof(Path))]
    public bool HasPath => Path is not null;
}
