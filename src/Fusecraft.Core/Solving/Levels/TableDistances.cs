using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>Distances from a table. A state beyond its region has none: the goal lies within, and no way leads back.</summary>
internal sealed class TableDistances(DistanceTable table) : IGoalDistances
{
    public Metric Metric => table.Metric;

    public int? DistanceOf(State state) => table.DistanceOf(state);
}
