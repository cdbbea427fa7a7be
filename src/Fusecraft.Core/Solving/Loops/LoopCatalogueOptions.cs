namespace Fusecraft.Solving;

/// <summary>How far to look for useful loops.</summary>
public sealed class LoopCatalogueOptions
{
    /// <summary>The defaults.</summary>
    public static LoopCatalogueOptions Default { get; } = new();

    /// <summary>How lengths are counted.</summary>
    public Metric Metric { get; init; } = Metric.Step;

    /// <summary>Loops of at most this length are listed; null for as long as the budgets allow.</summary>
    public int? MaxLength { get; init; }

    /// <summary>Loops are listed that move or turn at most so many blocks and single pieces.</summary>
    public int MaxMoved { get; init; } = 4;

    /// <summary>The search ends when it holds this many states on the way out, or on the way back. Takes some 100 bytes a state on a cube of 54 sites.</summary>
    public int MaxStates { get; init; } = 300_000;

    /// <summary>The search ends when it has compared so many pairs of a way out and a way back.</summary>
    public long MaxPairs { get; init; } = 100_000_000;

    /// <summary>The search ends when it has found so many loops.</summary>
    public int MaxLoops { get; init; } = 10_000;
}
