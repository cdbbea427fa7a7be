using System.Numerics;
using FsCheck.Xunit;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>Series, centres, block systems and actions, against plain closure on small groups and by laws on larger ones.</summary>
public class StructureTests
{
    [Fact]
    public void All_groups_of_two_elements_of_degree_4_have_the_structure_of_their_closures()
    {
        var all = SmallGroups.AllOfDegree(4).ToList();
        foreach (var a in all)
        {
            foreach (var b in all)
            {
                Check([a, b], 4);
            }
        }
    }

    [Property(MaxTest = 60)]
    public void Random_groups_of_degree_up_to_6_have_the_structure_of_their_closures(ulong seed) => Check(SmallGroups.RandomGenerators(seed, 6), 6);

    [Property(MaxTest = 100)]
    public void Kernel_and_image_of_an_action_multiply_to_the_order(ulong seed)
    {
        var group = SmallGroups.Random(seed, 12);
        foreach (var orbit in group.MovedOrbits)
        {
            Check(group.ActionOn(orbit));
            foreach (var system in group.MinimalBlockSystems(orbit[0]))
            {
                Check(group.ActionOn(system));
            }
        }

        void Check(GroupAction action)
        {
            Assert.Equal(group.Order, action.Image.Order * action.Kernel.Order);
            Assert.True(action.Kernel.IsNormalIn(group));
            Assert.All(action.Kernel.Generators, generator => Assert.True(action.Map(generator).IsIdentity));
            foreach (var one in group.Generators)
            {
                foreach (var other in group.Generators)
                {
                    Assert.Equal(action.Map(one * other), action.Map(one) * action.Map(other));
                }
            }
        }
    }

    [Property(MaxTest = 100)]
    public void Series_descend_by_normal_subgroups(ulong seed)
    {
        var group = SmallGroups.Random(seed, 10);
        foreach (var series in new[] { group.DerivedSeries(), group.LowerCentralSeries() })
        {
            for (var i = 1; i < series.Length; i++)
            {
                Assert.True(series[i].IsNormalIn(group));
                Assert.True(series[i].IsSubgroupOf(series[i - 1]));
                Assert.True(series[i].Order < series[i - 1].Order);
            }
        }

        Assert.Equal(group.Order / group.DerivedSubgroup().Order, group.AbelianInvariants().Aggregate(BigInteger.One, (product, invariant) => product * invariant));
    }

    [Theory]
    [InlineData("(1 2 3 4 5 6)", "2 3")]
    [InlineData("(1 2 3 4)(5 6)", "4")]
    [InlineData("(1 2 3 4); (5 6)", "2 4")]
    [InlineData("(1 2 3 4 5 6 7 8 9); (10 11 12)", "3 9")]
    [InlineData("(1 2 3); (1 2)", "2")]
    [InlineData("(1 2 3); (3 4 5)", "")]
    public void Abelian_invariants_are_prime_powers(string generators, string invariants) => Assert.Equal(invariants, string.Join(' ', Of(generators).AbelianInvariants()));

    [Theory]
    [InlineData("(1 2 3 4 5 6)", "2 3")]
    [InlineData("(1 2 3 4 5 6 7 8 9 10 11 12)", "2 3 4 6")]
    [InlineData("(1 2 3 4 5); (1 2)", "")]
    [InlineData("(1 2)(3 4); (1 3)(2 4)", "2 2 2")]
    public void All_block_systems_are_found(string generators, string sizes) => Assert.Equal(sizes, string.Join(' ', Of(generators).BlockSystems(0).Select(system => system.PartSize)));

    [Fact]
    public void The_minimal_block_systems_of_a_cycle_are_those_of_prime_part_size() =>
        Assert.Equal([2, 3], KnownGroups.Cyclic(12).MinimalBlockSystems(0).Select(system => system.PartSize).Order());

    [Fact]
    public void A_block_system_reads_as_parts_in_braces() => Assert.Equal("{1 4} {2 5} {3 6}", KnownGroups.Cyclic(6).BlockSystemJoining(0, 3).ToString());

