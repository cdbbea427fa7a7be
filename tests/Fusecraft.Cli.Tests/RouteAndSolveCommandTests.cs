using System.Text.Json;

namespace Fusecraft.Cli.Tests;

public sealed class RouteAndSolveCommandTests : IDisposable
{
    private readonly Workbench _bench = new();
    private readonly string _board;
    private readonly string _canal;

    public RouteAndSolveCommandTests()
    {
        _board = _bench.Write("board.fuse.json", Files.Board);
        _canal = _bench.Write("canal.fuse.json", Files.Canal);
    }

    public void Dispose() => _bench.Dispose();

    [Fact]
    public async Task A_solution_is_a_word_on_a_line_of_its_own()
    {
        var outcome = await _bench.RunAsync("solve", _board, "--from", "R D L");

        Assert.Equal("R U L\n3 steps, proven shortest. A search over all shorter paths found none.\n", outcome.Output);
        Assert.Equal("", outcome.Error);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task A_state_may_be_given_by_its_colours()
    {
        var cube = _bench.Write("colours.fuse.json", """
            { "format": "fusecraft/mechanism/1", "name": "Coloured", "family": { "kind": "cube", "size": 2 }, "goal": "colours", "colours": "faces" }
            """);

        var solved = await _bench.RunAsync("solve", cube, "--colours", "UFR:U=F UFR:F=R UFR:R=U UFL:U=F UFL:F=L UFL:L=U");
        var twisted = await _bench.RunAsync("solve", cube, "--colours", "UFR:U=F UFR:F=R UFR:R=U");

        Assert.Equal(ExitCodes.Done, solved.Code);
        Assert.Equal(
            new Workbench.Outcome(ExitCodes.Negative, "There is no such way. No member of the vertex group (order 3674160) brings the colours there.\n", ""), twisted);
        Assert.Equal(ExitCodes.BadInput, (await _bench.RunAsync("solve", cube, "--colours", "UFR:U=Q")).Code);
    }

    [Fact]
    public async Task A_state_and_its_colours_are_not_given_together()
    {
        Assert.Equal(ExitCodes.Usage, (await _bench.RunAsync("solve", _board)).Code);
        var both = await _bench.RunAsync("solve", _board, "--from", "home", "--colours", "home");
        Assert.Equal(ExitCodes.Usage, both.Code);
        Assert.StartsWith("Give either --from or --colours.", both.Error, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_solution_as_json_is_one_line() => Assert.Equal(
        new Workbench.Outcome(
            ExitCodes.Done, """{"solvable":true,"word":"R U L","length":3,"provenShortest":true,"reason":"A search over all shorter paths found none."}""" + "\n", ""),
        await _bench.RunAsync("solve", _board, "--from", "R D L", "--json"));

    [Fact]
    public async Task Every_word_given_leads_where_it_should()
    {
        var answer = await _bench.RunAsync("route", _board, "--from", "R D", "--to", "(1 2 3)", "--json");

        using var json = JsonDocument.Parse(answer.Output);
        var trace = await _bench.RunAsync("trace", _board, "--from", "R D", "--word", json.RootElement.GetProperty("word").GetString()!);
        Assert.Equal(ExitCodes.Done, trace.Code);
        Assert.EndsWith($"labels after {json.RootElement.GetProperty("length").GetInt32()} steps: (1 2 3)\n", trace.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_route_to_the_goal_is_a_solution()
    {
        Assert.Equal(await _bench.RunAsync("solve", _board, "--from", "R D L"), await _bench.RunAsync("route", _board, "--from", "R D L", "--to", "goal"));
        Assert.Equal(
            await _bench.RunAsync("solve", _board, "--from", "R D L", "--max-length", "2", "--json"),
            await _bench.RunAsync("route", _board, "--from", "R D L", "--to", "goal", "--max-length", "2", "--json"));
    }

    [Fact]
    public async Task Being_there_already_takes_no_steps()
    {
        var outcome = await _bench.RunAsync("solve", _board, "--from", "home");

        Assert.Equal("(no steps)\n0 steps, proven shortest. Nothing needs to be done.\n", outcome.Output);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    // Elementary: every step of the board is odd and moves the gap, so two tiles alone cannot trade places.
    [Fact]
    public async Task An_unreachable_state_is_an_honest_no()
    {
        var text = await _bench.RunAsync("route", _board, "--from", "home", "--to", "(1 2)");
        Assert.StartsWith("There is no such way. ", text.Output, StringComparison.Ordinal);
        Assert.Equal("", text.Error);
        Assert.Equal(ExitCodes.Negative, text.Code);

        var json = await _bench.RunAsync("route", _board, "--from", "home", "--to", "(1 2)", "--json");
        Assert.StartsWith("""{"solvable":false,"word":null,"length":null,"provenShortest":false,"reason":""", json.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Negative, json.Code);
    }

    [Fact]
    public async Task No_way_leads_back_through_a_passage()
    {
        Assert.Equal(ExitCodes.Done, (await _bench.RunAsync("route", _canal, "--from", "home", "--to", "A B C")).Code);
        Assert.Equal(ExitCodes.Negative, (await _bench.RunAsync("route", _canal, "--from", "A B C", "--to", "home")).Code);
        Assert.Equal(ExitCodes.Negative, (await _bench.RunAsync("solve", _canal, "--from", "A")).Code);
    }

    [Fact]
    public async Task A_word_longer_than_asked_for_does_not_count()
    {
        var outcome = await _bench.RunAsync("solve", _board, "--from", "R D L", "--max-length", "2");

        Assert.Equal("There is no such way. A search over all paths of at most 2 steps found none.\n", outcome.Output);
        Assert.Equal(ExitCodes.Negative, outcome.Code);
        Assert.Equal(ExitCodes.Done, (await _bench.RunAsync("solve", _board, "--from", "R D L", "--max-length", "3")).Code);
    }

    [Fact]
    public async Task Solve_counts_as_it_is_told()
    {
        Assert.StartsWith("R U L\n3 runs, 3 steps, proven shortest.", (await _bench.RunAsync("solve", _board, "--from", "R D L", "--metric", "run", "--max-length", "3", "--nodes", "9000")).Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Negative, (await _bench.RunAsync("solve", _board, "--from", "R D L", "--metric", "run", "--max-length", "2")).Code);
        Assert.Equal(ExitCodes.BadInput, (await _bench.RunAsync("solve", _board, "--from", "R D L", "--metric", "weights", "--weight", "no=2")).Code);
        Assert.Equal(ExitCodes.Usage, (await _bench.RunAsync("solve", _board, "--from", "R D L", "--nodes", "0")).Code);
    }

    [Fact]
    public async Task Shapes_alone_are_reached_sooner()
    {
        var states = await _bench.RunAsync("route", _board, "--from", "home", "--to", "R D L U R", "--max-length", "1");
        var shapes = await _bench.RunAsync("route", _board, "--from", "home", "--to", "R D L U R", "--max-length", "1", "--shape-only");

        Assert.Equal(ExitCodes.Negative, states.Code);
        Assert.Equal("R\n1 step, proven shortest. A search over all shorter paths found none.\n", shapes.Output);
        Assert.Equal("L\n", (await _bench.RunAsync("route", _board, "--from", "R D L U R", "--to", "goal", "--shape-only")).Output[..2]);
    }

    [Fact]
    public async Task A_goal_of_marks_asks_for_a_shape()
    {
        var marks = _bench.Write("marks.fuse.json", Files.Canal.Replace("\"sites\": 4", "\"sites\": 4, \"goal\": { \"marks\": [\"boat@3\"] }", StringComparison.Ordinal));

        Assert.StartsWith("A B\n", (await _bench.RunAsync("solve", marks, "--from", "home")).Output, StringComparison.Ordinal);
        Assert.StartsWith("A B\n", (await _bench.RunAsync("route", marks, "--from", "home", "--to", "goal", "--shape-only")).Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task A_goal_of_labels_is_no_shape()
    {
        var sites = _bench.Write("sites.fuse.json", Files.Canal.Replace("\"sites\": 4", "\"sites\": 4, \"goal\": { \"sites\": [\"3\"] }", StringComparison.Ordinal));

        var outcome = await _bench.RunAsync("route", sites, "--from", "A", "--to", "goal", "--shape-only");

        Assert.Equal("--shape-only: the goal of One-way canal asks for labels, not for a shape; give a state with --to\n", outcome.Error);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Fact]
    public async Task Runs_are_counted_where_asked_for()
    {
        var cube = _bench.Write("cube.fuse.json", Files.PlainCube);

        var found = await _bench.RunAsync("route", cube, "--from", "U2 R2 F2", "--to", "goal", "--max-length", "3", "--metric", "run");
        Assert.Equal("F F R R U U\n3 runs, 6 steps, proven shortest. A search over all shorter paths found none.\n", found.Output);
        Assert.Equal(ExitCodes.Done, found.Code);

        var none = await _bench.RunAsync("route", cube, "--from", "U2 R2 F2", "--to", "goal", "--max-length", "2", "--metric", "run");
        Assert.Equal("There is no such way. A search over all paths of at most 2 runs found none.\n", none.Output);
        Assert.Equal(ExitCodes.Negative, none.Code);

        var json = await _bench.RunAsync("route", cube, "--from", "U2 R2 F2", "--to", "goal", "--max-length", "3", "--metric", "run", "--json");
        Assert.Contains("\"length\":6,\"metric\":\"run\",\"lengthByMetric\":3,\"provenShortest\":true", json.Output, StringComparison.Ordinal);
    }

    // A word of so few runs is neither found nor ruled out by so few nodes.
    [Fact]
    public async Task A_budget_that_ends_a_search_leaves_the_question_open()
    {
        var cube = _bench.Write("cube.fuse.json", Files.PlainCube);

        var outcome = await _bench.RunAsync("route", cube, "--from", "U R F D L B U2 R2 D F' L B D' R2", "--to", "goal", "--max-length", "13", "--metric", "run", "--nodes", "1000", "--json");

        Assert.StartsWith("""{"solvable":""", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("\"word\":null,\"length\":null,\"provenShortest\":false,\"reason\":\"The budget of ", outcome.Output, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.BudgetEnded, outcome.Code);
    }

    [Theory]
    [InlineData("--from", "R Q")]
    [InlineData("--from", "(1 7)")]
    [InlineData("--from", "U")]
    [InlineData("--to", "nowhere")]
    [InlineData("--to", "(1 2")]
    public async Task A_state_that_cannot_be_read_is_bad_input(string option, string state)
    {
        var outcome = option == "--from"
            ? await _bench.RunAsync("route", _board, "--from", state, "--to", "home")
            : await _bench.RunAsync("route", _board, "--from", "home", "--to", state);

        Assert.StartsWith($"{option}: ", outcome.Error, StringComparison.Ordinal);
        Assert.Contains($"\"{state}\"", outcome.Error, StringComparison.Ordinal);
        Assert.Equal(1, outcome.Error.Count(c => c == '\n'));
        Assert.Equal("", outcome.Output);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Fact]
    public async Task A_bad_file_is_bad_input()
    {
        Assert.Equal(ExitCodes.BadInput, (await _bench.RunAsync("solve", _bench.Write("bad.fuse.json", Files.Bad), "--from", "home")).Code);
        Assert.Equal(ExitCodes.BadInput, (await _bench.RunAsync("route", _bench.PathOf("none.fuse.json"), "--from", "home", "--to", "goal")).Code);
    }
}
