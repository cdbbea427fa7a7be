namespace Fusecraft.Solving;

/// <summary>Among which steps a random walk chooses.</summary>
public enum WalkChoice
{
    /// <summary>Among the steps that are free: whoever shuffles tries only what can be done.</summary>
    FreeSteps,

    /// <summary>Among all steps; one that is barred does nothing, and still counts as a turn.</summary>
    AllSteps,
}
