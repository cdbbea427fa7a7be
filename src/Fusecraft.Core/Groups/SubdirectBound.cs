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
internal static class SubdirectBound
{
    /// <summary>Larger orbits are taken without block systems, which would cost more than they save.</summary>
    private const int LargestOrbit = 512;

    /// <param name="group">Any group.</param>
    /// <param name="fixing">Some members that fix the first point moved; they save work.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static BigInteger Of(PermutationGroup group, ReadOnlySpan<Permutation> fixing, CancellationToken cancellation)
    {
        var parts = new List<OrbitParts>();
        var kept = new List<int[][]>();
        var placeOf = new int[group.Degree];
        foreach (var orbit in group.MovedOrbits)
        {
            cancellation.ThrowIfCancellationRequested();
            var generators = ActionOn(group.Generators.AsSpan(), orbit, placeOf);
            if (!kept.Exists(other => AreEquivalent(other, generators)))
            {
                kept.Add(generators);
                parts.Add(BestParts(generators, parts.Count == 0 ? ActionOn(fixing, orbit, placeOf) : []));
            }
        }

        var order = BigInteger.One;
        foreach (var part in parts)
        {
            order *= part.WreathOrder / part.TargetOrder;
        }

        return order * ImageOrder(group.Generators.Length, parts);
    }

    private static int[][] ActionOn(ReadOnlySpan<Permutation> members, ImmutableArray<int> orbit, int[] placeOf)
    {
        for (var place = 0; place < orbit.Length; place++)
        {
            placeOf[orbit[place]] = place;
        }

        var generators = new int[members.Length][];
        for (var i = 0; i < generators.Length; i++)
        {
            generators[i] = new int[orbit.Length];
            for (var place = 0; place < orbit.Length; place++)
            {
                generators[i][place] = placeOf[members[i][orbit[place]]];
            }
        }

        return generators;
    }

    // Some bijection commutes with all generators: it is known by the image of one point.
    private static bool AreEquivalent(int[][] one, int[][] other)
    {
        if (one.Length == 0 || one[0].Length != other[0].Length)
        {
            return false;
        }

        var images = new int[one[0].Length];
        var points = new int[images.Length];
        for (var image = 0; image < images.Length; image++)
        {
            if (IsEquivalence(one, other, image, images, points))
            {
                return true;
            }
        }

        return false;
    }

    private static bool IsEquivalence(int[][] one, int[][] other, int firstImage, int[] images, int[] points)
    {
        Array.Fill(images, -1);
        images[0] = firstImage;
        points[0] = 0;
        var count = 1;
        for (var i = 0; i < count; i++)
        {
            for (var generator = 0; generator < one.Length; generator++)
            {
                var (next, image) = (one[generator][points[i]], other[generator][images[points[i]]]);
                if (images[next] < 0)
                {
                    images[next] = image;
                    points[count++] = next;
                }
                else if (images[next] != image)
                {
                    return false;
                }
            }
        }

        return true;
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
    private static BigInteger ImageOrder(int generators, List<OrbitParts> parts)
    {
        var images = new HashSet<Permutation>();
        var degree = 0;
        for (var generator = 0; generator < generators; generator++)
        {
            var image = new List<int>();
            foreach (var part in parts)
            {
                part.AppendTarget(generator, image);
            }

            images.Add(Permutation.FromTrustedImages<int>(image.ToArray()));
            degree = image.Count;
        }

        return PermutationGroup.Generate(images, degree).Order;
    }
}
