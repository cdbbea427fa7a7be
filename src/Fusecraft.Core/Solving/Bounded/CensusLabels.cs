using System.Numerics;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// All labels on all sites that ever move, and a number, in as few words as that takes. Where the label on one site of a place tells which labels are on its other sites, as it does where pieces keep their sites in a cycle, one
/// site a place is written.
/// </summary>
internal sealed class CensusLabels
{
    /// <summary>With more sites the table of what a label tells would be large.</summary>
    private const int MostSites = 2048;

    private readonly int[] _writtenOf;
    private readonly ushort[] _told;
    private readonly int _bits;
    private readonly ulong _mask;
    private readonly int _perWord;
    private readonly int _numberWord;
    private readonly int _numberShift;

    /// <param name="mechanism">The mechanism.</param>
    /// <param name="numberBits">The bits of the number, up to 32.</param>
    public CensusLabels(Mechanism mechanism, int numberBits)
    {
        Sites = [.. Enumerable.Range(0, mechanism.SiteCount).Where(site => mechanism.Steps.Any(step => step.Permutation[site] != site))];
        var count = Sites.Length;
        _writtenOf = [.. Enumerable.Range(0, count)];
        _told = [];
        if (count <= MostSites && TryTell(mechanism) is var (writtenOf, told))
        {
            (_writtenOf, _told) = (writtenOf, told);
        }

        Written = [.. _writtenOf.Distinct().Order()];
        _bits = count <= 1 ? 1 : BitOperations.Log2((uint)count - 1) + 1;
        _mask = (1UL << _bits) - 1;
        _perWord = 64 / _bits;
        var (words, rest) = Math.DivRem(Written.Length, _perWord);
        (_numberWord, _numberShift) = (rest * _bits) + numberBits <= 64 ? (words, rest * _bits) : (words + 1, 0);
        Words = Math.Max(1, _numberShift == 0 && numberBits == 0 ? words : _numberWord + 1);
    }

    /// <summary>The sites that ever move. Below they go by their places in this list.</summary>
    public int[] Sites { get; }

    /// <summary>The sites whose labels are written.</summary>
    public int[] Written { get; }

    /// <summary>The words of a key.</summary>
    public int Words { get; }

    /// <summary>The number of a key.</summary>
    public int Number(ReadOnlySpan<ulong> key) => _numberWord < Words ? (int)(key[_numberWord] >> _numberShift) : 0;

    /// <summary>The label on each site.</summary>
    public void Read(ReadOnlySpan<ulong> key, Span<ushort> labels)
    {
        for (var (at, word) = (0, 0); at < Written.Length; word++)
        {
            var rest = key[word];
            for (var end = Math.Min(at + _perWord, Written.Length); at < end; at++)
            {
                labels[Written[at]] = (ushort)(rest & _mask);
                rest >>= _bits;
            }
        }

        for (var site = 0; _told.Length > 0 && site < labels.Length; site++)
        {
            labels[site] = _told[(site * labels.Length) + labels[_writtenOf[site]]];
        }
    }

    /// <summary>Writes a number and the labels that come from certain sites to each site.</summary>
    public void Write(int number, ReadOnlySpan<ushort> labels, ReadOnlySpan<ushort> sources, Span<ulong> key)
    {
        for (var (at, word) = (0, 0); word < key.Length; word++)
        {
            var full = 0UL;
            var end = Math.Min(at + _perWord, Written.Length);
            for (var shift = 0; at < end; at++, shift += _bits)
            {
                full |= (ulong)labels[sources[Written[at]]] << shift;
            }

            key[word] = full;
        }

        if (_numberWord < key.Length)
        {
            key[_numberWord] |= (ulong)number << _numberShift;
        }
    }

    // Follows the sites of each piece wherever steps take them. Null where the label on a place's first site does not tell the others.
    private (int[] WrittenOf, ushort[] Told)? TryTell(Mechanism mechanism)
    {
        var count = Sites.Length;
        var pieces = Enumerable.Range(0, count).GroupBy(site => mechanism.PieceOfSite[Sites[site]]).Select(group => group.ToArray()).ToList();
        var writtenOf = new int[count];
        foreach (var piece in pieces)
        {
            foreach (var site in piece)
            {
                writtenOf[site] = piece[0];
            }
        }

        var images = mechanism.Steps.Select(step => Sites.Select(site => Array.BinarySearch(Sites, step.Permutation[site])).ToArray()).ToList();
        var told = new ushort[count * count];
        var isKnown = new bool[count * count];
        foreach (var piece in pieces)
        {
            var queue = new Queue<int[]>([piece]);
            while (queue.TryDequeue(out var places))
            {
                var shown = piece[Array.IndexOf(places, writtenOf[places[0]])];
                if (isKnown[(places[0] * count) + shown])
                {
                    if (places.Where((site, i) => told[(site * count) + shown] != piece[i]).Any())
                    {
                        return null;
                    }

                    continue;
                }

                for (var i = 0; i < places.Length; i++)
                {
                    told[(places[i] * count) + shown] = (ushort)piece[i];
                    isKnown[(places[i] * count) + shown] = true;
                }

                foreach (var image in images)
                {
                    queue.Enqueue([.. places.Select(site => image[site])]);
                }
            }
        }

        return (writtenOf, told);
    }
}
