using System.Collections.Immutable;
using System.Diagnostics;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// Searches the common members of one or more groups for those that carry a structure on the points to itself, or for one that carries it to another. Base images are tried one after the other; each trial
/// refines an ordered partition of the points in the way in which the partition of the source was refined, and is given up where the two part differently.
/// </summary>
/// <remarks>
/// <para>Sources: J. S. Leon, <em>Permutation group algorithms based on partitions I: theory and algorithms</em>, J. Symbolic Comput. 12 (1991); C. C. Sims's pruning by the subgroup found so far, as told
/// by G. Butler, <em>Fundamental Algorithms for Permutation Groups</em> (1991) (sources not opened, methods from memory).</para>
/// <para>The stabilizer K is found from the last step up: at each step the members that fix all base points before are known where they fix this one too, and one trial for each orbit of K of possible images
/// settles the step. Of each double coset KgK only the element is looked for whose base images come first in lexicographic order. Exponential in the worst case. Not safe to share.</para>
/// </remarks>
internal sealed class PartitionBacktrack
{
    private readonly RefinedBase _base;
    private readonly ImmutableArray<PermutationGroup> _groups;
    private readonly PointStructure _source;
    private readonly CancellationToken _cancellation;
    private readonly int _steps;

    // For each step: which points are images of its base point under the members of the stabilizer found so far that fix the base points before.
    private readonly bool[][] _stabilizerOrbits;

    // For each number of steps done: the partition on the side of the target, and for each group a member with the images chosen so far.
    private readonly int[][] _cells;
    private readonly int[][][] _members;

    private readonly int[] _images;
    private readonly int[] _pointOfCell;
    private readonly int[] _keys;
    private readonly int[] _counter;
    private readonly int[] _representative;
    private PointStructure _target;
    private PermutationGroup? _stabilizer;
    private int _start;

    public PartitionBacktrack(ImmutableArray<PermutationGroup> groups, PointStructure source, CancellationToken cancellation)
    {
        var degree = source.Degree;
        _groups = groups;
        _source = _target = source;
        _cancellation = cancellation;
        _base = new RefinedBase(groups, source, cancellation);
        _steps = _base.Points.Length;
        _stabilizerOrbits = NewTable<bool>(_steps, degree);
        _cells = NewTable<int>(_steps + 1, degree);
        _members = [.. groups.Select(_ => NewTable<int>(_steps + 1, degree))];
        _images = new int[_steps];
        _pointOfCell = new int[degree];
        _keys = new int[degree];
        _counter = new int[degree];
        _representative = new int[degree];
    }

    /// <summary>So many images of base points are tried in one search; then it is given up.</summary>
    public long MaxTrials { get; init; } = long.MaxValue;

    /// <summary>So many were tried in the last search.</summary>
    public long Trials { get; private set; }

    /// <summary>True when the last search was given up: then what it returned means nothing, unless it found a member.</summary>
    public bool IsExhausted => Trials >= MaxTrials;

    /// <summary>The common members that carry the structure to itself.</summary>
    public PermutationGroup Stabilizer()
    {
        if (_stabilizer is not null)
        {
            return _stabilizer;
        }

        Trials = 0;
        _target = _source;
        var generators = ImmutableArray.CreateBuilder<Permutation>();
        var order = BigInteger.One;
        var orbits = new int[_source.Degree];
        Lanes.Identity<int>(orbits);
        for (_start = _steps - 1; _start >= 0; _start--)
        {
            _base.Cells[_start].CopyTo(_cells[_start], 0);
            foreach (var members in _members)
            {
                Lanes.Identity<int>(members[_start]);
            }

            var point = _base.Points[_start];
            MarkOrbit(orbits, point, _stabilizerOrbits[_start]);
            for (var image = 0; image < orbits.Length; image++)
            {
                if (_cells[_start][image] == _base.Cells[_start][point] && !_stabilizerOrbits[_start][image] && Root(orbits, image) == image
                    && TryStep(_start, image) && Descend(_start + 1))
                {
                    var found = _members[0][_steps];
                    generators.Add(Permutation.FromTrustedImages<int>(found));
                    Join(orbits, found);
                    MarkOrbit(orbits, point, _stabilizerOrbits[_start]);
                }
            }

            order *= _stabilizerOrbits[_start].Count(isThere => isThere);
        }

        _start = 0;
        return _stabilizer = PermutationGroup.FromOrder(generators.DrainToImmutable(), _groups[0].Degree, order);
    }

    /// <summary>A common member that carries the structure to another one on as many points, or null where there is none.</summary>
    public Permutation? FindCarryingTo(PointStructure target)
    {
        Debug.Assert(target.Degree == _source.Degree && target.Permutations.Length == _source.Permutations.Length, "The structures differ in kind.");
        Stabilizer();
        _target = target;
        return Find([.. _groups.Select(_ => Permutation.Identity)]);
    }

