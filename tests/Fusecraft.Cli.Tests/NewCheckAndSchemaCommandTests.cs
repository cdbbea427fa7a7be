using System.Text.Json;
using Fusecraft.Mechanisms;

namespace Fusecraft.Cli.Tests;

public sealed class NewCheckAndSchemaCommandTests : IDisposable
{
    private readonly Workbench _bench = new();

    public void Dispose() => _bench.Dispose();

    [Theory]
    [InlineData("cube")]
    [InlineData("board")]
    [InlineData("graph")]
    [InlineData("custom")]
    public async Task A_new_file_loads_says_what_to_change_and_can_be_examined(string kind)
    {
        var path = _bench.PathOf("new.fuse.json");

        var outcome = await _bench.RunAsync("new", kind, "-o", path);

        Assert.Equal(new Workbench.Outcome(ExitCodes.Done, "Wrote new.fuse.json. Change it, then try: fusecraft examine new.fuse.json\n", ""), outcome);
        var mechanism = MechanismFile.Load(path);
        Assert.True(mechanism.About!.Length > 100);
        Assert.Equal(ExitCodes.Done, (await _bench.RunAsync("check", path)).Code);
        Assert.Equal(ExitCodes.Done, (await _bench.RunAsync("examine", path)).Code);
        Assert.Equal([path], Directory.GetFiles(Path.GetDirectoryName(path)!));
    }

    [Fact]
    public async Task A_file_that_exists_is_replaced_only_when_asked()
    {
        var path = _bench.Write("mine.fuse.json", "my work");

        var refused = await _bench.RunAsync("new", "cube", "--output", path);
        Assert.Equal(new Workbench.Outcome(ExitCodes.BadInput, "", "mine.fuse.json: the file exists already; --force replaces it\n"), refused);
        Assert.Equal("my work", await File.ReadAllTextAsync(path));

        Assert.Equal(ExitCodes.Done, (await _bench.RunAsync("new", "cube", "--output", path, "--force")).Code);
        Assert.Equal("My fused cube", MechanismFile.Load(path).Name);
    }

    [Fact]
    public async Task A_place_that_cannot_be_written_is_bad_input()
    {
        var nowhere = await _bench.RunAsync("new", "board", "-o", _bench.PathOf(Path.Combine("nowhere", "new.fuse.json")));
        Assert.Equal(ExitCodes.BadInput, nowhere.Code);
        Assert.EndsWith("new.fuse.json: there is no such folder\n", nowhere.Error, StringComparison.Ordinal);

        Directory.CreateDirectory(_bench.PathOf("folder"));
        Assert.Equal(
            new Workbench.Outcome(ExitCodes.BadInput, "", "folder: this is a folder, not a file\n"), await _bench.RunAsync("new", "board", "--force", "-o", _bench.PathOf("folder")));
    }

    [Fact]
    public async Task Good_files_are_summed_up_in_a_line() => Assert.Equal(
        new Workbench.Outcome(
            ExitCodes.Done,
            """
            board.fuse.json: ok, Two by three: 6 sites in 6 pieces, 7 turns, 0 blocks and 1 mark at home
            cube.fuse.json: ok, Cornerstone: 54 sites in 27 pieces, 6 turns, 1 block and 0 marks at home

            """,
            ""),
        await _bench.RunAsync("check", _bench.Write("board.fuse.json", Files.Board), _bench.Write("cube.fuse.json", Files.FusedCube)));

    [Fact]
    public async Task All_problems_of_all_files_are_listed()
    {
        Directory.CreateDirectory(_bench.PathOf("folder"));

        var outcome = await _bench.RunAsync(
            "check", _bench.Write("bad.fuse.json", Files.Bad), _bench.Write("board.fuse.json", Files.Board), _bench.Write("empty.fuse.json", ""), _bench.PathOf("none.fuse.json"), _bench.PathOf("folder"));

        Assert.StartsWith("board.fuse.json: ok, ", outcome.Output, StringComparison.Ordinal);
        var lines = outcome.Error.TrimEnd('\n').Split('\n');
        Assert.Equal(5, lines.Length);
        Assert.StartsWith("bad.fuse.json: line 2, column 30, $.turns.A.moves: found \"(1 9)\"; ", lines[0], StringComparison.Ordinal);
        Assert.StartsWith("bad.fuse.json: line 3, column 14, $.blocks[0]: found a block of one piece; ", lines[1], StringComparison.Ordinal);
        Assert.StartsWith("empty.fuse.json: line 1, column 1, $: found ", lines[2], StringComparison.Ordinal);
        Assert.Equal("none.fuse.json: there is no such file", lines[3]);
        Assert.Equal("folder: this is a folder, not a file", lines[4]);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Fact]
    public async Task The_schema_is_printed()
    {
        var outcome = await _bench.RunAsync("schema");

        using var schema = JsonDocument.Parse(outcome.Output);
        Assert.Equal(JsonValueKind.Object, schema.RootElement.GetProperty("properties").ValueKind);
        Assert.Equal(MechanismFile.Schema.Trim(), outcome.Output.Trim());
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }
}
