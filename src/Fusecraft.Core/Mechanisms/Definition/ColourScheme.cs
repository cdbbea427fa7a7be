using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>Which labels look alike.</summary>
public sealed class ColourScheme
{
    private ColourScheme(ColourSchemeKind kind, ImmutableArray<ImmutableArray<string>> alike)
    {
        Kind = kind;
        AlikeSites = alike;
    }

    /// <summary>Every label looks different from every other.</summary>
    public static ColourScheme Distinct { get; } = new(ColourSchemeKind.Distinct, []);

    /// <summary>The labels of one face look alike; for families that have faces.</summary>
    public static ColourScheme Faces { get; } = new(ColourSchemeKind.Faces, []);

    /// <summary>Which kind of scheme this is.</summary>
    public ColourSchemeKind Kind { get; }

    /// <summary>For <see cref="ColourSchemeKind.Alike"/> the lists of sites whose labels look alike; sites in no list look different from all others. Else empty.</summary>
    public ImmutableArray<ImmutableArray<string>> AlikeSites { get; }

    /// <summary>The labels of the sites of each list look alike.</summary>
    /// <param name="lists">Disjoint lists of site names.</param>
    public static ColourScheme Alike(params IEnumerable<ImmutableArray<string>> lists) => new(ColourSchemeKind.Alike, [.. lists]);
}
