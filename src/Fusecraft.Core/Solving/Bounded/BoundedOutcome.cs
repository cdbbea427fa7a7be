namespace Fusecraft.Solving;

/// <summary>How a bounded search ended.</summary>
public enum BoundedOutcome
{
    /// <summary>A word was found, and it is proven that none is shorter.</summary>
    Found,

    /// <summary>Proven: there is no word within the bound; perhaps there are longer ones.</summary>
    NoneWithinBound,

    /// <summary>Proven: there is no word at all, of whatever length.</summary>
    NoneAtAll,

    /// <summary>A budget ended the search; what it has proven until then is the lower bound.</summary>
    BudgetEnded,
}
