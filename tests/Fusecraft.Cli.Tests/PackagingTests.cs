using System.Text.Json;

namespace Fusecraft.Cli.Tests;

/// <summary>The two packages, made and used as a stranger would: the library in a fresh project, the tool installed from a folder.</summary>
public sealed class PackagingTests : IAsyncLifetime, IDisposable
{
    // A version of its own, so that nothing in the package cache can stand in for what is packed here.
    private readonly string _version = $"0.0.0-test.{Guid.NewGuid():N}";
    private readonly Workbench _bench = new();
    private readonly DotNet _dotnet;

    public PackagingTests() => _dotnet = new DotNet(_bench.PathOf(""));

    private string Feed => _bench.PathOf("feed");

    public async Task InitializeAsync()
    {
        Directory.CreateDirectory(Feed);
        foreach (var project in (string[])["Fusecraft.Core", "Fusecraft.Cli"])
        {
            // Built apart from the repository's own outputs. What goes into the packages must be locked.
            await _dotnet.RunAsync(
                "pack", Path.Combine(DotNet.Repository, "src", project), "-c", "Release", "-o", Feed, "--artifacts-path", _bench.PathOf("artifacts"),
                $"-p:Version={_version}", "-p:RestoreLockedMode=true", "-p:UseSharedCompilation=false");
        }

        // The folder is one more source beside those that the machine has.
        _bench.Write("nuget.config", """<configuration><packageSources><add key="packed" value="feed" /></packageSources></configuration>""");
    }

    public async Task DisposeAsync()
    {
        var cache = (await _dotnet.RunAsync("nuget", "locals", "global-packages", "--list")).Split(": ", 2)[1].Trim();
        foreach (var package in (string[])["fusecraft.core", "fusecraft.cli"])
        {
            var folder = Path.Combine(cache, package, _version);
            if (Directory.Exists(folder))
            {
                Directory.Delete(folder, recursive: true);
            }

            var parent = Path.Combine(cache, package);
            if (Directory.Exists(parent) && !Directory.EnumerateFileSystemEntries(parent).Any())
            {
                Directory.Delete(parent);
            }
        }
    }

    public void Dispose() => _bench.Dispose();

    [Fact]
    public async Task The_packages_serve_a_fresh_project_and_a_fresh_tool_folder()
    {
        await AssertLibraryServesAFreshProjectAsync();
        await AssertToolCanBeInstalledAndRunAsync();
    }

    private async Task AssertLibraryServesAFreshProjectAsync()
    {
        Directory.CreateDirectory(_bench.PathOf("fresh"));
        _bench.Write(Path.Combine("fresh", "Fresh.csproj"), $"""
            <Project Sdk="Microsoft.NET.Sdk">
              <PropertyGroup>
                <OutputType>Exe</OutputType>
                <TargetFramework>net10.0</TargetFramework>
                <TreatWarningsAsErrors>true</TreatWarningsAsErrors>
                <NuGetAudit>false</NuGetAudit>
              </PropertyGroup>
              <ItemGroup>
                <PackageReference Include="Fusecraft.Core" Version="{_version}" />
              </ItemGroup>
            </Project>
            """);
        _bench.Write(Path.Combine("fresh", "Fresh.cs"), """
            using Fusecraft.Mechanisms;
            using Fusecraft.Reporting;

            var cube = MechanismBuilder.Cube("Plain", 3).Build();
            System.Console.WriteLine(Examination.Of(cube).HomeRegion!.VertexGroup.FactoredOrder);
            """);

        var output = await _dotnet.RunAsync("run", "--project", _bench.PathOf("fresh"), "-p:UseSharedCompilation=false");

        // OEIS A075152: 43252003274489856000 positions.
        Assert.Equal("2^27·3^14·5^3·7^2·11", output.Trim());
        Assert.True(File.Exists(Path.Combine(_bench.PathOf("fresh"), "bin", "Debug", "net10.0", "Fusecraft.Core.dll")));
    }

    private async Task AssertToolCanBeInstalledAndRunAsync()
    {
        var tools = _bench.PathOf("tools");
        await _dotnet.RunAsync("tool", "install", "Fusecraft.Cli", "--version", _version, "--tool-path", tools, "--add-source", Feed);
        var fusecraft = Path.Combine(tools, OperatingSystem.IsWindows() ? "fusecraft.exe" : "fusecraft");
        var board = _bench.Write("board.fuse.json", Files.Board);

        using var json = JsonDocument.Parse(await _dotnet.RunProgramAsync(fusecraft, "examine", "--json", board));

        Assert.Equal("360", json.RootElement.GetProperty("reachableStates").GetString());
        Assert.Equal($"fusecraft {_version}", (await _dotnet.RunProgramAsync(fusecraft, "--version")).Trim());
    }
}
