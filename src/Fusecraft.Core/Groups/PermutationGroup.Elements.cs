using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>All members in lexicographic order of image lists (the order of <see cref="Rank"/>), made as they are asked for. The identity is first.</summary>
    public IEnumerable<Permutation> Elements()
    {
        var chain = _ascendingChain.Value;
        var digits = new int[chain.Base.Length];
        int level;
        do
        {
            yield return chain.Tables.FromDigits(digits);
            for (level = digits.Length - 1; level >= 0 && ++digits[level] == chain.OrbitLengths[level]; level--)
            {
                digits[level] = 0;
            }
        }
        while (level >= 0);
    }

    /// <summary>One member of each right coset <c>subgroup * g</c> of a subgroup, made as they are asked for; <see cref="Index"/> says how many there are. The identity is first.</summary>
    /// <param name="subgroup">A subgroup of this group.</param>
    /// <remarks>Each is the first of its coset in lexicographic order, as given by the subgroup's <see cref="LeastOfCoset"/>. Keeps those met so far; their order depends on the generators of this group.</remarks>
    /// <exception cref="ArgumentException">It is no subgroup of this group.</exception>
    public IEnumerable<Permutation> CosetRepresentatives(PermutationGroup subgroup)
    {
        RequireSubgroup(subgroup);
        return ListCosets(subgroup);
    }

    /// <summary>The member of the right coset <c>group * permutation</c> whose image list is first in lexicographic order: equal for two permutations exactly when their cosets are.</summary>
    /// <param name="permutation">Any permutation.</param>
    /// <remarks>One composition a level, and a look at each orbit point.</remarks>
    public Permutation LeastOfCoset(Permutation permutation)
    {
        // Members that fix the base points before a level choose freely, among its orbit, which point goes where the level's base point is to go.
        var tables = _ascendingChain.Value.Tables;
        for (var level = 0; level < tables.Count; level++)
        {
            var best = tables.BasePoint(level);
            for (var i = 0; i < tables.OrbitLength(level); i++)
            {
                var point = tables.OrbitPoint(level, i);
                best = permutation[point] < permutation[best] ? point : best;
            }

            if (best != tables.BasePoint(level))
            {
                permutation = tables.Representative(level, best) * permutation;
            }
        }

        return permutation;
    }

    /// <summary>How many members there are of each cycle type, by enumeration: divided by <see cref="Order"/> these are the coefficients of the group's cycle index.</summary>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes time in proportion to the order.</remarks>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public IReadOnlyDictionary<CycleType, BigInteger> CycleTypeCounts(CancellationToken cancellationToken = default)
    {
        var counts = new Dictionary<CycleType, BigInteger>();
        foreach (var member in Elements())
        {
            cancellationToken.ThrowIfCancellationRequested();
            var type = member.CycleType;
            counts[type] = counts.GetValueOrDefault(type) + 1;
        }

        return counts;
    }

    /// <summary>
    /// In how many ways the points can be coloured, where two colourings count as one when a member carries one to the other: the average, over the members, of <paramref name="colours"/> to
    /// the power of the number of cycles, fixed points included (the Cauchy-Frobenius lemma, also called Burnside's).
    /// </summary>
    /// <param name="colours">How many colours there are; not all need occur.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes time in proportion to the order.</remarks>
    /// <exception cref="ArgumentOutOfRangeException">The number of colours is negative.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public BigInteger CountColourings(int colours, CancellationToken cancellationToken = default)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(colours);
        var fixedColourings = BigInteger.Zero;
        foreach (var (type, count) in CycleTypeCounts(cancellationToken))
        {
            var cycles = Degree - type.MovedPoints;
            foreach (var part in type.Parts)
            {
                cycles += part.Count;
            }

            fixedColourings += count * BigInteger.Pow(colours, cycles);
        }

        return fixedColourings / Order;
    }

    private IEnumerable<Permutation> ListCosets(PermutationGroup subgroup)
    {
        var met = new HashSet<Permutation> { Permutation.Identity };
        var queue = new Queue<Permutation>(met);
        yield return Permutation.Identity;
        while (queue.TryDequeue(out var next))
        {
            foreach (var generator in Generators)
            {
                var image = subgroup.LeastOfCoset(next * generator);
                if (met.Add(image))
                {
                    queue.Enqueue(image);
                    yield return image;
                }
            }
        }
    }
}
