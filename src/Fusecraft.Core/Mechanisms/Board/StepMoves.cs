using System.Numerics;
using System.Runtime.CompilerServices;

namespace Fusecraft.Mechanisms;

/// <summary>What one step does to shapes: the masks that say whether it is free, and where it takes each token.</summary>
internal sealed class StepMoves
{
    private readonly int _words;

    // Alternatives one after the other, each the needed slots, then the barring ones (with all bonds that would be torn).
    private readonly ulong[] _guards;
    private readonly ulong[] _moved;
    private readonly int[] _targets;
    private readonly int[] _sources;

    // The conditions in code, one an alternative; null where there are none at all.
    private readonly Mechanism _mechanism;
    private readonly GuardTerm[]? _conditions;

    /// <param name="mechanism">The mechanism.</param>
    /// <param name="words">The number of words of a key.</param>
    /// <param name="targets">For each slot the one its token comes to, or -1 where the token would be torn.</param>
    /// <param name="terms">The alternatives of the guard.</param>
    /// <param name="slotOf">The slot of a mark; null where the mark can never be there.</param>
    public StepMoves(Mechanism mechanism, int words, int[] targets, IReadOnlyList<GuardTerm> terms, Func<Slot, int?> slotOf)
    {
        _mechanism = mechanism;
        _words = words;
        _targets = targets;
        _moved = new ulong[words];
        var torn = new ulong[words];
        for (var slot = 0; slot < targets.Length; slot++)
        {
            if (targets[slot] < 0)
            {
                torn[slot >> 6] |= 1UL << slot;
            }
            else if (targets[slot] != slot)
            {
                _moved[slot >> 6] |= 1UL << slot;
            }
        }

        var guards = new List<ulong>();
        var kept = new List<GuardTerm>();
        foreach (var term in terms)
        {
            var needs = new ulong[words];
            var bars = (ulong[])torn.Clone();

            // A mark that can never be there is never needed in vain by a kept alternative, and never bars.
            if (!term.Needs.All(need => TrySet(needs, slotOf(need))))
            {
                continue;
            }

            foreach (var bar in term.BarredBy)
            {
                TrySet(bars, slotOf(bar));
            }

            guards.AddRange(needs);
            guards.AddRange(bars);
            kept.Add(term);
        }

        _guards = [.. guards];
        _conditions = kept.TrueForAll(term => term.When is null) ? null : [.. kept];
        _sources = Sources();
    }

    /// <summary>The number of alternatives of the guard; where there is none the step is never free.</summary>
    public int AlternativeCount => _guards.Length / (2 * _words);

    /// <summary>True when a condition in code has a say, so that the masks alone do not tell whether the step is free.</summary>
    public bool HasConditions => _conditions is not null;

    /// <summary>For each slot the one its token comes to, or -1 where the token would be torn.</summary>
    public ReadOnlySpan<int> Targets => _targets;

    /// <summary>The slots that an alternative needs.</summary>
    public ReadOnlySpan<ulong> Needs(int alternative) => _guards.AsSpan(2 * alternative * _words, _words);

    /// <summary>The slots that bar an alternative, those that would be torn among them.</summary>
    public ReadOnlySpan<ulong> Bars(int alternative) => _guards.AsSpan(((2 * alternative) + 1) * _words, _words);

    /// <summary>True when one alternative of the guard holds and nothing would be torn.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public bool IsFree(ReadOnlySpan<ulong> key) => _words == 1 ? IsFree<OneWord>(key) : IsFree<ManyWords>(key);

    /// <summary>Writes the shape after the step, which must be free.</summary>
    public void Move(ReadOnlySpan<ulong> key, Span<ulong> next)
    {
        if (_words == 1)
        {
            Move<OneWord>(key, next);
        }
        else
        {
            Move<ManyWords>(key, next);
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public bool IsFree<TWidth>(ReadOnlySpan<ulong> key)
        where TWidth : struct, IShapeWidth
    {
        var words = TWidth.Words(_words);
        var guards = _guards;
        for (var at = 0; at + (2 * words) <= guards.Length; at += 2 * words)
        {
            var unmet = 0UL;
            for (var i = 0; i < words; i++)
            {
                unmet |= (guards[at + i] & ~key[i]) | (guards[at + words + i] & key[i]);
            }

            if (unmet == 0 && (_conditions is null || Holds(_conditions[at / (2 * words)], key)))
            {
                return true;
            }
        }

        return false;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public void Move<TWidth>(ReadOnlySpan<ulong> key, Span<ulong> next)
        where TWidth : struct, IShapeWidth
    {
        var words = TWidth.Words(_words);
        for (var i = 0; i < words; i++)
        {
            next[i] = key[i] & ~_moved[i];
        }

        for (var i = 0; i < words; i++)
        {
            for (var tokens = key[i] & _moved[i]; tokens != 0; tokens &= tokens - 1)
            {
                var target = _targets[(i << 6) + BitOperations.TrailingZeroCount(tokens)];
                next[target >> 6] |= 1UL << target;
            }
        }
    }

    /// <summary>Writes the shape before the step.</summary>
    public void MoveBack(ReadOnlySpan<ulong> key, Span<ulong> previous)
    {
        for (var i = 0; i < _words; i++)
        {
            previous[i] = key[i] & ~_moved[i];
        }

        for (var i = 0; i < _words; i++)
        {
            for (var tokens = key[i] & _moved[i]; tokens != 0; tokens &= tokens - 1)
            {
                var source = _sources[(i << 6) + BitOperations.TrailingZeroCount(tokens)];
                previous[source >> 6] |= 1UL << source;
            }
        }
    }

    // Nothing would be torn, so there is a shape where the step ends.
    private bool Holds(GuardTerm term, ReadOnlySpan<ulong> key)
    {
        if (term.When is null || !term.IsReadAtEnd)
        {
            return term.When?.Invoke(new Shape(_mechanism, key)) ?? true;
        }

        var end = new ulong[_words];
        Move(key, end);
        return term.When(new Shape(_mechanism, end));
    }

    private int[] Sources()
    {
        var sources = new int[_targets.Length];
        for (var slot = 0; slot < _targets.Length; slot++)
        {
            if (_targets[slot] >= 0)
            {
                sources[_targets[slot]] = slot;
            }
        }

        return sources;
    }

    private static bool TrySet(ulong[] mask, int? slot)
    {
        if (slot is { } known)
        {
            mask[known >> 6] |= 1UL << known;
        }

        return slot is not null;
    }
}
