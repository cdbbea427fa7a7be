using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>One way to write a guard, whatever way it was written down, so that guards can be compared: the alternatives that cannot be shortened, all of them, sorted.</summary>
/// <remarks>
/// Source: W. V. Quine, <em>A way to simplify truth functions</em>, Amer. Math. Monthly 62 (1955) 627-631 (from memory): add the consensus of two alternatives, drop what another implies, until nothing
/// changes. Guards with very many such alternatives are left as they are after a while; then two that say the same may look different, never the other way round.
/// </remarks>
internal static class GuardForm
{
    private const int MaxAlternatives = 64;

    /// <summary>The form of a guard with its sites moved by a permutation.</summary>
    public static string Of(ImmutableArray<GuardTerm> terms, Permutation sites = default)
    {
        var texts = Alternatives(terms).ConvertAll(alternative => $"{Text(alternative.Needs)}|{Text(alternative.BarredBy)}");
        texts.Sort(StringComparer.Ordinal);
        return string.Join('/', texts);

        string Text(ImmutableHashSet<(string Mark, int Site)> marks) => string.Join(' ', marks.Select(mark => $"{mark.Mark}@{sites[mark.Site]}").Order(StringComparer.Ordinal));
    }

    /// <summary>The alternatives that cannot be shortened.</summary>
    public static ImmutableArray<GuardTerm> Shortest(ImmutableArray<GuardTerm> terms) => [.. Alternatives(terms).Select(alternative => new GuardTerm([.. alternative.Needs], [.. alternative.BarredBy]))];

    private static List<Alternative> Alternatives(ImmutableArray<GuardTerm> terms)
    {
        var alternatives = new List<Alternative>();
        foreach (var term in terms)
        {
            Add(alternatives, new Alternative([.. term.Needs], [.. term.BarredBy]));
        }

        for (var changed = alternatives.Count > 1; changed;)
        {
            changed = false;
            var snapshot = alternatives.ToArray();
            for (var i = 0; i < snapshot.Length && snapshot.Length <= MaxAlternatives; i++)
            {
                for (var k = 0; k < i; k++)
                {
                    changed |= snapshot[i].Consensus(snapshot[k]) is { } consensus && Add(alternatives, consensus);
                }
            }
        }

        return alternatives;
    }

    // Adds an alternative unless it is a contradiction or implied by another; drops those that it implies.
    private static bool Add(List<Alternative> alternatives, Alternative added)
    {
        if (added.Needs.Overlaps(added.BarredBy) || alternatives.Exists(other => other.IsImpliedBy(added)))
        {
            return false;
        }

        alternatives.RemoveAll(added.IsImpliedBy);
        alternatives.Add(added);
        return true;
    }

    private sealed record Alternative(ImmutableHashSet<(string Mark, int Site)> Needs, ImmutableHashSet<(string Mark, int Site)> BarredBy)
    {
        // It holds wherever the other one does.
        public bool IsImpliedBy(Alternative other) => Needs.IsSubsetOf(other.Needs) && BarredBy.IsSubsetOf(other.BarredBy);

        // What both say together but for the one mark about which they disagree; null where they disagree about none or more.
        public Alternative? Consensus(Alternative other)
        {
            var disputed = Needs.Intersect(other.BarredBy).Union(other.Needs.Intersect(BarredBy));
            return disputed.Count == 1 ? new Alternative(Needs.Union(other.Needs).Except(disputed), BarredBy.Union(other.BarredBy).Except(disputed)) : null;
        }
    }
}
