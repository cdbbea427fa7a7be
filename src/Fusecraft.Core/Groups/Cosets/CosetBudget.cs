namespace Fusecraft.Groups;

/// <summary>How many cosets may still be looked at; a trial of a search costs as much as a coset.</summary>
internal sealed class CosetBudget(long cosets)
{
    private long _left = cosets;

    /// <summary>Takes some from the budget; false when fewer are left.</summary>
    public bool TrySpend(long cosets = 1)
    {
        _left -= cosets;
        return _left >= 0;
    }
}
