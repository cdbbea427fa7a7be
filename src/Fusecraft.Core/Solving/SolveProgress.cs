namespace Fusecraft.Solving;

/// <summary>What a solver is doing.</summary>
/// <param name="Stage">The stage it is at, in a few words.</param>
/// <param name="Count">How many states or shapes this stage has seen.</param>
public readonly record struct SolveProgress(string Stage, long Count);
