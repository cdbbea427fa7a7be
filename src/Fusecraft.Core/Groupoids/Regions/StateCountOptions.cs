namespace Fusecraft.Groupoids;

/// <summary>How much work counting states over several regions may take.</summary>
public sealed class StateCountOptions
{
    /// <summary>Up to 250,000 cosets.</summary>
    public static StateCountOptions Default { get; } = new();

    /// <summary>So many passages, cosets and trials of searches may be looked at, in all; at least 0. Each takes about a composition a level of a stabilizer chain, and memory for about two permutations.</summary>
    public long MaxCosets { get; init; } = 250_000;
}
