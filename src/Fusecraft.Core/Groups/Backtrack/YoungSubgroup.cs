using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The permutations, or even permutations, of the points 0 … n-1 that keep every point's colour: products of permutations of points of one colour.</summary>
internal sealed class YoungSubgroup
{
    private readonly int[] _colours;
    private readonly int[][] _classes;
    private readonly bool _even;

    /// <param name="colours">The colour of each point.</param>
    /// <param name="even">Whether to take the even permutations only.</param>
    public YoungSubgroup(int[] colours, bool even)
    {
        _colours = colours;
        _even = even;
        _classes = [.. Enumerable.Range(0, colours.Length).GroupBy(point => colours[point]).Select(group => group.ToArray()).Where(points => points.Length > 1)];
        var order = BigInteger.One;
        foreach (var points in _classes)
        {
            for (var i = 2; i <= points.Length; i++)
            {
                order *= i;
            }
        }

        Group = PermutationGroup.FromOrder(even ? EvenGenerators() : AllGenerators(), colours.Length, even && _classes.Length > 0 ? order / 2 : order);
    }

    public PermutationGroup Group { get; }

    /// <summary>A permutation, even where only those are taken, that carries another colouring with as many points of each colour to this one, or null where there is none.</summary>
    public Permutation? Carrying(int[] colours)
    {
        var images = new int[colours.Length];
        int[] from = [.. Enumerable.Range(0, colours.Length).OrderBy(point => colours[point])];
        int[] to = [.. Enumerable.Range(0, colours.Length).OrderBy(point => _colours[point])];
        for (var i = 0; i < from.Length; i++)
        {
            images[from[i]] = to[i];
        }

        var permutation = Permutation.FromImages(images);
        if (!_even || permutation.Parity == Parity.Even)
        {
            return permutation;
        }

        return _classes.Length > 0 ? permutation * Permutation.FromCycle(_classes[0][0], _classes[0][1]) : null;
    }

    private ImmutableArray<Permutation> AllGenerators() =>
        [.. _classes.SelectMany(points => new[] { Permutation.FromCycle(points[0], points[1]), Permutation.FromCycle(points) }).Distinct()];

    // The alternating group on each colour, and exchanges in two colours at once.
    private ImmutableArray<Permutation> EvenGenerators()
    {
        var generators = ImmutableArray.CreateBuilder<Permutation>();
        foreach (var points in _classes)
        {
            if (points.Length > 2)
            {
                generators.Add(Permutation.FromCycle(points.AsSpan(0, 3)));
                generators.Add(Permutation.FromCycle(points.AsSpan(1 - (points.Length & 1))));
            }
        }

        for (var i = 1; i < _classes.Length; i++)
        {
            generators.Add(Permutation.FromCycle(_classes[i - 1][0], _classes[i - 1][1]) * Permutation.FromCycle(_classes[i][0], _classes[i][1]));
        }

        return [.. generators.Distinct()];
    }
}
