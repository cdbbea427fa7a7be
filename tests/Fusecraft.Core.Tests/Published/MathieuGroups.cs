using Fusecraft.Permutations;

namespace Fusecraft.Tests.Published;

/// <summary>Generators of Mathieu groups from memory; their orders are checked against the Atlas.</summary>
internal static class MathieuGroups
{
    public static Permutation[] M11 => Parse("(1,2,3,4,5,6,7,8,9,10,11)", "(3,7,11,8)(4,10,5,6)");

    public static Permutation[] M12 => [.. M11, .. Parse("(1,12)(2,11)(3,6)(4,8)(5,9)(7,10)")];

    public static Permutation[] M22 => Parse(
        "(1,2,3,4,5,6,7,8,9,10,11)(12,13,14,15,16,17,18,19,20,21,22)",
        "(1,4,5,9,3)(2,8,10,7,6)(12,15,16,20,14)(13,19,21,18,17)",
        "(1,21)(2,10,8,6)(3,13,4,17)(5,19,9,18)(11,22)(12,14,16,20)");

    public static Permutation[] M23 => Parse(
        "(1,2,3,4,5,6,7,8,9,10,11,12,13,14,15,16,17,18,19,20,21,22,23)",
        "(3,17,10,7,9)(4,13,14,19,5)(8,18,11,12,23)(15,20,22,21,16)");

    public static Permutation[] M24 => [.. M23, .. Parse("(1,24)(2,23)(3,12)(4,16)(5,18)(6,10)(7,20)(8,14)(9,21)(11,17)(13,22)(15,19)")];

    private static Permutation[] Parse(params string[] cycles) => [.. cycles.Select(Permutation.Parse)];
}
