namespace Fusecraft.Groupoids;

/// <summary>The shapes of each region in ascending order, by counting: 8 bytes a shape where there are several regions.</summary>
internal sealed class RegionMembers
{
    private readonly int[]? _ordered;
    private readonly int[]? _places;
    private readonly int[] _starts;

    public RegionMembers(ShapeGroupoid groupoid)
    {
        var regions = groupoid.Regions;
        _starts = new int[regions.Length + 1];
        for (var region = 0; region < regions.Length; region++)
        {
            _starts[region + 1] = _starts[region] + regions[region].ShapeCount;
        }

        if (regions.Length == 1)
        {
            return;
        }

        _ordered = new int[groupoid.ShapeCount];
        _places = new int[groupoid.ShapeCount];
        var next = _starts.AsSpan(0, regions.Length).ToArray();
        for (var shape = 0; shape < _ordered.Length; shape++)
        {
            var region = groupoid.RegionOf(shape);
            _places[shape] = next[region] - _starts[region];
            _ordered[next[region]++] = shape;
        }
    }

    /// <summary>The shapes of a region.</summary>
    public int[] Of(int region) => _ordered is null ? [.. Enumerable.Range(0, _starts[1])] : _ordered[_starts[region].._starts[region + 1]];

    /// <summary>The position of a shape among those of its region.</summary>
    public int Place(int shape) => _places is null ? shape : _places[shape];
}
