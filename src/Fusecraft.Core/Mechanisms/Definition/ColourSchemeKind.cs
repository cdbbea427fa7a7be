namespace Fusecraft.Mechanisms;

/// <summary>The kinds of <see cref="ColourScheme"/>.</summary>
public enum ColourSchemeKind
{
    /// <summary>All labels look different.</summary>
    Distinct,

    /// <summary>One colour a face.</summary>
    Faces,

    /// <summary>Lists of sites with labels that look alike.</summary>
    Alike,
}
