using System.Diagnostics;
using System.Numerics;
using System.Runtime.CompilerServices;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// One level of a stabilizer chain: generators of a group that fixes all earlier base points, the orbit of this level's base point under it, and for
/// each orbit point a representative, stored as its inverse: the permutation that takes the orbit point back to the base point.
/// </summary>
/// <remarks>A representative never changes once made, so that Schreier generators already checked stay checked while the level grows.</remarks>
internal sealed class ChainLevel<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly List<int> _orbit = [];
    private readonly List<(int Parent, int Generator)> _edges = [];
    private readonly List<int> _checked = [];
    private T[]? _orbitMarks;

    /// <summary>Starts a level whose orbit is the base point alone.</summary>
    public ChainLevel(int point, int position, ReadOnlySpan<T> identity, int degree)
    {
        Point = point;
        Position = position;
        Generators = new PackedPermutations<T>(identity.Length);
        GeneratorInverses = new PackedPermutations<T>(identity.Length);
        Inverses = new PackedPermutations<T>(identity.Length, 8);
        Slots = new int[degree];
        Slots.AsSpan().Fill(-1);
        Walk = new RandomWalk<T>(identity.Length);
        Append(point, -1, -1);
        identity.CopyTo(Inverses.AddRow());
    }

    /// <summary>The base point.</summary>
    public int Point { get; }

    /// <summary>Where the base point stands in the order in which base points are taken.</summary>
    public int Position { get; }

    /// <summary>For each point its index in the orbit, or -1.</summary>
    public int[] Slots { get; }

    /// <summary>Row k takes orbit point k back to the base point.</summary>
    public PackedPermutations<T> Inverses { get; }

    public PackedPermutations<T> Generators { get; }

    public PackedPermutations<T> GeneratorInverses { get; }

    /// <summary>Random elements of the group the generators make.</summary>
    public RandomWalk<T> Walk { get; }

    /// <summary>How many random elements of the stabilizer in a row lay in the levels below.</summary>
    public int Quiet { get; set; }

    public int OrbitLength => _orbit.Count;

    /// <summary>For each point all bits set where it is in the orbit, none elsewhere; made on first use.</summary>
    public ReadOnlySpan<T> OrbitMarks => _orbitMarks ??= MarkOrbit();

    public int OrbitPoint(int index) => _orbit[index];

    /// <summary>How many generators, in order, have had their Schreier generator at this orbit point checked.</summary>
    public int CheckedGenerators(int index) => _checked[index];

    public void SetChecked(int index, int generators) => _checked[index] = generators;

    /// <summary>True when the generator is the one by which <paramref name="to"/> entered the orbit from <paramref name="from"/>, so that the Schreier generator is the identity.</summary>
    public bool IsTreeEdge(int from, int generator, int to) => _edges[to] == (from, generator);

    /// <summary>Adds a generator that fixes all earlier base points and extends the orbit.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public void AddGenerator(ReadOnlySpan<T> generator)
    {
        Generators.Add(generator);
        Lanes.InvertPadded(generator, GeneratorInverses.AddRow());
        Walk.Add(generator);
        Quiet = 0;
        var old = _orbit.Count;
        for (var x = 0; x < old; x++)
        {
            Step(x, Generators.Count - 1);
        }

        for (var x = old; x < _orbit.Count; x++)
        {
            for (var s = 0; s < Generators.Count; s++)
            {
                Step(x, s);
            }
        }
    }

    // Optimised from the first call, like sifting.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Step(int from, int generator)
    {
        var image = int.CreateTruncating(Generators[generator][_orbit[from]]);
        if (Slots[image] >= 0)
        {
            return;
        }

        // The representative of the image is that of `from`, then the generator; its inverse is the product of the inverses the other way round.
        Append(image, from, generator);
        var row = Inverses.AddRow();
        Lanes.ComposePadded<T>(GeneratorInverses[generator], Inverses[from], row);
        Debug.Assert(int.CreateTruncating(row[image]) == Point, "A representative must lead back to the base point.");
    }

    private void Append(int point, int parent, int generator)
    {
        Slots[point] = _orbit.Count;
        _orbit.Add(point);
        _orbitMarks = null;
        _edges.Add((parent, generator));
        _checked.Add(0);
    }

    private T[] MarkOrbit()
    {
        var marks = new T[Inverses.Stride];
        foreach (var point in _orbit)
        {
            marks[point] = T.AllBitsSet;
        }

        return marks;
    }
}
