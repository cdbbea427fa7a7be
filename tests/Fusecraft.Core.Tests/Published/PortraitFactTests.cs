using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Names and composition factors from publications, each with its source.</summary>
public class PortraitFactTests
{
    // Conway, Curtis, Norton, Parker, Wilson, Atlas of Finite Groups, 1985 (source not opened; names and transitivity also in Encyclopedia of Mathematics, "Sporadic simple group", opened).
    [Fact]
    public void Mathieu_groups_are_recognised_with_their_transitivity()
    {
        Check(MathieuGroups.M11, "M11 on 11 points, sharply 4-transitive, primitive");
        Check(MathieuGroups.M12, "M12 on 12 points, sharply 5-transitive, primitive");
        Check(MathieuGroups.M22, "M22 on 22 points, 3-transitive, primitive");
        Check(MathieuGroups.M23, "M23 on 23 points, 4-transitive, primitive");
        Check(MathieuGroups.M24, "M24 on 24 points, 5-transitive, primitive");

        void Check(Fusecraft.Permutations.Permutation[] generators, string text)
        {
            var portrait = PermutationGroup.Generate(generators).Portrait();
            Assert.True(portrait.IsSimple);
            Assert.Equal(text, Assert.Single(portrait.Orbits).Action.ToString());
        }
    }

    // PSL(d, q) is simple but for PSL(2,2) and PSL(2,3): e.g. Dixon, Mortimer, Permutation Groups, 1996. Isomorphisms: Atlas of Finite Groups, 1985 (sources not opened, from memory).
    [Theory]
    [InlineData(2, 4, "Alt(5)")]
    [InlineData(2, 5, "PSL(2,4) PSL(2,5)")]
    [InlineData(2, 7, "PSL(2,7) PSL(3,2)")]
    [InlineData(2, 8, "PSL(2,8)")]
    [InlineData(2, 9, "Alt(6) PSL(2,9)")]
    [InlineData(2, 11, "PSL(2,11)")]
    [InlineData(2, 13, "PSL(2,13)")]
    [InlineData(2, 16, "PSL(2,16)")]
    [InlineData(2, 17, "PSL(2,17)")]
    [InlineData(2, 19, "PSL(2,19)")]
    [InlineData(2, 23, "PSL(2,23)")]
    [InlineData(3, 2, "PSL(2,7) PSL(3,2)")]
    [InlineData(3, 3, "PSL(3,3)")]
    [InlineData(3, 4, "PSL(3,4)")]
    [InlineData(3, 5, "PSL(3,5)")]
    [InlineData(3, 7, "PSL(3,7)")]
    [InlineData(4, 2, "Alt(8) PSL(4,2)")]
    [InlineData(4, 3, "PSL(4,3)")]
    [InlineData(5, 2, "PSL(5,2)")]
    [InlineData(6, 2, "PSL(6,2)")]
    public void Projective_special_linear_groups_are_recognised_as_simple(int d, int q, string names)
    {
        var portrait = KnownGroups.ProjectiveSpecial(d, q).Portrait();
        var factor = Assert.Single(portrait.CompositionFactors);

        Assert.True(portrait.IsSimple);
        Assert.Superset(names.Split(' ').ToHashSet(), factor.Names.ToHashSet());
        Assert.Equal(names == "PSL(2,4) PSL(2,5)" ? "Alt(5)" : names.Split(' ')[0], factor.Name);
    }

    // As above; PGL(2,q) is sharply 3-transitive, with PSL(2,q) of index gcd(2, q-1).
    [Theory]
    [InlineData(5)]
    [InlineData(7)]
    [InlineData(8)]
    [InlineData(11)]
    [InlineData(23)]
    public void Projective_general_linear_groups_of_the_line_are_sharply_3_transitive(int q)
    {
        var action = Assert.Single(KnownGroups.ProjectiveGeneral(2, q).Portrait().Orbits).Action;

        Assert.Equal(3, action.Transitivity);
        Assert.True(action.IsSharplyTransitive);
        Assert.Equal(q == 8 ? "PSL(2,8)" : $"PGL(2,{q})", action.Name);
    }

    // PGL(2,9) and the point stabilizer of M11 are both sharply 3-transitive of degree 10 (Zassenhaus 1936; Dixon, Mortimer 1996; sources not opened, from memory), so that alone gives no name.
    [Fact]
    public void Two_sharply_3_transitive_groups_of_degree_10_get_no_name()
    {
        var stabilizer = PermutationGroup.Generate(MathieuGroups.M11).PointwiseStabilizer(0);
        foreach (var action in new[] { KnownGroups.ProjectiveGeneral(2, 9), stabilizer }.Select(group => group.Portrait().Orbits.Single().Action))
        {
            Assert.True(action is { Transitivity: 3, IsSharplyTransitive: true, Degree: 10 });
            Assert.Null(action.Name);
            Assert.Equal("Alt(6), C2", string.Join(", ", action.CompositionFactors));
        }
    }

