namespace Fusecraft.Groupoids;

/// <summary>How far an exploration may go, and on how many threads. What is found, and how it is numbered, depends on the limits but never on the threads.</summary>
public sealed class ExplorationOptions
{
    /// <summary>No limit but memory, all processor cores.</summary>
    public static ExplorationOptions Default { get; } = new();

    /// <summary>The exploration ends, incomplete, when a shape beyond this number is found; at least 1.</summary>
    public int MaxShapes { get; init; } = int.MaxValue - 1;

    /// <summary>
    /// The exploration ends, incomplete, when a shape is found that would make all shapes together take more than this many bytes: their keys or numbers, the index to look them up, and the path
    /// to each. Not counted are a few megabytes of working memory a thread. Room for one shape is always granted. At least 1.
    /// </summary>
    public long MaxBytes { get; init; } = long.MaxValue;

    /// <summary>How many threads work at the same time, the caller's among them; at least 1. With 1 no other thread is asked.</summary>
    public int DegreeOfParallelism { get; init; } = Environment.ProcessorCount;
}
