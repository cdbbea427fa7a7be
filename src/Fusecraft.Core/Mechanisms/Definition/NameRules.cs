using System.Buffers;
using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>What names may look like.</summary>
internal static class NameRules
{
    public const string Characters = "letters A-Z and a-z, digits, and the characters _ , : .";

    private static readonly SearchValues<char> Allowed = SearchValues.Create("ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789_,:.");

    public static bool IsName(ReadOnlySpan<char> name) => !name.IsEmpty && !name.ContainsAnyExcept(Allowed);

    public static bool IsNameCharacter(char c) => Allowed.Contains(c);

    public static bool IsTurnName(ReadOnlySpan<char> name) => IsName(name) && char.IsAsciiLetterOrDigit(name[0]);

    /// <summary>Complains about site names that are missing, too many, malformed or repeated.</summary>
    public static bool RequireSites(ImmutableArray<string> names, string path, ProblemList problems)
    {
        if (names.IsEmpty || names.Length > Permutation.MaxDegree)
        {
            problems.Add(path, names.IsEmpty ? "no sites" : $"{names.Length} sites", $"there are 1 to {Permutation.MaxDegree} sites");
            return false;
        }

        var seen = new HashSet<string>();
        for (var i = 0; i < names.Length; i++)
        {
            if (!IsName(names[i]))
            {
                problems.Add($"{path}[{i}]", $"\"{names[i]}\"", $"a name is made of {Characters}");
            }
            else if (!seen.Add(names[i]))
            {
                problems.Add($"{path}[{i}]", $"\"{names[i]}\" a second time", "names are distinct");
            }
        }

        return seen.Count == names.Length;
    }
}
