using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

// What loops do to sites, pieces and blocks.
public sealed partial class VertexGroup
{
    /// <summary>How loops move the labels of sites: the group itself. Point <c>i</c> is site <c>i</c>.</summary>
    public LoopAction ActionOnSites() => new(this, new GroupAction(Group, Groupoid.Mechanism.SiteCount, static member => member), Groupoid.Mechanism.SiteNames);

    /// <summary>How loops move pieces, turned within themselves or not. Point <c>i</c> is the place of piece <c>i</c> at home; a piece without sites never moves.</summary>
    public LoopAction ActionOnPieces()
    {
        var mechanism = Groupoid.Mechanism;
        return new LoopAction(
            this,
            new GroupAction(Group, mechanism.PieceCount, member => Permutation.FromTrustedImages<int>([.. Enumerable.Range(0, mechanism.PieceCount).Select(piece => PieceAfter(member, piece))])),
            mechanism.PieceNames);
    }

    /// <summary>How loops move blocks: which block of the base shape goes where. Point <c>i</c> is the i-th of the base shape's <see cref="Mechanisms.Shape.Blocks"/>.</summary>
    /// <remarks>A loop leads back to the base shape, so it carries each block to the place of one with as many pieces. Names are pieces in brackets, such as <c>[UF UFR]</c>.</remarks>
    public LoopAction ActionOnBlocks()
    {
        var mechanism = Groupoid.Mechanism;
        var blocks = Groupoid.ShapeAt(BaseShape).Blocks;
        var blockOf = new Dictionary<int, int>();
        for (var block = 0; block < blocks.Length; block++)
        {
            foreach (var piece in blocks[block])
            {
                blockOf.Add(piece, block);
            }
        }

        return new LoopAction(
            this,
            new GroupAction(Group, blocks.Length, member => Permutation.FromTrustedImages<int>([.. blocks.Select(block => blockOf[PieceAfter(member, block[0])])])),
            [.. blocks.Select(block => $"[{string.Join(' ', block.Select(piece => mechanism.PieceNames[piece]))}]")]);
    }

    private int PieceAfter(Permutation member, int piece)
    {
        var mechanism = Groupoid.Mechanism;
        var sites = mechanism.SitesOfPiece[piece];
        return sites.IsEmpty ? piece : mechanism.PieceOfSite[member[sites[0]]];
    }
}
