using System.Collections.Immutable;

namespace Fusecraft.Solving;

/// <summary>Pieces or blocks that a loop carries round: each to the place of the next, the last to that of the first.</summary>
/// <param name="Bodies">Each a block of the base shape or a single piece, as ascending piece numbers; just one where it is turned in its place.</param>
/// <param name="Twist">How often the loop has to bring each of them back to its place until it lies there as before: 1 where it comes back unturned.</param>
public sealed record LoopCycle(ImmutableArray<ImmutableArray<int>> Bodies, int Twist);
