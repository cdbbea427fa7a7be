using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Reference;

/// <summary>
/// Two hundred random groups of degree 4 to 30, the same ones every time, of the kinds that stabilizer chains, centres and block systems find hard in different ways.
/// Members are random words in the generators, so that the groups depend on no algorithm under test.
/// </summary>
internal static class ReferenceGroups
{
    public const int LeastDegree = 4;
    public const int LargestDegree = 30;

    private static readonly (string Kind, int Count, Func<SeededRandom, PermutationGroup> Make)[] _kinds =
    [
        ("trivial", 8, Trivial),
        ("cyclic", 20, Cyclic),
        ("direct product", 24, Product),
        ("subdirect product", 24, Subdirect),
        ("equivalent orbits", 28, EquivalentOrbits),
        ("imprimitive", 32, Imprimitive),
        ("primitive", 28, Primitive),
        ("repeated generators", 16, Repeated),
        ("random", 20, Scattered),
    ];

    public static ImmutableArray<(string Kind, PermutationGroup Group)> All { get; } = Make();

    private static ImmutableArray<(string Kind, PermutationGroup Group)> Make()
    {
        var random = new SeededRandom(200);
        return [.. _kinds.SelectMany(kind => Enumerable.Range(0, kind.Count).Select(_ => (kind.Kind, kind.Make(random))))];
    }

    // No generators, or some identities.
    private static PermutationGroup Trivial(SeededRandom random) => PermutationGroup.Generate(Enumerable.Repeat(Permutation.Identity, random.NextInt32(3)), Degree(random));

    // A permutation, often with some of its powers before it.
    private static PermutationGroup Cyclic(SeededRandom random)
    {
        var degree = Degree(random);
        var whole = random.NextPermutation(degree);
        return PermutationGroup.Generate([.. Some(random, 3, () => whole.Power(random.NextInt32(12))), whole], degree);
    }

    private static PermutationGroup Product(SeededRandom random) => Relabelled(random, KnownGroups.DirectProduct(Transitive(random, 15), Transitive(random, 15)));

    // Members of two groups side by side, of which not every pair occurs.
    private static PermutationGroup Subdirect(SeededRandom random)
    {
        var (left, right) = (Transitive(random, 15), Transitive(random, 15));
        return Relabelled(random, PermutationGroup.Generate(Some(random, 3, () => SideBySide(left.Degree, Member(random, left), Member(random, right))), left.Degree + right.Degree));
    }

    // One group acting alike on two or three orbits, sometimes with an orbit beside them on which it acts in another way.
    private static PermutationGroup EquivalentOrbits(SeededRandom random)
    {
        var group = Transitive(random, 10);
        var other = Transitive(random, LargestDegree - (2 * group.Degree));
        var copies = random.NextInt32(3);
        return Relabelled(random, copies switch
        {
            0 => PermutationGroup.Generate(group.Generators.Select(g => SideBySide(group.Degree, g, g)), 2 * group.Degree),
            1 => PermutationGroup.Generate(group.Generators.Select(g => SideBySide(group.Degree, g, SideBySide(group.Degree, g, g))), 3 * group.Degree),
            _ => PermutationGroup.Generate(
                group.Generators.Select(g => SideBySide(other.Degree, Member(random, other), SideBySide(group.Degree, g, g))), other.Degree + (2 * group.Degree)),
        });
    }

    // A transitive subgroup of a wreath product, or all of it.
    private static PermutationGroup Imprimitive(SeededRandom random)
    {
        var lower = Transitive(random, 10);
        var wreath = KnownGroups.WreathProduct(lower, Transitive(random, LargestDegree / lower.Degree));
        for (var tries = 0; tries < 20; tries++)
        {
            var subgroup = PermutationGroup.Generate(Some(random, 3, () => Member(random, wreath)), wreath.Degree);
            if (subgroup.IsTransitive)
            {
                return Relabelled(random, subgroup);
            }
        }

        return Relabelled(random, wreath);
    }

