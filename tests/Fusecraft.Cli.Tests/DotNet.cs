using System.Collections;
using System.Diagnostics;
using System.Text;

namespace Fusecraft.Cli.Tests;

/// <summary>Runs the .NET SDK, and programs that need its runtime, in a folder.</summary>
internal sealed class DotNet
{
    private static readonly TimeSpan Patience = TimeSpan.FromMinutes(10);
    private readonly string _folder;

    public DotNet(string folder) => _folder = folder;

    /// <summary>The root of the repository.</summary>
    public static string Repository { get; } = FindRepository();

    private static string Root => Path.GetFullPath(Path.Combine(Path.GetDirectoryName(typeof(object).Assembly.Location)!, "..", "..", ".."));

    public Task<string> RunAsync(params string[] args) => RunProgramAsync(Path.Combine(Root, OperatingSystem.IsWindows() ? "dotnet.exe" : "dotnet"), args);

    /// <summary>Runs a program that must succeed, and gives what it wrote to its standard output.</summary>
    public async Task<string> RunProgramAsync(string program, params string[] args)
    {
        var start = new ProcessStartInfo(program, args)
        {
            WorkingDirectory = _folder,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
            StandardOutputEncoding = Encoding.UTF8,
            StandardErrorEncoding = Encoding.UTF8,
        };
        foreach (var name in Environment.GetEnvironmentVariables().Cast<DictionaryEntry>().Select(variable => (string)variable.Key))
        {
            // What the build that runs these tests left behind must not steer another one.
            if (name.StartsWith("MSBuild", StringComparison.OrdinalIgnoreCase) || name.StartsWith("VSTEST", StringComparison.OrdinalIgnoreCase))
            {
                start.Environment.Remove(name);
            }
        }

        start.Environment["DOTNET_ROOT"] = Root;
        start.Environment["DOTNET_NOLOGO"] = "1";
        start.Environment["DOTNET_CLI_TELEMETRY_OPTOUT"] = "1";
        start.Environment["DOTNET_CLI_UI_LANGUAGE"] = "en";
        // Build nodes that outlive the build would keep the pipes open for ever.
        start.Environment["MSBUILDDISABLENODEREUSE"] = "1";
        start.Environment["DOTNET_CLI_USE_MSBUILD_SERVER"] = "0";
        using var process = Process.Start(start)!;
        var output = process.StandardOutput.ReadToEndAsync();
        var error = process.StandardError.ReadToEndAsync();
        using var limit = new CancellationTokenSource(Patience);
        try
        {
            await process.WaitForExitAsync(limit.Token);
        }
        catch (OperationCanceledException)
        {
            process.Kill(entireProcessTree: true);
            throw;
        }

        Assert.True(process.ExitCode == 0, $"{program} {string.Join(' ', args)} exited with {process.ExitCode}:\n{await output}\n{await error}");
        return await output;
    }

    private static string FindRepository()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "Fusecraft.Core.sln")))
        {
            folder = folder.Parent;
        }

        return folder?.FullName ?? throw new InvalidOperationException($"No Fusecraft.Core.sln above {AppContext.BaseDirectory}.");
    }
}
