namespace Fusecraft.Solving;

/// <summary>What pruning tables may take.</summary>
public sealed class PruningOptions
{
    /// <summary>The defaults.</summary>
    public static PruningOptions Default { get; } = new();

    /// <summary>The most bytes that a table may take; where several are chosen automatically, all of them together. While a table is filled, its step tables come on top.</summary>
    public long MaxBytes { get; init; } = 256L << 20;

    /// <summary>How many threads fill a table; 1 starts none.</summary>
    public int DegreeOfParallelism { get; init; } = Environment.ProcessorCount;

    /// <summary>A folder in which tables chosen automatically are kept and looked for; null to keep none. It must exist.</summary>
    public string? CacheFolder { get; init; }
}