    [Fact]
    public void The_centre_of_the_2_by_2_by_2_wreath_is_the_common_exchange()
    {
        var group = KnownGroups.WreathProduct(KnownGroups.Cyclic(2), KnownGroups.Symmetric(5));

        Assert.Equal([Permutation.Parse("(1 2)(3 4)(5 6)(7 8)(9 10)")], group.Centre().Generators.ToArray());
    }

    // All edges of the 3x3x3 flipped in place is the one element other than the identity that commutes with everything (D. Singmaster, Notes on the Magic Cube, 1981; source not opened, from memory).
    [Fact]
    public void The_centre_of_the_3x3x3_has_two_elements() =>
        Assert.Equal(2, PermutationGroup.Generate(Fusecraft.Tests.Support.CubeFacelets.LayerTurns(3, 1)).Centre().Order);

    [Fact]
    public void Arguments_that_do_not_fit_are_refused()
    {
        var group = Of("(1 2 3)(4 5 6)");

        Assert.Throws<ArgumentException>(() => group.NormalClosure(Permutation.Parse("(1 2)")));
        Assert.Throws<ArgumentException>(() => group.ActionOn([0, 1]));
        Assert.Throws<ArgumentException>(() => group.ActionOn([0, 0]));
        Assert.Throws<ArgumentException>(() => group.BlockSystemJoining(0, 3));
        Assert.Throws<ArgumentException>(() => group.ActionOn(KnownGroups.Cyclic(6).BlockSystemJoining(0, 2)));
        Assert.Throws<ArgumentException>(() => group.ActionOn([0, 1, 2]).Map(Permutation.Parse("(1 2)")));
    }

    private static PermutationGroup Of(string generators) => PermutationGroup.Generate([.. generators.Split(';').Select(text => Permutation.Parse(text.Trim()))]);

    private static void Check(Permutation[] generators, int degree)
    {
        var group = PermutationGroup.Generate(generators, degree);
        var members = SmallGroups.Closure(generators);
        var derived = SmallGroups.Closure(members.SelectMany(_ => members, Permutation.Commutator).Distinct());
        var centre = members.Where(member => members.All(other => member * other == other * member)).ToHashSet();
        Assert.Equal(derived, SmallGroups.Closure(group.DerivedSubgroup().Generators));
        Assert.Equal(centre, SmallGroups.Closure(group.Centre().Generators));
        Assert.Equal(members.Count == centre.Count, group.IsAbelian);
        Assert.Equal(members.Count == derived.Count, group.IsPerfect);

        var last = members;
        for (var next = derived; next.Count < last.Count; next = SmallGroups.Closure(last.SelectMany(_ => last, Permutation.Commutator).Distinct()))
        {
            last = next;
        }

        Assert.Equal(last.Count == 1, group.IsSolvable);
        foreach (var orbit in group.MovedOrbits)
        {
            var systems = group.BlockSystems(orbit[0]).Select(system => system.ToString()).Order(StringComparer.Ordinal);
            Assert.Equal(PlainBlockSystems(members, [.. orbit]).Order(StringComparer.Ordinal), systems);
        }
    }

    // A set of points with the first of the orbit is a part when its images are disjoint from it or equal to it.
    private static IEnumerable<string> PlainBlockSystems(HashSet<Permutation> members, int[] orbit)
    {
        for (var chosen = 1; chosen < 1 << (orbit.Length - 1); chosen++)
        {
            var part = orbit.Where((_, i) => i == 0 || (chosen >> (i - 1) & 1) != 0).ToHashSet();
            var images = members.Select(member => part.Select(point => member[point]).ToHashSet()).ToList();
            if (part.Count < orbit.Length && images.TrueForAll(image => image.SetEquals(part) || !image.Overlaps(part)))
            {
                yield return string.Join(' ', images.Select(image => "{" + string.Join(' ', image.Order().Select(point => point + 1)) + "}").Distinct().OrderBy(text => int.Parse(text[1..].Split(' ', '}')[0])));
            }
        }
    }
}
