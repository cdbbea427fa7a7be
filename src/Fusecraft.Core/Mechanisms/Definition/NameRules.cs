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

    /// <summary>
    /// Complains about site names that are missing, too many, malformed or repeated. Names that cannot serve are replaced, so that the others keep their numbers and what is said about them
    /// can be checked; null where there is nothing to check against.
    /// </summary>
    public static ImmutableArray<string>? CheckSites(ImmutableArray<string> names, string path, ProblemList problems)
    {
        if (names.IsEmpty || names.Length > Permutation.MaxDegree)
        {
            problems.Add(path, names.IsEmpty ? "no sites" : $"{names.Length} sites", $"there are 1 to {Permutation.MaxDegree} sites");
            return null;
        }

        var seen = new HashSet<string>();
        var checkedNames = ImmutableArray.CreateBuilder<string>(names.Length);
        for (var i = 0; i < names.Length; i++)
        {
            var serves = IsName(names[i]);
            if (!serves)
            {
                problems.Add($"{path}[{i}]", $"\"{names[i]}\"", $"a name is made of {Characters}");
            }
            else if (!seen.Add(names[i]))
            {
                serves = false;
                problems.Add($"{path}[{i}]", $"\"{names[i]}\" a second time", "names are distinct");
            }

            // A number sign cannot stand in a name, so this one is nobody else's.
            checkedNames.Add(serves ? names[i] : $"#{i + 1}");
        }

        return checkedNames.DrainToImmutable();
    }
}
