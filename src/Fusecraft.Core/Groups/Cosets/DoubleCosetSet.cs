using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>Distinct double cosets H·x·V of two groups, each with the number of its members.</summary>
/// <remarks>
/// H·x·V is made of cosets of the larger group, an orbit under the smaller one. Few of them are listed, so that asking whether a permutation lies in one is a look-up. Where there are many, the double coset is
/// asked about by search; and where that takes too long, listed after all, as far as the budget goes.
/// </remarks>
internal sealed class DoubleCosetSet
{
    /// <summary>From so many cosets on a search is tried.</summary>
    private const int ManyCosets = 2048;

    private readonly PermutationGroup _larger;
    private readonly PermutationGroup _smaller;
    private readonly bool _isInverted;
    private readonly CosetBudget _budget;
    private readonly CancellationToken _cancellation;
    private readonly HashSet<Permutation> _listed = [];
    private readonly List<WideDoubleCoset> _wide = [];
    private readonly List<(Permutation Representative, BigInteger Size)> _entries = [];

    public DoubleCosetSet(PermutationGroup h, PermutationGroup v, CosetBudget budget, CancellationToken cancellation)
    {
        // (H·x·V)⁻¹ = V·x⁻¹·H.
        _isInverted = v.Order > h.Order;
        (_larger, _smaller) = _isInverted ? (v, h) : (h, v);
        _budget = budget;
        _cancellation = cancellation;
    }

    /// <summary>A member of each double coset, and how many there are in it.</summary>
    public IReadOnlyList<(Permutation Representative, BigInteger Size)> Entries => _entries;

    /// <summary>Adds the double coset of a permutation where it is new. False when that could not be decided within the budget; then the set is of no more use.</summary>
    public bool TryAdd(Permutation x, out bool isNew)
    {
        isNew = false;
        if (!_budget.TrySpend())
        {
            return false;
        }

        var walk = new CosetWalk(_larger, _smaller, _isInverted ? x.Inverse() : x);
        var first = walk.Representatives[0];
        if (_listed.Contains(first))
        {
            return true;
        }

        foreach (var wide in _wide)
        {
            switch (wide.Contains(first, _budget))
            {
                case null:
                    return false;
                case true:
                    _listed.Add(first);
                    return true;
            }
        }

        isNew = true;
        var triesSearch = true;
        while (!walk.IsClosed)
        {
            _cancellation.ThrowIfCancellationRequested();
            if (triesSearch && walk.Representatives.Count > ManyCosets)
            {
                triesSearch = false;
                if (WideDoubleCoset.TryMake(_larger, _smaller, first, _budget, _cancellation) is { } wide)
                {
                    _wide.Add(wide);
                    _listed.Add(first);
                    _entries.Add((x, wide.Size));
                    return true;
                }
            }

            if (!walk.TryAdvance(_budget))
            {
                return false;
            }
        }

        _listed.UnionWith(walk.Representatives);
        _entries.Add((x, walk.Representatives.Count * _larger.Order));
        return true;
    }
}
