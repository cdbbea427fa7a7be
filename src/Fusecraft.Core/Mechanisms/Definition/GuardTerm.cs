namespace Fusecraft.Mechanisms;

/// <summary>One alternative of a guard: all of <paramref name="Needs"/> and none of <paramref name="BarredBy"/>, read in the shape where the step starts.</summary>
internal sealed record GuardTerm((string Mark, int Site)[] Needs, (string Mark, int Site)[] BarredBy)
{
    public static GuardTerm Always { get; } = new([], []);

    /// <summary>A condition in code, besides; null for none.</summary>
    public Func<Shape, bool>? When { get; init; }

    /// <summary>True when <see cref="When"/> is read in the shape where the step ends: it undoes the step that the condition was written for.</summary>
    public bool IsReadAtEnd { get; init; }

    public GuardTerm And(GuardTerm other) => new([.. Needs, .. other.Needs], [.. BarredBy, .. other.BarredBy]) { When = Both(When, other.When) };

    private static Func<Shape, bool>? Both(Func<Shape, bool>? one, Func<Shape, bool>? other) =>
        one is null || other is null ? one ?? other : shape => one(shape) && other(shape);
}
