using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>A turn of a custom mechanism as it is written down.</summary>
public sealed class TurnDefinition
{
    /// <summary>The turn's name; starts with a letter or a digit.</summary>
    public required string Name { get; init; }

    /// <summary>The permutation of the forward step: disjoint cycles of site names.</summary>
    public required string Moves { get; init; }

    /// <summary>Pieces carried although none of their sites is in <see cref="Moves"/>.</summary>
    public ImmutableArray<string> Carries { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>The guard of the forward step.</summary>
    public GuardDefinition Guard { get; init; } = GuardDefinition.Always;

    /// <summary>True when there is no backward step.</summary>
    public bool IsOneWay { get; init; }

    /// <summary>The backward step's own guard; null when it is free exactly to undo a free forward step.</summary>
    public GuardDefinition? Back { get; init; }

    /// <summary>How the forward step is written in words; null for the turn's name.</summary>
    public string? As { get; init; }

    /// <summary>How the backward step is written in words; null for the forward step's name followed by <c>'</c>.</summary>
    public string? BackAs { get; init; }
}
