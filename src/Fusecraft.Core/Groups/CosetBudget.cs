namespace Fusecraft.Groups;

/// <summary>How many cosets may still be looked at.</summary>
internal sealed class CosetBudget(long cosets)
{
    private long _left = cosets;

    /// <summary>Takes one from the budget; false when nothing is left.</summary>
    public bool TrySpend() => _left > 0 && _left-- > 0;
}
