using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>Counts the states that can be reached from the first shape's own, over all regions.</summary>
/// <remarks>
/// <para>The permutations of all paths from the first shape to the first shape of a region Q are a union of double cosets H·x·V(Q), where H is the vertex group at the first shape: loops at the start come before,
/// on the left, loops at the end after, on the right. Each other shape of Q is reached by as many. With τ the tree paths of the regions, a passage by step t from shape p of region P to shape s of Q takes
/// H·x·V(P) to H·x·V(P)·σ·V(Q), where σ = τ(p)·t·τ(s)⁻¹.</para>
/// <para>Regions are taken when all passages into them are known; there are no ways back, so this comes to an end.</para>
/// </remarks>
internal sealed class ReachableStates
{
    private readonly ShapeGroupoid _groupoid;
    private readonly CancellationToken _cancellation;
    private readonly CosetBudget _budget;
    private readonly VertexGroup _home;
    private readonly PermutationGroup?[] _groups;
    private readonly DoubleCosetSet?[] _reached;
    private readonly List<Passage>[] _leaving;
    private readonly List<Arrival>[] _arriving;
    private readonly int[] _expected;

    private ReachableStates(VertexGroup home, StateCountOptions options, CancellationToken cancellation)
    {
        _home = home;
        _groupoid = home.Groupoid;
        _cancellation = cancellation;
        _budget = new CosetBudget(options.MaxCosets);
        var regions = _groupoid.Regions.Length;
        _groups = new PermutationGroup?[regions];
        _reached = new DoubleCosetSet?[regions];
        _leaving = [.. Enumerable.Range(0, regions).Select(_ => new List<Passage>())];
        _arriving = [.. Enumerable.Range(0, regions).Select(_ => new List<Arrival>())];
        _expected = new int[regions];
    }

    /// <summary>The number of states, or null when the budget does not suffice to find it.</summary>
    /// <param name="home">The vertex group at the groupoid's first shape.</param>
    /// <param name="options">The budget.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static BigInteger? Count(VertexGroup home, StateCountOptions options, CancellationToken cancellation)
    {
        if (home.Groupoid.Regions.Length == 1)
        {
            return home.StateCount;
        }

        return home.Groupoid.PassageCount > options.MaxCosets ? null : new ReachableStates(home, options, cancellation).Count();
    }

    private BigInteger? Count()
    {
        ListPassages();
        var total = BigInteger.Zero;
        var ready = new Queue<int>([0]);
        while (ready.TryDequeue(out var region))
        {
            _cancellation.ThrowIfCancellationRequested();
            var loops = region == 0 ? RegionLoops.Of(_home) : RegionLoops.Of(_groupoid, _groupoid.Regions[region], _cancellation);
            _groups[region] = loops.Group;
            var reached = _reached[region] = new DoubleCosetSet(_home.Group, loops.Group, _budget, _cancellation);
            if (!(region == 0 ? reached.TryAdd(Permutation.Identity, out _) : TryArrive(region, loops)))
            {
                return null;
            }

            foreach (var (_, size) in reached.Entries)
            {
                total += size * _groupoid.Regions[region].ShapeCount;
            }

            foreach (var (shape, step, target) in _leaving[region])
            {
                var next = _groupoid.RegionOf(target);
                _arriving[next].Add(new Arrival(region, loops.Label(shape) * step.Permutation, target));
                if (--_expected[next] == 0)
                {
                    ready.Enqueue(next);
                }
            }
        }

        return total;
    }

    private void ListPassages()
    {
        for (var shape = 0; shape < _groupoid.ShapeCount; shape++)
        {
            _cancellation.ThrowIfCancellationRequested();
            var region = _groupoid.RegionOf(shape);
            foreach (var step in _groupoid.Mechanism.Steps)
            {
                if (_groupoid.After(shape, step) is >= 0 and var target && _groupoid.RegionOf(target) is var next && next != region)
                {
                    _leaving[region].Add(new Passage(shape, step, target));
                    _expected[next]++;
                }
            }
        }
    }

    // What all passages into a region bring there.
    private bool TryArrive(int region, RegionLoops loops)
    {
        foreach (var arrivals in _arriving[region].GroupBy(arrival => arrival.Source))
        {
            var fromHome = arrivals.Key == 0;
            var between = fromHome ? _reached[region]! : new DoubleCosetSet(_groups[arrivals.Key]!, loops.Group, _budget, _cancellation);
            foreach (var arrival in arrivals)
            {
                // From home the double coset is H·σ·V(Q) itself; from elsewhere σ matters only up to V(P)·σ·V(Q).
                var sigma = arrival.Permutation * loops.Label(arrival.Target).Inverse();
                if (!between.TryAdd(sigma, out var isNew) || (isNew && !fromHome && !TryCarryOver(arrivals.Key, region, sigma)))
                {
                    return false;
                }
            }
        }

        _arriving[region].Clear();
        return true;
    }

    private bool TryCarryOver(int source, int region, Permutation sigma)
    {
        foreach (var (x, _) in _reached[source]!.Entries)
        {
            // H·x·V(P)·σ·V(Q), either by the cosets H·y in H·x·V(P) or by the cosets z·V(Q) in V(P)·σ·V(Q), whichever turn out to be fewer.
            var before = new CosetWalk(_home.Group, _groups[source]!, x);
            var after = new CosetWalk(_groups[region]!, _groups[source]!, sigma.Inverse());
            while (!before.IsClosed && !after.IsClosed)
            {
                _cancellation.ThrowIfCancellationRequested();
                if (!before.TryAdvance(_budget) || !after.TryAdvance(_budget))
                {
                    return false;
                }
            }

            var brought = before.IsClosed ? before.Representatives.Select(y => y * sigma) : after.Representatives.Select(z => x * z.Inverse());
            foreach (var permutation in brought)
            {
                if (!_reached[region]!.TryAdd(permutation, out _))
                {
                    return false;
                }
            }
        }

        return true;
    }

    /// <summary>A step that leaves its region.</summary>
    private readonly record struct Passage(int Shape, Step Step, int Target);

    /// <summary>A passage as its target's region sees it: the permutation of a path from the source region's first shape over it to the target.</summary>
    private readonly record struct Arrival(int Source, Permutation Permutation, int Target);
}
