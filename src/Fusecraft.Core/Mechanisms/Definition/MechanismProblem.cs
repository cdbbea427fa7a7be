namespace Fusecraft.Mechanisms;

/// <summary>One mistake in a mechanism file or definition: where it is, what was found, what would be right.</summary>
/// <param name="Path">The JSON path of the member, such as <c>$.turns.B.moves</c> or <c>$.blocks[0][1]</c>.</param>
/// <param name="Line">The 1-based line in the file; null for a definition that was not read from one.</param>
/// <param name="Column">The 1-based column (in characters) in that line; null for a definition that was not read from a file.</param>
/// <param name="Found">What was found.</param>
/// <param name="Expected">What would be right.</param>
public sealed record MechanismProblem(string Path, int? Line, int? Column, string Found, string Expected)
{
    /// <summary>One line: where, what was found, what would be right.</summary>
    public override string ToString() =>
        Line is null ? $"{Path}: found {Found}; {Expected}" : $"line {Line}, column {Column}, {Path}: found {Found}; {Expected}";
}
