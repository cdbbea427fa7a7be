namespace Fusecraft.Groupoids;

/// <summary>An arrow of a region which, removed together with the arrow that undoes it, leaves shapes of the region that can no longer all reach each other.</summary>
/// <param name="There">The arrow; where it can be undone, the one of the two that starts in the shape with the smaller number.</param>
/// <param name="Back">The arrow that undoes it, with the inverse permutation; null where none is free.</param>
public readonly record struct Bridge(Arrow There, Arrow? Back);
