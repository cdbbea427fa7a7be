namespace Fusecraft.Solving;

/// <summary>Which way the distances of a table are measured. The same where every step has a reverse of equal cost and the goal is home.</summary>
public enum DistanceOrigin
{
    /// <summary>From the base state of the numbering, home as a rule, to each state: how hard a state is to make.</summary>
    FromBase,

    /// <summary>From each state to the nearest state of the mechanism's goal: how hard a state is to solve.</summary>
    ToGoal,
}
