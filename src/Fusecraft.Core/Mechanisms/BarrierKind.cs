namespace Fusecraft.Mechanisms;

/// <summary>What can bar a step.</summary>
public enum BarrierKind
{
    /// <summary>The step would carry only a part of a block.</summary>
    TornBlock,

    /// <summary>A mark is missing, or one is in the way.</summary>
    Guard,

    /// <summary>The turn goes one way only; there is no such step.</summary>
    OneWay,

    /// <summary>Several steps are written with the name, and none of them is free.</summary>
    NoneFree,
}
