using System.Collections.Immutable;
using System.Numerics;

namespace Fusecraft.Mechanisms;

/// <summary>
/// A shape as one number. The slots fall into tracks: tokens move along their track and never to another. What lies on a track, its position, is one of few, a shape is a tuple of positions,
/// a step moves each track on its own and its guard is an AND over the tracks. So with the positions numbered and their steps tabulated, doing a step is one addition a track.
/// </summary>
internal sealed class ShapeProduct
{
    /// <summary>Tracks are taken together as long as they have no more positions than this, for fewer look-ups.</summary>
    private const int JoinLimit = 4096;

    private ShapeProduct(ImmutableArray<ShapeTrack> tracks)
    {
        Tracks = tracks;
        Radices = new ulong[tracks.Length];
        Size = 1;
        for (var i = tracks.Length - 1; i >= 0; i--)
        {
            Radices[i] = Size;
            Size *= (ulong)tracks[i].Count;
        }

        PositionCount = tracks.Sum(track => track.Count);
    }

    public ImmutableArray<ShapeTrack> Tracks { get; }

    /// <summary>What one more in the position of each track adds to a shape's number.</summary>
    public ulong[] Radices { get; }

    /// <summary>The numbers of shapes are less than this.</summary>
    public ulong Size { get; }

    /// <summary>The number of positions of all tracks together.</summary>
    public int PositionCount { get; }

    /// <summary>The bytes that the tables take.</summary>
    public long Bytes => Tracks.Sum(track => track.Bytes);

    /// <summary>The tracks of the shapes that home's tokens can come to, guards being read track by track; null where there are too many positions, or too many shapes to number.</summary>
    public static ShapeProduct? Of(ShapeBoard board, StepMasks masks, int maxPositions)
    {
        var tracks = new List<ShapeTrack>();
        foreach (var mask in TracksOf(board))
        {
            if (ShapeTrack.Of(board, masks, mask, maxPositions - tracks.Sum(track => track.Count)) is not { } track)
            {
                return null;
            }

            tracks.Add(track);
        }

        while (tracks.Count > 1)
        {
            tracks.Sort((one, other) => one.Count.CompareTo(other.Count));
            if ((long)tracks[0].Count * tracks[1].Count > JoinLimit
                || ShapeTrack.Of(board, masks, [.. tracks[0].Slots.Zip(tracks[1].Slots, (one, other) => one | other)], JoinLimit) is not { } joined)
            {
                break;
            }

            tracks.RemoveRange(0, 2);
            tracks.Add(joined);
        }

        var size = tracks.Aggregate(BigInteger.One, (product, track) => product * track.Count);
        return size <= 1UL << 62 ? new ShapeProduct([.. tracks]) : null;
    }

    /// <summary>The number of a shape; false where it is none of the product.</summary>
    public bool TryEncode(ReadOnlySpan<ulong> key, out ulong code)
    {
        code = 0;
        for (var i = 0; i < Tracks.Length; i++)
        {
            var position = Tracks[i].PositionOf(key);
            if (position < 0)
            {
                return false;
            }

            code += (ulong)position * Radices[i];
        }

        return true;
    }

    /// <summary>Writes the key of a shape.</summary>
    public void Decode(ulong code, Span<ulong> key)
    {
        key.Clear();
        for (var i = 0; i < Tracks.Length; i++)
        {
            var (position, rest) = Math.DivRem(code, Radices[i]);
            code = rest;
            Tracks[i].AddTo(key, (int)position);
        }
    }

    // Slots between which tokens can move, as masks; slots that no token ever leaves or enters make tracks of their own.
    private static List<ulong[]> TracksOf(ShapeBoard board)
    {
        var root = Enumerable.Range(0, board.SlotCount).ToArray();
        foreach (var moves in board.Moves)
        {
            for (var slot = 0; slot < root.Length; slot++)
            {
                if (moves.Targets[slot] >= 0)
                {
                    root[Root(slot)] = Root(moves.Targets[slot]);
                }
            }
        }

        var masks = new SortedDictionary<int, ulong[]>();
        for (var slot = 0; slot < root.Length; slot++)
        {
            if (!masks.TryGetValue(Root(slot), out var mask))
            {
                masks.Add(Root(slot), mask = new ulong[board.Words]);
            }

            mask[slot >> 6] |= 1UL << slot;
        }

        return masks.Count == 0 ? [new ulong[board.Words]] : [.. masks.Values];

        int Root(int slot)
        {
            while (root[slot] != slot)
            {
                slot = root[slot] = root[root[slot]];
            }

            return slot;
        }
    }
}
