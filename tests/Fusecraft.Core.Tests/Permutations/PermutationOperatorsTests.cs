using System.Numerics;
using FsCheck;
using FsCheck.Fluent;
using FsCheck.Xunit;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Permutations;

[Properties(Arbitrary = [typeof(PermutationArbitraries)])]
public class PermutationOperatorsTests
{
    [Property]
    public bool A_product_does_the_left_factor_first(Permutation p, Permutation q)
    {
        var product = p * q;
        return Enumerable.Range(0, 1100).All(i => product[i] == q[p[i]]);
    }

    [Property]
    public bool Multiplication_is_associative(Permutation p, Permutation q, Permutation r) => (p * q) * r == p * (q * r);

    [Property]
    public bool The_identity_is_neutral(Permutation p) => p * Permutation.Identity == p && Permutation.Identity * p == p;

    [Property]
    public bool The_inverse_undoes_from_both_sides(Permutation p) => (p * p.Inverse()).IsIdentity && (p.Inverse() * p).IsIdentity;

    [Property]
    public bool The_inverse_of_a_product_is_the_product_of_inverses_in_reverse(Permutation p, Permutation q) =>
        (p * q).Inverse() == q.Inverse() * p.Inverse();

    [Property]
    public bool Then_Multiply_and_the_operator_agree(Permutation p, Permutation q) =>
        p.Then(q) == p * q && Permutation.Multiply(p, q) == p * q && ProductOf(p, q) == p * q;

    [Property]
    public bool Exponents_add(Permutation p, int a, int b) => p.Power(a) * p.Power(b) == p.Power((BigInteger)a + b);

    [Property]
    public bool Exponents_multiply(Permutation p, int a, int b) => p.Power(a).Power(b) == p.Power((BigInteger)a * b);

    [Property]
    public bool Small_powers_are_repeated_products(Permutation p) =>
        p.Power(0).IsIdentity && p.Power(1) == p && p.Power(2) == p * p && p.Power(5) == p * p * p * p * p && p.Power(-1) == p.Inverse()
        && p.Power(-3) == p.Inverse() * p.Inverse() * p.Inverse();

    [Property]
    public bool Exponents_count_modulo_the_order_however_huge(Permutation p, int a)
    {
        var huge = p.Order * BigInteger.Pow(10, 200);
        return p.Power(huge + a) == p.Power(a) && p.Power(a - huge) == p.Power(a);
    }

    [Fact]
    public void A_power_by_a_huge_exponent_is_the_power_by_its_remainder()
    {
        var p = Permutation.Parse("(1 2 3 4 5 6 7)");
        Assert.Equal(p.Power(2), p.Power(BigInteger.Pow(2, 1000)));         // 2^1000 = 2 (2^3)^333 = 2 mod 7
        Assert.Equal(p.Power(-2), p.Power(-BigInteger.Pow(2, 1000)));
        Assert.Equal(p.Power(1), p.Power((BigInteger)long.MaxValue - 6));   // 2^63 - 7 = 1 mod 7
    }

    [Property]
    public bool Conjugating_renames_the_points(Permutation p, Permutation by)
    {
        var conjugate = p.ConjugateBy(by);
        return conjugate == by.Inverse() * p * by && Enumerable.Range(0, 1100).All(i => conjugate[by[i]] == by[p[i]]);
    }

    [Property]
    public bool Conjugation_is_a_homomorphism(Permutation p, Permutation q, Permutation by) =>
        (p * q).ConjugateBy(by) == p.ConjugateBy(by) * q.ConjugateBy(by) && p.ConjugateBy(q).ConjugateBy(by) == p.ConjugateBy(q * by);

    [Property]
    public bool Conjugates_have_equal_cycle_types(Permutation p, Permutation by) => p.ConjugateBy(by).CycleType == p.CycleType;

    [Property]
    public bool The_commutator_is_first_second_then_their_inverses(Permutation p, Permutation q) =>
        Permutation.Commutator(p, q) == p * q * p.Inverse() * q.Inverse();

    [Property]
    public Property The_commutator_is_the_identity_exactly_for_commuting_permutations() =>
        Prop.ForAll(Arb.From(PermutationArbitraries.Of(Gen.Choose(0, 4)).Two()), pair =>
        {
            var (p, q) = pair;
            var commute = p * q == q * p;
            return (Permutation.Commutator(p, q).IsIdentity == commute).Classify(commute, "commuting").Classify(!commute, "not commuting");
        });

    [Property]
    public bool Powers_of_one_permutation_commute(Permutation p, int a, int b) => Permutation.Commutator(p.Power(a), p.Power(b)).IsIdentity;

    [Theory]
    [InlineData(255)]
    [InlineData(256)]
    [InlineData(257)]
    [InlineData(258)]
    [InlineData(Permutation.MaxDegree - 1)]
    [InlineData(Permutation.MaxDegree)]
    public void Operators_agree_with_plain_arrays_around_the_storage_threshold_and_at_the_greatest_degree(int degree)
    {
        var random = new SeededRandom((ulong)degree);
        foreach (var other in new[] { degree, 3, 256, 257 })
        {
            var p = random.NextPermutation(degree);
            var q = random.NextPermutation(Math.Min(other, degree));
            var (a, b, n) = (new int[degree], new int[degree], Enumerable.Range(0, degree));
            p.CopyImages(a);
            q.CopyImages(b);
            Assert.Equal(n.Select(i => b[a[i]]), Images(p * q, degree));
            Assert.Equal(n.Select(i => a[b[i]]), Images(q * p, degree));
            Assert.Equal(n.OrderBy(i => a[i]), Images(p.Inverse(), degree));
            Assert.Equal(n.Select(i => a[a[a[i]]]), Images(p.Power(3), degree));
            Assert.Equal(p.Inverse() * q * p, q.ConjugateBy(p));
            Assert.Equal(q.Inverse() * p * q, p.ConjugateBy(q));
        }
    }

    [Fact]
    public void Products_that_fall_below_the_storage_threshold_equal_those_made_there()
    {
        var wide = Permutation.FromCycle(1, 300);
        var product = wide * Permutation.FromCycle(0, 1) * wide;
        Assert.Equal(Permutation.FromCycle(0, 300), product);
        Assert.Equal(Permutation.FromCycle(0, 1), wide * product * wide);
        Assert.Equal(Permutation.FromCycle(0, 1).GetHashCode(), (wide * product * wide).GetHashCode());
        Assert.Equal(2, (wide * product * wide).SupportEnd);
        Assert.True((wide * wide).IsIdentity);
    }

    private static T ProductOf<T>(T left, T right)
        where T : IMultiplyOperators<T, T, T>, IMultiplicativeIdentity<T, T> => T.MultiplicativeIdentity * left * right;

    private static int[] Images(Permutation permutation, int degree)
    {
        var images = new int[degree];
        permutation.CopyImages(images);
        return images;
    }
}
