using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>Well-known groups, ready-made: for tests, and as things to compare with. Their orders are known by theorem, so their chains are proven at once. Points are 0-based.</summary>
public static partial class KnownGroups
{
    /// <summary>All permutations of n points; order n!.</summary>
    /// <exception cref="ArgumentOutOfRangeException">n is negative or above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup Symmetric(int n)
    {
        RequireDegree(n, 0);
        return OfKnownOrder(n < 2 ? [] : n == 2 ? [Permutation.FromCycle(0, 1)] : [Cycle(0, n), Permutation.FromCycle(0, 1)], n, Factorial(n));
    }

    /// <summary>All even permutations of n points; order n!/2 for n from 2 on.</summary>
    /// <exception cref="ArgumentOutOfRangeException">n is negative or above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup Alternating(int n)
    {
        RequireDegree(n, 0);

        // (0 1 2) and a long cycle of odd length, over all points or over all but the first.
        return n < 3
            ? OfKnownOrder([], n, 1)
            : OfKnownOrder([Permutation.FromCycle(0, 1, 2), n % 2 == 1 ? Cycle(0, n) : Cycle(1, n - 1)], n, Factorial(n) / 2);
    }

    /// <summary>The powers of one cycle of n points; order n.</summary>
    /// <exception cref="ArgumentOutOfRangeException">n is below 1 or above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup Cyclic(int n)
    {
        RequireDegree(n, 1);
        return OfKnownOrder([Cycle(0, n)], n, n);
    }

    /// <summary>The rotations and reflections of the regular n-gon on its corners, numbered round; order 2n.</summary>
    /// <exception cref="ArgumentOutOfRangeException">n is below 3 or above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup Dihedral(int n)
    {
        RequireDegree(n, 3);
        var reflection = new int[n];
        for (var i = 0; i < n; i++)
        {
            reflection[i] = n - 1 - i;
        }

        return OfKnownOrder([Cycle(0, n), Permutation.FromTrustedImages<int>(reflection)], n, 2 * n);
    }

    /// <summary>Both groups side by side: the first on its points, the second on the points behind them. The order is the product of the orders.</summary>
    /// <exception cref="ArgumentException">The degrees add up to more than <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup DirectProduct(PermutationGroup first, PermutationGroup second)
    {
        ArgumentNullException.ThrowIfNull(first);
        ArgumentNullException.ThrowIfNull(second);
        RequireProductDegree((long)first.Degree + second.Degree);
        return OfKnownOrder(
            [.. first.Generators, .. second.Generators.Select(generator => Shifted(generator, second.Degree, first.Degree))], first.Degree + second.Degree, first.Order * second.Order);
    }

    /// <summary>
    /// The wreath product in its imprimitive action: as many copies of the lower group as the upper one has points, and the upper group exchanging them. Point i of copy j is number j·n + i, where n is the
    /// lower degree. The order is |lower|^m · |upper|, m the upper degree.
    /// </summary>
    /// <exception cref="ArgumentException">The degree n·m is more than <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup WreathProduct(PermutationGroup lower, PermutationGroup upper)
    {
        ArgumentNullException.ThrowIfNull(lower);
        ArgumentNullException.ThrowIfNull(upper);
        var (n, m) = (lower.Degree, upper.Degree);
        RequireProductDegree((long)n * m);

        // One copy of the lower group in each orbit of the upper one; the others are its conjugates.
        var copies = upper.Orbits.SelectMany(orbit => lower.Generators.Select(generator => Shifted(generator, n, orbit[0] * n)));
        var exchanges = upper.Generators.Select(generator => FromFunction(n * m, point => (generator[point / n] * n) + (point % n)));
        return OfKnownOrder([.. copies, .. exchanges], n * m, BigInteger.Pow(lower.Order, m) * upper.Order);
    }

    /// <summary>
    /// The wreath product in its product action, on tuples: the lower group acts in each place, the upper one exchanges the places. The tuple (i_0, …, i_(m-1)) is number i_0 + i_1·n + i_2·n² + …; a place goes where the
    /// upper group takes it. The order is |lower|^m · |upper|.
    /// </summary>
    /// <exception cref="ArgumentException">The degree n^m is more than <see cref="Permutation.MaxDegree"/>, or the lower group has fewer than two points.</exception>
    public static PermutationGroup WreathProductOnTuples(PermutationGroup lower, PermutationGroup upper)
    {
        ArgumentNullException.ThrowIfNull(lower);
        ArgumentNullException.ThrowIfNull(upper);
        var (n, m) = (lower.Degree, upper.Degree);
        if (n < 2)
        {
            throw new ArgumentException($"The lower group has {n} points; tuples need at least two.", nameof(lower));
        }

        RequireProductDegree(m > 16 ? long.MaxValue : (long)BigInteger.Pow(n, m));
        var places = Enumerable.Range(0, m).Select(place => (int)BigInteger.Pow(n, place)).ToArray();
        var degree = (int)BigInteger.Pow(n, m);
        var inPlaces = upper.Orbits.SelectMany(orbit => lower.Generators.Select(generator => FromFunction(degree, tuple =>
        {
            var entry = tuple / places[orbit[0]] % n;
            return tuple + ((generator[entry] - entry) * places[orbit[0]]);
        })));
        var exchanges = upper.Generators.Select(generator => FromFunction(degree, tuple => Enumerable.Range(0, m).Sum(place => tuple / places[place] % n * places[generator[place]])));
        return OfKnownOrder([.. inPlaces, .. exchanges], degree, BigInteger.Pow(lower.Order, m) * upper.Order);
    }

    private static PermutationGroup OfKnownOrder(IEnumerable<Permutation> generators, int degree, BigInteger order) => PermutationGroup.FromOrder([.. generators], degree, order);

    private static Permutation Cycle(int first, int length) => FromFunction(first + length, point => point < first ? point : first + ((point - first + 1) % length));

    private static Permutation Shifted(Permutation permutation, int degree, int by) => FromFunction(by + degree, point => point < by ? point : by + permutation[point - by]);

    private static Permutation FromFunction(int degree, Func<int, int> image)
    {
        var images = new int[degree];
        for (var point = 0; point < degree; point++)
        {
            images[point] = image(point);
        }

        return Permutation.FromTrustedImages<int>(images);
    }

    private static BigInteger Factorial(int n)
    {
        var product = BigInteger.One;
        for (var i = 2; i <= n; i++)
        {
            product *= i;
        }

        return product;
    }

    private static void RequireDegree(int n, int least)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(n, least);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(n, Permutation.MaxDegree);
    }

    private static void RequireProductDegree(long degree)
    {
        if (degree > Permutation.MaxDegree)
        {
            throw new ArgumentException($"The product would act on {(degree == long.MaxValue ? "far too many" : degree)} points; at most {Permutation.MaxDegree} are supported.");
        }
    }
}