    // q^d times the order of GL(d, q), whose factors are those of PSL(d, q) and of cyclic groups of orders q-1 and gcd(d, q-1) over and under it (standard, from memory).
    [Theory]
    [InlineData(2, 2, "C2^3, C3")]
    [InlineData(3, 2, "PSL(2,7), C2^3")]
    [InlineData(4, 2, "Alt(8), C2^4")]
    [InlineData(5, 2, "PSL(5,2), C2^5")]
    [InlineData(2, 3, "C2^4, C3^3")]
    [InlineData(3, 3, "PSL(3,3), C2, C3^3")]
    [InlineData(2, 5, "Alt(5), C2^3, C5^2")]
    [InlineData(2, 4, "Alt(5), C2^4, C3")]
    [InlineData(1, 5, "C2^2, C5")]
    [InlineData(1, 7, "C2, C3, C7")]
    [InlineData(1, 11, "C2, C5, C11")]
    [InlineData(1, 13, "C2^2, C3, C13")]
    public void Affine_groups_are_recognised_as_such(int d, int q, string factors)
    {
        var portrait = KnownGroups.AffineGeneral(d, q).Portrait();
        var action = Assert.Single(portrait.Orbits).Action;

        Assert.Equal(factors, string.Join(", ", portrait.CompositionFactors));
        Assert.True(action.IsPrimitive);
        Assert.True(action.IsAffine);
    }

    // Linear groups on prime power degree that have no translations: the projective lines over 7, 8 and 31 elements, the planes over 3 and 5 (13 and 31 points).
    [Fact]
    public void Projective_groups_are_not_affine() => Assert.All(
        [KnownGroups.ProjectiveSpecial(2, 7), KnownGroups.ProjectiveGeneral(2, 7), KnownGroups.ProjectiveSpecial(2, 8), KnownGroups.ProjectiveSpecial(3, 3), KnownGroups.ProjectiveSpecial(3, 5), KnownGroups.ProjectiveSpecial(2, 31)],
        group => Assert.False(group.Portrait().Orbits.Single().Action.IsAffine));

    // Order of A to the power n times the order of B (elementary).
    [Fact]
    public void Wreath_products_are_recognised()
    {
        Check(KnownGroups.WreathProduct(KnownGroups.Symmetric(3), KnownGroups.Symmetric(4)), "Sym(3) wr Sym(4)", "C2^7, C3^5");
        Check(KnownGroups.WreathProduct(KnownGroups.Cyclic(2), KnownGroups.Symmetric(5)), "C2 wr Sym(5)", "Alt(5), C2^6");
        Check(KnownGroups.WreathProduct(KnownGroups.Symmetric(4), KnownGroups.Cyclic(3)), "Sym(4) wr C3", "C2^9, C3^4");
        Check(KnownGroups.WreathProduct(KnownGroups.Cyclic(3), KnownGroups.Symmetric(8)), "C3 wr Sym(8)", "Alt(8), C2, C3^8");
        Check(KnownGroups.WreathProduct(KnownGroups.Alternating(5), KnownGroups.Alternating(5)), "Alt(5) wr Alt(5)", "Alt(5)^6");

        static void Check(PermutationGroup group, string name, string factors)
        {
            var portrait = group.Portrait();
            Assert.Equal(name, Assert.Single(portrait.Orbits).Action.Name);
            Assert.Equal(factors, string.Join(", ", portrait.CompositionFactors));
        }
    }

    // R. M. Wilson, Graph puzzles, homotopy, and the alternating group, J. Combin. Theory B 16 (1974) (quoted): PGL(2,5), as abstract group Sym(5).
    // <U, R> on the corner places of the 3x3x3: D. Singmaster, Notes on [the] Magic Cube (1981) (source not opened); order 73,483,200 in OEIS A080628 (opened).
    [Fact]
    public void Two_faces_of_the_3x3x3_move_the_corners_as_PGL_2_5()
    {
        var cube = new CubeFacelets(3);
        var portrait = PermutationGroup.Generate(cube.Turn('U'), cube.Turn('R')).Portrait();

        Assert.Equal(73_483_200, portrait.Order.Value);
        Assert.Contains(portrait.Orbits, orbit => orbit.Action.MinimalBlockSystems.Any(system => system.ActionOnParts.Name == "PGL(2,5)"));
        Assert.Equal("Alt(7), Alt(5), C2, C3^5", string.Join(", ", portrait.CompositionFactors));
    }

