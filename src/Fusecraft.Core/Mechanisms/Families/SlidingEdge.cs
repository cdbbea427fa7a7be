using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>Two neighbouring places between which a tile can slide when the other one is a gap: the common part of the sliding families.</summary>
/// <param name="A">The first place; the forward step slides a tile from <paramref name="B"/> to it.</param>
/// <param name="B">The second place.</param>
/// <param name="Name">The turn's name.</param>
/// <param name="As">How the forward step is written.</param>
/// <param name="BackAs">How the backward step is written.</param>
internal sealed record SlidingEdge(int A, int B, string Name, string As, string BackAs)
{
    private const string Gap = "gap";

    public static Blueprint? ToBlueprint(
        ImmutableArray<string> names, List<SlidingEdge> edges, ImmutableArray<string> gapNames, ProblemList problems, Func<ImmutableArray<Permutation>>? symmetries = null)
    {
        var numberOf = Enumerable.Range(0, names.Length).ToDictionary(i => names[i]);
        var gaps = new List<int>();
        for (var i = 0; i < gapNames.Length; i++)
        {
            if (!numberOf.TryGetValue(gapNames[i], out var gap))
            {
                problems.Add($"$.family.gaps[{i}]", $"\"{gapNames[i]}\"", "a gap is the name of a cell");
            }
            else if (gaps.Contains(gap))
            {
                problems.Add($"$.family.gaps[{i}]", $"\"{gapNames[i]}\" a second time", "each gap is listed once");
            }
            else
            {
                gaps.Add(gap);
            }
        }

        if (gapNames.IsEmpty)
        {
            gaps.Add(names.Length - 1);
        }

        // Only with several gaps can two tiles slide the same way at once; then the tile's cell tells them apart.
        var severalGaps = gaps.Count > 1;
        return new Blueprint
        {
            SiteNames = names,
            PieceOfSite = [.. Enumerable.Range(0, names.Length)],
            PieceNames = names,
            Symmetries = symmetries,
            Turns = [.. edges.Select(edge => edge.ToTurn(names, severalGaps && edge.As != edge.Name))],
            Marks = [.. gaps.Select(gap => (Gap, gap))],
        };
    }

    private TurnBlueprint ToTurn(ImmutableArray<string> names, bool nameTheCell) =>
        new(Name, Permutation.FromCycle(A, B), A < B ? [A, B] : [B, A])
        {
            Guard = [new GuardTerm([(Gap, A)], [(Gap, B)])],
            As = nameTheCell ? $"{As}.{names[B]}" : As,
            BackAs = nameTheCell ? $"{BackAs}.{names[A]}" : BackAs,
        };
}
