using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Colours the sites of a mechanism so that sites which some symmetry exchanges have equal colours: a site is coloured by what the steps, coloured in turn by what they do, do to it, over and over
/// until no more colours appear. Colours are hashes, so equal ones may, very rarely, tell less than they could, never more.
/// </summary>
internal sealed class SiteColours
{
    private readonly Mechanism _mechanism;
    private readonly int[][] _images;
    private readonly int[][] _sources;
    private readonly bool[][] _carried;
    private readonly ImmutableArray<GuardTerm>[] _guards;
    private readonly bool[] _isInert;

    public SiteColours(Mechanism mechanism)
    {
        _mechanism = mechanism;
        _images = [.. mechanism.Steps.Select(step => Images(step.Permutation))];
        _sources = [.. mechanism.Steps.Select(step => Images(step.Permutation.Inverse()))];
        _carried = new bool[mechanism.Steps.Length][];
        foreach (var step in mechanism.Steps)
        {
            var carried = step.Turn.CarriedPieces.ToHashSet();
            _carried[step.Index] = [.. mechanism.PieceOfSite.Select(carried.Contains)];
        }

        _guards = [.. mechanism.Steps.Select(step => GuardForm.Shortest(step.Terms))];
        _isInert = Inert();
    }

    /// <summary>The coarsest colours, not yet refined. Inert sites have colours of their own, so that they stay where they are.</summary>
    public ulong[] Initial()
    {
        var colours = new ulong[_mechanism.SiteCount];
        var inert = 0UL;
        for (var site = 0; site < colours.Length; site++)
        {
            colours[site] = _isInert[site] ? Hash.Mix(1, ++inert) : Hash.Mix(2, (ulong)_mechanism.SitesOfPiece[_mechanism.PieceOfSite[site]].Length);
        }

        return colours;
    }

    /// <summary>The same colours but for one site, which gets one of its own.</summary>
    public static ulong[] Singled(ulong[] colours, int site)
    {
        var singled = (ulong[])colours.Clone();
        singled[site] = Hash.Mix(3, colours[site]);
        return singled;
    }

    /// <summary>Refines colours until no more appear.</summary>
    public ulong[] Refined(ulong[] colours)
    {
        var count = Count(colours);
        while (true)
        {
            var next = Round(colours);
            var nextCount = Count(next);
            if (nextCount == count)
            {
                return next;
            }

            (colours, count) = (next, nextCount);
        }
    }

    public static int Count(ulong[] colours) => new HashSet<ulong>(colours).Count;

    private int[] Images(Permutation permutation)
    {
        var images = new int[_mechanism.SiteCount];
        permutation.CopyImages(images);
        return images;
    }

    // Sites of pieces that nothing moves, carries or reads, and that hold nothing at home; none where pieces have neighbours, with which they must stay together.
    private bool[] Inert()
    {
        var isInert = new bool[_mechanism.PieceCount];
        Array.Fill(isInert, _mechanism.Adjacency is null);
        foreach (var step in _mechanism.Steps)
        {
            Touch(step.Turn.CarriedPieces);
            Touch(_guards[step.Index].SelectMany(term => term.Needs.Concat(term.BarredBy)).Select(mark => _mechanism.PieceOfSite[mark.Site]));
        }

        Touch(_mechanism.HomeBlocks.SelectMany(block => block));
        Touch(_mechanism.HomeMarks.Select(mark => _mechanism.PieceOfSite[mark.Site]));
        return [.. _mechanism.PieceOfSite.Select(piece => isInert[piece])];

        void Touch(IEnumerable<int> pieces)
        {
            foreach (var piece in pieces)
            {
                isInert[piece] = false;
            }
        }
    }

    private ulong[] Round(ulong[] colours)
    {
        var steps = StepColours(colours);
        var neighbours = NeighbourColours(colours);
        var next = new ulong[colours.Length];
        for (var site = 0; site < next.Length; site++)
        {
            var sum = neighbours[_mechanism.PieceOfSite[site]];
            for (var step = 0; step < steps.Length; step++)
            {
                sum += Hash.Mix(steps[step], Hash.Mix(colours[_images[step][site]], colours[_sources[step][site]]) + (_carried[step][site] ? 1UL : 0));
            }

            foreach (var mate in _mechanism.SitesOfPiece[_mechanism.PieceOfSite[site]])
            {
                sum += Hash.Mix(4, colours[mate]);
            }

            next[site] = Hash.Mix(colours[site], sum);
        }

        foreach (var step in _mechanism.Steps)
        {
            foreach (var term in _guards[step.Index])
            {
                var whole = Term(term, colours);
                foreach (var (mark, site) in term.Needs)
                {
                    next[site] += Hash.Mix(Hash.Mix(steps[step.Index], whole), Hash.Mix(5, Hash.Of(mark)));
                }

                foreach (var (mark, site) in term.BarredBy)
                {
                    next[site] += Hash.Mix(Hash.Mix(steps[step.Index], whole), Hash.Mix(6, Hash.Of(mark)));
                }
            }
        }

        return next;
    }

    // For each piece what the sites of its neighbours are coloured.
    private ulong[] NeighbourColours(ulong[] colours)
    {
        var sums = new ulong[_mechanism.PieceCount];
        if (_mechanism.Adjacency is { } pairs)
        {
            ulong[] pieces = [.. _mechanism.SitesOfPiece.Select(sites => sites.Aggregate(12UL, (sum, site) => sum + Hash.Mix(13, colours[site])))];
            foreach (var (a, b) in pairs)
            {
                sums[a] += Hash.Mix(14, pieces[b]);
                sums[b] += Hash.Mix(14, pieces[a]);
            }
        }

        return sums;
    }

    private ulong[] StepColours(ulong[] colours)
    {
        var own = new ulong[_images.Length];
        for (var step = 0; step < own.Length; step++)
        {
            var sum = 0UL;
            for (var site = 0; site < colours.Length; site++)
            {
                sum += Hash.Mix(colours[site], Hash.Mix(7, colours[_images[step][site]]) + (_carried[step][site] ? 1UL : 0));
            }

            foreach (var term in _guards[step])
            {
                sum += Hash.Mix(8, Term(term, colours));
            }

            own[step] = sum;
        }

        return [.. _mechanism.Steps.Select(step => Hash.Mix(own[step.Index], step.Opposite is { } opposite ? own[opposite.Index] : 9))];
    }

    private static ulong Term(GuardTerm term, ulong[] colours)
    {
        var sum = 0UL;
        foreach (var (mark, site) in term.Needs)
        {
            sum += Hash.Mix(Hash.Mix(10, Hash.Of(mark)), colours[site]);
        }

        foreach (var (mark, site) in term.BarredBy)
        {
            sum += Hash.Mix(Hash.Mix(11, Hash.Of(mark)), colours[site]);
        }

        return sum;
    }
}
