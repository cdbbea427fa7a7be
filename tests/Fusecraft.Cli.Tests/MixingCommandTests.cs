using System.Text.Json;

namespace Fusecraft.Cli.Tests;

public sealed class MixingCommandTests : IDisposable
{
    private readonly Workbench _bench = new();

    public void Dispose() => _bench.Dispose();

    [Fact]
    public async Task So_many_turns_are_not_enough_and_the_answer_says_how_many_are()
    {
        var outcome = await _bench.RunAsync("mixing", _bench.Write("board.fuse.json", Files.Board), "--turns", "23");

        Assert.Equal("", outcome.Error);
        Assert.Equal(ExitCodes.Done, outcome.Code);
        Assert.StartsWith("Two by three\n360 states in 6 shapes\n", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("\n23 random turns (one turn more by toss): not enough, 0.", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("\nwithin 1/4    more than 23 turns\n", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("The walk has period 2:", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("What it tends to is itself 0.0952 from uniform", outcome.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task The_answer_for_programs_holds_every_turn()
    {
        var board = _bench.Write("board.fuse.json", Files.Board);
        var outcome = await _bench.RunAsync("mixing", board, "--all-steps", "--turns", "2000", "--json");

        using var json = JsonDocument.Parse(outcome.Output);
        var root = json.RootElement;
        Assert.Equal("fusecraft/mixing/1", root.GetProperty("format").GetString());
        Assert.Equal("all", root.GetProperty("choice").GetString());
        Assert.Equal(360, root.GetProperty("states").GetInt32());
        Assert.Equal(1, root.GetProperty("period").GetInt32());
        Assert.True(root.GetProperty("isUniform").GetBoolean());
        Assert.Equal(2001, root.GetProperty("distances").GetArrayLength());
        var turns = root.GetProperty("turnsTo").GetProperty("1/4").GetInt32();
        Assert.True(root.GetProperty("distances")[turns].GetProperty("fromUniform").GetDouble() <= 0.25);
        Assert.True(root.GetProperty("distances")[turns - 1].GetProperty("fromUniform").GetDouble() > 0.25);
        Assert.InRange(root.GetProperty("spectrum").GetProperty("gap").GetDouble(), 0.0001, 0.1);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task Watching_labels_bounds_what_has_too_many_states()
    {
        var cube = _bench.Write("cube.fuse.json", Files.PlainCube);
        var refused = await _bench.RunAsync("mixing", cube);

        Assert.Equal("The region has 43252003274489856000 states; 20000000 are allowed. Watch some labels only, for a lower bound.\n", refused.Error);
        Assert.Equal(ExitCodes.BudgetEnded, refused.Code);

        var outcome = await _bench.RunAsync("mixing", cube, "--watch", "UF:U UR:U");

        Assert.Contains("\n528 states in 1 shape; watching 2 labels, so every distance is a lower bound\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Theory]
    [InlineData("UF:Q", "--watch: Plain has no site UF:Q\n")]
    [InlineData("UF:U UF:U", "--watch: a site stands twice\n")]
    public async Task Sites_that_cannot_be_watched_are_bad_input(string sites, string problem)
    {
        var outcome = await _bench.RunAsync("mixing", _bench.Write("cube.fuse.json", Files.PlainCube), "--watch", sites);

        Assert.Equal(problem, outcome.Error);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Fact]
    public async Task One_way_walks_have_distances_and_no_bound_from_a_gap()
    {
        // Two turns that go one way only generate the even permutations of seven labels.
        var ring = _bench.Write("ring.fuse.json", """
            { "format": "fusecraft/mechanism/1", "name": "Ratchet ring", "sites": 7,
              "turns": { "A": { "moves": "(1 2 3 4 5 6 7)", "oneWay": true }, "B": { "moves": "(1 2 3)", "oneWay": true } } }
            """);
        var outcome = await _bench.RunAsync("mixing", ring);

        Assert.EndsWith("Some steps cannot be undone, so there is no bound from a spectral gap.\n", outcome.Output, StringComparison.Ordinal);
        Assert.StartsWith("Ratchet ring\n2,520 states in 1 shape\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task Walks_that_take_too_long_end_with_what_was_found()
    {
        // A ring that turns by one either way: the gap is 1 - cos(2π/61).
        var ring = _bench.Write("ring.fuse.json", $$"""
            { "format": "fusecraft/mechanism/1", "name": "Long ring", "sites": 61,
              "turns": { "A": { "moves": "({{string.Join(' ', Enumerable.Range(1, 61))}})" } } }
            """);
        var outcome = await _bench.RunAsync("mixing", ring);

        Assert.Contains("\nwithin 1/100  more than 1,000 turns\n", outcome.Output, StringComparison.Ordinal);
        Assert.Equal("1000 turns do not come within 1/100; --turns looks at more\n", outcome.Error);
        Assert.Equal(ExitCodes.BudgetEnded, outcome.Code);
    }
}
