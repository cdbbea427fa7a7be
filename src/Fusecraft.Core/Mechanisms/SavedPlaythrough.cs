using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>A saved play: where it started, the steps done and those taken back, and how many of them count. Plain data that a game can store as it likes.</summary>
/// <param name="Start">The labels at the start.</param>
/// <param name="Steps">The numbers of the steps, those taken back at the end included.</param>
/// <param name="Position">How many of the steps are done; the rest can be done again.</param>
public sealed record SavedPlaythrough(Permutation Start, ImmutableArray<ushort> Steps, int Position);
