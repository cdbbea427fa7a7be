using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

// Chains that are proven by meeting a bound of the order.
internal sealed partial class ChainBuilder<T>
{
    /// <summary>A chain that holds so many random elements in a row is taken for the whole group, so that a bound not met by then never will be.</summary>
    private const int QuietForBound = 10;

    /// <summary>
    /// Instead of a proof: sifts random elements of the whole group until a number that its order is known not to exceed is met, which proves the chain, or until several in a row were held. What is left of an
    /// element goes to the level where it fell out, so a level takes two or three elements. If the bound is not met this builder is of no further use but for another bound, for its levels need not be generated
    /// by those above.
    /// </summary>
    public bool TryReachBound(BigInteger bound, CancellationToken cancellation = default)
    {
        _orderBound = bound;
        if (ReachesBound())
        {
            return IsProven = true;
        }

        _tables.SharesGenerators = true;
        for (var quiet = 0; quiet < QuietForBound && _tables.Count > 0; quiet++)
        {
            cancellation.ThrowIfCancellationRequested();
            _tables[0].Walk.Next(_random).CopyTo(_sifted);
            var level = SiftInOrder();
            if (level < 0)
            {
                continue;
            }

            quiet = -1;
            _sifted.CopyTo(_product);
            Insert(level, _product);
            if (ReachesBound())
            {
                return IsProven = true;
            }
        }

        return false;
    }

    /// <summary>Some members that fix the first base point, after a few random elements where there are none yet.</summary>
    public Permutation[] SecondLevelGenerators()
    {
        for (var draw = 0; draw < QuietForBound && _tables.Count > 0 && (_tables.Count < 2 || _tables[1].Generators.Count < 2); draw++)
        {
            _tables[0].Walk.Next(_random).CopyTo(_sifted);
            if (SiftInOrder() is > 0 and var level)
            {
                _sifted.CopyTo(_product);
                Insert(level, _product);
            }
        }

        return _tables.Count < 2 ? [] : [.. _tables.OwnGenerators(1)];
    }

    // Sifts and gives the level where the element fell out, as one does that moves a point which comes before the level's base point; -1 where it was held.
    private int SiftInOrder()
    {
        var position = 0;
        for (var i = 0; i < _tables.Count; i++)
        {
            var level = _tables[i];
            for (; position < level.Position; position++)
            {
                if (_sifted[_candidates[position]] != T.CreateTruncating(_candidates[position]))
                {
                    return i;
                }
            }

            var slot = level.Slots[int.CreateTruncating(_sifted[level.Point])];
            if (slot < 0)
            {
                return i;
            }

            if (slot > 0)
            {
                Lanes.ComposePadded<T>(_sifted, level.Inverses[slot], _sifted);
            }
        }

        return _sifted.AsSpan().SequenceEqual(_tables.Identity) ? -1 : _tables.Count;
    }

    private bool ReachesBound()
    {
        if (_orderBound is not { } bound)
        {
            return false;
        }

        // The exact product of hundreds of orbit lengths is taken only where the logarithms come near.
        if (_tables.LogOrder < BigInteger.Log(bound) - 0.5)
        {
            return false;
        }

        var order = _tables.Order;
        return order > bound
            ? throw new ArgumentException($"The order bound {bound} is wrong: the group has at least {order} elements.", "orderBound")
            : order == bound;
    }
}
