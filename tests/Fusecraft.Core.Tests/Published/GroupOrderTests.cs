using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Group orders from publications, each with its source. Numbers in factored form are given as the sources print them.</summary>
public class GroupOrderTests
{
    // Conway, Sloane, Sphere Packings, Lattices and Groups, ch. 10 (source not opened, from memory).
    private static Permutation[] M24OnTheLine
    {
        get
        {
            var line = new ProjectiveGroups(23);
            HashSet<int> squares = [.. Enumerable.Range(0, 23).Select(x => x * x % 23)];
            var cubes = Permutation.FromImages([.. Enumerable.Range(0, 24).Select(x =>
                x == 23 ? 23 : line.Multiply(squares.Contains(x) ? line.Inverse(9) : 9, Power(line, x, 3)))]);
            return [line.Moebius(1, 1, 0, 1), line.Moebius(0, line.Negative(1), 1, 0), cubes];
        }
    }

    // Conway, Curtis, Norton, Parker, Wilson, Atlas of Finite Groups, 1985; the orders opened in Encyclopedia of Mathematics, "Sporadic simple group".
    // Orbit lengths: M11 and M12 are sharply 4- and 5-transitive, M22, M23, M24 3-, 4- and 5-transitive (same source). Generators from memory.
    [Fact]
    public void Mathieu_groups_have_the_orders_and_orbit_lengths_of_the_atlas()
    {
        RequireChain(MathieuGroups.M11, "2^4·3^2·5·11", 7920, 11, 10, 9, 8);
        RequireChain(MathieuGroups.M12, "2^6·3^3·5·11", 95040, 12, 11, 10, 9, 8);
        RequireChain(MathieuGroups.M22, "2^7·3^2·5·7·11", 443520, 22, 21, 20, 16, 3);
        RequireChain(MathieuGroups.M23, "2^7·3^2·5·7·11·23", 10200960, 23, 22, 21, 20, 16, 3);
        RequireChain(MathieuGroups.M24, "2^10·3^3·5·7·11·23", 244823040, 24, 23, 22, 21, 20, 16, 3);
    }

    // Conway, Sloane, Sphere Packings, Lattices and Groups, ch. 10-11 (source not opened, value from memory).
    [Fact]
    public void M12_acts_on_the_projective_line_over_11_elements()
    {
        var field = new ProjectiveGroups(11);
        var extra = Permutation.FromImages([.. Enumerable.Range(0, 12).Select(x =>
            x == 11 ? 11 : field.Add(field.Multiply(4, Power(field, x, 2)), field.Negative(field.Multiply(3, Power(field, x, 7)))))]);

        RequireOrder([.. Psl2(field), extra], 95040);
    }

    // Diaconis, Graham, Kantor, The mathematics of perfect shuffles, Adv. Appl. Math. 4 (1983) 175-196 (abstract opened).
    [Fact]
    public void The_Mongean_shuffle_of_twelve_cards_and_turning_the_deck_over_make_M12()
    {
        int[] images = [6, 7, 5, 8, 4, 9, 3, 10, 2, 11, 1, 12];
        var shuffle = Permutation.FromImages([.. images.Select(image => image - 1)]);
        var reversal = Permutation.FromImages([.. Enumerable.Range(0, 12).Select(i => 11 - i)]);

        RequireOrder([shuffle, reversal], 95040);
    }

    // Conway, Sloane, Sphere Packings, Lattices and Groups, ch. 10 (source not opened, value from memory).
    [Fact]
    public void M24_acts_on_the_projective_line_over_23_elements() => RequireOrder(M24OnTheLine, 244823040);

