using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>A turn with its names resolved to numbers.</summary>
/// <param name="Name">The turn's name.</param>
/// <param name="Moves">The permutation of the forward step.</param>
/// <param name="Carried">The pieces carried, ascending.</param>
internal sealed record TurnBlueprint(string Name, Permutation Moves, int[] Carried)
{
    /// <summary>The alternatives of the forward step's guard; the step is free when one of them holds.</summary>
    public IReadOnlyList<GuardTerm> Guard { get; init; } = [GuardTerm.Always];

    public bool IsOneWay { get; init; }

    /// <summary>The backward step's own guard, or null where it is derived.</summary>
    public IReadOnlyList<GuardTerm>? Back { get; init; }

    public string As { get; init; } = Name;

    public string BackAs { get; init; } = Name + "'";
}
