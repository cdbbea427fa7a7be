using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>A state that was drawn, and a word that makes it.</summary>
/// <param name="State">The state.</param>
/// <param name="Path">A path of free steps from home to the state, never a reversed solution; null where the search for one ended by its budget.</param>
public sealed record Scramble(State State, TurnPath? Path);
