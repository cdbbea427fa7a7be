using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Orders of large turning solids, as plain groups on all moving stickers.</summary>
public class LargeSolidTests
{
    // 24 times the term a(4) of OEIS A080656 (opened): all pieces distinct, the 24 ways to hold the cube included; 3^7 8! 24!^2 / 2.
    [Fact]
    public void The_twelve_layers_of_the_4x4x4_have_the_published_order()
    {
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(4, 1, 2));
        Assert.Equal(96, group.Degree);
        Proven(group, BigInteger.Parse("16972688908618238933770849245964147960401887232000000000"));
    }

    // OEIS A080656 (opened).
    [Fact]
    public void The_twelve_layers_of_the_5x5x5_have_the_published_order()
    {
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(5, 1, 2));
        Assert.Equal(144, group.Degree);
        Proven(group, BigInteger.Parse("2582636272886959379162819698174683585918088940054237132144778804568925405184000000000000000"));
    }

    // OEIS A309113 (opened): twelve faces, each turning by fifths; 20 corners of three stickers and 30 edges of two.
    [Fact]
    public void The_dodecahedron_has_the_published_order()
    {
        var group = PermutationGroup.Generate(Dodecahedron.FaceTurns());
        Assert.Equal(120, group.Degree);
        Proven(group, BigInteger.Parse("100669616553523347122516032313645505168688116411019768627200000000000"));
    }

    // Own formula: corners and middle edges as in the 3x3x3, and every other orbit all arrangements of 24, up to the parities that the turns tie together.
    [Theory]
    [InlineData(7, 8)]
    [InlineData(9, 15)]
    public void Larger_cubes_have_the_order_of_the_formula(int size, int orbits)
    {
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(size, [.. Enumerable.Range(1, size / 2)]));
        var whole = BigInteger.Parse("43252003274489856000") * BigInteger.Pow(Make.Factorial(24), orbits);

        // A face turn and, for each depth, a slice turn: each gives one sign to every orbit; so many signs are free, the rest follow.
        Proven(group, whole / BigInteger.Pow(2, orbits + 1 - (size / 2)));
    }

    private static void Proven(PermutationGroup group, BigInteger order)
    {
        Assert.Equal(order, group.Order);
        Assert.True(group.Chain.Proof.IsProven);
    }
}
