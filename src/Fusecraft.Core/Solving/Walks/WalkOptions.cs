using System.Collections.Immutable;

namespace Fusecraft.Solving;

/// <summary>What a random walk does each turn, and how far looking at it may go.</summary>
public sealed record WalkOptions
{
    /// <summary>The defaults.</summary>
    public static WalkOptions Default { get; } = new();

    /// <summary>Among which steps the walk chooses.</summary>
    public WalkChoice Choice { get; init; } = WalkChoice.FreeSteps;

    /// <summary>How likely steps are against each other, by the names of steps; those not named weigh 1. A weight is 0 or more; a step of weight 0 is never done.</summary>
    /// <remarks>Each sense of a turn is a step of its own: a half turn alone, which does the same in both senses, has two of them and is as likely as a quarter turn and its opposite together.</remarks>
    public IReadOnlyDictionary<string, double> Weights { get; init; } = ImmutableDictionary<string, double>.Empty;

    /// <summary>The probability, 0 or more and below 1, that a turn does nothing whatever is free.</summary>
    public double Holding { get; init; }

    /// <summary>The most states that a walk may have; it takes some 30 bytes a state.</summary>
    public int MaxStates { get; init; } = 20_000_000;

    /// <summary>How many threads work; 1 starts none. No answer depends on it, not in the last bit.</summary>
    public int DegreeOfParallelism { get; init; } = Environment.ProcessorCount;
}
