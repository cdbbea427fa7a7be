using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Two more points for each orbit of sites, which every permutation that is odd on the orbit exchanges: so that labels in place can mean an even permutation too. A stage that sees to the signs first spares the later ones the last two labels of
/// an orbit the wrong way round, for which no short loops may be left.
/// </summary>
internal sealed class OrbitSigns
{
    private readonly int _sites;
    private readonly List<int[]> _orbits = [];

    /// <param name="moves">Moves whose permutations make the orbits.</param>
    /// <param name="siteCount">The number of sites.</param>
    public OrbitSigns(IReadOnlyList<StageMove> moves, int siteCount)
    {
        _sites = siteCount;
        var parent = Enumerable.Range(0, siteCount).ToArray();
        int Root(int site) => parent[site] == site ? site : parent[site] = Root(parent[site]);
        foreach (var move in moves)
        {
            for (var site = 0; site < move.Permutation.SupportEnd; site++)
            {
                parent[Root(site)] = Root(move.Permutation[site]);
            }
        }

        foreach (var orbit in Enumerable.Range(0, siteCount).GroupBy(Root))
        {
            int[] sites = [.. orbit];
            if (moves.Any(move => IsOdd(move.Permutation, sites)))
            {
                _orbits.Add(sites);
            }
        }
    }

    /// <summary>The number of points.</summary>
    public int Count => _sites + (2 * _orbits.Count);

    /// <summary>The permutation with what it does to the signs.</summary>
    public Permutation Signed(Permutation permutation)
    {
        var images = new int[Count];
        for (var site = 0; site < _sites; site++)
        {
            images[site] = permutation[site];
        }

        for (var orbit = 0; orbit < _orbits.Count; orbit++)
        {
            var odd = IsOdd(permutation, _orbits[orbit]) ? 1 : 0;
            images[_sites + (2 * orbit)] = _sites + (2 * orbit) + odd;
            images[_sites + (2 * orbit) + 1] = _sites + (2 * orbit) + 1 - odd;
        }

        return Permutation.FromImages(images);
    }

    public StageMove Signed(StageMove move) => move with { Permutation = Signed(move.Permutation) };

    private static bool IsOdd(Permutation permutation, int[] orbit)
    {
        var seen = new HashSet<int>();
        var odd = false;
        foreach (var first in orbit)
        {
            for (var site = first; seen.Add(site); site = permutation[site])
            {
                odd ^= permutation[site] != first;
            }
        }

        return odd;
    }
}
