using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Permutations;

[Properties(Arbitrary = [typeof(PermutationArbitraries)])]
public class CycleTypeTests
{
    [Theory]
    [InlineData("()", "1", 1, Parity.Even, 0)]
    [InlineData("(1 2)", "2", 2, Parity.Odd, 2)]
    [InlineData("(1 2 3)(5 6)", "3 2", 6, Parity.Odd, 5)]
    [InlineData("(1 2)(3 4)(5 6 7)(8 9 10 11 12)(13 14 15 16 17)", "5^2 3 2^2", 30, Parity.Even, 17)]
    [InlineData("(1 2 3 4)(5 6 7 8 9 10)", "6 4", 12, Parity.Even, 10)]
    public void Type_order_parity_and_moved_points_of_examples(string cycles, string type, int order, Parity parity, int moved)
    {
        var p = Permutation.Parse(cycles);
        Assert.Equal(type, p.CycleType.ToString());
        Assert.Equal(order, p.Order);
        Assert.Equal(parity, p.Parity);
        Assert.Equal(parity, p.CycleType.Parity);
        Assert.Equal(moved, p.CycleType.MovedPoints);
        Assert.Equal(moved, p.Support.Length);
    }

    [Fact]
    public void Parts_go_from_the_longest_to_the_shortest() =>
        Assert.Equal<(int Length, int Count)>([(5, 1), (3, 1), (2, 2)], Permutation.Parse("(1 2)(3 4)(5 6 7)(8 9 10 11 12)").CycleType.Parts);

    [Property]
    public bool The_order_is_the_least_positive_power_that_is_the_identity(Permutation p)
    {
        var order = p.Order;
        return order.Sign > 0 && p.Power(order).IsIdentity && PrimeFactors(order).All(prime => !p.Power(order / prime).IsIdentity);
    }

    [Property]
    public bool Small_orders_are_found_by_repeating(byte seed)
    {
        var p = new SeededRandom(seed).NextPermutation(9);
        var (order, power) = (1, p);
        while (!power.IsIdentity)
        {
            (order, power) = (order + 1, power * p);
        }

        return p.Order == order;
    }

    [Property]
    public bool Parity_is_a_homomorphism(Permutation p, Permutation q) =>
        (p * q).Parity == (p.Parity == q.Parity ? Parity.Even : Parity.Odd) && p.Inverse().Parity == p.Parity;

    [Property]
    public bool Parity_is_that_of_the_number_of_inversions(byte seed)
    {
        var p = new SeededRandom(seed).NextPermutation(40);
        var inversions = Enumerable.Range(0, 40).Sum(j => Enumerable.Range(0, j).Count(i => p[i] > p[j]));
        return p.Parity == (Parity)(inversions % 2);
    }

    [Property]
    public bool Cycles_cover_the_support_once_each_from_its_smallest_point(Permutation p)
    {
        var cycles = p.Cycles();
        return cycles.SelectMany(cycle => cycle).Order().SequenceEqual(p.Support)
            && p.Support.SequenceEqual(Enumerable.Range(0, 1100).Where(i => p[i] != i))
            && cycles.All(cycle => cycle.Length >= 2 && cycle.Min() == cycle[0])
            && cycles.Select(cycle => cycle[0]).SequenceEqual(cycles.Select(cycle => cycle[0]).Order())
            && cycles.All(cycle => Enumerable.Range(0, cycle.Length).All(i => p[cycle[i]] == cycle[(i + 1) % cycle.Length]));
    }

    [Fact]
    public void Permutations_of_five_points_are_conjugate_exactly_when_their_types_are_equal()
    {
        var all = AllPermutations(5);
        foreach (var p in all)
        {
            var conjugates = all.Select(by => p.ConjugateBy(by)).ToHashSet();
            Assert.All(all, q => Assert.Equal(conjugates.Contains(q), q.CycleType == p.CycleType));
        }
    }

    [Fact]
    public void Equal_types_are_equal_values_with_equal_hashes()
    {
        var (a, b, c) = (Permutation.Parse("(1 2)(3 4 5)").CycleType, Permutation.Parse("(700 2 9)(1 300)").CycleType, Permutation.Parse("(1 2 3)").CycleType);
        Assert.True(a == b && !(a != b) && a.Equals(b) && a.Equals((object)b));
        Assert.Equal(a.GetHashCode(), b.GetHashCode());
        Assert.True(a != c && !a.Equals(c) && !a.Equals(null));
        Assert.Equal(default, Permutation.Identity.CycleType);
        Assert.Equal(default(CycleType).GetHashCode(), Permutation.Identity.CycleType.GetHashCode());
        Assert.Empty(default(CycleType).Parts);
        Assert.Equal(1, default(CycleType).Order);
    }

    [Fact]
    public void Orders_beyond_64_bits_are_exact()
    {
        // Own computation: cycles of the lengths of the first primes; their product is the order.
        var (p, first, product) = (Permutation.Identity, 0, BigInteger.One);
        foreach (var prime in new[] { 2, 3, 5, 7, 11, 13, 17, 19, 23, 29, 31, 37, 41, 43, 47, 53, 59, 61, 67, 71 })
        {
            p *= Permutation.FromCycle([.. Enumerable.Range(first, prime)]);
            (first, product) = (first + prime, product * prime);
        }

        Assert.True(product > ulong.MaxValue);
        Assert.Equal(product, p.Order);
    }

    private static List<Permutation> AllPermutations(int degree)
    {
        var all = new List<Permutation> { Permutation.Identity };
        for (var i = 1; i < degree; i++)
        {
            all = [.. all.SelectMany(p => Enumerable.Range(0, i + 1).Select(j => j == i ? p : p * Permutation.FromCycle(j, i)))];
        }

        return all;
    }

    private static IEnumerable<int> PrimeFactors(BigInteger number)
    {
        // Orders of permutations of at most 1000 points have no prime factor above 1000.
        for (var divisor = 2; divisor <= 1000 && number > 1; divisor++)
        {
            if ((number % divisor).IsZero)
            {
                yield return divisor;
                while ((number % divisor).IsZero)
                {
                    number /= divisor;
                }
            }
        }
    }
}
