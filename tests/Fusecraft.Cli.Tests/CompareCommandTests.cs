using System.Text.Json;

namespace Fusecraft.Cli.Tests;

public sealed class CompareCommandTests : IDisposable
{
    private const string Roof = """{ "format": "fusecraft/mechanism/1", "name": "Twin roof", "family": { "kind": "cube", "size": 2 }, "blocks": [["UFR", "UFL"]] }""";

    private const string Cellar = """{ "format": "fusecraft/mechanism/1", "name": "Twin cellar", "family": { "kind": "cube", "size": 2 }, "blocks": [["DBL", "DBR"]] }""";

    /// <summary>The one-way canal with its places renamed and its turns in another order.</summary>
    private const string RenamedCanal = """
        { "format": "fusecraft/mechanism/1", "name": "Renamed canal", "sites": ["w", "x", "y", "z"],
          "turns": {
            "Last": { "moves": "(x w)", "needs": ["boat@x"], "oneWay": true },
            "Mid": { "moves": "(x y)", "needs": ["boat@x"] },
            "First": { "moves": "(y z)", "needs": ["boat@z"], "oneWay": true } },
          "marks": { "boat": ["z"] } }
        """;

    private readonly Workbench _bench = new();

    public void Dispose() => _bench.Dispose();

    [Fact]
    public async Task One_puzzle_written_with_other_names_is_the_same()
    {
        var outcome = await _bench.RunAsync("compare", _bench.Write("canal.fuse.json", Files.Canal), _bench.Write("renamed.fuse.json", RenamedCanal));

        Assert.StartsWith("The same puzzle.\nThe home of the first, moved so that A becomes First, B becomes Mid', C becomes Last, is the home of the second.\n", outcome.Output, StringComparison.Ordinal);
        Assert.DoesNotContain("differs", outcome.Output, StringComparison.Ordinal);
        Assert.Equal("", outcome.Error);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task One_puzzle_held_by_another_corner_is_the_same_though_its_figures_differ()
    {
        var outcome = await _bench.RunAsync("compare", _bench.Write("roof.fuse.json", Roof), _bench.Write("cellar.fuse.json", Cellar));

        Assert.StartsWith("The same puzzle.\nThe home of the first, held by another corner, is the home of the second. Shapes are relative", outcome.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task Other_puzzles_give_a_negative_answer_that_names_the_first_difference()
    {
        var outcome = await _bench.RunAsync("compare", _bench.Write("fused.fuse.json", Files.FusedCube), _bench.Write("plain.fuse.json", Files.PlainCube));

        Assert.StartsWith(
            "Not the same puzzle.\nNo rotation or reflection that keeps the turns takes the home of the first to a shape of the second's home region. First difference: blocks, 1 and 0.\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Negative, outcome.Code);
    }

    [Fact]
    public async Task A_block_more_is_tried_on_the_second_of_two_files_or_on_the_only_one()
    {
        var plain = _bench.Write("plain.fuse.json", Files.PlainCube);
        var fused = _bench.Write("fused.fuse.json", Files.FusedCube);

        // A corner and an edge of it, at the other end of the cube.
        Assert.Equal(ExitCodes.Done, (await _bench.RunAsync("compare", fused, plain, "--with-block", "DBL DL")).Code);
        Assert.Equal(ExitCodes.Negative, (await _bench.RunAsync("compare", plain, "--with-block", "DBL DL")).Code);
    }

    [Fact]
    public async Task Json_holds_the_match_and_the_figures()
    {
        var outcome = await _bench.RunAsync("compare", _bench.Write("canal.fuse.json", Files.Canal), _bench.Write("renamed.fuse.json", RenamedCanal), "--json");

        using var document = JsonDocument.Parse(outcome.Output);
        var root = document.RootElement;
        Assert.Equal("fusecraft/comparison/1", root.GetProperty("format").GetString());
        Assert.Equal("samePuzzle", root.GetProperty("verdict").GetString());
        Assert.Equal("Mid'", root.GetProperty("homeMatch").GetProperty("turns").GetProperty("B").GetString());
        Assert.Equal("z", root.GetProperty("homeMatch").GetProperty("sites").GetProperty("1").GetString());
        Assert.False(root.GetProperty("homeMatch").GetProperty("repinned").GetBoolean());
        Assert.True(root.GetProperty("shapeGraphs").GetProperty("alike").GetBoolean());
        Assert.True(root.GetProperty("vertexGroups").GetProperty("alike").GetBoolean());
        Assert.Equal(JsonValueKind.Null, root.GetProperty("firstDifference").ValueKind);
        Assert.Equal("4", root.GetProperty("figures").EnumerateArray().Single(figure => figure.GetProperty("name").GetString() == "shapes").GetProperty("second").GetString());
        Assert.Equal(1, outcome.Output.Count(character => character == '\n'));
    }

    [Fact]
    public async Task An_ended_budget_leaves_the_question_open()
    {
        var outcome = await _bench.RunAsync("compare", _bench.Write("fused.fuse.json", Files.FusedCube), _bench.Write("plain.fuse.json", Files.PlainCube), "--max-shapes", "1");

        Assert.StartsWith("Not settled.\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal("--max-shapes 1 ended an exploration; there are more shapes\n", outcome.Error);
        Assert.Equal(ExitCodes.BudgetEnded, outcome.Code);
    }

    [Fact]
    public async Task One_file_alone_is_wrong_usage()
    {
        var outcome = await _bench.RunAsync("compare", _bench.Write("plain.fuse.json", Files.PlainCube));

        Assert.StartsWith("One file alone is compared with nothing: give a second one, or a block with --with-block.\n", outcome.Error, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Usage, outcome.Code);
    }

    [Fact]
    public async Task Bad_input_names_the_file()
    {
        var outcome = await _bench.RunAsync("compare", _bench.Write("plain.fuse.json", Files.PlainCube), _bench.PathOf("none.fuse.json"));

        Assert.Equal("none.fuse.json: there is no such file\n", outcome.Error);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }
}
