using System.Collections.Immutable;

namespace Fusecraft.Groupoids;

/// <summary>Where a loop takes a block.</summary>
/// <param name="Block">The block in the base shape, as ascending piece numbers.</param>
/// <param name="Target">The block of the base shape whose place it takes.</param>
/// <param name="Motion">Whether it moves there, turns in its place or keeps still.</param>
public readonly record struct BlockMove(ImmutableArray<int> Block, ImmutableArray<int> Target, BlockMotion Motion);
