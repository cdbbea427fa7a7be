using System.Text.Json;

namespace Fusecraft.Cli.Tests;

public sealed class DepthsAndScrambleCommandTests : IDisposable
{
    private readonly Workbench _bench = new();
    private readonly string _board;

    public DepthsAndScrambleCommandTests() => _board = _bench.Write(
        "board.fuse.json", """{ "format": "fusecraft/mechanism/1", "name": "Three by three", "family": { "kind": "board", "columns": 3, "rows": 3 } }""");

    public void Dispose() => _bench.Dispose();

    // OEIS A089473: the first and last of the 3x3 board's counts.
    [Fact]
    public async Task Depths_are_counted_exactly_and_a_farthest_state_is_shown()
    {
        var outcome = await _bench.RunAsync("depths", _board);

        Assert.Equal(ExitCodes.Done, outcome.Code);
        Assert.Equal("", outcome.Error);
        Assert.StartsWith("steps  states     share\n    0       1   0.001 %\n    1       2   0.001 %\n    2       4   0.002 %\n", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("181,440 states can be reached from home within the home region.\nGreatest distance 31, mean 21.972399 steps.\nA farthest state: ", outcome.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Depths_as_json_are_one_line_with_exact_counts()
    {
        var outcome = await _bench.RunAsync("depths", _board, "--metric", "step", "--json");

        using var json = JsonDocument.Parse(outcome.Output);
        Assert.Equal("fusecraft/depths/1", json.RootElement.GetProperty("format").GetString());
        Assert.Equal("step", json.RootElement.GetProperty("metric").GetString());
        Assert.True(json.RootElement.GetProperty("isComplete").GetBoolean());
        Assert.Equal("181440", json.RootElement.GetProperty("states").GetString());
        Assert.Equal(32, json.RootElement.GetProperty("counts").GetArrayLength());
        Assert.Equal("221", json.RootElement.GetProperty("counts")[30].GetString());
        Assert.Equal(31, json.RootElement.GetProperty("greatest").GetInt32());
        Assert.Equal(21.972399, json.RootElement.GetProperty("mean").GetDouble(), 6);
    }

    [Fact]
    public async Task Runs_and_weights_are_other_metrics()
    {
        Assert.Contains("Greatest distance 24,", (await _bench.RunAsync("depths", _board, "--metric", "run")).Output, StringComparison.Ordinal);
        var canal = _bench.Write("canal.fuse.json", Files.Canal);
        Assert.Equal(ExitCodes.BadInput, (await _bench.RunAsync("depths", canal, "--weight", "Nix=2")).Code);
        var unknown = await _bench.RunAsync("depths", canal, "--metric", "weights", "--weight", "Nix=2");
        Assert.Equal(ExitCodes.BadInput, unknown.Code);
        Assert.Contains("has no turn Nix; it has ", unknown.Error, StringComparison.Ordinal);
        Assert.Contains("is not of the form TURN=N", (await _bench.RunAsync("depths", canal, "--metric", "weights", "--weight", "Nix")).Error, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Usage, (await _bench.RunAsync("depths", _board, "--metric", "leaps")).Code);
    }

    [Fact]
    public async Task A_table_is_kept_on_demand()
    {
        var table = Path.Combine(Path.GetDirectoryName(_board)!, "board.fuse-depths");
        Assert.Equal(ExitCodes.Done, (await _bench.RunAsync("depths", _board, "--json", "--save", table)).Code);
        Assert.InRange(new FileInfo(table).Length, 181440 / 4, 60_000);
        var refused = await _bench.RunAsync("depths", _board, "--save", Path.Combine(table, "below", "a", "file"));
        Assert.Equal(ExitCodes.BadInput, refused.Code);
        Assert.StartsWith("--save: ", refused.Error, StringComparison.Ordinal);
    }

    // The even permutations of ten things: 10!/2.
    [Fact]
    public async Task Without_room_for_a_table_the_states_are_counted_one_by_one()
    {
        var ring = _bench.Write(
            "ring.fuse.json",
            """
            { "format": "fusecraft/mechanism/1", "name": "Ring", "sites": ["a", "b", "c", "d", "e", "f", "g", "h", "i", "j"],
              "turns": { "Short": { "moves": "(a b c)", "oneWay": true }, "Long": { "moves": "(b c d e f g h i j)", "oneWay": true } } }
            """);
        var table = await _bench.RunAsync("depths", ring, "--json");
        var census = await _bench.RunAsync("depths", ring, "--json", "--max-megabytes", "1");
        Assert.Equal((ExitCodes.Done, ExitCodes.Done), (table.Code, census.Code));
        Assert.Contains("A table of the 1814400 states of Ring takes about ", census.Error, StringComparison.Ordinal);
        Assert.Contains("\"isComplete\":true,\"states\":\"1814400\",\"counts\":[\"1\",\"2\",\"4\",", census.Output, StringComparison.Ordinal);
        Assert.Equal(table.Output, census.Output);

        var kept = await _bench.RunAsync("depths", ring, "--max-megabytes", "1", "--save", ring + ".table");
        Assert.Equal((ExitCodes.BudgetEnded, ""), (kept.Code, kept.Output));
        Assert.Equal(ExitCodes.BudgetEnded, (await _bench.RunAsync("depths", ring, "--max-megabytes", "1", "--to-goal")).Code);
    }

    // OEIS A080601: the first counts of the 3x3x3.
    [Fact]
    public async Task A_budget_of_states_ends_the_count_and_is_named()
    {
        var cube = _bench.Write("cube.fuse.json", """{ "format": "fusecraft/mechanism/1", "name": "Cube", "family": { "kind": "cube", "size": 3 } }""");
        var outcome = await _bench.RunAsync("depths", cube, "--metric", "run", "--max-states", "50000");
        Assert.Equal(ExitCodes.BudgetEnded, outcome.Code);
        Assert.Equal("runs  states\n   0       1\n   1      18\n   2     243\n   3   3,240\n   4  43,239\n\nHow many states can be reached from home is not known.\n", outcome.Output);
        Assert.Contains("The budget of 50,000 states (--max-states) ended the count; how many states are at distance 5 or farther is not known.", outcome.Error, StringComparison.Ordinal);

        outcome = await _bench.RunAsync("depths", cube, "--metric", "run", "--max-states", "50000", "--json");
        Assert.Equal(ExitCodes.BudgetEnded, outcome.Code);
        Assert.Equal(
            """{"format":"fusecraft/depths/1","metric":"run","origin":"home","isComplete":false,"states":null,"counts":["1","18","243","3240","43239"],"greatest":null,"mean":null}""" + "\n", outcome.Output);
    }

    [Fact]
    public async Task Scrambles_are_words_from_home_one_a_line()
    {
        var outcome = await _bench.RunAsync("scramble", _board, "--count", "3", "--seed", "7");

        Assert.Equal(ExitCodes.Done, outcome.Code);
        Assert.Equal(3, outcome.Output.TrimEnd().Split('\n').Length);
        Assert.Equal(outcome, await _bench.RunAsync("scramble", _board, "--count", "3", "--seed", "7"));
        Assert.NotEqual(outcome, await _bench.RunAsync("scramble", _board, "--count", "3", "--seed", "8"));
    }

    [Fact]
    public async Task A_scramble_as_json_has_the_state_that_its_word_makes()
    {
        var outcome = await _bench.RunAsync("scramble", _board, "--seed", "1", "--at-least", "30", "--json");

        using var json = JsonDocument.Parse(outcome.Output);
        Assert.Equal("fusecraft/scramble/1", json.RootElement.GetProperty("format").GetString());
        Assert.InRange(json.RootElement.GetProperty("length").GetInt32(), 30, 31);
        var trace = await _bench.RunAsync("trace", _board, "--word", json.RootElement.GetProperty("word").GetString()!);
        Assert.EndsWith($": {json.RootElement.GetProperty("state").GetString()}\n", trace.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Distances_that_no_state_has_are_an_honest_negative()
    {
        var outcome = await _bench.RunAsync("scramble", _board, "--seed", "1", "--at-least", "32");

        Assert.Equal(ExitCodes.Negative, outcome.Code);
        Assert.Contains("the greatest is 31", outcome.Error, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Usage, (await _bench.RunAsync("scramble", _board)).Code);
    }
}
