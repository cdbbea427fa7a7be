namespace Fusecraft.Cli.Tests;

public sealed class TraceCommandTests : IDisposable
{
    private readonly Workbench _bench = new();

    public void Dispose() => _bench.Dispose();

    [Fact]
    public async Task Every_step_shows_its_shape_and_what_it_moved()
    {
        var outcome = await _bench.RunAsync("trace", _bench.Write("cube.fuse.json", Files.FusedCube), "--word", "L U2");

        Assert.Equal(
            """
            0  start  shape  [UF UFR]
            1  L      moved  (DBL UBL UFL DFL)(DL BL UL FL)
                      shape  [UF UFR]
            2  U      moved  (UBL UBR UFR UFL)(UL UB UR UF)
                      shape  [UL UFL]
            3  U      moved  (UBL UBR UFR UFL)(UL UB UR UF)
                      shape  [UBL UB]

            labels after 3 steps: (DBL:L UFR:R UBL:L UBR:R UFL:L DFL:L)(DBL:D UFR:F UBL:B UBR:U UFL:U DFL:F)(DBL:B UFR:U UBL:U UBR:B UFL:F DFL:D)(DL:L BL:L UR:R UL:L FL:L)(DL:D BL:B UR:U UL:U FL:F)(UB:U UF:U)(UB:B UF:F)

            """,
            outcome.Output);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Theory]
    [InlineData("x U' x' U2", "F' U2")]
    [InlineData("M L", "L' R L")]
    public async Task Other_names_of_cube_turns_are_traced_as_the_steps_they_mean(string word, string steps)
    {
        var cube = _bench.Write("cube.fuse.json", """{ "format": "fusecraft/mechanism/1", "name": "Cube", "family": { "kind": "cube", "size": 3 } }""");
        var outcome = await _bench.RunAsync("trace", cube, "--word", word);
        var plain = await _bench.RunAsync("trace", cube, "--word", steps);

        Assert.Equal(ExitCodes.Done, outcome.Code);
        Assert.Equal(plain.Output.Split('\n')[^2], outcome.Output.Split('\n')[^2]);
    }

    [Fact]
    public async Task A_barred_step_ends_the_trace()
    {
        var outcome = await _bench.RunAsync("trace", _bench.Write("canal.fuse.json", Files.Canal), "--word", "A (B B')2 A C");

        Assert.Equal(
            """
            0  start  shape  boat@1
            1  A      moved  (1 2)
                      shape  boat@2
            2  B      moved  (2 3)
                      shape  boat@3
            3  B'     moved  (2 3)
                      shape  boat@2
            4  B      moved  (2 3)
                      shape  boat@3
            5  B'     moved  (2 3)
                      shape  boat@2

            labels after 5 steps: (1 2)
            step 6 (A) is barred: it needs boat@1

            """,
            outcome.Output);
        Assert.Equal("", outcome.Error);
        Assert.Equal(ExitCodes.Negative, outcome.Code);
    }

    [Fact]
    public async Task The_way_back_of_a_one_way_turn_is_barred()
    {
        var outcome = await _bench.RunAsync("trace", _bench.Write("canal.fuse.json", Files.Canal), "--word", "A A'");

        Assert.EndsWith("step 2 (A') is barred: turn A goes one way only\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Negative, outcome.Code);
    }

    [Fact]
    public async Task A_trace_may_start_from_cycles()
    {
        var outcome = await _bench.RunAsync("trace", _bench.Write("board.fuse.json", Files.Board), "--from", "(3 6)", "--word", "U");

        Assert.Equal(
            """
            0  start  shape  gap@3
            1  U      moved  (3 6)
                      shape  gap@6

            labels after 1 step: ()

            """,
            outcome.Output);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task No_step_is_free_where_no_turns_can_lead()
    {
        var outcome = await _bench.RunAsync("trace", _bench.Write("cube.fuse.json", Files.FusedCube), "--from", "(UFR:U UF:U)", "--word", "U");

        Assert.Equal("No step is free: no turns can ever bring the puzzle into this state.\n", outcome.Output);
        Assert.Equal(ExitCodes.Negative, outcome.Code);
    }

    [Theory]
    [InlineData("A Z", "character 3: found \"Z\"; the steps are A, B, B', C")]
    [InlineData("A (B", "character 5: the text ends where ')' is missing")]
    public async Task A_word_that_cannot_be_read_is_bad_input(string word, string problem)
    {
        var outcome = await _bench.RunAsync("trace", _bench.Write("canal.fuse.json", Files.Canal), "--word", word);

        Assert.Equal($"--word: \"{word}\" is no word of One-way canal: {problem}\n", outcome.Error);
        Assert.Equal("", outcome.Output);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }
}
