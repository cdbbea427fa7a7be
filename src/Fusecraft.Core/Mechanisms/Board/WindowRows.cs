using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Rows of a byte a site, the orbits of the turns packed into windows of at most 32 sites. Of equivalent orbits (some bijection commutes with all turns) only the first is held, for it tells where the sites of the
/// others go; sites that no turn moves are not held either.
/// </summary>
internal sealed class WindowRows : SiteRows
{
    /// <summary>Bytes from the start of a window that are read and written at once; the most that an orbit may have.</summary>
    public const int WindowSize = 32;

    // For each site: its byte in a row (its counterpart's, where its orbit is not held), or -1; where its window starts; and its own orbit's sites by the bytes of the window.
    private readonly int[] _byteOf;
    private readonly int[] _startOf;
    private readonly int[][] _siteAt;
    private readonly int[] _starts;
    private readonly int _used;

    private WindowRows(Mechanism mechanism, int[] byteOf, int[] startOf, int[][] siteAt, int[] starts, int used)
        : base(mechanism)
    {
        _byteOf = byteOf;
        _startOf = startOf;
        _siteAt = siteAt;
        _starts = starts;
        _used = used;
        Pitch = starts[^1] + WindowSize;
    }

    public override int Pitch { get; }

    /// <summary>Where the windows start in a row.</summary>
    public ReadOnlySpan<int> Starts => _starts;

    /// <summary>The bytes of a row that mean something; those after them do not.</summary>
    public int UsedBytes => _used;

    /// <summary>Null where an orbit has more sites than a window, or nothing moves.</summary>
    public static WindowRows? TryCreate(Mechanism mechanism)
    {
        var group = mechanism.UnguardedGroup;
        var orbits = group.MovedOrbits;
        if (orbits.IsEmpty || orbits.Any(orbit => orbit.Length > WindowSize))
        {
            return null;
        }

        // Each orbit with the one that tells about it, in matching order; perhaps itself.
        var told = new List<(ImmutableArray<int> Sites, ImmutableArray<int> By)>();
        foreach (var orbit in orbits)
        {
            var match = told.Where(entry => entry.Sites == entry.By).Select(entry => (entry.By, Sites: EquivalentOrbits.Match(group, entry.By, orbit))).FirstOrDefault(match => match.Sites is not null);
            told.Add(match.Sites is null ? (orbit, orbit) : ([.. match.Sites], match.By));
        }

        var (byteOf, startOf, siteAt) = (new int[mechanism.SiteCount], new int[mechanism.SiteCount], new int[mechanism.SiteCount][]);
        Array.Fill(byteOf, -1);
        var (starts, used, room) = (new List<int>(), 0, 0);
        foreach (var (sites, by) in told)
        {
            if (sites == by)
            {
                if (sites.Length > room)
                {
                    starts.Add(used);
                    room = WindowSize;
                }

                room -= sites.Length;
            }

            var list = new int[WindowSize];
            for (var i = 0; i < sites.Length; i++)
            {
                byteOf[sites[i]] = sites == by ? used++ : byteOf[by[i]];
                startOf[sites[i]] = sites == by ? starts[^1] : startOf[by[i]];
                list[byteOf[sites[i]] - startOf[sites[i]]] = sites[i];
                siteAt[sites[i]] = list;
            }
        }

        return new WindowRows(mechanism, byteOf, startOf, siteAt, [.. starts], used);
    }

    /// <summary>For each byte of a row, where its window starts.</summary>
    public int[] StartOfBytes()
    {
        var startOf = new int[_used];
        for (var i = 0; i < _starts.Length; i++)
        {
            Array.Fill(startOf, _starts[i], _starts[i], (i + 1 < _starts.Length ? _starts[i + 1] : _used) - _starts[i]);
        }

        return startOf;
    }

    public override void Compose(ReadOnlySpan<byte> first, ReadOnlySpan<byte> second, Span<byte> result) => Lanes.ComposeWindows(first, second, result, _starts);

    public override void Invert(ReadOnlySpan<byte> row, Span<byte> result)
    {
        for (var i = 0; i < _starts.Length; i++)
        {
            var (start, end) = (_starts[i], i + 1 < _starts.Length ? _starts[i + 1] : _used);
            for (var at = start; at < end; at++)
            {
                result[start + row[at]] = (byte)(at - start);
            }
        }
    }

    public override void Load(Permutation permutation, Span<byte> row)
    {
        for (var site = 0; site < _byteOf.Length; site++)
        {
            if (_byteOf[site] >= 0)
            {
                row[_byteOf[site]] = (byte)(_byteOf[permutation[site]] - _startOf[site]);
            }
        }
    }

    public override void CopyImages(ReadOnlySpan<byte> row, Span<int> images)
    {
        for (var site = 0; site < images.Length; site++)
        {
            images[site] = _byteOf[site] < 0 ? site : _siteAt[site][row[_byteOf[site]]];
        }
    }
}
