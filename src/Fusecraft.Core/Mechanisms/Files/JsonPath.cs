namespace Fusecraft.Mechanisms;

/// <summary>Writes JSON paths as RFC 9535 does: <c>$.turns.B.moves</c>, <c>$.blocks[0][1]</c>, and <c>$.turns['2']</c> where a name is not an identifier.</summary>
internal static class JsonPath
{
    internal const string Root = "$";

    internal static string Member(string path, string name) =>
        IsShorthand(name) ? $"{path}.{name}" : $"{path}['{name.Replace("\\", "\\\\", StringComparison.Ordinal).Replace("'", "\\'", StringComparison.Ordinal)}']";

    internal static string Index(string path, int index) => $"{path}[{index}]";

    private static bool IsShorthand(string name) =>
        name.Length > 0 && !char.IsAsciiDigit(name[0]) && name.All(c => char.IsAsciiLetterOrDigit(c) || c is '_' or >= '\x80');
}
