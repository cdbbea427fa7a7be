using System.Collections.Immutable;

namespace Fusecraft.Groupoids;

/// <summary>Loops of a basis that are copies of one another: a symmetry of the base shape takes the permutation of one, or its inverse, to that of the other.</summary>
/// <param name="Loops">The loops of the basis in this family, shortest first.</param>
/// <param name="CopyCount">How many copies the symmetries make of one of them, itself counted and a loop and its inverse counted once. Some of the copies need not be in the basis. Null where there are many thousands.</param>
public sealed record LoopFamily(ImmutableArray<BasisLoop> Loops, int? CopyCount);
