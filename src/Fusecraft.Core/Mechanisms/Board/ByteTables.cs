using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Fusecraft.Mechanisms;

/// <summary>
/// For keys of one word: what each value of each byte of a key contributes to the guards and to the shape after each step. A guard is the AND over the bytes, a move the OR.
/// </summary>
internal sealed class ByteTables
{
    private readonly int _bytes;
    private readonly ulong[] _free;
    private readonly ulong[] _moves;
    private readonly StepMasks _masks;

    public ByteTables(ShapeBoard board, StepMasks masks)
    {
        _masks = masks;
        _bytes = Math.Max(1, (board.SlotCount + 7) / 8);
        _free = new ulong[_bytes * 256];
        _moves = new ulong[board.Moves.Length * _bytes * 256];
        for (var at = 0; at < _bytes; at++)
        {
            FillFree(board, at);
            for (var step = 0; step < board.Moves.Length; step++)
            {
                FillMoves(board.Moves[step], at, _moves.AsSpan(((step * _bytes) + at) * 256, 256));
            }
        }
    }

    /// <summary>The free steps of a shape.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ulong FreeSteps(ulong key)
    {
        ref var free = ref MemoryMarshal.GetArrayDataReference(_free);
        var terms = free.At(key & 255);
        for (var at = 1; at < _bytes; at++)
        {
            key >>= 8;
            terms &= free.At((key & 255) + (uint)(at << 8));
        }

        return _masks.StepsOf(terms);
    }

    /// <summary>The shape after a free step.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ulong Move(int step, ulong key)
    {
        ref var table = ref Unsafe.Add(ref MemoryMarshal.GetArrayDataReference(_moves), (nint)(uint)(step * _bytes) << 8);
        var next = table.At(key & 255);
        for (var at = 1; at < _bytes; at++)
        {
            key >>= 8;
            next |= table.At((key & 255) + (uint)(at << 8));
        }

        return next;
    }

    private void FillFree(ShapeBoard board, int at)
    {
        for (var value = 0; value < 256; value++)
        {
            var key = (ulong)value << (8 * at);
            var here = 255UL << (8 * at);
            var terms = 0UL;
            for (var i = 0; i < _masks.Terms.Length; i++)
            {
                var (step, alternative) = _masks.Terms[i];
                if (step >= 0 && (board.Moves[step].Needs(alternative)[0] & here & ~key) == 0 && (board.Moves[step].Bars(alternative)[0] & key) == 0)
                {
                    terms |= 1UL << i;
                }
            }

            _free[(at * 256) + value] = terms;
        }
    }

    // A value's move is that of its lowest token and that of the others together.
    private static void FillMoves(StepMoves moves, int at, Span<ulong> table)
    {
        for (var value = 1; value < 256; value++)
        {
            var slot = (8 * at) + int.TrailingZeroCount(value);
            var target = slot < moves.Targets.Length ? moves.Targets[slot] : -1;
            table[value] = table[value & (value - 1)] | (target < 0 ? 0 : 1UL << target);
        }
    }
}
