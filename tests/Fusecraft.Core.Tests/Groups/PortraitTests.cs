using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Groups;

/// <summary>Portraits against plain listing on small groups, and by laws on larger ones.</summary>
public class PortraitTests
{
    [Property(MaxTest = 300)]
    public void Composition_factors_multiply_to_the_order_and_flags_agree_with_the_series(ulong seed)
    {
        var group = SmallGroups.Random(seed, 14);
        var portrait = group.Portrait();

        Assert.Equal(group.Order, Product(portrait));
        Assert.Equal(group.Order, portrait.Order.Value);
        Assert.All(portrait.CompositionFactors, factor => Assert.True(factor.IsSimple, factor.ToString()));
        Assert.Equal(group.IsAbelian, portrait.IsAbelian);
        Assert.Equal(group.IsNilpotent, portrait.IsNilpotent);
        Assert.Equal(group.IsSolvable, portrait.IsSolvable);
        Assert.Equal(group.IsPerfect, portrait.IsPerfect);
        Assert.Equal(group.AbelianInvariants().AsEnumerable(), portrait.AbelianInvariants);
        var series = group.DerivedSeries();
        Assert.Equal(series[^1].Order, portrait.PerfectResidualOrder.Value);
        Assert.Equal(group.IsSolvable ? series.Length - 1 : null, portrait.DerivedLength);
    }

    [Property(MaxTest = 30)]
    public void Composition_factors_of_random_groups_of_degree_up_to_6_are_those_found_by_listing(ulong seed) => CheckFactors(SmallGroups.RandomGenerators(seed, 6));

    [Fact]
    public void Composition_factors_of_all_groups_of_two_elements_of_degree_4_are_those_found_by_listing()
    {
        var all = SmallGroups.AllOfDegree(4).ToList();
        for (var i = 0; i < all.Count; i++)
        {
            for (var k = 0; k <= i; k++)
            {
                CheckFactors([all[i], all[k]]);
            }
        }
    }

    [Property(MaxTest = 100)]
    public void Actions_on_orbits_are_described_as_listing_finds_them(ulong seed)
    {
        var generators = SmallGroups.RandomGenerators(seed, 7);
        var group = PermutationGroup.Generate(generators, 7);
        var members = SmallGroups.Closure(generators);
        var portrait = group.Portrait();
        Assert.Equal(members.Aggregate(BigInteger.One, (exponent, member) => exponent / BigInteger.GreatestCommonDivisor(exponent, member.Order) * member.Order), portrait.Exponent);
        foreach (var orbit in portrait.Orbits)
        {
            var action = orbit.EquivalentTo is { } earlier ? portrait.Orbits[earlier] : orbit;
            var images = members.Select(member => string.Join(' ', action.Points.Select(point => member[point]))).Distinct().Count();
            Assert.Equal(images, orbit.Action.Order.Value);
            Assert.Equal(members.Count / images, orbit.KernelOrder);
            Assert.Equal(images == orbit.Points.Length, orbit.Action.IsRegular);
            for (var k = 1; k <= action.Points.Length; k++)
            {
                var lists = members.Select(member => string.Join(' ', action.Points.Take(k).Select(point => member[point]))).Distinct().Count();
                Assert.Equal(k <= orbit.Action.Transitivity, lists == Falling(action.Points.Length, k));
            }

            Assert.Equal(orbit.Action.IsSharplyTransitive, images == Falling(action.Points.Length, orbit.Action.Transitivity));
        }
    }

    [Property(MaxTest = 100)]
    public void Block_systems_are_described_by_orders_that_fit(ulong seed)
    {
        foreach (var orbit in SmallGroups.Random(seed, 12).Portrait().Orbits)
        {
            foreach (var system in orbit.Action.MinimalBlockSystems)
            {
                Assert.Equal(orbit.Action.Group.ActionOn(system.System).Kernel.Order, system.KernelOrder);
                var inPart = orbit.Action.Group.SetwiseStabilizer(system.System.Parts[0].AsSpan()).ActionOn(system.System.Parts[0]).Image;
                Assert.True(system.ActionInPart.Group.SameGroupAs(inPart));
                Assert.Equal(BigInteger.Pow(inPart.Order, system.PartCount) * system.ActionOnParts.Order.Value, orbit.Action.Order.Value * system.IndexInWreathProduct);
                Assert.InRange(system.PartCount, 2, orbit.Points.Length / 2);
            }
        }
    }

    [Property(MaxTest = 60)]
    public void The_portrait_depends_on_the_group_alone(ulong seed)
    {
        var group = SmallGroups.Random(seed, 10);
        var random = new SeededRandom(seed);
        var other = PermutationGroup.Generate([.. group.Chain.StrongGenerators, group.RandomElement(random), group.RandomElement(random)], group.Degree);

        Assert.Equal(group.Portrait().ToString(), other.Portrait().ToString());
    }

