using System.Text.RegularExpressions;

namespace Fusecraft.Cli.Tests;

/// <summary>Holds that every command shown in the pages gives the output shown beneath it.</summary>
public partial class DocumentationTests
{
    public static TheoryData<string> Pages => [.. new[] { "README.md" }.Concat(
        Directory.EnumerateFiles(Path.Combine(Root, "docs"), "*.md", SearchOption.AllDirectories).Select(path => Path.GetRelativePath(Root, path).Replace('\\', '/')).Order(StringComparer.Ordinal))];

    private static string Root { get; } = FindRoot();

    [Theory]
    [MemberData(nameof(Pages))]
    public async Task Documentation_shows_the_output_that_commands_give(string page)
    {
        var path = Path.Combine(Root, page);
        var shown = await File.ReadAllTextAsync(path);
        var right = shown;
        foreach (Match block in ConsoleBlock().Matches(shown))
        {
            var text = string.Concat(await Task.WhenAll(Command().Matches(block.Groups["text"].Value).Select(async command =>
                $"$ fusecraft {command.Groups["arguments"].Value}\n{await RunAsync(command.Groups["arguments"].Value)}")));
            right = right.Replace(block.Value, $"```console\n{text}```", StringComparison.Ordinal);
        }

        if (Environment.GetEnvironmentVariable("FUSECRAFT_WRITE_DOCS") == "1")
        {
            await File.WriteAllTextAsync(path, right);
        }
        else
        {
            Assert.Equal(right, shown);
        }
    }

    private static async Task<string> RunAsync(string commandLine)
    {
        var arguments = Argument().Matches(commandLine).Select(match => match.Groups["quoted"].Success ? match.Groups["quoted"].Value : match.Value)
            .Select(argument => argument.StartsWith("docs/", StringComparison.Ordinal) ? Path.Combine(Root, argument) : argument).ToArray();
        var output = new StringWriter { NewLine = "\n" };
        await Cli.RunAsync(arguments, output, output);
        return output.ToString().Replace(Root + Path.DirectorySeparatorChar, "", StringComparison.Ordinal).ReplaceLineEndings("\n");
    }

    private static string FindRoot()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder.FullName, "Fusecraft.Core.sln")))
        {
            folder = folder.Parent!;
        }

        return folder.FullName;
    }

    [GeneratedRegex(@"```console\n(?<text>[^`]*)```")]
    private static partial Regex ConsoleBlock();

    [GeneratedRegex(@"^\$ fusecraft (?<arguments>.*)$", RegexOptions.Multiline)]
    private static partial Regex Command();

    [GeneratedRegex(@"""(?<quoted>[^""]*)""|\S+")]
    private static partial Regex Argument();
}
