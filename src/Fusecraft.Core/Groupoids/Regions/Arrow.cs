using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>A free step at a shape: one of the arrows of which all turn paths are made.</summary>
/// <param name="Source">The number of the shape where the step starts.</param>
/// <param name="Step">The step.</param>
/// <param name="Target">The number of the shape where it ends.</param>
public readonly record struct Arrow(int Source, Step Step, int Target);