    [Theory]
    [InlineData("", "none")]
    [InlineData("(1 2 3 4); (1 3)", "C2^3")]
    [InlineData("(1 2 3); (4 5 6 7 8); (6 7 8)", "Alt(5), C3")]
    [InlineData("(1 2 3 4 5); (3 4 5); (6 7 8 9 10 11); (6 7)", "Alt(6), Alt(5), C2")]
    [InlineData("(1 2 3 4 5)(6 7 8 9 10); (3 4 5)(8 9 10)", "Alt(5)")]
    public void Composition_factors_read_as_names(string generators, string factors) => Assert.Equal(factors, Factors(Of(generators)));

    // Alt(n) on the n(n-1)/2 pairs is primitive for n > 4, and not the symmetric or alternating group of the pairs.
    [Theory]
    [InlineData(5, "Alt(5)")]
    [InlineData(6, "Alt(6)")]
    [InlineData(7, "Alt(7)")]
    [InlineData(8, "Alt(8)")]
    [InlineData(9, "Alt(9)")]
    public void Alternating_groups_are_recognised_by_their_action_on_pairs(int n, string name)
    {
        var portrait = OnPairs(KnownGroups.Alternating(n)).Portrait();

        Assert.Equal(name, Assert.Single(portrait.CompositionFactors).Name);
        Assert.True(portrait.IsSimple);
        Assert.True(portrait.Orbits[0].Action.IsPrimitive);
        Assert.Equal($"{name}, C2", Factors(OnPairs(KnownGroups.Symmetric(n))));
    }

    [Fact]
    public void A_simple_group_moving_its_members_from_both_sides_gives_two_factors()
    {
        Permutation[] members = [.. KnownGroups.Alternating(5).Elements()];
        var group = PermutationGroup.Generate(KnownGroups.Alternating(5).Generators.SelectMany(generator => (Permutation[])
        [
            Permutation.FromImages([.. members.Select(member => Array.IndexOf(members, member * generator))]),
            Permutation.FromImages([.. members.Select(member => Array.IndexOf(members, generator.Inverse() * member))]),
        ]), members.Length);

        Assert.True(group.IsPrimitive);
        Assert.Equal("Alt(5)^2", Factors(group));
    }

    // Alt(5) wr Alt(5) on 5^5 tuples is perfect, primitive and not affine, and has six factors; so have the others here, with Alt(5) wr Alt(6) and Alt(6) wr Alt(5).
    [Fact]
    public void Perfect_primitive_groups_with_five_or_more_factors_are_not_taken_for_simple()
    {
        Assert.True(CompositionWalk.MayHaveManyFactors(3125, BigInteger.Pow(60, 6)));
        Assert.True(CompositionWalk.MayHaveManyFactors(15625, BigInteger.Pow(60, 6) * 360));
        Assert.True(CompositionWalk.MayHaveManyFactors(7776, BigInteger.Pow(360, 5) * 60));
        Assert.False(CompositionWalk.MayHaveManyFactors(625, BigInteger.Pow(60, 6)));
        Assert.False(CompositionWalk.MayHaveManyFactors(3124, BigInteger.Pow(60, 6)));
        Assert.False(CompositionWalk.MayHaveManyFactors(3125, 60));
    }

    [Fact]
    public void Factors_without_a_name_say_what_is_known()
    {
        var order = FactoredInteger.Parse("2^12·3^6·5^6");

        Assert.Equal("(unrecognised of order 2^12·3^6·5^6)", new CompositionFactor([], order, 1, isSimple: false).ToString());
        Assert.Equal("(simple of order 2^12·3^6·5^6)^2", new CompositionFactor([], order, 2, isSimple: true).ToString());
        Assert.Null(new CompositionFactor([], order, 1, isSimple: false).Name);
    }

