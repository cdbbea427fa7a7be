namespace Fusecraft.Groupoids;

/// <summary>What a loop does to a block.</summary>
public enum BlockMotion
{
    /// <summary>Every label of the block is where it was.</summary>
    Still,

    /// <summary>The block is in its place, but its labels are not: it has been turned there.</summary>
    Turned,

    /// <summary>The block has gone to the place of another.</summary>
    Moved,
}
