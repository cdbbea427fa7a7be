namespace Fusecraft.Groupoids;

/// <summary>How a loop basis is looked for.</summary>
public sealed class LoopBasisOptions
{
    /// <summary>Enough for most puzzles, in seconds.</summary>
    public static LoopBasisOptions Default { get; } = new();

    /// <summary>
    /// How many states (arrangements of the labels) may be held while all loops are tried in the order of their lengths. What is still missing when they run out is made of loops along a spanning tree.
    /// </summary>
    public int MaxStates { get; init; } = 1 << 18;

    /// <summary>
    /// Symmetries of the mechanism that tell which loops are copies of one another, as far as they take the base shape to itself; null for those of <see cref="SymmetryGroup.Of"/>.
    /// </summary>
    public SymmetryGroup? Symmetries { get; init; }
}
