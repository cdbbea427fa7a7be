using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>What a mechanism is made from once names are resolved, before blocks, extra marks and goal are added: written by a family or from a custom definition.</summary>
internal sealed class Blueprint
{
    public required ImmutableArray<string> SiteNames { get; init; }

    /// <summary>Finds a site by a name other than the one in <see cref="SiteNames"/>.</summary>
    public Func<string, int?> SiteAlias { get; init; } = static _ => null;

    public required ImmutableArray<int> PieceOfSite { get; init; }

    public required ImmutableArray<string> PieceNames { get; init; }

    /// <summary>Finds a piece by a name of its own.</summary>
    public Func<string, int?> PieceAlias { get; init; } = static _ => null;

    /// <summary>Pairs of pieces that share a face; null where the mechanism knows no adjacency.</summary>
    public IReadOnlyList<(int A, int B)>? Adjacency { get; init; }

    /// <summary>The colour of each site's label at home by face; null where there are no faces.</summary>
    public ImmutableArray<int>? Faces { get; init; }

    /// <summary>What the colours of <see cref="Faces"/> are called.</summary>
    public ImmutableArray<string> FaceNames { get; init; } = [];

    /// <summary>Lists the symmetries of the solid or the board as permutations of the sites, the identity first; null where the mechanism comes without. Not all need take turns to turns.</summary>
    public Func<ImmutableArray<Permutation>>? Symmetries { get; init; }

    public required List<TurnBlueprint> Turns { get; init; }

    /// <summary>Marks that the family brings, with their home sites.</summary>
    public List<(string Mark, int Site)> Marks { get; init; } = [];

    public static ImmutableArray<string> NumberedNames(int count) => [.. Enumerable.Range(1, count).Select(i => i.ToString())];
}
