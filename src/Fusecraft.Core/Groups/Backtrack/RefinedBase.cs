using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>What a refinement parts the points by.</summary>
internal enum RefinementKind
{
    /// <summary>A number that the structure gives to each point.</summary>
    Invariant,

    /// <summary>The cell to which a permutation of the structure takes the point.</summary>
    Permutation,

    /// <summary>The orbit under the members of a group that fix the base points so far.</summary>
    Orbit,

    /// <summary>Whether the point is the base point.</summary>
    BasePoint,
}

/// <summary>A refinement as it parted the points on the source side; <paramref name="Index"/> says which invariant, permutation or group.</summary>
internal readonly record struct Refinement(RefinementKind Kind, int Index, CellSplit Split);

/// <summary>
/// The side of a partition backtrack that does not depend on the element sought: base points, one a step, and after each the ordered partition that follows from fixing them, with the refinements that led
/// there. The last partition has single points alone. A step's base point may be alone in its cell already; then it only carries the groups' chains on.
/// </summary>
/// <remarks>Source: see <see cref="PartitionBacktrack"/>. Memory: a few numbers for each point at each step. Immutable once made.</remarks>
internal sealed class RefinedBase
{
    private readonly PointStructure _source;
    private readonly int[] _keys;

    /// <summary>Chooses base points: always one of a smallest cell of two or more points. Then builds each group's chain on this base and refines with the orbits along it.</summary>
    public RefinedBase(ImmutableArray<PermutationGroup> groups, PointStructure source, CancellationToken cancellation)
    {
        _source = source;
        _keys = new int[source.Degree];
        var cells = new int[source.Degree];
        var count = Math.Min(1, source.Degree);
        var first = new List<Refinement>();
        for (var k = 0; k < source.Invariants.Length; k++)
        {
            first.Add(Refine(RefinementKind.Invariant, k, source.Invariants[k], cells, ref count));
        }

        for (var x = 0; x < groups.Length; x++)
        {
            first.Add(Refine(RefinementKind.Orbit, x, OrbitNumbers(groups[x].Generators), cells, ref count));
        }

        RefineByPermutations(first, cells, ref count);
        var prefix = ChoosePrefix([.. cells], count, groups.Min(group => group.Degree), cancellation);
        Chains = [.. groups.Select(group => group.ChainFrom(prefix, cancellation))];
        Orbits = [.. Chains.Select(chain => Enumerable.Range(0, chain.Base.Length + 1).Select(level => OrbitNumbers(chain.GeneratorsOf(level))).ToArray())];
        Points = MergedBase(prefix);

        List<ImmutableArray<Refinement>> refinements = [[.. first]];
        List<int[]> partitions = [(int[])cells.Clone()];
        List<int[]> levels = [new int[groups.Length]];
        foreach (var point in Points)
        {
            cancellation.ThrowIfCancellationRequested();
            var next = (int[])levels[^1].Clone();
            var list = new List<Refinement> { Refine(RefinementKind.BasePoint, 0, KeysOf(point, _keys), cells, ref count) };
            for (var x = 0; x < next.Length; x++)
            {
                if (next[x] < Chains[x].Base.Length && Chains[x].Base[next[x]] == point)
                {
                    next[x]++;
                    list.Add(Refine(RefinementKind.Orbit, x, Orbits[x][next[x]], cells, ref count));
                }
            }

            RefineByPermutations(list, cells, ref count);
            refinements.Add([.. list]);
            partitions.Add((int[])cells.Clone());
            levels.Add(next);
        }

        Refinements = [.. refinements];
        Cells = [.. partitions];
        Levels = [.. levels];
        Singles = [.. Enumerable.Range(0, Cells.Length).Select(NewSingles)];
    }

    /// <summary>The base points, one a step.</summary>
    public ImmutableArray<int> Points { get; }

    /// <summary>A proven chain of each group, whose base points are among <see cref="Points"/>, in this order.</summary>
    public ImmutableArray<StabilizerChain> Chains { get; }

