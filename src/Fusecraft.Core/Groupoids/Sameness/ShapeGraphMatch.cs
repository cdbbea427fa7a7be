using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>A bijection between the shapes of two mechanisms that, with a renaming of turns, takes arrows to arrows. One shape and the renaming fix all of it.</summary>
/// <param name="Shape">The number of a shape of the first mechanism.</param>
/// <param name="Image">The number of the shape of the second that corresponds to it.</param>
/// <param name="Steps">For each step of the first, by number, the step of the second that plays its part; null for a step that is free nowhere.</param>
public sealed record ShapeGraphMatch(int Shape, int Image, ImmutableArray<Step?> Steps);
