using System.Globalization;

namespace Fusecraft.Cli.Tests;

/// <summary>A folder of its own, and the command line run in this process. Outputs name files relative to the folder and end lines with a line feed.</summary>
internal sealed class Workbench : IDisposable
{
    private readonly string _folder = Directory.CreateTempSubdirectory("fusecraft-").FullName;

    public string PathOf(string name) => Path.Combine(_folder, name);

    /// <summary>Writes a file and gives its path.</summary>
    public string Write(string name, string text)
    {
        File.WriteAllText(PathOf(name), text);
        return PathOf(name);
    }

    /// <summary>Runs the command line.</summary>
    public async Task<Outcome> RunAsync(params string[] args) => await RunAsync(CancellationToken.None, args);

    public async Task<Outcome> RunAsync(CancellationToken cancellation, params string[] args)
    {
        using var output = new StringWriter(CultureInfo.InvariantCulture) { NewLine = "\n" };
        using var error = new StringWriter(CultureInfo.InvariantCulture) { NewLine = "\n" };
        var code = await Cli.RunAsync(args, output, error, cancellation);
        return new Outcome(code, Relative(output), Relative(error));
    }

    public void Dispose() => Directory.Delete(_folder, recursive: true);

    private string Relative(StringWriter text) => text.ToString().Replace(_folder + Path.DirectorySeparatorChar, "", StringComparison.Ordinal);

    /// <summary>What a run left behind.</summary>
    internal sealed record Outcome(int Code, string Output, string Error);
}
