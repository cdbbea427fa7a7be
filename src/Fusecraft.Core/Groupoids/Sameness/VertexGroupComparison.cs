using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>Whether the vertex groups at the homes of two mechanisms are one group up to a relabelling of the sites.</summary>
/// <param name="AreAlike">True when they are, false when they are not, null when that was not decided.</param>
/// <param name="Relabelling">Where they are alike and it is known: a permutation by which conjugation takes the first group to the second.</param>
/// <param name="Reason">What the answer rests on, in one clause.</param>
public sealed record VertexGroupComparison(bool? AreAlike, Permutation? Relabelling, string Reason);
