using Fusecraft.Mechanisms;
using Fusecraft.Permutations;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests.Mechanisms;

/// <summary>
/// The trade's other names of cube turns. What they mean is common practice in the trade (M follows L, E follows D, S follows F; x, y and z follow R, U and F); that they are translated rightly is checked against
/// <see cref="CubeFacelets"/>, which turns the layers literally and the whole cube with them.
/// </summary>
public class CubeNamesTests
{
    [Theory]
    [InlineData(3, "M", "R L'")]
    [InlineData(3, "E", "U D'")]
    [InlineData(3, "S", "B F'")]
    [InlineData(3, "M2", "R R L' L'")]
    [InlineData(3, "Rw", "L")]
    [InlineData(3, "2Rw", "L")]
    [InlineData(3, "2R", "L R'")]
    [InlineData(4, "2U", "Uw U'")]
    [InlineData(4, "3U'", "3Uw' Uw")]
    [InlineData(5, "2D", "Dw D'")]
    [InlineData(5, "3R", "Lw Rw'")]
    [InlineData(5, "3Rw", "Lw")]
    [InlineData(2, "D", "U")]
    [InlineData(2, "L2 B'", "R R F'")]
    [InlineData(4, "Dw", "Uw")]
    [InlineData(4, "3Lw", "R")]
    [InlineData(3, "x", "")]
    [InlineData(3, "x U", "F")]
    [InlineData(3, "y R", "B")]
    [InlineData(3, "z U", "L")]
    [InlineData(3, "x' U x", "B")]
    [InlineData(3, "[x: U R]", "F R")]
    [InlineData(3, "(x U)4", "F D B U")]
    [InlineData(3, "(x U)'", "U'")]
    [InlineData(3, "[M, U2]", "R L' B B R' L U' U'")]
    [InlineData(3, "Rw U Rw'", "L F L'")]
    [InlineData(4, "2U Uw", "Uw U' Uw")]
    public void Other_names_become_steps(int size, string text, string steps) => Assert.Equal(steps, Make.Cube(size).ParseWord(text).ToString());

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(6)]
    [InlineData(7)]
    public void Random_words_turn_the_layers_that_their_names_say_up_to_turning_the_whole_cube(int size)
    {
        var mechanism = Make.Cube(size);
        var model = new CubeFacelets(size);
        var toModel = Permutation.FromImages([.. Enumerable.Range(0, mechanism.SiteCount).Select(site => PointOf(model, mechanism.SiteNames[site], size))]);
        var whole = WholeTurns(model, size);
        var names = Names(model, size);
        var random = new SeededRandom((ulong)size);
        for (var round = 0; round < 500; round++)
        {
            var (text, literal) = RandomWord(names, random, 1 + random.NextInt32(12), 2);
            var read = mechanism.HomeState.Apply(mechanism.ParseWord(text)).Labels.ConjugateBy(toModel);

            Assert.True(whole.Contains(read.Inverse() * literal), $"\"{text}\" was read as \"{mechanism.ParseWord(text)}\".");
        }
    }

    [Fact]
    public void The_hold_is_dropped_at_the_end_of_a_word()
    {
        var cube = Make.Cube(3);

        Assert.Equal("F U", cube.ParseWord("x U").Then(cube.ParseWord("U")).ToString());
        Assert.Equal("F F", cube.ParseWord("x U U").ToString());
    }

    [Fact]
    public void Half_turns_that_are_used_alone_are_found()
    {
        var cube = Make.Cube(3, "U R L2 F2");

        Assert.Equal("F2 F2'", cube.ParseWord("x U2 U2'").ToString());
        Assert.Equal("R R L2'", cube.ParseWord("M2").ToString());
        Assert.Equal("R R F2", cube.ParseWord("y F2 L2").ToString());
        Assert.False(cube.TryParseWord("U M", out _, out var problem));
        Assert.Equal("character 3: \"M\" needs a quarter turn of L, of which the mechanism has the half turn L2 alone; the turns are U, R, L2, F2", problem);
        Assert.False(cube.TryParseWord("U D2", out _, out problem));
        Assert.Equal("character 3: \"D\" needs the turn D, which the mechanism does not have; the turns are U, R, L2, F2", problem);
    }

    [Theory]
    [InlineData(2, "M", "character 1: found \"M\"; a cube of size 2 has no middle layer")]
    [InlineData(2, "U Rw", "character 3: found \"Rw\"; a cube of size 2 has no wide turns; x, y and z turn it whole")]
    [InlineData(2, "2U", "character 1: found \"2U\"; a cube of size 2 has no inner layers")]
    [InlineData(3, "3Uw", "character 1: found \"3Uw\"; wide turns of a cube of size 3 take 2 layers")]
    [InlineData(3, "1U", "character 1: found \"1U\"; the inner layers of a cube of size 3 are 2")]
    [InlineData(4, "U 4Rw2", "character 3: found \"4Rw\"; wide turns of a cube of size 4 take 2 to 3 layers")]
    [InlineData(4, "E", "character 1: found \"E\"; a cube of size 4 has no middle layer")]
    [InlineData(5, "9U", "character 1: found \"9U\"; the inner layers of a cube of size 5 are 2 to 4")]
    [InlineData(5, "99999999999U", "character 1: found \"99999999999U\"; the inner layers of a cube of size 5 are 2 to 4")]
    [InlineData(3, "2x", "character 1: found \"2x\"; the steps are U, U', R, R', F, F', D, D', L, L', B, B'")]
    [InlineData(3, "xU", "character 2: found \"U\" behind \"x\"; steps are separated by spaces")]
    public void Names_that_the_size_does_not_have_are_refused(int size, string text, string problem)
    {
        Assert.False(Make.Cube(size).TryParseWord(text, out _, out var found));
        Assert.Equal(problem, found);
    }

    [Fact]
    public void A_translated_step_that_a_block_bars_is_named()
    {
        var cube = Make.Cube(3, "", "D DL");

        Assert.False(cube.HomeState.TryApply(cube.ParseWord("U M"), out _, out var barred));
        Assert.Equal("step 3 (L') is barred: it would tear the block [DL D]", barred.ToString());
        Assert.True(cube.HomeState.TryApply(cube.ParseWord("y2 z' R"), out var end, out _));
        Assert.Equal(cube.HomeState.Apply(cube.ParseWord("D")), end);
        Assert.Equal(
            "the word \"U M\", read as \"U R L'\", cannot be done from home: step 3 (L') is barred: it would tear the block [DL D]",
            Assert.Throws<FormatException>(() => cube.ParseState("U M")).Message);
    }

    [Fact]
    public void Other_mechanisms_do_not_know_the_names() => Assert.False(Make.Board(3, 3).TryParseWord("x", out _, out _));

    // What the holder turns: layers first to last seen from a face.
    private static List<(string Name, Permutation Moves)> Names(CubeFacelets model, int size)
    {
        var names = new List<(string, Permutation)> { ("x", model.Turn('R', 1, size)), ("y", model.Turn('U', 1, size)), ("z", model.Turn('F', 1, size)) };
        foreach (var face in "URFDLB")
        {
            names.Add(($"{face}", model.Turn(face)));
            for (var layer = 2; layer < size; layer++)
            {
                names.Add(($"{layer}{face}", model.Turn(face, layer, layer)));
                names.Add((layer == 2 ? $"{face}w" : $"{layer}{face}w", model.Turn(face, 1, layer)));
            }
        }

        if (size % 2 == 1)
        {
            var middle = (size + 1) / 2;
            names.AddRange([("M", model.Turn('L', middle, middle)), ("E", model.Turn('D', middle, middle)), ("S", model.Turn('F', middle, middle))]);
        }

        return names;
    }

    // Names with exponents, repeats, commutators and conjugates, with what they do to the places of the stickers in the holder's space.
    private static (string Text, Permutation Moves) RandomWord(List<(string Name, Permutation Moves)> names, SeededRandom random, int length, int depth)
    {
        var text = new List<string>();
        var moves = Permutation.Identity;
        for (var i = 0; i < length; i++)
        {
            string item;
            Permutation does;
            var kind = depth == 0 ? 0 : random.NextInt32(12);
            if (kind > 2)
            {
                kind = 0;
            }

            if (kind == 0)
            {
                (item, does) = names[random.NextInt32(names.Count)];
            }
            else
            {
                var (a, movesA) = RandomWord(names, random, 1 + random.NextInt32(3), depth - 1);
                var (b, movesB) = RandomWord(names, random, 1 + random.NextInt32(3), depth - 1);
                (item, does) = random.NextInt32(3) switch
                {
                    0 => ($"({a})", movesA),
                    1 => ($"[{a}, {b}]", movesA * movesB * movesA.Inverse() * movesB.Inverse()),
                    _ => ($"[{a}: {b}]", movesA * movesB * movesA.Inverse()),
                };
            }

            var (exponent, power) = random.NextInt32(6) switch
            {
                0 => ("'", -1),
                1 => ("2", 2),
                2 => ("2'", -2),
                3 => ("^-3", -3),
                _ => ("", 1),
            };
            text.Add(item + exponent);
            moves *= does.Power(power);
        }

        return (string.Join(' ', text), moves);
    }

    private static HashSet<Permutation> WholeTurns(CubeFacelets model, int size)
    {
        var turns = new HashSet<Permutation> { Permutation.Identity };
        var queue = new Queue<Permutation>(turns);
        while (queue.TryDequeue(out var turn))
        {
            foreach (var next in (Permutation[])[turn * model.Turn('R', 1, size), turn * model.Turn('U', 1, size)])
            {
                if (turns.Add(next))
                {
                    queue.Enqueue(next);
                }
            }
        }

        Assert.Equal(24, turns.Count);
        return turns;
    }

    private static int PointOf(CubeFacelets model, string site, int size)
    {
        var (piece, face) = (site.Split(':')[0], site[^1]);
        if (size > 3)
        {
            int[] place = [.. piece.Split(',').Select(int.Parse)];
            return model.PointOf(place[0], place[1], place[2], face);
        }

        int Along(char low, char high) => piece.Contains(low) ? 1 : piece.Contains(high) ? size : 2;
        return model.PointOf(Along('L', 'R'), Along('D', 'U'), Along('B', 'F'), face);
    }
}
