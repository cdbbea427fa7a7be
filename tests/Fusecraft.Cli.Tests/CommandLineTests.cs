using System.Globalization;
using System.Text.RegularExpressions;

namespace Fusecraft.Cli.Tests;

/// <summary>What holds for the command line as a whole.</summary>
public sealed partial class CommandLineTests : IDisposable
{
    private readonly Workbench _bench = new();

    public void Dispose() => _bench.Dispose();

    [Theory]
    [InlineData("Required command was not provided.")]
    [InlineData("There is no command 'frobnicate'.\n\n", "frobnicate", "--json")]
    [InlineData("Required argument 'FILE' missing for command: 'examine'.", "examine")]
    [InlineData("Give either --from or --colours.", "solve", "a.fuse.json")]
    [InlineData("Option '--to' is required.", "route", "a.fuse.json", "--from", "home")]
    [InlineData("Option '--word' is required.", "trace", "a.fuse.json")]
    [InlineData("Option '--output' is required.", "new", "cube")]
    [InlineData("Unrecognized command or argument '--frob'.", "schema", "--frob")]
    [InlineData("Unrecognized command or argument 'b.fuse.json'.", "solve", "a.fuse.json", "b.fuse.json", "--from", "home")]
    [InlineData("Argument 'pyramid' not recognized. Must be one of:", "new", "pyramid", "-o", "a.fuse.json")]
    [InlineData("--max-length takes a whole number from 0 to 2147483647; found \"-3\".", "solve", "a.fuse.json", "--from", "home", "--max-length", "-3")]
    public async Task Wrong_usage_is_answered_with_a_message_and_help(string message, params string[] args)
    {
        var outcome = await _bench.RunAsync(args);

        Assert.Equal("", outcome.Output);
        Assert.StartsWith(message, outcome.Error, StringComparison.Ordinal);
        Assert.Contains("\nUsage:\n  fusecraft ", outcome.Error, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.Usage, outcome.Code);
    }

    [Theory]
    [InlineData("new")]
    [InlineData("schema")]
    [InlineData("check")]
    [InlineData("examine")]
    [InlineData("route")]
    [InlineData("solve")]
    [InlineData("trace")]
    [InlineData("mixing")]
    public async Task Every_command_has_help_with_an_example(string command)
    {
        var outcome = await _bench.RunAsync(command, "--help");

        Assert.StartsWith("Description:\n", outcome.Output, StringComparison.Ordinal);
        Assert.Matches($"\nExamples?:\n  fusecraft {command} ?", outcome.Output);
        Assert.Equal("", outcome.Error);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task The_help_lists_all_commands()
    {
        var outcome = await _bench.RunAsync("--help");

        Assert.Equal(["new", "schema", "check", "examine", "compare", "route", "solve", "trace", "depths", "scramble", "loops", "mixing"], ListedCommand().Matches(outcome.Output).Select(match => match.Groups[1].Value));
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task The_version_is_a_line()
    {
        var outcome = await _bench.RunAsync("--version");

        Assert.Matches("^fusecraft [0-9]+\\.[0-9]+\\.[0-9]+[-.0-9A-Za-z]*\n$", outcome.Output);
        Assert.Equal(ExitCodes.Done, outcome.Code);
    }

    [Fact]
    public async Task A_name_that_starts_with_an_at_sign_is_a_name()
    {
        var outcome = await _bench.RunAsync("check", "@" + _bench.Write("args", "--help"));

        Assert.EndsWith(": there is no such file\n", outcome.Error, StringComparison.Ordinal);
        Assert.Equal(ExitCodes.BadInput, outcome.Code);
    }

    [Fact]
    public async Task An_interrupted_run_says_so()
    {
        var outcome = await _bench.RunAsync(new CancellationToken(canceled: true), "examine", _bench.Write("cube.fuse.json", Files.FusedCube));

        Assert.Equal(new Workbench.Outcome(ExitCodes.Interrupted, "", "Interrupted.\n"), outcome);
    }

    [Theory]
    [InlineData(typeof(InvalidOperationException), ExitCodes.Fault, "This is a fault of fusecraft, not yours: InvalidOperationException: first line second line\n")]
    [InlineData(typeof(OutOfMemoryException), ExitCodes.BudgetEnded, "The memory of this machine ended the work.\n")]
    public async Task Any_other_failure_is_one_line_without_a_stack_trace(Type kind, int code, string message)
    {
        using var output = new FailingWriter((Exception)Activator.CreateInstance(kind, "first line\nsecond line")!);
        using var error = new StringWriter(CultureInfo.InvariantCulture) { NewLine = "\n" };

        Assert.Equal(code, await Cli.RunAsync(["examine", _bench.Write("board.fuse.json", Files.Board)], output, error));
        Assert.Equal(message, error.ToString());
    }

    [Fact]
    public async Task Output_is_the_same_under_every_culture_and_holds_no_control_codes()
    {
        var board = _bench.Write("board.fuse.json", Files.Board);
        var cube = _bench.Write("cube.fuse.json", Files.FusedCube);
        var bad = _bench.Write("bad.fuse.json", Files.Bad);
        string[][] runs =
        [
            ["examine", cube],
            ["examine", cube, "--json"],
            ["examine", board, cube, bad],
            ["check", board, bad],
            ["route", board, "--from", "home", "--to", "(1 2 3)"],
            ["solve", board, "--from", "(1 2)", "--json"],
            ["trace", board, "--word", "R D L D"],
            ["examine"],
            ["examine", board, "--max-shapes", "x"],
            ["--help"],
        ];
        foreach (var run in runs)
        {
            var plain = await UnderCultureAsync(CultureInfo.InvariantCulture, run);
            Assert.DoesNotContain(plain.Output + plain.Error, character => char.IsControl(character) && character != '\n');
            foreach (var culture in (string[])["de-DE", "tr-TR", "ar-SA", "sv-SE"])
            {
                Assert.Equal(plain, await UnderCultureAsync(CultureInfo.GetCultureInfo(culture), run));
            }
        }
    }

    private async Task<Workbench.Outcome> UnderCultureAsync(CultureInfo culture, string[] args)
    {
        var (before, beforeUi) = (CultureInfo.CurrentCulture, CultureInfo.CurrentUICulture);
        try
        {
            (CultureInfo.CurrentCulture, CultureInfo.CurrentUICulture) = (culture, culture);
            return await _bench.RunAsync(args);
        }
        finally
        {
            (CultureInfo.CurrentCulture, CultureInfo.CurrentUICulture) = (before, beforeUi);
        }
    }

    [GeneratedRegex("^  ([a-z]+)( <.*>)? +[A-Z]", RegexOptions.Multiline)]
    private static partial Regex ListedCommand();

    private sealed class FailingWriter(Exception failure) : StringWriter(CultureInfo.InvariantCulture)
    {
        public override void WriteLine(string? value) => throw failure;
    }
}
