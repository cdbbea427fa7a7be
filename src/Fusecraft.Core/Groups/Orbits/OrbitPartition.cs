using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The orbits of a group on its points, found by joining each point with its images (disjoint sets with path halving).</summary>
internal sealed class OrbitPartition
{
    private readonly int[] _orbitOf;

    public OrbitPartition(ImmutableArray<Permutation> generators, int degree)
    {
        var parent = new int[degree];
        Lanes.Identity<int>(parent);
        foreach (var generator in generators)
        {
            for (var point = 0; point < generator.SupportEnd; point++)
            {
                // The smaller root wins, so that the root of an orbit is its least point.
                var a = Root(parent, point);
                var b = Root(parent, generator[point]);
                parent[Math.Max(a, b)] = Math.Min(a, b);
            }
        }

        _orbitOf = new int[degree];
        var orbits = new List<ImmutableArray<int>.Builder>();
        for (var point = 0; point < degree; point++)
        {
            var root = Root(parent, point);
            if (root == point)
            {
                _orbitOf[point] = orbits.Count;
                orbits.Add(ImmutableArray.CreateBuilder<int>());
            }

            _orbitOf[point] = _orbitOf[root];
            orbits[_orbitOf[point]].Add(point);
        }

        Orbits = [.. orbits.Select(orbit => orbit.DrainToImmutable())];
    }

    /// <summary>Each ascending, ordered by least points.</summary>
    public ImmutableArray<ImmutableArray<int>> Orbits { get; }

    /// <summary>Which of <see cref="Orbits"/> a point is in.</summary>
    public int IndexOf(int point) => _orbitOf[point];

    private static int Root(int[] parent, int point)
    {
        while (parent[point] != point)
        {
            parent[point] = parent[parent[point]];
            point = parent[point];
        }

        return point;
    }
}
