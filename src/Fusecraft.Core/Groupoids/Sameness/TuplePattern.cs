using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// What some permutations do together, whatever the points are called: points are numbered orbit by orbit in the order in which the permutations lead to them, from the point of the orbit where that
/// gives the least list. Two tuples have one pattern exactly when one permutation conjugates each of the first to its counterpart.
/// </summary>
internal sealed class TuplePattern
{
    private readonly ImmutableArray<int[]> _orbits;

    private TuplePattern(ImmutableArray<int[]> orbits, ImmutableArray<int> points)
    {
        _orbits = orbits;
        Points = points;
    }

    /// <summary>The points in their new order; where patterns are the same, points at the same place correspond.</summary>
    public ImmutableArray<int> Points { get; }

    /// <summary>The pattern on the points that a group moves, whose members the permutations are.</summary>
    public static TuplePattern Of(ImmutableArray<Permutation> permutations, PermutationGroup group)
    {
        var orbits = new List<(int[] Pattern, int[] Points)>();
        var seen = new bool[group.Degree];
        foreach (var start in group.MovedOrbits.SelectMany(orbit => orbit))
        {
            if (seen[start])
            {
                continue;
            }

            var best = Numbered(permutations, start, group.Degree);
            foreach (var point in best.Points)
            {
                seen[point] = true;
            }

            foreach (var other in best.Points.Skip(1).Select(point => Numbered(permutations, point, group.Degree)))
            {
                if (other.Pattern.AsSpan().SequenceCompareTo(best.Pattern) < 0)
                {
                    best = other;
                }
            }

            orbits.Add(best);
        }

        orbits.Sort((one, other) => one.Pattern.Length != other.Pattern.Length ? one.Pattern.Length - other.Pattern.Length : one.Pattern.AsSpan().SequenceCompareTo(other.Pattern));
        return new TuplePattern([.. orbits.Select(orbit => orbit.Pattern)], [.. orbits.SelectMany(orbit => orbit.Points)]);
    }

    public bool SameAs(TuplePattern other)
    {
        if (_orbits.Length != other._orbits.Length)
        {
            return false;
        }

        for (var i = 0; i < _orbits.Length; i++)
        {
            if (!_orbits[i].AsSpan().SequenceEqual(other._orbits[i]))
            {
                return false;
            }
        }

        return true;
    }

    // The orbit of a point, numbered breadth-first from there, and where each permutation takes each number.
    private static (int[] Pattern, int[] Points) Numbered(ImmutableArray<Permutation> permutations, int start, int degree)
    {
        var numberOf = new int[degree];
        Array.Fill(numberOf, -1);
        numberOf[start] = 0;
        var points = new List<int> { start };
        var pattern = new List<int>();
        for (var i = 0; i < points.Count; i++)
        {
            foreach (var permutation in permutations)
            {
                var image = permutation[points[i]];
                if (numberOf[image] < 0)
                {
                    numberOf[image] = points.Count;
                    points.Add(image);
                }

                pattern.Add(numberOf[image]);
            }
        }

        return ([.. pattern], [.. points]);
    }
}
