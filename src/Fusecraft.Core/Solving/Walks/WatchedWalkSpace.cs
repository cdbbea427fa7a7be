using System.Diagnostics;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>Shapes with the sites where some labels are, all other labels forgotten: what is left of a state when only these are watched.</summary>
internal sealed class WatchedWalkSpace : WalkSpace
{
    // For each state and slot where the step comes from, or -1.
    private readonly int[] _sources;

    private WatchedWalkSpace(WalkRates rates, int count, int[] sources)
        : base(rates, count) => _sources = sources;

    public override int Unit => 1;

    public override int Source(int state, int slot) => _sources[(state * Rates.Width) + slot];

    /// <summary>All that labels can come to within a region, found breadth-first.</summary>
    /// <param name="region">The region.</param>
    /// <param name="rates">The walk on its shapes.</param>
    /// <param name="labels">The labels watched, by their home sites.</param>
    /// <param name="start">Where the base state has moved the labels.</param>
    /// <param name="options">Limits.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <exception cref="InvalidOperationException">There are more states than allowed.</exception>
    public static WatchedWalkSpace Of(RegionShapes region, WalkRates rates, int[] labels, Permutation start, WalkOptions options, CancellationToken cancellation)
    {
        var coder = new Coder(region, labels.Length);
        var found = new List<long> { coder.Code(0, [.. labels.Select(label => start[label])]) };
        var indexOf = new Dictionary<long, int> { [found[0]] = 0 };
        for (var i = 0; i < found.Count; i++)
        {
            if ((i & 0xFFF) == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            for (var step = 0; step < region.Mechanism.Steps.Length; step++)
            {
                var next = coder.After(found[i], step);
                if (next >= 0 && indexOf.TryAdd(next, found.Count))
                {
                    found.Add(next);
                    if (found.Count > options.MaxStates)
                    {
                        throw new InvalidOperationException($"Watching {labels.Length} labels there are more than {options.MaxStates} states, the most allowed.");
                    }
                }
            }
        }

        // Shape by shape; within one as they were found.
        var ofShape = found.Count / region.Count;
        var filled = new int[region.Count];
        var numbers = new int[found.Count];
        for (var i = 0; i < numbers.Length; i++)
        {
            var place = coder.PlaceOf(found[i]);
            numbers[i] = (place * ofShape) + filled[place]++;
        }

        Debug.Assert(filled.All(count => count == ofShape), "Renaming the labels takes shapes of a region to each other, so each has as many states.");
        var sources = new int[checked(numbers.Length * rates.Width)];
        Array.Fill(sources, -1);
        for (var i = 0; i < numbers.Length; i++)
        {
            var place = coder.PlaceOf(found[i]);
            for (var slot = 0; slot < rates.Width; slot++)
            {
                if (rates.Arriving.Target(place, slot) is >= 0 and var source)
                {
                    sources[(numbers[i] * rates.Width) + slot] = numbers[indexOf[coder.Before(found[i], source, rates.Arriving.MoveAt(place, slot).Steps[0])]];
                }
            }
        }

        return new WatchedWalkSpace(rates, numbers.Length, sources);
    }

    protected override void Add(double[] rates, double[] from, double[] to, int first, int last)
    {
        for (var state = first; state < last; state++)
        {
            var place = state / OfShape;
            var sum = to[state];
            for (var slot = 0; slot < Rates.Width; slot++)
            {
                if (rates[(place * Rates.Width) + slot] is > 0 and var rate)
                {
                    sum += rate * from[_sources[(state * Rates.Width) + slot]];
                }
            }

            to[state] = sum;
        }
    }

    /// <summary>The place of a shape and the sites of the labels as one number.</summary>
    private sealed class Coder
    {
        private readonly RegionShapes _region;
        private readonly int[][] _images;
        private readonly int[][] _sources;
        private readonly int _labels;

        public Coder(RegionShapes region, int labels)
        {
            _region = region;
            _labels = labels;
            _images = [.. region.Mechanism.Steps.Select(step => Images(step.Permutation))];
            _sources = [.. region.Mechanism.Steps.Select(step => Images(step.Permutation.Inverse()))];
            if (region.Count * Math.Pow(region.Mechanism.SiteCount, labels) > long.MaxValue)
            {
                throw new InvalidOperationException($"{labels} labels on {region.Mechanism.SiteCount} sites are too many to watch.");
            }
        }

        public int PlaceOf(long code)
        {
            for (var i = 0; i < _labels; i++)
            {
                code /= _region.Mechanism.SiteCount;
            }

            return (int)code;
        }

        public long Code(int place, ReadOnlySpan<int> sites)
        {
            var code = (long)place;
            foreach (var site in sites)
            {
                code = (code * _region.Mechanism.SiteCount) + site;
            }

            return code;
        }

        public long After(long code, int step) => _region.After(PlaceOf(code), step) is >= 0 and var target ? Moved(code, target, _images[step]) : -1;

        public long Before(long code, int source, Step step) => Moved(code, source, _sources[step.Index]);

        private long Moved(long code, int place, int[] images)
        {
            Span<int> sites = stackalloc int[_labels];
            for (var i = _labels - 1; i >= 0; i--)
            {
                code = Math.DivRem(code, _region.Mechanism.SiteCount, out var site);
                sites[i] = images[site];
            }

            return Code(place, sites);
        }

        private int[] Images(Permutation permutation) => [.. Enumerable.Range(0, _region.Mechanism.SiteCount).Select(site => permutation[site])];
    }
}
