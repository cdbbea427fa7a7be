using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>The lists of points that the members carry a list to, in lexicographic order, made as they are asked for: take as many as wanted, <see cref="OrbitSizeOfTuple"/> says how many there are.</summary>
    /// <param name="points">Points in 0 … Degree-1, distinct; their order matters.</param>
    /// <remarks>Takes a chain with this base at the start, and no memory that grows.</remarks>
    /// <exception cref="ArgumentException">A point is outside 0 … Degree-1 or given twice.</exception>
    public IEnumerable<ImmutableArray<int>> OrbitOfTuple(params ReadOnlySpan<int> points)
    {
        StabilizerChain.RequirePrefix(points, Degree, nameof(points));
        int[] tuple = [.. points];
        return ListTuples(tuple, ChainFrom(tuple), 0, 0, Permutation.Identity);
    }

    /// <summary>How many lists of points the members carry a list to.</summary>
    /// <param name="points">Points in 0 … Degree-1, distinct.</param>
    /// <exception cref="ArgumentException">A point is outside 0 … Degree-1 or given twice.</exception>
    public BigInteger OrbitSizeOfTuple(params ReadOnlySpan<int> points)
    {
        var chain = ChainWithBase(points);
        var size = BigInteger.One;
        for (var level = 0; level < chain.Base.Length && points.Contains(chain.Base[level]); level++)
        {
            size *= chain.OrbitLengths[level];
        }

        return size;
    }

    /// <summary>
    /// The sets of points that the members carry a set to, each once and ascending, made as they are asked for: take as many as wanted, <see cref="OrbitSizeOfSet"/> says how many there are.
    /// First the set itself, then those that one generator carries it to, and so on.
    /// </summary>
    /// <param name="points">Points in 0 … Degree-1, distinct.</param>
    /// <remarks>Keeps the sets met so far. The order depends on the generators.</remarks>
    /// <exception cref="ArgumentException">A point is outside 0 … Degree-1 or given twice.</exception>
    public IEnumerable<ImmutableArray<int>> OrbitOfSet(params ReadOnlySpan<int> points)
    {
        StabilizerChain.RequirePrefix(points, Degree, nameof(points));
        int[] set = [.. points];
        Array.Sort(set);
        return ListSets(set);
    }

    /// <summary>How many sets of points the members carry a set to: |group| / |set-wise stabilizer|.</summary>
    /// <inheritdoc cref="SetwiseStabilizer"/>
    public BigInteger OrbitSizeOfSet(ReadOnlySpan<int> points, CancellationToken cancellationToken = default) => Order / SetwiseStabilizer(points, cancellationToken).Order;

    // All images of the tuple's points from one on, given those before: the member takes the points before where they are to go.
    private static IEnumerable<ImmutableArray<int>> ListTuples(int[] tuple, StabilizerChain chain, int done, int level, Permutation member)
    {
        if (done == tuple.Length)
        {
            yield return [.. tuple.Select(point => member[point])];
            yield break;
        }

        if (level == chain.Base.Length || chain.Base[level] != tuple[done])
        {
            foreach (var images in ListTuples(tuple, chain, done + 1, level, member))
            {
                yield return images;
            }

            yield break;
        }

        foreach (var point in chain.Orbit(level).OrderBy(point => member[point]))
        {
            foreach (var images in ListTuples(tuple, chain, done + 1, level + 1, chain.Representative(level, point) * member))
            {
                yield return images;
            }
        }
    }

    private IEnumerable<ImmutableArray<int>> ListSets(int[] set)
    {
        var met = new HashSet<int[]>(ListComparer.Instance) { set };
        var queue = new Queue<int[]>(met);
        yield return [.. set];
        while (queue.TryDequeue(out var next))
        {
            foreach (var generator in Generators)
            {
                var image = Array.ConvertAll(next, point => generator[point]);
                Array.Sort(image);
                if (met.Add(image))
                {
                    queue.Enqueue(image);
                    yield return [.. image];
                }
            }
        }
    }

    private sealed class ListComparer : IEqualityComparer<int[]>
    {
        public static readonly ListComparer Instance = new();

        public bool Equals(int[]? x, int[]? y) => ReferenceEquals(x, y) || (x is not null && y is not null && x.AsSpan().SequenceEqual(y));

        public int GetHashCode(int[] obj)
        {
            var hash = default(HashCode);
            foreach (var point in obj)
            {
                hash.Add(point);
            }

            return hash.ToHashCode();
        }
    }
}
