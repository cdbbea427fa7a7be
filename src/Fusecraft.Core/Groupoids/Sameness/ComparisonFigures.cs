using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;

namespace Fusecraft.Groupoids;

/// <summary>The figures of two mechanisms side by side, those of their turns first, then those of their shapes, then those of their states.</summary>
internal static class ComparisonFigures
{
    public static ImmutableArray<ComparedFigure> Of(ShapeGroupoid first, ShapeGroupoid second, VertexGroup? firstGroup, VertexGroup? secondGroup, CancellationToken cancellation)
    {
        return
        [
            Figure("sites", groupoid => groupoid.Mechanism.SiteCount),
            Figure("pieces", groupoid => groupoid.Mechanism.PieceCount),
            Figure("turns", groupoid => groupoid.Mechanism.Turns.Length),
            Figure("blocks", groupoid => groupoid.Mechanism.HomeBlocks.Length),
            Figure("marks", groupoid => groupoid.Mechanism.HomeMarks.Length),
            Complete("shapes", groupoid => groupoid.ShapeCount),
            Complete("shapes up to symmetry", groupoid => ShapeOrbits.Explore(groupoid.Mechanism, cancellationToken: cancellation).RepresentativeCount),
            Complete("free turns", groupoid => groupoid.FreeTurnCount),
            Complete("dead ends", groupoid => groupoid.DeadEndCount),
            Complete("stuck shapes", groupoid => groupoid.StuckShapeCount),
            Complete("regions", groupoid => groupoid.Regions.Length),
            Complete("passages", groupoid => groupoid.PassageCount),
            Complete("traps", groupoid => groupoid.TrapCount),
            Complete("shapes of the home region", groupoid => groupoid.HomeRegion.ShapeCount),
            new ComparedFigure("order of the vertex group", Text(firstGroup?.Order), Text(secondGroup?.Order)),
            new ComparedFigure("orbit lengths of the vertex group", Orbits(firstGroup), Orbits(secondGroup)),
            new ComparedFigure("states of the home region", Text(firstGroup?.StateCount), Text(secondGroup?.StateCount)),
        ];

        ComparedFigure Figure(string name, Func<ShapeGroupoid, long> count) => new(name, Text(count(first)), Text(count(second)));

        ComparedFigure Complete(string name, Func<ShapeGroupoid, long> count) =>
            new(name, first.IsComplete ? Text(count(first)) : null, second.IsComplete ? Text(count(second)) : null);
    }

    private static string? Text(BigInteger? number) => number?.ToString(CultureInfo.InvariantCulture);

    // Such as 8 x 2, 3: two orbits of eight sites and one of three.
    private static string? Orbits(VertexGroup? group) => group is null ? null : string.Join(", ", group.Group.MovedOrbits.GroupBy(orbit => orbit.Length)
        .OrderByDescending(orbits => orbits.Key).Select(orbits => orbits.Count() == 1 ? $"{orbits.Key}" : $"{orbits.Key} x {orbits.Count()}")) is { Length: > 0 } text ? text : "none";
}
