using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Published;

/// <summary>Positions of puzzles some of whose pieces look alike: the order of the group over that of the stabilizer of the colouring. And positions that count as one where a symmetry carries one to the other.</summary>
public class VisiblePositionTests
{
    // OEIS A075152 (opened); M. E. Larsen, Amer. Math. Monthly 92 (1985) 381-390: the 4x4x4 up to orientation, which holding one corner still comes to.
    private static readonly BigInteger Size4 = BigInteger.Parse("7401196841564901869874093974498574336000000000");

    // OEIS A075152 (opened).
    private static readonly BigInteger Size5 = BigInteger.Parse("282870942277741856536180333107150328293127731985672134721536000000000000000");

    [Fact]
    public void The_4x4x4_with_the_centres_of_a_face_alike_and_one_corner_held()
    {
        var (group, colours) = Coloured(4);

        // OEIS A080656 (opened): all pieces distinct. Any even permutation of the centres that stay in their faces is hidden.
        Assert.Equal(BigInteger.Parse("707195371192426622240452051915172831683411968000000000"), group.Order);
        Assert.Equal(Size4, group.OrbitSizeOfColouring(colours));
        Assert.Equal(BigInteger.Pow(24, 6) / 2, group.ColouringStabilizer(colours).Order);
    }

    // OEIS A075152 (opened) times the 24 orientations of the whole: with no corner held these count too.
    [Fact]
    public void The_4x4x4_with_no_corner_held_has_24_times_as_many()
    {
        var cube = new CubeFacelets(4);
        var group = PermutationGroup.Generate(CubeFacelets.LayerTurns(4, 1, 2));
        Assert.Equal(96, group.Degree);
        Assert.Equal(Size4 * 24, group.OrbitSizeOfColouring([.. cube.Stickers.Select(Face)]));

        int Face((int X, int Y, int Z) place) => Math.Abs(place.X) == 4 ? Math.Sign(place.X) : Math.Abs(place.Y) == 4 ? 3 * Math.Sign(place.Y) : 9 * Math.Sign(place.Z);
    }

    [Fact]
    public void The_5x5x5_with_the_centres_of_a_face_alike()
    {
        var (group, colours) = Coloured(5);
        Assert.Equal(BigInteger.Parse("2582636272886959379162819698174683585918088940054237132144778804568925405184000000000000000"), group.Order);
        Assert.Equal(Size5, group.OrbitSizeOfColouring(colours));
    }

    // OEIS A309109 (opened): the tetrahedron that turns about its four corners, without and with separately turning tips.
    [Fact]
    public void The_tetrahedral_corner_turning_puzzle()
    {
        Permutation[] turns = [.. Enumerable.Range(0, 4).Select(Tetrahedral)];
        Permutation[] tips = [.. Enumerable.Range(0, 4).Select(corner => Permutation.FromCycle(24 + (3 * corner), 25 + (3 * corner), 26 + (3 * corner)))];
        Assert.Equal(933_120, PermutationGroup.Generate(turns).Order);
        Assert.Equal(75_582_720, PermutationGroup.Generate([.. turns.Select((turn, corner) => turn * tips[corner]), .. tips]).Order);

        // Six edges in two orientations each, and four axial pieces with three places each.
        Assert.Equal([12, 3, 3, 3, 3], PermutationGroup.Generate(turns).Orbits.Select(orbit => orbit.Length).OrderDescending());
    }

    // First: OEIS A080583, A080638 (opened); second: own figure. A symmetry s fixes the positions that commute with it, so the lemma of Cauchy and Frobenius adds up centralizers.
    [Fact]
    public void The_3x3x3_up_to_its_symmetries()
    {
        var cube = new CubeFacelets(3);
        var group = PermutationGroup.Generate("URFDLB".Select(cube.Turn), cube.Stickers.Count);
        var all = (Rotations: BigInteger.Zero, Symmetries: BigInteger.Zero);
        var centralizers = new Dictionary<(CycleType, bool), BigInteger>();
        foreach (var (symmetry, isRotation) in Symmetries(cube))
        {
            // Conjugate symmetries fix equally many positions; cycle types on the stickers and the sense tell the ten classes apart.
            if (!centralizers.TryGetValue((symmetry.CycleType, isRotation), out var count))
            {
                centralizers.Add((symmetry.CycleType, isRotation), count = group.Centralizer(symmetry).Order);
            }

            all = (all.Rotations + (isRotation ? count : 0), all.Symmetries + count);
        }

        Assert.Equal(10, centralizers.Count);
        Assert.Equal(BigInteger.Parse("901083404981813616") * 48, all.Symmetries);
        Assert.Equal(BigInteger.Parse("1802166805653080256") * 24, all.Rotations);
    }

    private static (PermutationGroup Group, int[] Colours) Coloured(int size)
    {
        var mechanism = Mechanism.Create(new MechanismDefinition { Name = "coloured cube", Family = new CubeFamily(size), Colours = ColourScheme.Faces });
        return (mechanism.UnguardedGroup, [.. mechanism.ColourOfSite]);
    }

    // Sites 0 … 11: axial pieces, three each, one for each other corner (their face is the one opposite to it). Sites 12 … 23: edges, from one corner to another, one of the two faces each.
    private static Permutation Tetrahedral(int corner)
    {
        int[] others = [.. Enumerable.Range(0, 4).Where(other => other != corner)];
        int Next(int other) => other == corner ? corner : others[(Array.IndexOf(others, other) + 1) % 3];
        var axial = (from a in Enumerable.Range(0, 4) from face in Enumerable.Range(0, 4) where face != a select (a, a, face)).ToList();
        var edges = (from b in Enumerable.Range(0, 4) from a in Enumerable.Range(0, b) from face in Enumerable.Range(0, 4) where face != a && face != b select (a, b, face)).ToList();
        List<(int A, int B, int Face)> sites = [.. axial, .. edges];
        return Permutation.FromImages([.. sites.Select((site, i) =>
        {
            if (site.A != corner && site.B != corner)
            {
                return i;
            }

            var (a, b) = (Next(site.A), Next(site.B));
            return sites.IndexOf((Math.Min(a, b), Math.Max(a, b), Next(site.Face)));
        })]);
    }

    // All ways to put the three axes on each other with either sign.
    private static IEnumerable<(Permutation Symmetry, bool IsRotation)> Symmetries(CubeFacelets cube)
    {
        var places = cube.Stickers.ToList();
        foreach (var axes in (int[][])[[0, 1, 2], [1, 2, 0], [2, 0, 1], [1, 0, 2], [0, 2, 1], [2, 1, 0]])
        {
            for (var signs = 0; signs < 8; signs++)
            {
                int Moved((int X, int Y, int Z) place, int axis)
                {
                    int[] coordinates = [place.X, place.Y, place.Z];
                    return coordinates[axes[axis]] * (((signs >> axis) & 1) == 0 ? 1 : -1);
                }

                var isEven = (axes[1] - axes[0] + 3) % 3 == 1;
                yield return (Permutation.FromImages([.. places.Select(place => places.IndexOf((Moved(place, 0), Moved(place, 1), Moved(place, 2))))]), isEven == (BitOperations.PopCount((uint)signs) % 2 == 0));
            }
        }
    }
}
