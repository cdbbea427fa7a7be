using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>A symmetry of a mechanism that takes the base shape to itself: where it takes each site, and which step each step becomes.</summary>
internal sealed record LoopSymmetry(Permutation Sites, ImmutableArray<int> Steps);
