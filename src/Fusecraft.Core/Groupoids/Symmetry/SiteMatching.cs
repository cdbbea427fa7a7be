using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Bijections between the sites of two mechanisms, or of one with itself, that take turns to turns: sites are coloured, one site of a colour is taken to each of the other side's, and the colours
/// refined again, until every site has its own.
/// </summary>
/// <remarks>Source of the method: B. D. McKay, <em>Practical graph isomorphism</em>, Congressus Numerantium 30 (1981) (from memory).</remarks>
internal sealed class SiteMatching
{
    private readonly SiteColours _from;
    private readonly SiteColours _to;
    private readonly StepMatcher _matcher;
    private readonly CancellationToken _cancellation;
    private long _nodesLeft;

    /// <param name="from">The mechanism whose sites are moved.</param>
    /// <param name="to">The mechanism to which they are moved.</param>
    /// <param name="matcher">Decides about complete bijections.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <param name="maxNodes">So many partial bijections are tried at most.</param>
    public SiteMatching(Mechanism from, Mechanism to, StepMatcher matcher, CancellationToken cancellation, long maxNodes = long.MaxValue)
    {
        _from = new SiteColours(from);
        _to = ReferenceEquals(from, to) ? _from : new SiteColours(to);
        _matcher = matcher;
        _cancellation = cancellation;
        _nodesLeft = maxNodes;
    }

    /// <summary>True when the search was given up before all was tried.</summary>
    public bool EndedByBudget => _nodesLeft < 0;

    /// <summary>One bijection; null where there is none or the budget ended the search.</summary>
    public Permutation? First() => Search(_from.Refined(_from.Initial()), _to.Refined(_to.Initial()));

    /// <summary>Bijections of the mechanism with itself that generate all of them.</summary>
    public ImmutableArray<Permutation> Automorphisms()
    {
        var levels = new List<(ulong[] Colours, int Site, ulong[] Below)>();
        var colours = _from.Refined(_from.Initial());
        while (TrySmallestCell(colours, out var colour))
        {
            var site = Array.IndexOf(colours, colour);
            var below = _from.Refined(SiteColours.Singled(colours, site));
            levels.Add((colours, site, below));
            colours = below;
        }

        // From the deepest level up, so that those found already, which fix the sites of the levels above, spare the rest of their orbits.
        var found = ImmutableArray.CreateBuilder<Permutation>();
        for (var level = levels.Count - 1; level >= 0; level--)
        {
            var (above, site, below) = levels[level];
            var orbits = new int[above.Length];
            Gather(orbits, found);
            var hopeless = new HashSet<int>();
            for (var target = 0; target < above.Length; target++)
            {
                if (above[target] != above[site] || orbits[target] == orbits[site] || hopeless.Contains(orbits[target]))
                {
                    continue;
                }

                if (Search(below, _from.Refined(SiteColours.Singled(above, target))) is { } automorphism)
                {
                    found.Add(automorphism);
                    Gather(orbits, found);
                    hopeless.Clear();
                }
                else
                {
                    hopeless.Add(orbits[target]);
                }
            }
        }

        return found.ToImmutable();
    }

    private static bool TrySmallestCell(ulong[] colours, out ulong colour)
    {
        var sizes = new Dictionary<ulong, int>();
        foreach (var entry in colours)
        {
            sizes[entry] = sizes.GetValueOrDefault(entry) + 1;
        }

        colour = 0;
        var best = int.MaxValue;
        foreach (var (entry, size) in sizes)
        {
            if (size > 1 && (size < best || (size == best && entry < colour)))
            {
                (colour, best) = (entry, size);
            }
        }

        return best < int.MaxValue;
    }

    // Numbers the orbits of some permutations: points of one orbit get one number.
    private static void Gather(int[] orbits, IReadOnlyList<Permutation> permutations)
    {
        Array.Fill(orbits, -1);
        var queue = new Queue<int>();
        for (var start = 0; start < orbits.Length; start++)
        {
            if (orbits[start] >= 0)
            {
                continue;
            }

            orbits[start] = start;
            queue.Enqueue(start);
            while (queue.TryDequeue(out var point))
            {
                foreach (var permutation in permutations)
                {
                    var image = permutation[point];
                    if (orbits[image] < 0)
                    {
                        orbits[image] = start;
                        queue.Enqueue(image);
                    }
                }
            }
        }
    }

    private Permutation? Search(ulong[] from, ulong[] to)
    {
        _cancellation.ThrowIfCancellationRequested();
        if (--_nodesLeft < 0 || !from.Order().SequenceEqual(to.Order()))
        {
            return null;
        }

        if (!TrySmallestCell(from, out var colour))
        {
            var siteOf = new Dictionary<ulong, int>();
            for (var site = 0; site < to.Length; site++)
            {
                siteOf.Add(to[site], site);
            }

            var bijection = Permutation.FromTrustedImages<int>([.. from.Select(entry => siteOf[entry])]);
            return _matcher.Match(bijection) is null ? null : bijection;
        }

        var below = _from.Refined(SiteColours.Singled(from, Array.IndexOf(from, colour)));
        for (var target = 0; target < to.Length; target++)
        {
            if (to[target] == colour && Search(below, _to.Refined(SiteColours.Singled(to, target))) is { } bijection)
            {
                return bijection;
            }
        }

        return null;
    }
}
