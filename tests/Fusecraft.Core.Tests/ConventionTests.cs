using System.Reflection;
using System.Runtime.CompilerServices;
using System.Text.RegularExpressions;
using Fusecraft.Permutations;

namespace Fusecraft.Tests;

/// <summary>Holds the conventions that hold everywhere, so that reviewers need not look for them.</summary>
public partial class ConventionTests
{
    private const int LongestFile = 500;

    private static readonly Type[] _public = typeof(Permutation).Assembly.GetExportedTypes();

    [Fact]
    public void Public_structs_are_readonly_values_with_equality()
    {
        var offences =
            from type in _public
            where type.IsValueType && !type.IsEnum && !type.IsByRefLike
            where !type.IsDefined(typeof(IsReadOnlyAttribute), false)
                || !type.GetInterfaces().Contains(typeof(IEquatable<>).MakeGenericType(type))
                || type.GetMethod("op_Equality", [type, type]) is null
                || type.GetMethod("op_Inequality", [type, type]) is null
            select type;
        Assert.Empty(offences);
    }

    [Fact]
    public void Public_classes_are_sealed_static_or_abstract()
    {
        var offences = from type in _public where type.IsClass && !type.IsSealed && !type.IsAbstract select type;
        Assert.Empty(offences);
    }

    [Fact]
    public void No_public_field_is_an_array()
    {
        var offences =
            from type in _public
            from field in type.GetFields(BindingFlags.Public | BindingFlags.Instance | BindingFlags.Static)
            where field.FieldType.IsArray
            select $"{type}.{field.Name}";
        Assert.Empty(offences);
    }

    [Fact]
    public void A_file_holds_at_most_one_public_type_and_is_named_after_it()
    {
        var files = SourceFiles("src").ToList();
        Assert.NotEmpty(files);
        Assert.Empty(
            from file in files
            from name in PublicType().Matches(File.ReadAllText(file)).Select(match => match.Groups["name"].Value).Distinct()
            where Path.GetFileName(file).Split('.')[0] != name
            select $"{file} holds {name}");
    }

    [Fact]
    public void No_file_is_longer_than_500_lines() => Assert.Empty(
        from file in SourceFiles("src").Concat(SourceFiles("tests")).Concat(SourceFiles("benchmarks"))
        let lines = File.ReadLines(file).Count()
        where lines > LongestFile
        select $"{file} has {lines} lines");

    [GeneratedRegex(@"^public\s[^(=;{]*?\b(record\s+struct|record\s+class|record|class|struct|interface|enum|delegate\s+\S+)\s+(?<name>\w+)", RegexOptions.Multiline)]
    private static partial Regex PublicType();

    private static IEnumerable<string> SourceFiles(string folder) => Directory.EnumerateFiles(Path.Combine(Root(), folder), "*.cs", SearchOption.AllDirectories)
        .Where(file => !file.Split(Path.DirectorySeparatorChar).Any(part => part is "obj" or "bin"));

    private static string Root()
    {
        var folder = new DirectoryInfo(AppContext.BaseDirectory);
        while (folder is not null && !File.Exists(Path.Combine(folder.FullName, "Fusecraft.Core.sln")))
        {
            folder = folder.Parent;
        }

        return folder?.FullName ?? throw new DirectoryNotFoundException("The tests do not run inside the repository.");
    }
}
