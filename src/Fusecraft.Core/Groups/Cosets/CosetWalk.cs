using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The right cosets of a group A that make up the double coset A·z·B, found one after the other: an orbit under multiplication by B's generators from the right.</summary>
internal sealed class CosetWalk
{
    private readonly PermutationGroup _a;
    private readonly PermutationGroup _b;
    private readonly HashSet<Permutation> _met;
    private readonly List<Permutation> _representatives;
    private int _next;

    public CosetWalk(PermutationGroup a, PermutationGroup b, Permutation z)
    {
        _a = a;
        _b = b;
        _representatives = [a.LeastOfCoset(z)];
        _met = [.. _representatives];
    }

    /// <summary>The first member, in lexicographic order, of each coset met so far.</summary>
    public IReadOnlyList<Permutation> Representatives => _representatives;

    /// <summary>True when all cosets are met.</summary>
    public bool IsClosed => _next == _representatives.Count;

    /// <summary>Looks where the next coset goes. False when the budget does not reach for the cosets met there.</summary>
    public bool TryAdvance(CosetBudget budget)
    {
        var from = _representatives[_next++];
        foreach (var generator in _b.Generators)
        {
            var image = _a.LeastOfCoset(from * generator);
            if (_met.Add(image))
            {
                _representatives.Add(image);
                if (!budget.TrySpend())
                {
                    return false;
                }
            }
        }

        return true;
    }
}