    /// <summary>A permutation that carries the structure to itself and lies, for each group G in turn, in the right coset <c>G * representative</c>; null where there is none. Not in the groups, as a rule.</summary>
    public Permutation? FindInCosets(params ImmutableArray<Permutation> representatives)
    {
        Stabilizer();
        _target = _source;
        return Find(representatives);
    }

    // What holds of the members of a group along its chain holds of those of a coset too: each is a member followed by the representative.
    private Permutation? Find(ImmutableArray<Permutation> representatives)
    {
        Trials = 0;
        Array.Clear(_cells[0]);
        for (var x = 0; x < _members.Length; x++)
        {
            representatives[x].CopyLanes<int>(_members[x][0]);
        }

        return TryRefine(0, 0) && Descend(0) ? Permutation.FromTrustedImages<int>(_members[0][_steps]) : null;
    }

    // Tries the images of the base points from a step on. When all points are alone in their cells the refinements have checked everything: the partitions agree on colours, orbits and permutations.
    private bool Descend(int step)
    {
        if (step == _steps)
        {
            Debug.Assert(_members.All(members => members[_steps].AsSpan().SequenceEqual(_members[0][_steps])), "The groups' members should agree.");
            return true;
        }

        var cells = _cells[step];
        var cell = _base.Cells[step][_base.Points[step]];
        for (var image = 0; image < cells.Length; image++)
        {
            if (cells[image] == cell && TryStep(step, image) && Descend(step + 1))
            {
                return true;
            }
        }

        return false;
    }

    private bool TryStep(int step, int image)
    {
        _cancellation.ThrowIfCancellationRequested();
        if (Trials >= MaxTrials)
        {
            return false;
        }

        Trials++;
        _images[step] = image;
        _cells[step].CopyTo(_cells[step + 1], 0);
        for (var x = 0; x < _members.Length; x++)
        {
            Extend(x, step, image);
        }

        return TryRefine(step + 1, image) && !ComesLater(step + 1);
    }

    // Carries a group's member on to one that takes the step's base point to the image too; the orbits on the target side saw to it that there is one.
    private void Extend(int x, int step, int image)
    {
        var member = _members[x][step];
        var extended = _members[x][step + 1];
        var level = _base.Levels[step][x];
        if (_base.Levels[step + 1][x] == level)
        {
            member.CopyTo(extended, 0);
            return;
        }

        _base.Chains[x].Representative(level, Array.IndexOf(member, image)).CopyLanes<int>(_representative);
        for (var point = 0; point < member.Length; point++)
        {
            extended[point] = member[_representative[point]];
        }
    }

    private bool TryRefine(int step, int image)
    {
        var cells = _cells[step];
        foreach (var (kind, index, split) in _base.Refinements[step])
        {
            var keys = kind switch
            {
                RefinementKind.Invariant => _target.Invariants[index],
                RefinementKind.Permutation => RefinedBase.KeysOf(_target.Permutations[index], cells, _keys),
                RefinementKind.BasePoint => RefinedBase.KeysOf(image, _keys),
                _ => OrbitKeys(_base.Orbits[index][_base.Levels[step][index]], _members[index][step]),
            };
            if (!split.TryApply(cells, keys, _counter))
            {
                return false;
            }
        }

        return true;
    }

    private int[] OrbitKeys(int[] orbits, int[] member)
    {
        for (var point = 0; point < orbits.Length; point++)
        {
            _keys[member[point]] = orbits[point];
        }

        return _keys;
    }

    // True when some k in the stabilizer fixes the base points before one, takes it to a point whose image is known, and that image comes before its own: then k times the element sought comes earlier.
    private bool ComesLater(int step)
    {
        var cells = _cells[step];
        for (var point = 0; point < cells.Length; point++)
        {
            _pointOfCell[cells[point]] = point;
        }

        foreach (var single in _base.Singles[step])
        {
            var image = _pointOfCell[_base.Cells[step][single]];
            for (var i = _start; i < step; i++)
            {
                if (image < _images[i] && _stabilizerOrbits[i][single])
                {
                    return true;
                }
            }
        }

        return false;
    }

    private static T[][] NewTable<T>(int rows, int columns)
    {
        var table = new T[rows][];
        for (var row = 0; row < rows; row++)
        {
            table[row] = new T[columns];
        }

        return table;
    }

    // Orbits as disjoint sets; the root of each is its least point.
    private static int Root(int[] parents, int point)
    {
        while (parents[point] != point)
        {
            parents[point] = parents[parents[point]];
            point = parents[point];
        }

        return point;
    }

    private static void Join(int[] parents, int[] images)
    {
        for (var point = 0; point < images.Length; point++)
        {
            var (a, b) = (Root(parents, point), Root(parents, images[point]));
            parents[Math.Max(a, b)] = Math.Min(a, b);
        }
    }

    private static void MarkOrbit(int[] parents, int point, bool[] marks)
    {
        var root = Root(parents, point);
        for (var other = 0; other < marks.Length; other++)
        {
            marks[other] = Root(parents, other) == root;
        }
    }
}
