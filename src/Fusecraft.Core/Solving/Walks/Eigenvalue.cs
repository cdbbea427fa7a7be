using System.Numerics;

namespace Fusecraft.Solving;

/// <summary>An eigenvalue of a random walk.</summary>
/// <param name="Value">The value; real where the walk is reversible.</param>
/// <param name="Multiplicity">How often it occurs; null where only the value is known.</param>
public readonly record struct Eigenvalue(Complex Value, int? Multiplicity);
