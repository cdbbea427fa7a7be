using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>A move that is free on the way but leads on no shortest word: one wrong step, or where runs are counted one wrong run.</summary>
/// <param name="Steps">The steps of the move; just one unless runs are counted.</param>
/// <param name="Detour">How much longer the shortest word through this move is, at least 1. Null where no way leads from it to the goal any more, or where that is not known: see <see cref="IsLost"/>.</param>
/// <param name="IsLost">True where it is proven that no way leads from it to the goal any more; null where a budget ended before that was known.</param>
public sealed record LevelMove(ImmutableArray<Step> Steps, int? Detour, bool? IsLost);
