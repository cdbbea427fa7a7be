using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

// Shapes moved by other things than steps.
internal sealed partial class ShapeBoard
{
    /// <summary>For each slot the one that a permutation of the sites takes it to; null where it takes pieces apart or a slot out of the board.</summary>
    public int[]? SlotsMoved(Permutation sites)
    {
        if (PieceMapOrNull(sites) is not { } pieceMap)
        {
            return null;
        }

        var targets = new int[_slots.Count];
        for (var slot = 0; slot < targets.Length; slot++)
        {
            if (!_slotOf.TryGetValue(_slots[slot].Moved(sites, pieceMap), out targets[slot]))
            {
                return null;
            }
        }

        return targets;
    }

    /// <summary>The key of the shape with these blocks, each as ascending pieces, and marks; null where a token can never be there.</summary>
    public ulong[]? KeyOf(IEnumerable<ImmutableArray<int>> blocks, IEnumerable<(string Mark, int Site)> marks)
    {
        var key = new ulong[Words];
        foreach (var block in blocks)
        {
            foreach (var (a, b) in Bonds(block))
            {
                if (!_slotOf.TryGetValue(Slot.OfBond(a, b), out var slot))
                {
                    return null;
                }

                Set(key, slot);
            }
        }

        foreach (var (mark, site) in marks)
        {
            if (!_slotOf.TryGetValue(Slot.OfMark(mark, site), out var slot))
            {
                return null;
            }

            Set(key, slot);
        }

        return key;
    }
}
