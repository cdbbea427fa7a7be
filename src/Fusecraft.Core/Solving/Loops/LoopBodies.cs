using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>What moves as one at a shape: its blocks, and the pieces outside them. Those without sites, such as a hidden core, are left out.</summary>
internal sealed class LoopBodies
{
    private readonly List<ImmutableArray<int>> _pieces = [];
    private readonly List<int[]> _sites = [];
    private readonly int[] _bodyOf;

    public LoopBodies(Shape shape)
    {
        Mechanism = shape.Mechanism;
        _bodyOf = new int[Mechanism.SiteCount];
        var isFused = new bool[Mechanism.PieceCount];
        foreach (var block in shape.Blocks)
        {
            foreach (var piece in block)
            {
                isFused[piece] = true;
            }
        }

        var all = shape.Blocks.Concat(Enumerable.Range(0, isFused.Length).Where(piece => !isFused[piece]).Select(piece => ImmutableArray.Create(piece)));
        foreach (var pieces in all.OrderBy(pieces => pieces[0]))
        {
            int[] sites = [.. pieces.SelectMany(piece => Mechanism.SitesOfPiece[piece])];
            if (sites.Length == 0)
            {
                continue;
            }

            foreach (var site in sites)
            {
                _bodyOf[site] = _sites.Count;
            }

            _pieces.Add(pieces);
            _sites.Add(sites);
        }
    }

    public Mechanism Mechanism { get; }

    public int Count => _sites.Count;

    public ImmutableArray<int> Pieces(int body) => _pieces[body];

    public int[] Sites(int body) => _sites[body];

    /// <summary>The body to whose place a loop takes one.</summary>
    public int After(int body, Permutation loop) => _bodyOf[loop[_sites[body][0]]];

    /// <summary>The order of a permutation that keeps a body in its place, on the sites of that body.</summary>
    public int OrderOn(int body, Permutation permutation)
    {
        var order = 1;
        for (var power = permutation; Array.Exists(_sites[body], site => power[site] != site); power *= permutation)
        {
            order++;
        }

        return order;
    }
}
