using Fusecraft.Permutations;

namespace Fusecraft.Groups;

// The Mathieu groups. Generators from memory; orders from J. H. Conway et al., Atlas of Finite Groups (1985).
public static partial class KnownGroups
{
    private const string Elevens = "(1 2 3 4 5 6 7 8 9 10 11)";
    private const string M23Cycle = "(1 2 3 4 5 6 7 8 9 10 11 12 13 14 15 16 17 18 19 20 21 22 23)";
    private const string M23Other = "(3 17 10 7 9)(4 13 14 19 5)(8 18 11 12 23)(15 20 22 21 16)";

    /// <summary>The Mathieu group M11 on 11 points, sharply 4-transitive; order 7,920.</summary>
    public static PermutationGroup MathieuM11() => Given(11, 7_920, Elevens, "(3 7 11 8)(4 10 5 6)");

    /// <summary>The Mathieu group M12 on 12 points, sharply 5-transitive; order 95,040.</summary>
    public static PermutationGroup MathieuM12() => Given(12, 95_040, Elevens, "(3 7 11 8)(4 10 5 6)", "(1 12)(2 11)(3 6)(4 8)(5 9)(7 10)");

    /// <summary>The Mathieu group M22 on 22 points; order 443,520.</summary>
    public static PermutationGroup MathieuM22() => Given(
        22,
        443_520,
        "(1 2 3 4 5 6 7 8 9 10 11)(12 13 14 15 16 17 18 19 20 21 22)",
        "(1 4 5 9 3)(2 8 10 7 6)(12 15 16 20 14)(13 19 21 18 17)",
        "(1 21)(2 10 8 6)(3 13 4 17)(5 19 9 18)(11 22)(12 14 16 20)");

    /// <summary>The Mathieu group M23 on 23 points; order 10,200,960.</summary>
    public static PermutationGroup MathieuM23() => Given(23, 10_200_960, M23Cycle, M23Other);

    /// <summary>The Mathieu group M24 on 24 points, 5-transitive; order 244,823,040.</summary>
    public static PermutationGroup MathieuM24() => Given(24, 244_823_040, M23Cycle, M23Other, "(1 24)(2 23)(3 12)(4 16)(5 18)(6 10)(7 20)(8 14)(9 21)(11 17)(13 22)(15 19)");

    private static PermutationGroup Given(int degree, int order, params string[] generators) =>
        OfKnownOrder(generators.Select(Permutation.Parse), degree, order);
}
