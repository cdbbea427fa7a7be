using System.Collections.Immutable;

namespace Fusecraft.Groups;

/// <summary>A block system (of imprimitivity): a division of an orbit into equal parts that every member of the group carries to parts.</summary>
/// <remarks>Value equality. Immutable, safe to share.</remarks>
public sealed class BlockSystem : IEquatable<BlockSystem>
{
    private readonly Dictionary<int, int> _partOf = [];

    internal BlockSystem(ImmutableArray<ImmutableArray<int>> parts)
    {
        Parts = parts;
        for (var part = 0; part < parts.Length; part++)
        {
            foreach (var point in parts[part])
            {
                _partOf.Add(point, part);
            }
        }
    }

    /// <summary>The parts, each ascending, in the order of their least points.</summary>
    public ImmutableArray<ImmutableArray<int>> Parts { get; }

    /// <summary>The number of points in each part.</summary>
    public int PartSize => Parts[0].Length;

    /// <summary>True when the parts are single points, or the whole orbit is one part.</summary>
    public bool IsTrivial => PartSize == 1 || Parts.Length == 1;

    /// <summary>True when both have the same parts.</summary>
    public static bool operator ==(BlockSystem? left, BlockSystem? right) => left is null ? right is null : left.Equals(right);

    /// <summary>True when the parts differ.</summary>
    public static bool operator !=(BlockSystem? left, BlockSystem? right) => !(left == right);

    /// <summary>The number of the part that a point is in; -1 for a point outside the orbit.</summary>
    public int PartOf(int point) => _partOf.GetValueOrDefault(point, -1);

    /// <inheritdoc/>
    public bool Equals(BlockSystem? other) =>
        other is not null && Parts.Length == other.Parts.Length && Parts.Zip(other.Parts).All(pair => pair.First.AsSpan().SequenceEqual(pair.Second.AsSpan()));

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as BlockSystem);

    /// <inheritdoc/>
    public override int GetHashCode() => HashCode.Combine(Parts.Length, Parts[0][0], Parts[0][^1]);

    /// <summary>The parts in braces, points numbered from 1: <c>{1 4} {2 5} {3 6}</c>.</summary>
    public override string ToString() => string.Join(' ', Parts.Select(part => "{" + string.Join(' ', part.Select(point => point + 1)) + "}"));
}
