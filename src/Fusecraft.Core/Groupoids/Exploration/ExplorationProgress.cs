namespace Fusecraft.Groupoids;

/// <summary>How far an exploration has come.</summary>
/// <param name="ShapesFound">The shapes found so far.</param>
/// <param name="ShapesExplored">Those of them whose steps have been tried.</param>
public readonly record struct ExplorationProgress(int ShapesFound, int ShapesExplored);
