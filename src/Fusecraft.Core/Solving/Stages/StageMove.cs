using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>Steps that a stage takes as one move: a power of a turn, a run, or a loop.</summary>
/// <param name="Steps">The numbers of the steps, in the order in which they are done.</param>
/// <param name="Permutation">Their product.</param>
/// <param name="Cost">What the move costs in the search, at least 1.</param>
/// <param name="Class">Moves of one class in a row are one move of that class, so a search skips them; -1 for a move that stands by itself.</param>
internal sealed record StageMove(int[] Steps, Permutation Permutation, int Cost, int Class);
