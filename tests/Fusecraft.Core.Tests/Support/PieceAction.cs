using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Support;

/// <summary>What a permutation of the sites does to pieces and to blocks.</summary>
internal static class PieceAction
{
    /// <summary>The permutation of the given pieces, numbered by their places in the list.</summary>
    public static Permutation Of(Mechanism mechanism, Permutation sites, IReadOnlyList<int> pieces) =>
        Permutation.FromImages([.. pieces.Select(piece => IndexOf(pieces, ImageOf(mechanism, sites, piece)))]);

    /// <summary>The permutation of the given sets of pieces, which must be carried to each other.</summary>
    public static Permutation OfBlocks(Mechanism mechanism, Permutation sites, ImmutableArray<ImmutableArray<int>> blocks)
    {
        var images = new int[blocks.Length];
        for (var i = 0; i < images.Length; i++)
        {
            var image = blocks[i].Select(piece => ImageOf(mechanism, sites, piece)).ToHashSet();
            images[i] = Enumerable.Range(0, blocks.Length).Single(k => image.SetEquals(blocks[k]));
        }

        return Permutation.FromImages(images);
    }

    public static int ImageOf(Mechanism mechanism, Permutation sites, int piece) =>
        mechanism.SitesOfPiece[piece].IsEmpty ? piece : mechanism.PieceOfSite[sites[mechanism.SitesOfPiece[piece][0]]];

    private static int IndexOf(IReadOnlyList<int> pieces, int piece) => Enumerable.Range(0, pieces.Count).Single(i => pieces[i] == piece);
}
