using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>One move of a shortest word, and what else could have been done in its place.</summary>
/// <param name="State">The state before the move.</param>
/// <param name="Distance">The length of a shortest word from there.</param>
/// <param name="Steps">The steps of the move; just one unless runs are counted.</param>
/// <param name="FreeCount">How many moves are free there.</param>
/// <param name="BestCount">How many of them begin a shortest word.</param>
/// <param name="WrongMoves">The others, in the order of their steps.</param>
/// <param name="ShapeChanges">How many steps of the move change the shape.</param>
/// <param name="Passages">How many steps of the move lead where no turn path leads back from, labels ignored.</param>
public sealed record LevelStage(
    State State, int Distance, ImmutableArray<Step> Steps, int FreeCount, int BestCount, ImmutableArray<LevelMove> WrongMoves, int ShapeChanges, int Passages);
