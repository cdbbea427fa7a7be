namespace Fusecraft.Mechanisms;

/// <summary>One alternative of a guard: all of <paramref name="Needs"/> and none of <paramref name="BarredBy"/>, read in the shape where the step starts.</summary>
internal sealed record GuardTerm((string Mark, int Site)[] Needs, (string Mark, int Site)[] BarredBy)
{
    public static GuardTerm Always { get; } = new([], []);

    public GuardTerm And(GuardTerm other) => new([.. Needs, .. other.Needs], [.. BarredBy, .. other.BarredBy]);
}
