using Fusecraft.Mechanisms;

namespace Fusecraft.Core.Tests.Mechanisms.Files;

public class MechanismFileTests
{
    [Theory]
    [MemberData(nameof(GoodMechanismFiles.Cases), MemberType = typeof(GoodMechanismFiles))]
    public void Writing_what_was_read_and_reading_that_changes_nothing_more(string what, string json)
    {
        Assert.NotEmpty(what);
        var written = MechanismFile.Write(MechanismFile.Parse(json));

        Assert.Equal(written, MechanismFile.Write(MechanismFile.Parse(written)));
    }

    [Theory]
    [InlineData(GoodMechanismFiles.WeirGate)]
    [InlineData(GoodMechanismFiles.LockBasin)]
    [InlineData(GoodMechanismFiles.FerryLandings)]
    public void Text_laid_out_as_the_writer_does_comes_back_letter_by_letter(string json) =>
        Assert.Equal(json, MechanismFile.Write(MechanismFile.Parse(json)));

    [Fact]
    public void Every_member_is_read()
    {
        var definition = MechanismFile.Parse(GoodMechanismFiles.FerryLandings).Definition;

        Assert.Equal("mechanism-1.schema.json", definition.Schema);
        Assert.Equal("Ferry landings – Fähre", definition.Name);
        Assert.Equal("Two landings \"North\" and \"South\";\nthe ferry is a mark.", definition.About);
        Assert.Null(definition.Family);
        Assert.Empty(definition.Use);
        Assert.Equal<string>(["N1", "N2", "N3", "S1", "S2", "S3", "S:4", "pier_5", "6.6", "7,7"], definition.Sites);
        Assert.Equal([["N1", "N2"], ["S1", "S2"]], definition.Pieces.Select(piece => piece.ToArray()));
        Assert.Equal(["north", "2nd", "drop"], definition.Turns.Select(turn => turn.Name));
        Assert.Equal(["(N1 S1)(N2 S2)", "(N3 S3)", "(6.6 7,7)"], definition.Turns.Select(turn => turn.Moves));
        Assert.Equal([["N1", "N3"], ["S:4", "pier_5", "6.6"]], definition.Blocks.Select(block => block.ToArray()));
        var mark = Assert.Single(definition.Marks);
        Assert.Equal("ferry", mark.Name);
        Assert.Equal<string>(["N3"], mark.Sites);
        Assert.Equal(GoalKind.Marks, definition.Goal.Kind);
        Assert.Equal<string>(["ferry@S3"], definition.Goal.Names);
        Assert.Equal(ColourSchemeKind.Alike, definition.Colours.Kind);
        Assert.Equal([["N1", "N2", "N3"], ["S1", "S2"]], definition.Colours.AlikeSites.Select(list => list.ToArray()));
    }

    [Fact]
    public void Every_member_of_a_turn_is_read()
    {
        var turns = MechanismFile.Parse(GoodMechanismFiles.FerryLandings).Definition.Turns;

        Assert.Equal<string>(["pier_5"], turns[0].Carries);
        Assert.True(turns[0].Guard.IsAlways);
        Assert.Null(turns[0].Back);
        Assert.Equal(("go", "come"), (turns[0].As, turns[0].BackAs));
        Assert.False(turns[0].IsOneWay);

        Assert.Equal<string>(["ferry@N3"], turns[1].Guard.Needs);
        Assert.Equal<string>(["ferry@S3"], turns[1].Guard.BarredBy);
        Assert.Equal<string>(["ferry@N3"], turns[1].Guard.AnyOf[0].Needs);
        Assert.Equal<string>(["ferry@6.6"], turns[1].Guard.AnyOf[1].AnyOf[0].BarredBy);
        Assert.Equal<string>(["ferry@7,7", "ferry@S:4"], turns[1].Guard.AnyOf[1].AnyOf[1].Needs);
        Assert.True(turns[1].Back!.IsAlways);

        Assert.True(turns[2].IsOneWay);
    }

    [Fact]
    public void Families_are_read()
    {
        var cube = Assert.IsType<CubeFamily>(Family("""{ "kind": "cube", "size": 5, "centreTwist": true }"""));
        Assert.Equal((5, true), (cube.Size, cube.CentreTwist));

        var board = Assert.IsType<BoardFamily>(Family("""{ "kind": "board", "columns": 4, "rows": 3, "gaps": [1, "12"] }"""));
        Assert.Equal((4, 3), (board.Columns, board.Rows));
        Assert.Equal<string>(["1", "12"], board.Gaps);

        var graph = Assert.IsType<GraphBoardFamily>(Family("""{ "kind": "graph-board", "vertices": 3, "edges": [[1, 2], ["2", "3"]] }"""));
        Assert.Equal<string>(["1", "2", "3"], graph.Vertices);
        Assert.Equal<(string, string)>([("1", "2"), ("2", "3")], graph.Edges);
        Assert.Empty(graph.Gaps);

        static MechanismFamily? Family(string json) =>
            MechanismFile.Parse($$"""{ "format": "fusecraft/mechanism/1", "name": "Test", "family": {{json}} }""").Definition.Family;
    }

