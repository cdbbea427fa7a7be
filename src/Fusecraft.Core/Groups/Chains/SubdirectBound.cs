using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// An upper bound for the order of a group with several orbits, often met by puzzle groups; a chain that meets it is proven complete.
/// </summary>
/// <remarks>
/// <para>On each orbit the group keeps some division into k parts (perhaps single points), so it acts there within A ≀ Sym(k), where A is the action of a part's stabilizer on the part. Where two orbits are equivalent
/// (some bijection commutes with the group), one of them tells all about the other and is left out. So |G| ≤ ∏ |A|^k k!.</para>
/// <para>The sign of the exchange of parts and, where A is abelian, the product of the local actions (the twist sum) are homomorphisms of A ≀ Sym(k) onto C_2 and A. All members lie in the preimage of the subgroup K
/// that the generators' images make in the product of those targets, so |G| ≤ ∏ |A|^k k! · |K| / ∏ (2·|A|).</para>
/// </remarks>
internal sealed class SubdirectBound
{
    /// <summary>Larger orbits are taken without block systems, which would cost more than they save.</summary>
    private const int LargestOrbit = 512;

    private readonly List<(ImmutableArray<int> Orbit, OrbitParts Parts)> _kept = [];
    private readonly List<(int Kept, int[] Match)> _leftOut = [];

    private SubdirectBound(PermutationGroup group) => Group = group;

    /// <summary>The group.</summary>
    public PermutationGroup Group { get; }

    /// <summary>The orbits of two or more points, one of each class of equivalent ones, and what the group does there.</summary>
    public IReadOnlyList<(ImmutableArray<int> Orbit, OrbitParts Parts)> Kept => _kept;

    /// <summary>The other orbits: the number of an equivalent one among those kept, and the partners of its points in order.</summary>
    public IReadOnlyList<(int Kept, int[] Match)> LeftOut => _leftOut;

    /// <summary>The order of the group is at most this.</summary>
    public BigInteger Bound { get; private set; }

    public static BigInteger Of(PermutationGroup group, ReadOnlySpan<Permutation> fixing, CancellationToken cancellation) => Analyse(group, fixing, cancellation).Bound;

    /// <param name="group">Any group.</param>
    /// <param name="fixing">Some members that fix the first point moved; they save work.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static SubdirectBound Analyse(PermutationGroup group, ReadOnlySpan<Permutation> fixing, CancellationToken cancellation)
    {
        var bound = new SubdirectBound(group);
        var actions = new List<int[][]>();
        var placeOf = new int[group.Degree];
        var order = BigInteger.One;
        foreach (var orbit in group.MovedOrbits)
        {
            cancellation.ThrowIfCancellationRequested();
            var generators = EquivalentOrbits.ActionOn(group.Generators.AsSpan(), orbit, placeOf);
            if (bound.LeavesOut(orbit, generators, actions))
            {
                continue;
            }

            var parts = BestParts(generators, actions.Count == 0 ? EquivalentOrbits.ActionOn(fixing, orbit, placeOf) : []);
            actions.Add(generators);
            bound._kept.Add((orbit, parts));
            order *= parts.WreathOrder / parts.TargetOrder;
        }

        bound.Bound = order * bound.ImageOrder();
        return bound;
    }

    private bool LeavesOut(ImmutableArray<int> orbit, int[][] generators, List<int[][]> actions)
    {
        for (var i = 0; i < actions.Count; i++)
        {
            if (EquivalentOrbits.Match(actions[i], generators) is { } match)
            {
                _leftOut.Add((i, Array.ConvertAll(match, place => orbit[place])));
                return true;
            }
        }

        return false;
    }

    // The division that gives the least bound. What fixes point 0 carries the division that unites it with a point to itself, so it unites it with the images of that point as well.
    private static OrbitParts BestParts(int[][] generators, int[][] fixing)
    {
        var size = generators[0].Length;
        var best = OrbitParts.Points(generators, size);
        if (size > LargestOrbit)
        {
            return best;
        }

        var isSettled = new bool[size];
        for (var point = 1; point < size; point++)
        {
            if (isSettled[point])
            {
                continue;
            }

            Settle(point);
            var parent = AtkinsonBlocks.Join(generators, size, [(0, point)], out var unions);
            var parts = size - unions;
            if (parts == 1)
            {
                continue;
            }

            var partOf = NumberParts(parent);
            var candidate = new OrbitParts(generators, partOf, parts);
            best = candidate.WreathOrder < best.WreathOrder ? candidate : best;

            // Of a part of two or three points each gives the same division again.
            for (var i = 1; i < size && size / parts <= 3; i++)
            {
                isSettled[i] |= partOf[i] == 0;
            }
        }

        return best;

        void Settle(int point)
        {
            var open = new Stack<int>([point]);
            isSettled[point] = true;
            while (open.TryPop(out var next))
            {
                foreach (var member in fixing)
                {
                    if (!isSettled[member[next]])
                    {
                        isSettled[member[next]] = true;
                        open.Push(member[next]);
                    }
                }
            }
        }
    }

    private static int[] NumberParts(int[] parent)
    {
        var numberOf = new int[parent.Length];
        Array.Fill(numberOf, -1);
        var partOf = new int[parent.Length];
        var count = 0;
        for (var point = 0; point < parent.Length; point++)
        {
            var root = AtkinsonBlocks.Root(parent, point);
            numberOf[root] = numberOf[root] < 0 ? count++ : numberOf[root];
            partOf[point] = numberOf[root];
        }

        return partOf;
    }

    // The order of the subgroup that the generators make in the product of all targets, as a permutation group: each target acts on points of its own.
    private BigInteger ImageOrder()
    {
        var images = new HashSet<Permutation>();
        var degree = 0;
        for (var generator = 0; generator < Group.Generators.Length; generator++)
        {
            var image = new List<int>();
            foreach (var (_, parts) in _kept)
            {
                parts.AppendTarget(generator, image);
            }

            images.Add(Permutation.FromTrustedImages<int>(image.ToArray()));
            degree = image.Count;
        }

        return PermutationGroup.Generate(images, degree).Order;
    }
}
