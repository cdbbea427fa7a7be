using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>Where a solver wants to get.</summary>
public sealed class Goal
{
    private Goal(GoalKind kind, ImmutableArray<string> names)
    {
        Kind = kind;
        Names = names;
    }

    /// <summary>Every label home.</summary>
    public static Goal Home { get; } = new(GoalKind.Home, []);

    /// <summary>The home shape, labels anywhere.</summary>
    public static Goal Shape { get; } = new(GoalKind.Shape, []);

    /// <summary>The home shape, and every site showing its home colour.</summary>
    public static Goal Colours { get; } = new(GoalKind.Colours, []);

    /// <summary>Which kind of goal this is.</summary>
    public GoalKind Kind { get; }

    /// <summary>For <see cref="GoalKind.Marks"/> the wanted marks as <c>mark@site</c>, for <see cref="GoalKind.Sites"/> the names of the sites; else empty.</summary>
    public ImmutableArray<string> Names { get; }

    /// <summary>Any state in which all the given marks are there.</summary>
    /// <param name="marks">At least one, each as <c>mark@site</c>.</param>
    public static Goal MarksAt(params IEnumerable<string> marks) => new(GoalKind.Marks, [.. marks]);

    /// <summary>Any state in which the labels of the given sites are home.</summary>
    /// <param name="sites">At least one site name.</param>
    public static Goal SitesHome(params IEnumerable<string> sites) => new(GoalKind.Sites, [.. sites]);
}
