namespace Fusecraft.Solving;

/// <summary>What a loop does to pieces and blocks, roughly.</summary>
public enum LoopEffectKind
{
    /// <summary>Nothing at all.</summary>
    None,

    /// <summary>Pieces or blocks are turned in their places; none goes elsewhere.</summary>
    Twist,

    /// <summary>Two trade places.</summary>
    Swap,

    /// <summary>Two pairs trade places.</summary>
    DoubleSwap,

    /// <summary>Three go round.</summary>
    ThreeCycle,

    /// <summary>Anything else.</summary>
    Other,
}