    /// <summary>For each number of steps done, the level that each chain stands at.</summary>
    public ImmutableArray<int[]> Levels { get; }

    /// <summary>For each group and level the number of the orbit of each point.</summary>
    public ImmutableArray<int[][]> Orbits { get; }

    /// <summary>For each number of steps done, the refinements that the last of them brought.</summary>
    public ImmutableArray<ImmutableArray<Refinement>> Refinements { get; }

    /// <summary>For each number of steps done, the number of the cell of each point.</summary>
    public ImmutableArray<int[]> Cells { get; }

    /// <summary>For each number of steps done, the points left alone in their cells by the last of them.</summary>
    public ImmutableArray<int[]> Singles { get; }

    /// <summary>Writes 1 for a point and 0 for all others.</summary>
    public static int[] KeysOf(int point, int[] keys)
    {
        Array.Clear(keys);
        keys[point] = 1;
        return keys;
    }

    /// <summary>Writes for each point the cell that a permutation takes it to.</summary>
    public static int[] KeysOf(int[] images, int[] cells, int[] keys)
    {
        for (var point = 0; point < keys.Length; point++)
        {
            keys[point] = cells[images[point]];
        }

        return keys;
    }

    private static Refinement Refine(RefinementKind kind, int index, int[] keys, int[] cells, ref int count) => new(kind, index, new CellSplit(cells, keys, ref count));

    private void RefineByPermutations(List<Refinement> list, int[] cells, ref int count)
    {
        int before;
        do
        {
            before = count;
            for (var k = 0; k < _source.Permutations.Length; k++)
            {
                list.Add(Refine(RefinementKind.Permutation, k, KeysOf(_source.Permutations[k], cells, _keys), cells, ref count));
            }
        }
        while (count > before);
    }

    // Which points to fix, were there no groups: they take what is left then in ascending order.
    private int[] ChoosePrefix(int[] cells, int count, int degree, CancellationToken cancellation)
    {
        var prefix = new List<int>();
        var sizes = new int[cells.Length + 1];
        while (true)
        {
            cancellation.ThrowIfCancellationRequested();
            Array.Clear(sizes);
            foreach (var cell in cells)
            {
                sizes[cell]++;
            }

            var best = -1;
            for (var point = 0; point < degree; point++)
            {
                if (sizes[cells[point]] > 1 && (best < 0 || sizes[cells[point]] < sizes[cells[best]]))
                {
                    best = point;
                }
            }

            if (best < 0)
            {
                return [.. prefix];
            }

            prefix.Add(best);
            Refine(RefinementKind.BasePoint, 0, KeysOf(best, _keys), cells, ref count);
            RefineByPermutations([], cells, ref count);
        }
    }

    // Every chain takes base points in the order of the prefix and then ascending.
    private ImmutableArray<int> MergedBase(int[] prefix)
    {
        var isBase = new bool[_source.Degree];
        foreach (var chain in Chains)
        {
            foreach (var point in chain.Base)
            {
                isBase[point] = true;
            }
        }

        var points = ImmutableArray.CreateBuilder<int>();
        foreach (var point in prefix.Concat(Enumerable.Range(0, isBase.Length)))
        {
            if (isBase[point])
            {
                isBase[point] = false;
                points.Add(point);
            }
        }

        return points.DrainToImmutable();
    }

    private int[] OrbitNumbers(ImmutableArray<Permutation> generators)
    {
        var orbits = new OrbitPartition(generators, _source.Degree);
        return [.. Enumerable.Range(0, _source.Degree).Select(orbits.IndexOf)];
    }

    private int[] NewSingles(int step)
    {
        var alone = Alone(Cells[step]);
        var before = step == 0 ? [] : Alone(Cells[step - 1]);
        return [.. alone.Except(before)];
    }

    private static List<int> Alone(int[] cells)
    {
        var sizes = new int[cells.Length + 1];
        foreach (var cell in cells)
        {
            sizes[cell]++;
        }

        return [.. Enumerable.Range(0, cells.Length).Where(point => sizes[cells[point]] == 1)];
    }
}
