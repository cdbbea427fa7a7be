using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groupoids;

public class GroupRelabellingTests
{
    public static TheoryData<string> Groups => ["S5", "A6", "C12", "D9", "C2xC2xC2", "S3wrC2", "AGL(1,7)", "PGL(2,5)", "S4xA4", "trivial"];

    [Theory]
    [MemberData(nameof(Groups))]
    public void Relabelled_groups_are_found_alike_with_a_relabelling_that_does_it(string name)
    {
        var group = Group(name);
        var random = new SeededRandom(7);
        for (var i = 0; i < 5; i++)
        {
            var by = random.NextPermutation(Math.Max(group.Degree, 1));
            var other = PermutationGroup.Generate(group.Generators.Select(generator => generator.ConjugateBy(by)), group.Degree);

            var answer = new GroupRelabelling(group, other, 50_000_000, CancellationToken.None).Decide(null);

            Assert.True(answer.AreAlike, answer.Reason);
            Assert.True(PermutationGroup.Generate(group.Generators.Select(generator => generator.ConjugateBy(answer.Relabelling!.Value)), group.Degree).SameGroupAs(other));
        }
    }

    [Fact]
    public void Groups_that_differ_are_told_apart()
    {
        // Orders; orbit lengths; actions on the orbits; cycle types.
        Unlike(Group("C12"), Group("D9"), "their orders are 12 and 18");
        Unlike(KnownGroups.Cyclic(6), PermutationGroup.Generate(Permutation.Parse("(1 2 3)(4 5)")), "their orbits have other lengths");
        Unlike(
            PermutationGroup.Generate(Permutation.Parse("(1 2 3 4)"), Permutation.Parse("(5 6)")),
            PermutationGroup.Generate(Permutation.Parse("(1 2 3 4)"), Permutation.Parse("(1 3)(5 6)")),
            "they act on their orbits with other orders");
        Unlike(KnownGroups.Cyclic(4), PermutationGroup.Generate(Permutation.Parse("(1 2)(3 4)"), Permutation.Parse("(1 3)(2 4)")), "they have other numbers of members of some cycle type");
    }

    // Regular actions of C8 x C2 and of the other group of order 16 with a cyclic subgroup of index 2 and as many elements of each order (a textbook fact; source not opened, from memory).
    [Fact]
    public void Groups_that_agree_in_all_counts_are_told_apart_by_trial() => Unlike(Regular(1), Regular(5), "no images of the generators do the same up to relabelling; all were tried");

    [Fact]
    public void Large_groups_of_no_known_kind_are_left_undecided()
    {
        // The Mathieu group of degree 11 (order 7920) on 1 … 11 and relabelled.
        var group = PermutationGroup.Generate(Permutation.Parse("(1 2 3 4 5 6 7 8 9 10 11)"), Permutation.Parse("(3 7 11 8)(4 10 5 6)"));
        var by = Permutation.Parse("(1 2)");
        var other = PermutationGroup.Generate(group.Generators.Select(generator => generator.ConjugateBy(by)), 11);

        Assert.Null(new GroupRelabelling(group, other, 50_000_000, CancellationToken.None).Decide(null).AreAlike);
        Assert.True(new GroupRelabelling(group, other, 50_000_000, CancellationToken.None).Decide(by).AreAlike);
    }

    private static void Unlike(PermutationGroup one, PermutationGroup other, string reason)
    {
        var answer = new GroupRelabelling(one, other, 50_000_000, CancellationToken.None).Decide(null);
        Assert.False(answer.AreAlike);
        Assert.Equal(reason, answer.Reason);
    }

    // x of order 8, y of order 2, y x y = x^k, acting on the 16 products x^i y^j by right multiplication: (i, j) x = (i + k^j, j), (i, j) y = (i, j + 1).
    private static PermutationGroup Regular(int k)
    {
        var x = Enumerable.Range(0, 16).Select(point => (((point % 8) + (point < 8 ? 1 : k)) % 8) + (point / 8 * 8)).ToArray();
        var y = Enumerable.Range(0, 16).Select(point => (point + 8) % 16).ToArray();
        return PermutationGroup.Generate(Permutation.FromImages(x), Permutation.FromImages(y));
    }

    private static PermutationGroup Group(string name) => name switch
    {
        "S5" => KnownGroups.Symmetric(5),
        "A6" => KnownGroups.Alternating(6),
        "C12" => KnownGroups.Cyclic(12),
        "D9" => KnownGroups.Dihedral(9),
        "C2xC2xC2" => PermutationGroup.Generate(Permutation.Parse("(1 2)(3 4)(5 6)(7 8)"), Permutation.Parse("(1 3)(2 4)(5 7)(6 8)"), Permutation.Parse("(1 5)(2 6)(3 7)(4 8)")),
        "S3wrC2" => KnownGroups.WreathProduct(KnownGroups.Symmetric(3), KnownGroups.Cyclic(2)),
        "AGL(1,7)" => PermutationGroup.Generate(Permutation.Parse("(1 2 3 4 5 6 7)"), Permutation.Parse("(2 4 3 7 5 6)")),
        "PGL(2,5)" => PermutationGroup.Generate(Permutation.Parse("(1 2 3 4 5)"), Permutation.Parse("(2 3 5 4)"), Permutation.Parse("(1 6)(2 5)")),
        "S4xA4" => KnownGroups.DirectProduct(KnownGroups.Symmetric(4), KnownGroups.Alternating(4)),
        _ => PermutationGroup.Generate(),
    };
}
