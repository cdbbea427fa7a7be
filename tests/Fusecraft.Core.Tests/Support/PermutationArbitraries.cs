using FsCheck;
using FsCheck.Fluent;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Support;

/// <summary>
/// Random permutations for laws: mostly small ones, where coincidences happen, some of puzzle size, and some on both sides of the degree
/// where the packed store changes from one byte a point to two. Shrinks by leaving out cycles.
/// </summary>
public static class PermutationArbitraries
{
    public static Arbitrary<Permutation> Permutations() => Arb.From(Of(Degrees), Shrink);

    /// <summary>Permutations of 0 … degree-1, the degree drawn first.</summary>
    public static Gen<Permutation> Of(Gen<int> degrees) =>
        degrees.SelectMany(degree => Gen.Shuffle(Enumerable.Range(0, degree).ToArray())).Select(images => Permutation.FromImages(images));

    private static Gen<int> Degrees => Gen.Frequency(
        (10, Gen.Choose(0, 8)),
        (4, Gen.Choose(9, 60)),
        (3, Gen.Choose(254, 259)),
        (1, Gen.Choose(500, 1000)));

    private static IEnumerable<Permutation> Shrink(Permutation permutation)
    {
        foreach (var cycle in permutation.Cycles())
        {
            yield return permutation * Permutation.FromCycle(cycle.AsSpan()).Inverse();
        }
    }
}
