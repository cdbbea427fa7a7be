namespace Fusecraft.Mechanisms;

/// <summary>Some slots that tokens never leave or enter, with the positions that the tokens on them can come to and what each step does to a position.</summary>
internal sealed class ShapeTrack
{
    private readonly ShapeStore _positions;
    private readonly ulong[] _terms;
    private readonly int[] _next;

    private ShapeTrack(ulong[] slots, ShapeStore positions, ulong[] terms, int[] next)
    {
        Slots = slots;
        _positions = positions;
        _terms = terms;
        _next = next;
    }

    /// <summary>The slots, as a mask.</summary>
    public ulong[] Slots { get; }

    /// <summary>The number of positions.</summary>
    public int Count => _positions.Count;

    /// <summary>For each position, the alternatives of <see cref="StepMasks"/> that hold as far as this track goes.</summary>
    public ReadOnlySpan<ulong> Terms => _terms;

    /// <summary>For each position and step, the position after it; 0 where this track bars the step.</summary>
    public ReadOnlySpan<int> Next => _next;

    public long Bytes => ((4L + Slots.Length) * Count * sizeof(ulong)) + ((long)_next.Length * sizeof(int));

    /// <summary>Finds the positions by a search from home's; null where there are more than <paramref name="maxCount"/>.</summary>
    public static ShapeTrack? Of(ShapeBoard board, StepMasks masks, ulong[] slots, int maxCount)
    {
        var positions = new ShapeStore(board.Words);
        var key = new ulong[board.Words];
        var next = new ulong[board.Words];
        var allTerms = new List<ulong>();
        var allNext = new List<int>();
        And(board.HomeKey, slots, next);
        positions.FindOrAdd<ManyWords>(next);
        for (var position = 0; position < positions.Count; position++)
        {
            if (positions.Count > maxCount)
            {
                return null;
            }

            positions.Key(position).CopyTo(key);
            var terms = Holding(board, masks, slots, key);
            var steps = masks.StepsOf(terms);
            allTerms.Add(terms);
            for (var step = 0; step < masks.StepCount; step++)
            {
                var target = 0;
                if ((steps >> step & 1) != 0)
                {
                    board.Moves[step].Move(key, next);
                    target = positions.FindOrAdd<ManyWords>(next);
                }

                allNext.Add(target);
            }
        }

        positions.Trim();
        return new ShapeTrack(slots, positions, [.. allTerms], [.. allNext]);
    }

    /// <summary>The number of the position on this track in a shape; -1 where home's tokens cannot come to it.</summary>
    public int PositionOf(ReadOnlySpan<ulong> key)
    {
        Span<ulong> here = stackalloc ulong[8];
        here = key.Length <= here.Length ? here[..key.Length] : new ulong[key.Length];
        And(key, Slots, here);
        return _positions.Find(here);
    }

    /// <summary>Adds the tokens of a position to a key.</summary>
    public void AddTo(Span<ulong> key, int position)
    {
        var tokens = _positions.Key(position);
        for (var i = 0; i < key.Length; i++)
        {
            key[i] |= tokens[i];
        }
    }

    private static ulong Holding(ShapeBoard board, StepMasks masks, ulong[] slots, ulong[] key)
    {
        var terms = 0UL;
        for (var i = 0; i < masks.Terms.Length; i++)
        {
            var (step, alternative) = masks.Terms[i];
            if (step < 0)
            {
                continue;
            }

            var unmet = 0UL;
            var needs = board.Moves[step].Needs(alternative);
            var bars = board.Moves[step].Bars(alternative);
            for (var word = 0; word < key.Length; word++)
            {
                unmet |= (needs[word] & slots[word] & ~key[word]) | (bars[word] & key[word]);
            }

            terms |= unmet == 0 ? 1UL << i : 0;
        }

        return terms;
    }

    private static void And(ReadOnlySpan<ulong> key, ulong[] mask, Span<ulong> result)
    {
        for (var i = 0; i < mask.Length; i++)
        {
            result[i] = key[i] & mask[i];
        }
    }
}
