using System.Text.Json;

namespace Fusecraft.Cli.Tests;

public sealed class LoopsCommandTests : IDisposable
{
    private readonly Workbench _bench = new();

    public void Dispose() => _bench.Dispose();

    [Fact]
    public async Task Loops_are_listed_with_effect_and_word()
    {
        var outcome = await _bench.RunAsync("loops", _bench.Write("canal.fuse.json", Files.Canal), "--from", "A");

        Assert.Equal(new Workbench.Outcome(ExitCodes.Done, "0 loops: all there are that move at most 4 blocks and single pieces.\n", ""), outcome);

        outcome = await _bench.RunAsync("loops", _bench.Write("board.fuse.json", Files.Board), "--max-length", "5", "--max-moved", "3");
        Assert.Equal(
            """
            4  (2 3 5)  D R U L
            4  (2 5 3)  R D L U
            2 loops, among them all of length 5 or less that move at most 3 blocks and single pieces.

            """,
            outcome.Output);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task Every_word_of_the_json_does_what_it_says()
    {
        var cube = _bench.Write("cube.fuse.json", Files.FusedCube);
        var outcome = await _bench.RunAsync("loops", cube, "--max-length", "5", "--max-moved", "8", "--metric", "run", "--json");

        using var json = JsonDocument.Parse(outcome.Output);
        var root = json.RootElement;
        Assert.Equal(("fusecraft/loops/1", "run", 8), (root.GetProperty("format").GetString(), root.GetProperty("metric").GetString(), root.GetProperty("maxMoved").GetInt32()));
        Assert.NotEqual(0, root.GetProperty("loops").GetArrayLength());
        foreach (var loop in root.GetProperty("loops").EnumerateArray().Take(5))
        {
            var trace = await _bench.RunAsync("trace", cube, "--word", loop.GetProperty("word").GetString()!);
            Assert.EndsWith($": {loop.GetProperty("labels").GetString()}\n", trace.Output, StringComparison.Ordinal);
        }
    }
}