    [Fact]
    public void A_whole_number_stands_for_its_digits()
    {
        var definition = MechanismFile.Parse("""{ "format": "fusecraft/mechanism/1", "name": "Test", "sites": [10, "b"], "turns": { "A": { "moves": "(10 b)" } }, "blocks": [[10, "b"]] }""").Definition;

        Assert.Equal<string>(["10", "b"], definition.Sites);
        Assert.Equal<string>(["10", "b"], definition.Blocks[0]);
    }

    [Fact]
    public void Long_lists_fill_their_lines_and_long_objects_have_a_line_for_each_member()
    {
        var definition = new MechanismDefinition
        {
            Name = "Long list",
            Sites = [.. Enumerable.Range(1, 30).Select(i => $"site{i}")],
            Turns =
            [
                new TurnDefinition { Name = "A", Moves = "(site1 site2)" },
                new TurnDefinition { Name = "B", Moves = "(site1 site3)", Carries = ["site4", "site5", "site6"], Guard = new GuardDefinition { Needs = ["gap@site1", "gap@site2", "gap@site3"] } },
            ],
            Marks = [new MarkDefinition("gap", ["site1", "site2", "site3"])],
        };

        Assert.Equal(
            """
            {
              "format": "fusecraft/mechanism/1",
              "name": "Long list",
              "sites": [
                "site1", "site2", "site3", "site4", "site5", "site6", "site7", "site8", "site9", "site10",
                "site11", "site12", "site13", "site14", "site15", "site16", "site17", "site18", "site19",
                "site20", "site21", "site22", "site23", "site24", "site25", "site26", "site27", "site28",
                "site29", "site30"
              ],
              "turns": {
                "A": { "moves": "(site1 site2)" },
                "B": {
                  "moves": "(site1 site3)",
                  "carries": ["site4", "site5", "site6"],
                  "needs": ["gap@site1", "gap@site2", "gap@site3"]
                }
              },
              "marks": { "gap": ["site1", "site2", "site3"] }
            }

            """,
            MechanismFile.Write(definition));
    }

    [Fact]
    public void Sites_in_another_order_than_counting_are_listed() =>
        Assert.Contains("\"sites\": [\"2\", \"1\"]", MechanismFile.Write(new MechanismDefinition { Name = "Test", Sites = ["2", "1"] }), StringComparison.Ordinal);

    [Fact]
    public void A_file_that_was_saved_can_be_loaded()
    {
        using var folder = new TemporaryFolder();
        var path = folder.File("basin" + MechanismFile.Extension);

        MechanismFile.Save(MechanismFile.Parse(GoodMechanismFiles.FerryLandings), path);

        Assert.Equal(GoodMechanismFiles.FerryLandings, File.ReadAllText(path));
        Assert.Equal((byte)'{', File.ReadAllBytes(path)[0]);
        Assert.Equal(GoodMechanismFiles.FerryLandings, MechanismFile.Write(MechanismFile.Load(path)));
        Assert.Single(Directory.GetFiles(folder.Path));
    }

    [Fact]
    public void Saving_over_an_older_file_replaces_it()
    {
        using var folder = new TemporaryFolder();
        var path = folder.File("basin.fuse.json");
        File.WriteAllText(path, new string('x', 10_000));

        MechanismFile.Save(MechanismFile.Parse(GoodMechanismFiles.LockBasin), path);

        Assert.Equal(GoodMechanismFiles.LockBasin, File.ReadAllText(path));
    }

    [Fact]
    public void Saving_through_a_link_replaces_what_it_points_to()
    {
        if (OperatingSystem.IsWindows())
        {
            // Making links takes a privilege there.
            return;
        }

        using var folder = new TemporaryFolder();
        var (path, link) = (folder.File("basin.fuse.json"), folder.File("link.fuse.json"));
        File.WriteAllText(path, "old");
        File.CreateSymbolicLink(link, path);

        MechanismFile.Save(MechanismFile.Parse(GoodMechanismFiles.LockBasin), link);

        Assert.Equal(GoodMechanismFiles.LockBasin, File.ReadAllText(path));
        Assert.Equal(path, new FileInfo(link).LinkTarget);
    }

    [Fact]
    public void An_older_file_stays_as_it_was_when_writing_fails()
    {
        using var folder = new TemporaryFolder();
        var path = folder.File("basin.fuse.json");
        File.WriteAllText(path, "old");

        Assert.Throws<IOException>(() => AtomicFile.Write(path, stream =>
        {
            stream.Write("half of the n"u8);
            throw new IOException("The disk is full.");
        }));

        Assert.Equal("old", File.ReadAllText(path));
        Assert.Single(Directory.GetFiles(folder.Path));
    }

    [Fact]
    public void Saving_where_there_is_no_folder_fails_and_leaves_nothing()
    {
        using var folder = new TemporaryFolder();

        Assert.Throws<DirectoryNotFoundException>(() =>
            MechanismFile.Save(MechanismFile.Parse(GoodMechanismFiles.LockBasin), folder.File("missing/basin.fuse.json")));

        Assert.Empty(Directory.GetFileSystemEntries(folder.Path));
    }

    private sealed class TemporaryFolder : IDisposable
    {
        public string Path { get; } = Directory.CreateTempSubdirectory().FullName;

        public string File(string name) => System.IO.Path.Combine(Path, name);

        public void Dispose() => Directory.Delete(Path, recursive: true);
    }
}
