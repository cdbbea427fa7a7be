using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>A mark and the sites on which its tokens sit at home.</summary>
/// <param name="Name">The mark's name, such as <c>gap</c> or <c>pin</c>.</param>
/// <param name="Sites">The names of the sites, one token on each.</param>
public sealed record MarkDefinition(string Name, ImmutableArray<string> Sites);
