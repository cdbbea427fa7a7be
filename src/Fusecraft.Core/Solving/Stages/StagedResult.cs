using System.Diagnostics.CodeAnalysis;
using Fusecraft.Groupoids;

namespace Fusecraft.Solving;

/// <summary>A short word found by stages, or why there is none.</summary>
public sealed class StagedResult
{
    internal StagedResult(bool? isSolvable, TurnPath? path, long length, long nodes, string reason)
    {
        IsSolvable = isSolvable;
        Path = path;
        Length = length;
        Nodes = nodes;
        Reason = reason;
    }

    /// <summary>True: there is a path. False: proven that there is none. Null: a budget ended before either was settled.</summary>
    public bool? IsSolvable { get; }

    /// <summary>The path, replayed before it was given; null where none was found.</summary>
    public TurnPath? Path { get; }

    /// <summary>The length of the path in the metric asked for; 0 where there is none.</summary>
    public long Length { get; }

    /// <summary>The budget of moves (<see cref="StagedOptions.MaxNodes"/>) with which the same word is found again, whatever the time.</summary>
    public long Nodes { get; }

    /// <summary>In one sentence, how the answer was settled or what ended the work.</summary>
    public string Reason { get; }

    /// <summary>True when a path was found.</summary>
    [MemberNotNullWhen(true, nameof(Path))]
    public bool HasPath => Path is not null;
}
