using System.Numerics;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// A coset space of a stage small enough to be written out: the arrangements of coloured labels on the sites that the loops at the base shape bring about, with the table of what each loop does to each. Arrangement 0 is
/// home.
/// </summary>
internal sealed class StageComponent
{
    private readonly ShapeStore _store;
    private readonly int[] _sites;
    private readonly int[] _colours;
    private readonly int _bits;

    private StageComponent(ShapeStore store, int[] sites, int[] colours, int bits, int[] after)
    {
        _store = store;
        _sites = sites;
        _colours = colours;
        _bits = bits;
        After = after;
    }

    /// <summary>The number of arrangements.</summary>
    public int Count => _store.Count;

    /// <summary>The arrangement after a loop, at <c>arrangement * loops + loop</c>.</summary>
    public int[] After { get; }

    /// <summary>Writes a coset space out; null where it has more than a number of arrangements.</summary>
    /// <param name="frame">The shapes and the moves.</param>
    /// <param name="colours">For each label its colour.</param>
    /// <param name="maxCount">The greatest number of arrangements.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static StageComponent? Build(StageFrame frame, int[] colours, int maxCount, CancellationToken cancellation)
    {
        var sites = RelevantSites(frame, colours);
        int[] dense = Dense(sites, colours);
        var bits = Math.Max(1, BitOperations.Log2((uint)Math.Max(1, dense.Append(0).Max())) + 1);
        var perWord = 64 / bits;
        var words = Math.Max(1, (sites.Length + perWord - 1) / perWord);
        var place = new int[frame.SiteCount];
        for (var i = 0; i < sites.Length; i++)
        {
            place[sites[i]] = i;
        }

        // Where what lies on each place after a loop lay before.
        ushort[][] sources = [.. frame.Loops.Select(loop => loop.Inverse()).Select(back => Array.ConvertAll(sites, site => (ushort)place[back[site]]))];
        var store = new ShapeStore(words);
        var next = new ulong[words];
        var lanes = new ushort[sites.Length];
        for (var i = 0; i < sites.Length; i++)
        {
            Put(next, i, dense[sites[i]], bits, perWord);
        }

        store.FindOrAdd<ManyWords>(next);
        var after = new List<int>();
        for (var state = 0; state < store.Count; state++)
        {
            if (state % 256 == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            var key = store.Key(state);
            for (var i = 0; i < lanes.Length; i++)
            {
                lanes[i] = (ushort)(key[i / perWord] >> (i % perWord * bits) & ((1UL << bits) - 1));
            }

            foreach (var source in sources)
            {
                Array.Clear(next);
                for (int i = 0, word = 0, shift = 0; i < source.Length; i++)
                {
                    next[word] |= (ulong)lanes[source[i]] << shift;
                    shift += bits;
                    if (shift + bits > 64)
                    {
                        (word, shift) = (word + 1, 0);
                    }
                }

                after.Add(store.FindOrAdd<ManyWords>(next));
            }

            if (store.Count > maxCount)
            {
                return null;
            }
        }

        store.Trim();
        return new StageComponent(store, sites, dense, bits, [.. after]);
    }

    /// <summary>The number of the arrangement that a loop brings about from home; -1 where the loops do not bring it about.</summary>
    /// <param name="labelOn">For each site the label on it.</param>
    public int Rank(ReadOnlySpan<int> labelOn)
    {
        var perWord = 64 / _bits;
        var key = new ulong[Math.Max(1, (_sites.Length + perWord - 1) / perWord)];
        for (var i = 0; i < _sites.Length; i++)
        {
            Put(key, i, _colours[labelOn[_sites[i]]], _bits, perWord);
        }

        return _store.Find<ManyWords>(key);
    }

    // Sites on which the colour can change: those that loops join to one of another colour.
    private static int[] RelevantSites(StageFrame frame, int[] colours)
    {
        var parent = Enumerable.Range(0, frame.SiteCount).ToArray();
        int Root(int site) => parent[site] == site ? site : parent[site] = Root(parent[site]);
        foreach (var loop in frame.Loops)
        {
            for (var site = 0; site < loop.SupportEnd; site++)
            {
                parent[Root(site)] = Root(loop[site]);
            }
        }

        var mixed = new bool[frame.SiteCount];
        for (var site = 0; site < frame.SiteCount; site++)
        {
            mixed[Root(site)] |= colours[site] != colours[Root(site)];
        }

        return [.. Enumerable.Range(0, frame.SiteCount).Where(site => mixed[Root(site)])];
    }

    private static int[] Dense(int[] sites, int[] colours)
    {
        var numbers = new Dictionary<int, int>();
        var dense = new int[colours.Length];
        foreach (var site in sites)
        {
            numbers.TryAdd(colours[site], numbers.Count);
            dense[site] = numbers[colours[site]];
        }

        return dense;
    }

    private static void Put(Span<ulong> key, int place, int colour, int bits, int perWord) =>
        key[place / perWord] |= (ulong)colour << (place % perWord * bits);
}