    [Theory]
    [InlineData("(1 2 3 4 5 6)", "C6 on 6 points, regular")]
    [InlineData("(1 2)(3 4); (1 3)(2 4)", "C2^2 on 4 points, regular")]
    [InlineData("(1 2 3 4)(5 6 7 8); (1 5)(2 6)(3 7)(4 8)", "C2 x C4 on 8 points, regular")]
    [InlineData("(1 2 3 4 5); (2 5)(3 4)", "Dih(5) on 5 points, primitive, affine")]
    [InlineData("(1 2 3 4 5); (2 3 5 4)", "AGL(1,5) on 5 points, sharply 2-transitive, primitive, affine")]
    [InlineData("(1 2 3 4 5 6 7); (2 3 5)(4 7 6)", "C7:C3 on 7 points, primitive, affine")]
    [InlineData("(1 2 3 4 5 6 7); (1 2)(3 6)", "PSL(2,7) = PSL(3,2) on 7 points, 2-transitive, primitive")]
    [InlineData("(1 2 3 4); (1 2)", "Sym(4) on 4 points")]
    [InlineData("(1 2); (1 3)(2 4); (3 4)", "Dih(4) on 4 points, imprimitive")]
    [InlineData("(1 2 3); (4 5 6); (1 4)(2 5)(3 6); (1 2)", "Sym(3) wr C2 on 6 points, imprimitive")]
    public void Actions_read_as_names_and_facts(string generators, string text) => Assert.Equal(text, Assert.Single(Of(generators).Portrait().Orbits).Action.ToString());

    [Fact]
    public void The_3x3x3_reads_in_a_few_lines()
    {
        const string Text = """
            order 43252003274489856000 = 2^27·3^14·5^3·7^2·11, 48 points moved, 2 orbits
            not solvable, perfect residual of order 2^26·3^14·5^3·7^2·11, abelian invariants 2, exponent 55440
            composition factors: Alt(12), Alt(8), C2^12, C3^7
            orbit 1 from point 1: order 2^7·3^9·5·7 on 24 points, imprimitive
              8 parts of 3: C3 in each, Sym(8) on them, kernel of order 3^7, index 3 in C3 wr Sym(8)
            orbit 2 from point 2: order 2^21·3^5·5^2·7·11 on 24 points, imprimitive
              12 parts of 2: C2 in each, Sym(12) on them, kernel of order 2^11, index 2 in C2 wr Sym(12)
            """;
        Assert.Equal(Text.ReplaceLineEndings("\n"), PermutationGroup.Generate(CubeFacelets.LayerTurns(3, 1)).Portrait().ToString());
    }

    [Fact]
    public void The_trivial_group_has_a_portrait() => Assert.Equal("order 1, 0 points moved, 0 orbits\ntrivial, exponent 1\ncomposition factors: none", KnownGroups.Symmetric(1).Portrait().ToString());

    [Fact]
    public void Orbits_on_which_the_group_acts_alike_are_said_so()
    {
        var portrait = Of("(1 2 3)(4 5 6)(7 8 9); (1 2)(4 5)(7 9)").Portrait();

        Assert.Equal([null, 0, 0], portrait.Orbits.Select(orbit => orbit.EquivalentTo));
        Assert.EndsWith("orbit 3 from point 7: 3 points, moved like orbit 1", portrait.ToString(), StringComparison.Ordinal);
        Assert.Equal([null, null], Of("(1 2 3); (4 5 6); (1 2)(4 5)").Portrait().Orbits.Select(orbit => orbit.EquivalentTo));
    }

    [Fact]
    public void Work_ends_when_the_token_asks() => Assert.Throws<OperationCanceledException>(() => KnownGroups.Symmetric(5).Portrait(new CancellationToken(canceled: true)));

    private static PermutationGroup OnPairs(PermutationGroup group)
    {
        var pairs = Enumerable.Range(0, group.Degree).SelectMany(i => Enumerable.Range(0, i).Select(k => (k, i))).ToList();
        return PermutationGroup.Generate(
            group.Generators.Select(generator => Permutation.FromImages([.. pairs.Select(pair =>
                pairs.IndexOf((Math.Min(generator[pair.k], generator[pair.i]), Math.Max(generator[pair.k], generator[pair.i]))))])),
            pairs.Count);
    }

    private static void CheckFactors(Permutation[] generators)
    {
        var portrait = PermutationGroup.Generate(generators).Portrait();
        var orders = portrait.CompositionFactors.SelectMany(factor => Enumerable.Repeat((int)factor.Order.Value, factor.Multiplicity)).Order();
        Assert.Equal(NaiveFactors.OrdersOf(SmallGroups.Closure(generators)), orders);
    }

    private static string Factors(PermutationGroup group) => group.Portrait().CompositionFactors is { IsEmpty: false } factors ? string.Join(", ", factors) : "none";

    private static BigInteger Product(GroupPortrait portrait) =>
        portrait.CompositionFactors.Aggregate(BigInteger.One, (product, factor) => product * BigInteger.Pow(factor.Order.Value, factor.Multiplicity));

    private static BigInteger Falling(int n, int k) => Enumerable.Range(n - k + 1, k).Aggregate(BigInteger.One, (product, factor) => product * factor);

    private static PermutationGroup Of(string generators) =>
        PermutationGroup.Generate([.. generators.Split(';', StringSplitOptions.RemoveEmptyEntries).Select(text => Permutation.Parse(text.Trim()))]);
}