    // Order 663,552: OEIS A080627 (opened). Solvable: own computation.
    [Fact]
    public void The_squares_group_is_solvable()
    {
        var cube = new CubeFacelets(3);
        var portrait = PermutationGroup.Generate([.. "URFDLB".Select(face => cube.Turn(face).Power(2))]).Portrait();

        Assert.Equal(663_552, portrait.Order.Value);
        Assert.True(portrait.IsSolvable);
        Assert.False(portrait.IsNilpotent);
        Assert.Equal("C2^13, C3^4", string.Join(", ", portrait.CompositionFactors));
    }

    // OEIS A338883 (opened): no element of the 3x3x3 has an order that does not divide 55,440, the least common multiple of all.
    [Fact]
    public void The_exponent_of_the_3x3x3_is_the_published_one() => Assert.Equal(55_440, PermutationGroup.Generate(CubeFacelets.LayerTurns(3, 1)).Portrait().Exponent);

    // 24 times the order in OEIS A080656 (opened): 3^7·8!·24!²/2. The factors follow from that formula.
    [Fact]
    public void The_4x4x4_is_made_of_three_alternating_groups_and_cyclic_ones()
    {
        var portrait = PermutationGroup.Generate(CubeFacelets.LayerTurns(4, 1, 2)).Portrait();

        Assert.Equal(BigInteger.Pow(3, 7) * Make.Factorial(8) * Make.Factorial(24) * Make.Factorial(24) / 2, portrait.Order.Value);
        Assert.Equal("Alt(24)^2, Alt(8), C2^2, C3^7", string.Join(", ", portrait.CompositionFactors));
        Assert.Equal([null, null, 1, null], portrait.Orbits.Select(orbit => orbit.EquivalentTo));
    }

    // Orders of simple groups: Atlas of Finite Groups, 1985 (source not opened, values from memory).
    [Theory]
    [InlineData(60, "Alt(5) = PSL(2,4) = PSL(2,5)")]
    [InlineData(168, "PSL(2,7) = PSL(3,2)")]
    [InlineData(6048, "PSU(3,3)")]
    [InlineData(7920, "M11")]
    [InlineData(20160, "Alt(8) = PSL(3,4) = PSL(4,2)")]
    [InlineData(25920, "PSp(4,3) = PSU(4,2)")]
    [InlineData(29120, "Sz(8)")]
    [InlineData(62400, "PSU(3,4)")]
    [InlineData(95040, "M12")]
    [InlineData(126000, "PSU(3,5)")]
    [InlineData(175560, "J1")]
    [InlineData(443520, "M22")]
    [InlineData(604800, "J2")]
    [InlineData(979200, "PSp(4,4)")]
    [InlineData(1451520, "PSp(6,2)")]
    [InlineData(4245696, "G2(3)")]
    [InlineData(10073444472, "Ree(27)")]
    [InlineData(17971200, "Tits group")]
    [InlineData(32537600, "Sz(32)")]
    [InlineData(44352000, "HS")]
    [InlineData(50232960, "J3")]
    [InlineData(174182400, "PΩ+(8,2)")]
    [InlineData(197406720, "PΩ-(8,2)")]
    [InlineData(211341312, "3D4(2)")]
    [InlineData(251596800, "G2(4)")]
    [InlineData(898128000, "McL")]
    [InlineData(4030387200, "He")]
    [InlineData(4585351680, "PSp(6,3) or Ω(7,3)")]
    [InlineData(145926144000, "Ru")]
    [InlineData(448345497600, "Suz")]
    [InlineData(495766656000, "Co3")]
    [InlineData(42305421312000, "Co2")]
    [InlineData(64561751654400, "Fi22")]
    [InlineData(4089470473293004800, "Fi23")]
    [InlineData(6, "")]
    [InlineData(12, "")]
    [InlineData(72, "")]
    [InlineData(120, "")]
    [InlineData(720, "")]
    [InlineData(1512, "")]
    [InlineData(12096, "")]
    public void Simple_groups_have_the_orders_of_the_atlas(long order, string names) => Assert.Equal(names, string.Join(" = ", SimpleGroupNames.OfOrder(FactoredInteger.FromSmooth(order, 100))));

    // The number of orders below 10,000 of non-abelian simple groups: 60, 168, 360, 504, 660, 1092, 2448, 2520, 3420, 4080, 5616, 6048, 6072, 7800, 7920, 9828 (OEIS A001034; source not opened, values from memory).
    [Fact]
    public void The_orders_of_simple_groups_below_10000_are_the_published_ones() => Assert.Equal(
        [60, 168, 360, 504, 660, 1092, 2448, 2520, 3420, 4080, 5616, 6048, 6072, 7800, 7920, 9828],
        Enumerable.Range(2, 9998).Where(order => !SimpleGroupNames.OfOrder(FactoredInteger.FromFactors(order)).IsEmpty));
}
