using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Support;

/// <summary>Translates the library's shapes into the naive ones.</summary>
internal static class NaiveReading
{
    public static NaiveShape Of(Shape shape)
    {
        var mechanism = shape.Mechanism;
        return new NaiveShape(
            [.. shape.Marks.Select(mark => $"{mark.Mark}@{mechanism.SiteNames[mark.Site]}")],
            [.. shape.Blocks.Select(block => block.SelectMany(piece => mechanism.SitesOfPiece[piece]).Select(site => mechanism.SiteNames[site]).ToHashSet())]);
    }
}
