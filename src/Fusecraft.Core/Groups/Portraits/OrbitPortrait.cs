using System.Collections.Immutable;
using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>An orbit of two or more points, and what the group does on it.</summary>
/// <remarks>Every statement is proven. Immutable, safe to share.</remarks>
public sealed class OrbitPortrait
{
    internal OrbitPortrait(ImmutableArray<int> points, ActionPortrait action, BigInteger kernelOrder, int? equivalentTo)
    {
        Points = points;
        Action = action;
        KernelOrder = kernelOrder;
        EquivalentTo = equivalentTo;
    }

    /// <summary>The points, 0-based, ascending.</summary>
    public ImmutableArray<int> Points { get; }

    /// <summary>The action on the orbit, point <c>Points[i]</c> called <c>i</c>. That of the earlier orbit, with its numbering, where <see cref="EquivalentTo"/> names one.</summary>
    public ActionPortrait Action { get; }

    /// <summary>The number of members that fix every point of the orbit.</summary>
    public BigInteger KernelOrder { get; }

    /// <summary>The first orbit, as an index in <see cref="GroupPortrait.Orbits"/>, on which the group acts in the same way: the points can be matched such that matching points always move alike. Null where there is none before this one.</summary>
    public int? EquivalentTo { get; }

    /// <summary>One line for the orbit, and one for each of its first few minimal block systems.</summary>
    public override string ToString()
    {
        const int MostSystems = 5;
        var start = $"from point {Points[0] + 1}: ";
        if (EquivalentTo is { } earlier)
        {
            return $"{start}{Points.Length} points, moved like orbit {earlier + 1}";
        }

        var systems = Action.MinimalBlockSystems;
        var lines = systems.Take(MostSystems).Select(system => $"  {system}").Prepend($"{start}{Action}");
        return string.Join('\n', systems.Length > MostSystems ? lines.Append($"  and {systems.Length - MostSystems} more minimal block systems") : lines);
    }
}
