using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// Looks, shape by shape of the home region, for a state that shows given colours. A state in shape s has the labels h·τ(s) with h in the vertex group V, so it shows on site τ(s)[h[i]] the colour of label i: a member
/// h is wanted that carries the home colouring to the colours found on the sites τ(s)[…].
/// </summary>
internal sealed class ColourCompletion
{
    private readonly VertexGroup _group;
    private readonly Mechanism _mechanism;
    private readonly CancellationToken _cancellation;

    // Each orbit of the group with its home colours in order: most shapes are ruled out by these.
    private readonly List<(int[] Sites, int[] Colours)> _orbits = [];

    public ColourCompletion(VertexGroup group, CancellationToken cancellation)
    {
        _group = group;
        _mechanism = group.Groupoid.Mechanism;
        _cancellation = cancellation;
        foreach (var orbit in group.Group.Orbits)
        {
            int[] sites = [.. orbit];
            _orbits.Add((sites, Sorted(sites, _mechanism.ColourOfSite.AsSpan())));
        }
    }

    /// <summary>A state of the region of home that shows the colours, in the first shape that has one; null where none does.</summary>
    public State? Find(ColouredState colours)
    {
        var groupoid = _group.Groupoid;
        var wanted = new int[_mechanism.SiteCount];
        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            _cancellation.ThrowIfCancellationRequested();
            if (groupoid.RegionOf(shape) != groupoid.RegionOf(_group.BaseShape))
            {
                continue;
            }

            var path = _group.Label(shape);
            for (var site = 0; site < wanted.Length; site++)
            {
                wanted[site] = colours.ColourOn[path[site]];
            }

            if (_orbits.TrueForAll(orbit => Sorted(orbit.Sites, wanted).AsSpan().SequenceEqual(orbit.Colours))
                && _group.Group.FindMemberTaking(_mechanism.ColourOfSite.AsSpan(), wanted, _cancellation) is { } member)
            {
                return _mechanism.StateOf(member * path);
            }
        }

        return null;
    }

    private static int[] Sorted(int[] sites, ReadOnlySpan<int> colours)
    {
        var sorted = new int[sites.Length];
        for (var i = 0; i < sorted.Length; i++)
        {
            sorted[i] = colours[sites[i]];
        }

        Array.Sort(sorted);
        return sorted;
    }
}
