using System.Collections.Immutable;
using System.Text;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>One loop of a <see cref="LoopBasis"/>.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class BasisLoop
{
    internal BasisLoop(TurnPath path)
    {
        Path = path;
        Blocks = [.. path.Source.Blocks.Select(MoveOf)];
    }

    /// <summary>The loop: its steps, its word and its permutation.</summary>
    public TurnPath Path { get; }

    /// <summary>The number of steps.</summary>
    public int Length => Path.Length;

    /// <summary>Where the loop takes the label on each site.</summary>
    public Permutation Permutation => Path.Permutation;

    /// <summary>The cycle type of <see cref="Permutation"/> on the sites.</summary>
    public CycleType CycleType => Permutation.CycleType;

    /// <summary>What the loop does to each block of the base shape, in the order of the shape's blocks.</summary>
    public ImmutableArray<BlockMove> Blocks { get; }

    /// <summary>
    /// What the loop does to blocks, by piece names: <c>([UF UFR] [DL DBL])</c> when two trade places, <c>[UF UFR] turned</c> for one that turns in its place; empty when all keep still.
    /// </summary>
    public string DescribeBlocks()
    {
        var text = new StringBuilder();
        var isDone = new bool[Blocks.Length];
        for (var i = 0; i < Blocks.Length; i++)
        {
            if (isDone[i] || Blocks[i].Motion == BlockMotion.Still)
            {
                continue;
            }

            text.Append(text.Length > 0 ? " " : "");
            if (Blocks[i].Motion == BlockMotion.Turned)
            {
                text.Append(NameOf(i)).Append(" turned");
                continue;
            }

            var cycle = new List<string>();
            for (var at = i; !isDone[at]; at = IndexOf(Blocks[at].Target))
            {
                isDone[at] = true;
                cycle.Add(NameOf(at));
            }

            text.Append('(').AppendJoin(' ', cycle).Append(')');
        }

        return text.ToString();
    }

    /// <summary>The word.</summary>
    public override string ToString() => Path.ToString();

    private string NameOf(int block) => $"[{string.Join(' ', Blocks[block].Block.Select(piece => Path.Mechanism.PieceNames[piece]))}]";

    private int IndexOf(ImmutableArray<int> block)
    {
        var index = 0;
        while (!Blocks[index].Block.SequenceEqual(block))
        {
            index++;
        }

        return index;
    }

    private BlockMove MoveOf(ImmutableArray<int> block)
    {
        var mechanism = Path.Mechanism;

        // A piece without sites, such as a hidden core, never moves.
        ImmutableArray<int> target = [.. block.Select(piece => mechanism.SitesOfPiece[piece] is [var site, ..] ? mechanism.PieceOfSite[Permutation[site]] : piece).Order()];
        var isStill = block.All(piece => mechanism.SitesOfPiece[piece].All(site => Permutation[site] == site));
        return new BlockMove(block, target, isStill ? BlockMotion.Still : target.SequenceEqual(block) ? BlockMotion.Turned : BlockMotion.Moved);
    }
}
