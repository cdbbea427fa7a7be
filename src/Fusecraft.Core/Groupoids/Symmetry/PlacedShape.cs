using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>Blocks and marks in places that need not be places of the shape board: what a shape becomes when it is moved by something other than steps.</summary>
internal sealed class PlacedShape : IEquatable<PlacedShape>
{
    private readonly string _text;

    private PlacedShape(IEnumerable<ImmutableArray<int>> blocks, IEnumerable<(string Mark, int Site)> marks)
    {
        Blocks = [.. blocks.Select(block => block.Sort()).OrderBy(block => block[0])];
        Marks = [.. marks.OrderBy(mark => mark.Mark, StringComparer.Ordinal).ThenBy(mark => mark.Site)];
        _text = string.Join('|', Blocks.Select(block => string.Join(' ', block))) + "/" + string.Join(' ', Marks.Select(mark => $"{mark.Mark}@{mark.Site}"));
    }

    public ImmutableArray<ImmutableArray<int>> Blocks { get; }

    public ImmutableArray<(string Mark, int Site)> Marks { get; }

    public static PlacedShape Of(Shape shape) => new(shape.Blocks, shape.Marks);

    public PlacedShape Moved(Permutation sites, int[] pieces) =>
        new(Blocks.Select(block => block.Select(piece => pieces[piece]).ToImmutableArray()), Marks.Select(mark => (mark.Mark, sites[mark.Site])));

    /// <summary>The shape of a mechanism; null where its turns can never bring the tokens there.</summary>
    public Shape? In(Mechanism mechanism) =>
        !Blocks.Any(block => block[0] < 0) && mechanism.Board.KeyOf(Blocks, Marks) is { } key ? new Shape(mechanism, key) : null;

    public bool Equals(PlacedShape? other) => other is not null && _text == other._text;

    public override bool Equals(object? obj) => Equals(obj as PlacedShape);

    public override int GetHashCode() => _text.GetHashCode(StringComparison.Ordinal);
}
