using System.Text.RegularExpressions;
using Fusecraft.Tests.Support;

namespace Fusecraft.Tests;

/// <summary>Holds that the C# shown in the pages is the C# that the tests compile and run.</summary>
public partial class DocumentationTests
{
    public static TheoryData<string> Pages => [.. Repository.Pages];

    [Theory]
    [MemberData(nameof(Pages))]
    public void Documentation_shows_the_samples_that_are_tested(string page)
    {
        var path = Repository.PathOf(page);
        var shown = File.ReadAllText(path);
        var right = SampleBlock().Replace(shown, match => $"<!-- sample: {match.Groups["name"].Value} -->\n```csharp\n{Region(match.Groups["name"].Value)}```");
        if (Environment.GetEnvironmentVariable("FUSECRAFT_WRITE_DOCS") == "1")
        {
            File.WriteAllText(path, right);
        }
        else
        {
            Assert.Equal(right, shown);
        }

        Assert.Equal(CSharpBlock().Count(right), SampleBlock().Count(right));
    }

    [Theory]
    [MemberData(nameof(Pages))]
    public void Links_between_pages_lead_somewhere(string page)
    {
        var folder = Path.GetDirectoryName(Repository.PathOf(page))!;
        foreach (Match link in Link().Matches(File.ReadAllText(Repository.PathOf(page))))
        {
            var target = link.Groups["target"].Value;
            Assert.True(Path.Exists(Path.Combine(folder, target)), $"{page} links to {target}, which is not there.");
        }
    }

    private static string Region(string name)
    {
        foreach (var file in Directory.EnumerateFiles(Repository.PathOf("tests/Fusecraft.Core.Tests/Samples"), "*.cs"))
        {
            var lines = File.ReadAllLines(file);
            var start = Array.FindIndex(lines, line => line.Trim() == $"#region {name}");
            if (start < 0)
            {
                continue;
            }

            var end = Array.FindIndex(lines, start, line => line.Trim() == "#endregion");
            var indent = lines[start].Length - lines[start].TrimStart().Length;
            return string.Concat(lines[(start + 1)..end].Select(line => (line.Length > indent ? line[indent..] : line.TrimStart()) + "\n"));
        }

        throw new InvalidOperationException($"No sample file has a region {name}.");
    }

    [GeneratedRegex(@"<!-- sample: (?<name>\S+) -->\n```csharp\n(?<code>[^`]*)```")]
    private static partial Regex SampleBlock();

    [GeneratedRegex(@"^```csharp", RegexOptions.Multiline)]
    private static partial Regex CSharpBlock();

    [GeneratedRegex(@"\]\((?<target>(?!https?:|#)[^)#]+)")]
    private static partial Regex Link();
}