    // MacWilliams, Sloane, The Theory of Error-Correcting Codes, 1977: weights 1, 759, 2576, 759, 1 (quoted); blocks of S(5,8,24), S(4,7,23), S(3,6,22).
    // Here the words of weight 8 are orbits of the group, which the code's definition does not use.
    [Fact]
    public void M24_permutes_the_759_words_of_weight_8_of_the_extended_Golay_code()
    {
        HashSet<int> residues = [.. Enumerable.Range(1, 22).Select(x => x * x % 23)];
        var rows = Enumerable.Range(0, 23).Select(shift => residues.Aggregate(1 << 23, (word, residue) => word | (1 << ((residue + shift) % 23)))).ToArray();
        var words = new HashSet<int> { 0 };
        foreach (var row in rows)
        {
            words.UnionWith([.. words.Select(word => word ^ row)]);
        }

        int[] octads = [.. words.Where(word => BitOperations.PopCount((uint)word) == 8)];
        Assert.Equal([(0, 1), (8, 759), (12, 2576), (16, 759), (24, 1)],
            words.GroupBy(word => BitOperations.PopCount((uint)word)).Select(group => (group.Key, group.Count())).Order());
        Assert.Equal(253, octads.Count(word => (word >> 23) == 1));
        Assert.Equal(77, octads.Count(word => (word >> 22) == 3));

        var field = new ProjectiveGroups(23);

        // The group of the projective line as above permutes the words of the mirror image, made by the non-residues; hence the conjugation.
        var mirror = Permutation.FromImages([.. Enumerable.Range(0, 24).Select(x => x == 23 ? 23 : field.Negative(x))]);
        Permutation[] generators = [.. M24OnTheLine.Select(generator => generator.ConjugateBy(mirror))];
        var group = PermutationGroup.Generate(generators);
        var images = new HashSet<int>();
        var queue = new Queue<int>([octads[0]]);
        while (queue.TryDequeue(out var octad))
        {
            if (images.Add(octad))
            {
                foreach (var generator in generators)
                {
                    queue.Enqueue(Enumerable.Range(0, 24).Where(i => ((octad >> i) & 1) == 1).Aggregate(0, (word, i) => word | (1 << generator[i])));
                }
            }
        }

        Assert.Equal(244823040, group.Order);
        Assert.True(images.SetEquals(octads), $"The orbit has {images.Count} sets.");
    }

    // Standard; for example Dixon, Mortimer, Permutation Groups, 1996 (source not opened, values from memory): q(q²-1)/2 and q(q²-1).
    [Theory]
    [InlineData(5, 60)]
    [InlineData(7, 168)]
    [InlineData(11, 660)]
    [InlineData(13, 1092)]
    [InlineData(17, 2448)]
    [InlineData(19, 3420)]
    [InlineData(23, 6072)]
    public void Linear_fractional_groups_over_prime_fields_have_the_standard_orders(int q, int order)
    {
        var field = new ProjectiveGroups(q);
        RequireOrder(Psl2(field), order);

        RequireChain([field.Moebius(1, 1, 0, 1), field.Moebius(field.PrimitiveElement, 0, 0, 1), field.Moebius(0, field.Negative(1), 1, 0)], null, 2 * order, q + 1, q, q - 1);
    }

    // As above: q(q²-1) / gcd(2, q-1).
    [Theory]
    [InlineData(4, 60)]
    [InlineData(8, 504)]
    [InlineData(9, 360)]
    [InlineData(16, 4080)]
    public void Linear_fractional_groups_over_prime_power_fields_have_the_standard_orders(int q, int order)
    {
        var field = new ProjectiveGroups(q);
        RequireOrder([.. field.Transvections(2).Select(map => field.OnProjectivePoints(2, map))], order);
    }

    // As above: the order of GL(n, q) over (q-1)·gcd(n, q-1).
    [Theory]
    [InlineData(3, 2, 168)]
    [InlineData(3, 3, 5616)]
    [InlineData(3, 4, 20160)]
    [InlineData(3, 5, 372000)]
    [InlineData(3, 7, 1876896)]
    [InlineData(4, 2, 20160)]
    [InlineData(5, 2, 9999360)]
    [InlineData(6, 2, 20158709760)]
    [InlineData(4, 3, 6065280)]
    public void Projective_special_linear_groups_have_the_standard_orders(int n, int q, long order)
    {
        var field = new ProjectiveGroups(q);
        RequireOrder([.. field.Transvections(n).Select(map => field.OnProjectivePoints(n, map))], order);
    }

