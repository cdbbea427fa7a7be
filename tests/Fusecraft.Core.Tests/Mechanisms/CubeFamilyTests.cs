using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Mechanisms;

/// <summary>The cube family, against an independent model made of points in space.</summary>
public class CubeFamilyTests
{
    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    public void Turns_are_rotations_of_the_layers_beyond_a_cut(int size)
    {
        var mechanism = MechanismBuilder.Cube("Cube", size).Build();
        var model = new CubeFacelets(size);
        var pointOf = Enumerable.Range(0, mechanism.SiteCount).Select(site => PointOf(mechanism, model, site, size)).ToArray();
        var rename = Permutation.FromImages(pointOf);

        Assert.Equal(6 * size * size, mechanism.SiteCount);
        foreach (var turn in mechanism.Turns)
        {
            var layers = turn.Name.EndsWith('w') ? char.IsAsciiDigit(turn.Name[0]) ? turn.Name[0] - '0' : 2 : 1;
            var face = turn.Name.First(char.IsAsciiLetterUpper);
            Assert.Equal(model.Turn(face, 1, layers), turn.Permutation.ConjugateBy(rename));
        }
    }

    [Theory]
    [InlineData(2, "U R F", 8)]
    [InlineData(3, "U R F D L B", 27)]
    [InlineData(4, "U Uw 3Uw R Rw 3Rw F Fw 3Fw", 56)]
    [InlineData(5, "U Uw R Rw F Fw D Dw L Lw B Bw", 99)]
    public void Turns_and_pieces_are_those_of_the_size(int size, string turns, int pieces)
    {
        var mechanism = MechanismBuilder.Cube("Cube", size).Build();

        Assert.Equal(turns, string.Join(' ', mechanism.Turns));
        Assert.Equal(pieces, mechanism.PieceCount);
        Assert.Equal(size % 2 == 1, mechanism.FindPiece("core") is not null);
    }

    [Fact]
    public void The_largest_cube_has_60000_sites_and_297_turns()
    {
        var mechanism = MechanismBuilder.Cube("Large", 100).Build();

        Assert.Equal((60_000, 297), (mechanism.SiteCount, mechanism.Turns.Length));
        Assert.Equal(4, mechanism.Turns[98].Permutation.Order);
    }

    [Theory]
    [InlineData("UFR", "RUF")]
    [InlineData("UFR", "3,3,3")]
    [InlineData("UFR", "FUR:U")]
    [InlineData("DBL", "1,1,1")]
    [InlineData("U", "2,3,2")]
    public void A_piece_is_known_by_every_order_of_its_letters_and_by_its_place(string one, string other)
    {
        var cube = MechanismBuilder.Cube("Cube", 3).Build();

        Assert.NotNull(cube.FindPiece(one));
        Assert.Equal(cube.FindPiece(one), cube.FindPiece(other));
    }

    [Theory]
    [InlineData("UD")]
    [InlineData("UU")]
    [InlineData("X")]
    [InlineData("2,2,2")]
    [InlineData("4,1,1")]
    [InlineData("")]
    [InlineData("UFR:B")]
    public void What_is_no_piece_is_not_found(string name) => Assert.Null(MechanismBuilder.Cube("Cube", 3).Build().FindPiece(name));

    [Fact]
    public void Sites_are_numbered_by_piece_and_then_by_face()
    {
        var cube = MechanismBuilder.Cube("Cube", 3).Build();

        Assert.Equal(["DBL:L", "DBL:D", "DBL:B", "DL:L", "DL:D", "DFL:L"], cube.SiteNames.Take(6));
        Assert.Equal("UFR:F", cube.SiteNames[^1]);
    }

    [Fact]
    public void With_centre_twist_a_turn_takes_the_corners_of_its_centre_round()
    {
        var cube = MechanismBuilder.Cube("Cube", 3, centreTwist: true).Build();

        Assert.Equal(72, cube.SiteCount);
        Assert.Equal(cube.FindSite("U:U.2"), cube.FindTurn("U")!.Permutation[cube.FindSite("U:U.1")!.Value]);
        Assert.Null(cube.FindSite("U:U"));
        Assert.Null(cube.FindSite("U:U.5"));
    }

    // Cells are counted from left, bottom and back in both.
    private static int PointOf(Mechanism mechanism, CubeFacelets model, int site, int size)
    {
        var face = mechanism.SiteNames[site].Split(':')[1][0];
        foreach (var x in Enumerable.Range(1, size))
        {
            foreach (var y in Enumerable.Range(1, size))
            {
                foreach (var z in Enumerable.Range(1, size))
                {
                    if (mechanism.FindPiece($"{x},{y},{z}") == mechanism.PieceOfSite[site])
                    {
                        return model.PointOf(x, y, z, face);
                    }
                }
            }
        }

        throw new InvalidOperationException("The piece is nowhere.");
    }
}
