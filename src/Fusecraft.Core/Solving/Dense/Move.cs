using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>What a metric counts as one: a step, or all of a run.</summary>
/// <param name="Steps">The steps, in the order in which they are done.</param>
/// <param name="Permutation">Their product.</param>
/// <param name="Cost">What the move costs.</param>
internal sealed record Move(ImmutableArray<Step> Steps, Permutation Permutation, int Cost);