    // p(p-1) (elementary).
    [Theory]
    [InlineData(5, 20)]
    [InlineData(7, 42)]
    [InlineData(11, 110)]
    [InlineData(13, 156)]
    public void Affine_groups_of_the_line_have_p_times_p_minus_1_members(int p, int order)
    {
        var field = new ProjectiveGroups(p);
        RequireChain(Agl(field, 1), null, order, p, p - 1);
    }

    // q^d times the order of GL(d, q) (source not opened, values from memory).
    [Theory]
    [InlineData(2, 2, 24)]
    [InlineData(3, 2, 1344)]
    [InlineData(4, 2, 322560)]
    [InlineData(5, 2, 319979520)]
    [InlineData(2, 3, 432)]
    [InlineData(3, 3, 303264)]
    [InlineData(2, 5, 12000)]
    public void Affine_groups_of_spaces_have_the_standard_orders(int d, int q, long order) => RequireOrder(Agl(new ProjectiveGroups(q), d), order);

    // Order of A to the power n times the order of B (elementary).
    [Theory]
    [InlineData("(1 2 3);(1 2)", 3, "(1 2 3 4);(1 2)", 4, 31104)]
    [InlineData("(1 2)", 2, "(1 2 3 4 5);(1 2)", 5, 3840)]
    [InlineData("(1 2 3 4);(1 2)", 4, "(1 2 3)", 3, 41472)]
    [InlineData("(1 2 3)", 3, "(1 2 3 4 5 6 7 8);(1 2)", 8, 264539520)]
    [InlineData("(1 2 3);(3 4 5)", 5, "(1 2 3);(3 4 5)", 5, 46656000000)]
    public void Wreath_products_have_the_order_of_one_to_the_power_n_times_that_of_the_other(string inner, int width, string outer, int copies, long order)
    {
        var generators = inner.Split(';').Select(Permutation.Parse).Concat(outer.Split(';').Select(Permutation.Parse).Select(p =>
            Permutation.FromImages([.. Enumerable.Range(0, width * copies).Select(i => (p[i / width] * width) + (i % width))])));
        RequireOrder([.. generators], order);
    }

    // Legendre's exponent of 2 in 16! (elementary).
    [Fact]
    public void The_Sylow_2_subgroup_of_S16_has_order_2_to_the_15() => RequireOrder(
        [.. new[] { 1, 2, 4, 8 }.Select(half => Permutation.FromImages([.. Enumerable.Range(0, 2 * half).Select(i => i ^ half)]))], 32768);

