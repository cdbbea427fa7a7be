namespace Fusecraft.Tests.Support;

public class CubeFaceletsTests
{
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(7)]
    public void There_are_6n2_stickers_in_lexicographic_order(int size)
    {
        var stickers = new CubeFacelets(size).Stickers;
        Assert.Equal(6 * size * size, stickers.Count);
        Assert.Equal(stickers.Order(), stickers);
    }

    [Fact]
    public void Clockwise_turns_carry_stickers_as_seen_from_their_face()
    {
        var cube = new CubeFacelets(3);

        // The top corner at front and right goes to front and left, its front sticker to the left face.
        Assert.Equal(cube.PointOf(1, 3, 3, 'L'), cube.Turn('U')[cube.PointOf(3, 3, 3, 'F')]);

        // The right turn brings the front sticker of that corner to the top, at the back.
        Assert.Equal(cube.PointOf(3, 3, 1, 'U'), cube.Turn('R')[cube.PointOf(3, 3, 3, 'F')]);

        // The front turn brings the top sticker of that corner to the right face, at the bottom.
        Assert.Equal(cube.PointOf(3, 1, 3, 'R'), cube.Turn('F')[cube.PointOf(3, 3, 3, 'U')]);

        // The opposite faces turn the other way about the same axis.
        Assert.Equal(cube.PointOf(3, 1, 3, 'R'), cube.Turn('D')[cube.PointOf(1, 1, 3, 'F')]);
        Assert.Equal(cube.PointOf(1, 1, 3, 'D'), cube.Turn('L')[cube.PointOf(1, 3, 3, 'F')]);
        Assert.Equal(cube.PointOf(1, 1, 1, 'L'), cube.Turn('B')[cube.PointOf(1, 3, 1, 'U')]);
    }

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(5)]
    public void Turning_all_layers_from_opposite_faces_cancels(int size)
    {
        var cube = new CubeFacelets(size);
        foreach (var (face, opposite) in new[] { ('R', 'L'), ('U', 'D'), ('F', 'B') })
        {
            Assert.True((cube.Turn(face, 1, size) * cube.Turn(opposite, 1, size)).IsIdentity);
            Assert.Equal(cube.Turn(face, 1, size), cube.Turn(face, 1, 1) * cube.Turn(face, 2, size));
            Assert.Equal(cube.Turn(face, 2, size), cube.Turn(opposite, 1, size - 1).Inverse());
            Assert.Equal(4, cube.Turn(face).Order);
        }
    }

    [Fact]
    public void An_outer_turn_of_the_3x3x3_is_five_four_cycles() => Assert.Equal("4^5", new CubeFacelets(3).Turn('U').CycleType.ToString());
}
