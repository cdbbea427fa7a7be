namespace Fusecraft.Mechanisms;

/// <summary>
/// The cube of <c>Size</c> layers a side that turns beyond each of its cut planes. Sites are all facelets; pieces are the surface cells and, for odd sizes, the hidden core.
/// </summary>
/// <remarks>
/// A turn is a quarter turn of all layers beyond one cut plane, on the side away from the fixed reference (the core for odd sizes, the corner DBL for
/// even ones), clockwise as seen from that face: <c>U</c> one layer, <c>Uw</c> two, <c>3Uw</c> three, and so on.
/// </remarks>
public sealed partial class CubeFamily : MechanismFamily
{
    /// <summary>Describes a cube.</summary>
    /// <param name="size">Layers a side, 2 to 100; checked when the mechanism is made.</param>
    /// <param name="centreTwist">For odd sizes: replaces each face centre facelet by four sites, so that its twist counts.</param>
    public CubeFamily(int size, bool centreTwist = false)
    {
        Size = size;
        CentreTwist = centreTwist;
    }

    /// <inheritdoc/>
    public override string Kind => "cube";

    /// <summary>Layers a side.</summary>
    public int Size { get; }

    /// <summary>True when the twist of the face centres counts.</summary>
    public bool CentreTwist { get; }
}
