using System.Text.Json;
using System.Text.RegularExpressions;
using Fusecraft.Mechanisms;

namespace Fusecraft.Core.Tests.Mechanisms.Files;

/// <summary>The examples of the reference page are true.</summary>
public class FileFormatPageTests
{
    private static readonly string Page = File.ReadAllText(Path.Combine(Root(), "docs", "file-format.md")).ReplaceLineEndings("\n");

    public static TheoryData<string> Examples { get; } = [.. Blocks("json")];

    [Theory]
    [MemberData(nameof(Examples))]
    public void Every_example_is_read_and_passes_the_schema(string json)
    {
        Assert.NotEmpty(MechanismFile.Parse(json).Turns);
        Assert.True(SchemaCheck.Passes(json));
    }

    [Fact]
    public void The_wrong_example_is_refused_with_the_problems_shown()
    {
        var exception = Assert.Throws<MechanismFormatException>(() => MechanismFile.Parse(Assert.Single(Blocks("json wrong"))));

        Assert.Equal(Assert.Single(Blocks("text")).TrimEnd(), exception.Message.ReplaceLineEndings("\n"));
    }

    [Fact]
    public void The_turns_of_the_cubes_are_those_listed()
    {
        var rows = Regex.Matches(Page, @"^\| (\d) \| ((?:`\w+` ?)+)\|$", RegexOptions.Multiline);

        Assert.Equal(["2", "3", "4", "5"], rows.Select(row => row.Groups[1].Value));
        Assert.All(rows, row =>
        {
            var cube = MechanismBuilder.Cube("Cube", int.Parse(row.Groups[1].Value)).Build();
            Assert.Equal(row.Groups[2].Value.Replace("`", "", StringComparison.Ordinal).TrimEnd(), string.Join(' ', cube.Turns.Select(turn => turn.Name)));
        });
    }

    [Fact]
    public void Every_member_of_the_schema_is_on_the_page()
    {
        var schema = JsonDocument.Parse(MechanismFile.Schema).RootElement;
        var names = Properties(schema).Concat(schema.GetProperty("$defs").EnumerateObject().SelectMany(part => Properties(part.Value))).ToList();

        Assert.Contains("centreTwist", names);
        Assert.All(names, name => Assert.Contains($"`{name}`", Page, StringComparison.Ordinal));

        static IEnumerable<string> Properties(JsonElement part) =>
            part.TryGetProperty("properties", out var properties) ? properties.EnumerateObject().Select(property => property.Name) : [];
    }

    private static IEnumerable<string> Blocks(string info) =>
        Regex.Matches(Page, $"^```{info}\n(.*?)^```$", RegexOptions.Multiline | RegexOptions.Singleline).Select(match => match.Groups[1].Value);

    private static string Root()
    {
        var folder = AppContext.BaseDirectory;
        while (!File.Exists(Path.Combine(folder, "Fusecraft.Core.sln")))
        {
            folder = Path.GetDirectoryName(folder) ?? throw new InvalidOperationException("The tests run inside the repository.");
        }

        return folder;
    }
}
