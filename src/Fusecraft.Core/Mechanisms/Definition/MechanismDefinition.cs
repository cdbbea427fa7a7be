using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>
/// A mechanism as it is written down: member by member what a mechanism file holds. Names are still names; making a mechanism from it
/// resolves them and finds all mistakes.
/// </summary>
/// <remarks>Either <see cref="Family"/> is given, or <see cref="Sites"/> and <see cref="Turns"/>. Immutable.</remarks>
public sealed class MechanismDefinition
{
    /// <summary>The address of a JSON Schema that the file names; kept, not read.</summary>
    public string? Schema { get; init; }

    /// <summary>What the mechanism is called; not empty.</summary>
    public required string Name { get; init; }

    /// <summary>Free text about the mechanism.</summary>
    public string? About { get; init; }

    /// <summary>A ready-made family that supplies sites, pieces and turns; null for a custom mechanism.</summary>
    public MechanismFamily? Family { get; init; }

    /// <summary>The turns of the family that are kept, such as <c>U</c> or, for the half turn alone, <c>F2</c>; empty for all.</summary>
    public ImmutableArray<string> Use { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>The names of the sites of a custom mechanism, in the order of their numbers.</summary>
    public ImmutableArray<string> Sites { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>The pieces of a custom mechanism that have several sites, as lists of site names; other sites are pieces of their own.</summary>
    public ImmutableArray<ImmutableArray<string>> Pieces { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>The turns of a custom mechanism, in the order of their numbers.</summary>
    public ImmutableArray<TurnDefinition> Turns { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>The blocks at home: each two or more pieces, named by any of their sites or by a name of their own.</summary>
    public ImmutableArray<ImmutableArray<string>> Blocks { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>The marks at home.</summary>
    public ImmutableArray<MarkDefinition> Marks { get; init => field = value.IsDefault ? [] : value; } = [];

    /// <summary>Where a solver wants to get.</summary>
    public Goal Goal { get; init; } = Goal.Home;

    /// <summary>Which labels look alike.</summary>
    public ColourScheme Colours { get; init; } = ColourScheme.Distinct;

    /// <summary>The same definition with one more block.</summary>
    /// <param name="pieces">The names of the pieces to fuse; checked when the mechanism is made.</param>
    public MechanismDefinition WithBlock(params IEnumerable<string> pieces) => new()
    {
        Schema = Schema,
        Name = Name,
        About = About,
        Family = Family,
        Use = Use,
        Sites = Sites,
        Pieces = Pieces,
        Turns = Turns,
        Blocks = Blocks.Add([.. pieces]),
        Marks = Marks,
        Goal = Goal,
        Colours = Colours,
    };
}
