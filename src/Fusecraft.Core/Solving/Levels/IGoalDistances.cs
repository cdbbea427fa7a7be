using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>How far states are from the goal of their mechanism.</summary>
internal interface IGoalDistances
{
    /// <summary>How distances are counted.</summary>
    Metric Metric { get; }

    /// <summary>The least cost to the goal; -1 where no way leads there; null where a budget ended before either was known.</summary>
    int? DistanceOf(State state);
}
