using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>
/// The condition, besides the blocks, under which a step is free: all of <see cref="Needs"/>, none of <see cref="BarredBy"/>, and at least one guard of
/// <see cref="AnyOf"/> unless that is empty, and <see cref="When"/>. Read in the shape where the step starts. Entries are written <c>mark@site</c>.
/// </summary>
public sealed class GuardDefinition
{
    /// <summary>The guard that always holds.</summary>
    public static GuardDefinition Always { get; } = new();

    /// <summary>Marks that must be there, as <c>mark@site</c>.</summary>
    public ImmutableArray<string> Needs { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>Marks that must not be there, as <c>mark@site</c>.</summary>
    public ImmutableArray<string> BarredBy { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>Guards of which at least one must hold; empty for no such condition.</summary>
    public ImmutableArray<GuardDefinition> AnyOf { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>
    /// A condition in code that must hold too; null for none. It must be pure: the same answer for the same shape whenever and on whichever thread it is asked. Mechanism files cannot hold it.
    /// </summary>
    public Func<Shape, bool>? When { get; init; }

    /// <summary>True when the guard has no condition at all.</summary>
    public bool IsAlways => Needs.IsEmpty && BarredBy.IsEmpty && AnyOf.IsEmpty && When is null;

    /// <summary>True when a condition in code stands in this guard or in one of its alternatives.</summary>
    internal bool HasCode => When is not null || AnyOf.Any(guard => guard.HasCode);
}
