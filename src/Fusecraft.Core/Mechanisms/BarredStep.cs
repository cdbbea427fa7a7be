namespace Fusecraft.Mechanisms;

/// <summary>A step of a word that cannot be done, and why.</summary>
/// <param name="Index">The 0-based position of the step in the word.</param>
/// <param name="Name">The step as written.</param>
/// <param name="Barrier">What bars it.</param>
public sealed record BarredStep(int Index, string Name, Barrier Barrier)
{
    /// <summary>One line, with the position counted from 1.</summary>
    public override string ToString() => $"step {Index + 1} ({Name}) is barred: {Barrier}";
}
