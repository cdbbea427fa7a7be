using System.Text.Json;
using System.Text.RegularExpressions;

namespace Fusecraft.Cli.Tests;

public sealed partial class ExamineCommandTests : IDisposable
{
    private const string BoardJson =
        """
        {"format":"fusecraft/examination/1","mechanism":{"name":"Two by three","sites":6,"pieces":6,"turns":7,"blocks":0},"isComplete":true,"shapes":6,"freeTurns":7,"deadEnds":0,"stuckShapes":0,"regions":1,"passages":0,"traps":0,"homeRegion":{"shapes":6,"eccentricity":3,"states":"360","vertexGroup":{"order":"60","factors":"2^2·3·5","proof":"proven","degree":5,"orbits":[["1","2","3","4","5"]]}},"reachableStates":"360"}

        """;

    private readonly Workbench _bench = new();

    public void Dispose() => _bench.Dispose();

    [Fact]
    public async Task One_file_gives_a_report_in_sentences()
    {
        var outcome = await _bench.RunAsync("examine", _bench.Write("board.fuse.json", Files.Board));

        Assert.Equal(
            """
            Two by three
            6 sites in 6 pieces, 7 turns, 0 blocks and 1 mark at home.

            A shape is where the blocks and marks are, labels ignored.
              shapes                      6        reachable from home
              free turns                  7        pairs of a shape and a turn whose forward step is free
              dead ends                   0        shapes where exactly one turn has a free step, in either sense
              stuck shapes                0        shapes where no step is free

            A region is made of shapes that can all reach each other.
              regions                     1        every shape leads back home
              passages                    0        free steps that leave their region: no way back
              traps                       0        regions without passages, other than the home region

            The home region holds the home shape.
              shapes                      6
              farthest shape              3        single steps from home

            The vertex group is all that turn paths from the home shape back to it can do to the labels.
              order                       60 = 2^2·3·5, proven
              moved sites                 5        in 1 orbit, where labels can trade places
                5 sites: 1 2 3 4 5

            A state is where all the labels are.
              states of the home region   360, as many as its shapes times the order
              states reachable in all     360

            """,
            outcome.Output);
        Assert.Equal("", outcome.Error);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task States_of_several_regions_are_counted_together()
    {
        var outcome = await _bench.RunAsync("examine", _bench.Write("canal.fuse.json", Files.Canal));

        Assert.Contains("  regions                     3\n", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("  order                       1, proven\n  moved sites                 0        no label ever moves\n", outcome.Output, StringComparison.Ordinal);
        Assert.EndsWith("  states reachable in all     4\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task Long_orbits_and_big_numbers_stay_readable()
    {
        var outcome = await _bench.RunAsync("examine", _bench.Write("plain.fuse.json", Files.PlainCube));

        Assert.Contains("  order                       43,252,003,274,489,856,000 = 2^27·3^14·5^3·7^2·11, proven\n", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("    24 sites: DBL:L DBL:D DBL:B DFL:L", outcome.Output, StringComparison.Ordinal);
        Assert.Contains(" and 14 more\n", outcome.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Json_is_one_object_a_line_and_nothing_else()
    {
        var board = _bench.Write("board.fuse.json", Files.Board);

        Assert.Equal(new Workbench.Outcome(ExitCodes.Done, BoardJson, ""), await _bench.RunAsync("examine", board, "--json"));

        var both = await _bench.RunAsync("examine", "--json", board, _bench.Write("canal.fuse.json", Files.Canal));
        Assert.Equal(ExitCodes.Done, both.Code);
        var lines = both.Output.TrimEnd('\n').Split('\n');
        Assert.Equal(2, lines.Length);
        Assert.Equal(BoardJson.TrimEnd(), lines[0]);
        using var canal = JsonDocument.Parse(lines[1]);
        Assert.Equal(3, canal.RootElement.GetProperty("regions").GetInt32());
        Assert.Equal("4", canal.RootElement.GetProperty("reachableStates").GetString());
    }

    [Fact]
    public async Task Several_files_give_a_table()
    {
        var outcome = await _bench.RunAsync(
            "examine", _bench.Write("board.fuse.json", Files.Board), _bench.Write("canal.fuse.json", Files.Canal), _bench.Write("plain.fuse.json", Files.PlainCube));

        // Counted by hand; published counts beside the files.
        Assert.Equal(
            """
            file  shapes  dead ends  stuck  regions  farthest  vertex group  states
            board.fuse.json  6  0  0  1  3  2^2·3·5  360
            canal.fuse.json  4  2  1  3  0  1  4
            plain.fuse.json  1  0  0  1  0  2^27·3^14·5^3·7^2·11  43,252,003,274,489,856,000

            The vertex group is given by its order, the farthest shape by its steps from home; states are those reachable from home.

            """,
            Columns(outcome.Output));
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task A_bad_file_does_not_hide_the_others()
    {
        var outcome = await _bench.RunAsync(
            "examine", "--json", _bench.Write("bad.fuse.json", Files.Bad), _bench.Write("board.fuse.json", Files.Board), _bench.PathOf("none.fuse.json"));

        Assert.Equal(BoardJson, outcome.Output);
        Assert.Matches("^bad.fuse.json: line 2, column [0-9]+, \\$\\.turns\\.A\\.moves: found .*\nbad.fuse.json: line 3, .*\nnone.fuse.json: there is no such file\n$", outcome.Error);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Fact]
    public async Task More_blocks_can_be_fused_for_the_occasion()
    {
        var cube = _bench.Write("cube.fuse.json", Files.PlainCube);
        var fused = _bench.Write("fused.fuse.json", Files.FusedCube.Replace("Cornerstone", "Plain", StringComparison.Ordinal));
        var fusedTwice = _bench.Write("twice.fuse.json", Files.FusedCube.Replace("Cornerstone", "Plain", StringComparison.Ordinal).Replace("[\"UFR\", \"UF\"]", "[\"UFR\", \"UF\"], [\"DL\", \"L\"]", StringComparison.Ordinal));

        Assert.Equal(await _bench.RunAsync("examine", "--json", fused), await _bench.RunAsync("examine", "--json", cube, "--with-block", "UFR UF"));
        Assert.Equal(await _bench.RunAsync("examine", "--json", fusedTwice), await _bench.RunAsync("examine", "--json", cube, "--with-block", "UF URF", "--with-block", "DL L"));
    }

    [Fact]
    public async Task A_block_that_cannot_be_fused_is_bad_input()
    {
        var outcome = await _bench.RunAsync("examine", _bench.Write("cube.fuse.json", Files.FusedCube), "--with-block", "UF XY");

        Assert.Equal("", outcome.Output);
        Assert.Equal(
            """
            cube.fuse.json with the blocks of --with-block: $.blocks[1][0]: found piece "UF", which is in block 1 already; a piece is in at most one block; join the two lists to fuse them
            cube.fuse.json with the blocks of --with-block: $.blocks[1][1]: found "XY"; a block lists pieces, each by one of its sites or by its own name

            """,
            outcome.Error);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Fact]
    public async Task An_ended_budget_says_so_and_shows_what_was_found()
    {
        var canal = _bench.Write("canal.fuse.json", Files.Canal);

        var text = await _bench.RunAsync("examine", canal, "--max-shapes", "1");
        Assert.EndsWith(
            """
            A shape is where the blocks and marks are, labels ignored.
              shapes found so far         1        there are more
              free turns found so far     0        pairs of a shape and a turn whose forward step is free

            """,
            text.Output,
            StringComparison.Ordinal);
        Assert.Equal("canal.fuse.json: --max-shapes 1 ended the exploration; there are more shapes\n", text.Error);
        Assert.Equal(ExitCodes.BudgetEnded, text.Code);

        var json = await _bench.RunAsync("examine", canal, "--max-shapes", "1", "--json");
        Assert.Equal(
            """
            {"format":"fusecraft/examination/1","mechanism":{"name":"One-way canal","sites":4,"pieces":4,"turns":3,"blocks":0},"isComplete":false,"shapes":1,"freeTurns":0,"deadEnds":null,"stuckShapes":null,"regions":null,"passages":null,"traps":null,"homeRegion":null,"reachableStates":null}

            """,
            json.Output);
        Assert.Equal(ExitCodes.BudgetEnded, json.Code);

        var table = await _bench.RunAsync("examine", canal, _bench.Write("plain.fuse.json", Files.PlainCube), "--max-shapes", "1");
        Assert.Contains("  > 1  ?  ?  ?  ?  ?  ?\n", Columns(table.Output), StringComparison.Ordinal);
        Assert.Equal(ExitCodes.BudgetEnded, table.Code);
    }

    [Fact]
    public async Task Bad_input_is_more_serious_than_an_ended_budget()
    {
        var outcome = await _bench.RunAsync("examine", _bench.PathOf("none.fuse.json"), _bench.Write("canal.fuse.json", Files.Canal), "--max-shapes", "1", "--json");

        Assert.Equal(ExitCodes.BadInput, outcome.Code);
        Assert.NotEqual("", outcome.Output);
    }

    [Fact]
    public async Task A_mistake_that_only_exploring_finds_is_bad_input()
    {
        var outcome = await _bench.RunAsync("examine", _bench.Write("alike.fuse.json", Files.WrittenAlike));

        Assert.StartsWith("alike.fuse.json: ", outcome.Error, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Theory]
    [InlineData("0")]
    [InlineData("-1")]
    [InlineData("many")]
    [InlineData("1e3")]
    [InlineData("99999999999")]
    public async Task A_budget_is_a_positive_whole_number(string number)
    {
        var outcome = await _bench.RunAsync("examine", "a.fuse.json", "--max-shapes", number);

        Assert.StartsWith($"--max-shapes takes a whole number from 1 to 2147483647; found \"{number}\".\n\nDescription:\n", outcome.Error, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Usage, outcome.Code);
    }

    // How wide the columns are depends on where the files lie.
    private static string Columns(string output) => Gap().Replace(output, "  ");

    [GeneratedRegex("  +")]
    private static partial Regex Gap();
}
