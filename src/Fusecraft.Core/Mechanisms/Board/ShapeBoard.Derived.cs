using System.Security.Cryptography;

namespace Fusecraft.Mechanisms;

// What follows from slots and moves: other forms of the same for faster exploration, made once when asked for; a fingerprint.
internal sealed partial class ShapeBoard
{
    private volatile ShapeProduct? _product;

    /// <summary>The steps that are free in a shape as the bits of one word; null where there are too many, or conditions in code.</summary>
    public StepMasks? Masks => _masks.Value;

    /// <summary>Moves by table look-up, for keys of one word; null where there is no such thing. Made at the first call, which takes some tens of microseconds.</summary>
    public ByteTables? ByteTables => _byteTables.Value;

    /// <summary>True when there is nothing in a key but slots.</summary>
    public bool HasOnlySlots(ReadOnlySpan<ulong> key)
    {
        for (var word = 0; word < key.Length; word++)
        {
            var slots = Math.Clamp(_slots.Count - (64 * word), 0, 64);
            if (slots < 64 && key[word] >> slots != 0)
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>
    /// A SHA-256 of all that shapes and steps depend on: the slots in their order, then of each step the target of each slot and the masks of each alternative of the guard. Names of steps and
    /// pieces, labels, goal and colours have no part in it.
    /// </summary>
    /// <exception cref="NotSupportedException">A turn has a guard written in code.</exception>
    public byte[] Fingerprint()
    {
        if (Array.FindIndex(_moves, moves => moves.HasConditions) is >= 0 and var coded)
        {
            throw new NotSupportedException($"Turn {_mechanism.Steps[coded].Turn.Name} has a guard written in code, which a file cannot hold.");
        }

        using var text = new MemoryStream();
        using var writer = new BinaryWriter(text);
        writer.Write(_slots.Count);
        foreach (var slot in _slots)
        {
            writer.Write(slot.Mark ?? "");
            writer.Write(slot.A);
            writer.Write(slot.B);
        }

        writer.Write(_moves.Length);
        foreach (var moves in _moves)
        {
            foreach (var target in moves.Targets)
            {
                writer.Write(target);
            }

            writer.Write(moves.AlternativeCount);
            for (var alternative = 0; alternative < moves.AlternativeCount; alternative++)
            {
                foreach (var word in (ReadOnlySpan<ulong>)[.. moves.Needs(alternative), .. moves.Bars(alternative)])
                {
                    writer.Write(word);
                }
            }
        }

        writer.Flush();
        return SHA256.HashData(text.ToArray());
    }

    /// <summary>The tracks of this board, kept once made; null where they would have more than so many positions, or the steps do not fit them.</summary>
    public ShapeProduct? ProductWithin(int maxPositions)
    {
        if (_product is { } product)
        {
            return product.PositionCount <= maxPositions ? product : null;
        }

        return Masks is { } masks ? _product = ShapeProduct.Of(this, masks, maxPositions) : null;
    }
}
