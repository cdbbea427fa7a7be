namespace Fusecraft.Tests.Support;

/// <summary>Where the files of the repository are.</summary>
internal static class Repository
{
    /// <summary>The folder that holds the solution.</summary>
    public static string Root { get; } = Find();

    /// <summary>The Markdown pages that users read.</summary>
    public static IEnumerable<string> Pages => Directory.EnumerateFiles(Root, "*.md").Concat(Directory.EnumerateFiles(PathOf("docs"), "*.md", SearchOption.AllDirectories))
        .Select(path => Path.GetRelativePath(Root, path).Replace('\\', '/')).Order(StringComparer.Ordinal);

    public static string PathOf(string relative) => Path.Combine(Root, relative);

    private static string Find()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (!File.Exists(Path.Combine(folder.FullName, "Fusecraft.Core.sln")))
        {
            folder = folder.Parent ?? throw new InvalidOperationException("The tests do not run inside the repository.");
        }

        return folder.FullName;
    }
}
