namespace Fusecraft.Mechanisms;

/// <summary>The kinds of <see cref="Goal"/>.</summary>
public enum GoalKind
{
    /// <summary>Every label home.</summary>
    Home,

    /// <summary>The home shape, labels anywhere.</summary>
    Shape,

    /// <summary>The home shape and colouring.</summary>
    Colours,

    /// <summary>Some marks at given sites.</summary>
    Marks,

    /// <summary>Some labels home.</summary>
    Sites,
}