    private static PermutationGroup Primitive(SeededRandom random) => Relabelled(random, random.NextInt32(13) switch
    {
        0 => KnownGroups.MathieuM11(),
        1 => KnownGroups.MathieuM12(),
        2 => KnownGroups.MathieuM22(),
        3 => KnownGroups.MathieuM24(),
        4 => KnownGroups.ProjectiveSpecial(3, 2 + random.NextInt32(3)),
        5 => KnownGroups.ProjectiveSpecial(4, 2),
        6 => KnownGroups.AffineGeneral(2, 3 + random.NextInt32(3)),
        7 => KnownGroups.AffineGeneral(3, 2 + random.NextInt32(2)),
        8 => KnownGroups.ProjectiveGeneral(2, OneOf(random, 5, 7, 8, 9, 11, 13)),
        9 => KnownGroups.ProjectiveSpecial(2, OneOf(random, 5, 7, 16, 17, 19, 23, 25)),
        10 => KnownGroups.WreathProductOnTuples(KnownGroups.Symmetric(3 + random.NextInt32(3)), KnownGroups.Symmetric(2)),
        11 => KnownGroups.AffineGeneral(1, OneOf(random, 5, 8, 9, 16, 23, 27)),
        _ => KnownGroups.Alternating(5 + random.NextInt32(8)),
    });

    // The generators of a group twice, with the identity, an inverse and a word among them.
    private static PermutationGroup Repeated(SeededRandom random)
    {
        var group = random.NextInt32(2) == 0 ? Product(random) : Subdirect(random);
        var generators = group.Generators;
        return PermutationGroup.Generate([.. generators, Permutation.Identity, Member(random, group), generators[0].Inverse(), .. generators], group.Degree);
    }

    // Permutations of no structure, or powers of them that move few points.
    private static PermutationGroup Scattered(SeededRandom random)
    {
        var degree = Degree(random);
        return PermutationGroup.Generate(Some(random, 3, () => random.NextPermutation(degree).Power(OneOf(random, 1, 2, 6, 12, 60))), degree);
    }

    private static PermutationGroup Transitive(SeededRandom random, int largestDegree)
    {
        while (true)
        {
            var group = random.NextInt32(6) switch
            {
                0 => KnownGroups.Cyclic(2 + random.NextInt32(11)),
                1 => KnownGroups.Dihedral(3 + random.NextInt32(10)),
                2 => KnownGroups.Symmetric(2 + random.NextInt32(5)),
                3 => KnownGroups.Alternating(3 + random.NextInt32(5)),
                4 => KnownGroups.AffineGeneral(1, OneOf(random, 4, 5, 7, 8, 9, 11, 13)),
                _ => KnownGroups.ProjectiveSpecial(2, OneOf(random, 3, 4, 5, 7, 8, 9)),
            };
            if (group.Degree <= largestDegree)
            {
                return group;
            }
        }
    }

    private static int Degree(SeededRandom random) => LeastDegree + random.NextInt32(LargestDegree - LeastDegree + 1);

    private static int OneOf(SeededRandom random, params ReadOnlySpan<int> numbers) => numbers[random.NextInt32(numbers.Length)];

    // From one up to a number of them.
    private static Permutation[] Some(SeededRandom random, int most, Func<Permutation> next) => [.. Enumerable.Range(0, 1 + random.NextInt32(most)).Select(_ => next())];

    private static Permutation Member(SeededRandom random, PermutationGroup group)
    {
        var member = Permutation.Identity;
        for (var i = 0; i < 20; i++)
        {
            member *= group.Generators[random.NextInt32(group.Generators.Length)];
        }

        return member;
    }

    private static Permutation SideBySide(int leftDegree, Permutation left, Permutation right) =>
        Permutation.FromImages([.. Enumerable.Range(0, leftDegree + right.SupportEnd).Select(i => i < leftDegree ? left[i] : leftDegree + right[i - leftDegree])]);

    private static PermutationGroup Relabelled(SeededRandom random, PermutationGroup group)
    {
        var names = random.NextPermutation(group.Degree);
        return PermutationGroup.Generate(group.Generators.Select(generator => generator.ConjugateBy(names)), group.Degree);
    }
}