    // Elementary.
    [Theory]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(8)]
    [InlineData(12)]
    [InlineData(20)]
    [InlineData(25)]
    [InlineData(26)]
    [InlineData(27)]
    public void Symmetric_and_alternating_groups_have_n_factorial_members_and_half_of_it(int n)
    {
        var factorial = Enumerable.Range(1, n).Aggregate(BigInteger.One, (product, i) => product * i);
        int[] points = [.. Enumerable.Range(0, n)];
        var evenCycle = n % 2 == 1 ? Permutation.FromCycle(points) : Permutation.FromCycle(points.AsSpan(1));

        RequireChain([Permutation.FromCycle(points), Permutation.FromCycle(0, 1)], null, factorial, [.. Enumerable.Range(2, n - 1).Reverse()]);
        RequireChain([evenCycle, Permutation.FromCycle(0, 1, 2)], null, factorial / 2, [.. Enumerable.Range(3, n - 2).Reverse()]);
    }

    // Elementary.
    [Fact]
    public void The_dihedral_group_of_the_12_gon_has_24_and_the_Frobenius_group_on_7_points_21_members()
    {
        RequireOrder([Permutation.FromCycle([.. Enumerable.Range(0, 12)]), Permutation.FromImages([.. Enumerable.Range(0, 12).Select(i => 11 - i)])], 24);
        RequireOrder([Permutation.Parse("(1,2,3,4,5,6,7)"), Permutation.Parse("(2,3,5)(4,7,6)")], 21);
    }

    // Diaconis, Graham, Kantor, The mathematics of perfect shuffles, Adv. Appl. Math. 4 (1983) 175-196 (abstract opened): k·2^k for 2^k cards.
    [Theory]
    [InlineData(2, 8)]
    [InlineData(4, 24)]
    [InlineData(8, 64)]
    [InlineData(16, 160)]
    public void In_and_out_shuffles_of_2_to_the_k_cards_make_k_times_2_to_the_k_orders(int n, int order)
    {
        var outShuffle = Permutation.FromImages([.. Enumerable.Range(0, 2 * n).Select(i => i < n ? 2 * i : (2 * (i - n)) + 1)]);
        var inShuffle = Permutation.FromImages([.. Enumerable.Range(0, 2 * n).Select(i => i < n ? (2 * i) + 1 : 2 * (i - n))]);

        RequireOrder([outShuffle, inShuffle], order);
    }

    // OEIS A075152, A080602 (opened): the 3x3x3 on 48 moving facelets. Its orbit lengths along a base, sorted: own computation, for regression.
    [Fact]
    public void The_3x3x3_turns_make_a_group_of_the_published_order()
    {
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(3, 1));

        Assert.Equal(48, group.Degree);
        Assert.Equal(FactoredInteger.Parse("2^27·3^14·5^3·7^2·11"), group.FactoredOrder);
        Assert.Equal(BigInteger.Parse("43252003274489856000", null), group.Order);
        Assert.Equal([24, 24, 22, 21, 20, 18, 18, 16, 15, 14, 12, 12, 10, 9, 8, 6, 4, 3], group.Chain.OrbitLengths.OrderDescending());
    }

    // OEIS A054434 (opened): all six layers of the 2x2x2, orientations of the whole included.
    [Fact]
    public void The_2x2x2_with_six_layers_has_the_published_order()
    {
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(2, 1));

        Assert.Equal(24, group.Degree);
        Assert.Equal(88179840, group.Order);
    }

    // OEIS A080656 (opened): the 5x5x5 with all pieces distinct.
    [Fact]
    public void The_5x5x5_turns_make_a_group_of_the_published_order()
    {
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(5, 1, 2));

        Assert.Equal(144, group.Degree);
        Assert.Equal(12, group.Generators.Length);
        Assert.Equal(BigInteger.Parse("2582636272886959379162819698174683585918088940054237132144778804568925405184000000000000000", null), group.Order);
        Assert.True(group.Chain.Proof.IsProven);
    }

    private static int Power(ProjectiveGroups field, int x, int exponent) => Enumerable.Range(0, exponent).Aggregate(1, (product, _) => field.Multiply(product, x));

    private static Permutation[] Psl2(ProjectiveGroups field) =>
        [field.Moebius(1, 1, 0, 1), field.Moebius(field.Multiply(field.PrimitiveElement, field.PrimitiveElement), 0, 0, 1), field.Moebius(0, field.Negative(1), 1, 0)];

    private static Permutation[] Agl(ProjectiveGroups field, int d)
    {
        int[] Scale(int[] vector) => [field.Multiply(field.PrimitiveElement, vector[0]), .. vector[1..]];
        int[] Shift(int[] vector) => [field.Add(vector[0], 1), .. vector[1..]];
        var maps = field.Transvections(d).Append(Scale).Append(Shift);
        return [.. maps.Select(map => field.OnVectors(d, map))];
    }

    private static void RequireOrder(Permutation[] generators, BigInteger order) => RequireChain(generators, null, order);

    private static void RequireChain(Permutation[] generators, string? factored, BigInteger order, params int[] orbitLengths)
    {
        var group = PermutationGroup.Generate(generators);

        Assert.Equal(order, group.Order);
        Assert.True(group.Chain.Proof.IsProven);
        Assert.Equal(order, group.FactoredOrder.Value);
        if (factored is not null)
        {
            Assert.Equal(factored, group.FactoredOrder.ToString());
        }

        if (orbitLengths.Length > 0)
        {
            Assert.Equal(orbitLengths, group.Chain.OrbitLengths);
        }
    }
}
