using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Pruning tables as a search reads them: coordinates that are carried along, each through a symmetry of the mechanism or as it is, and for each reading of a table the two coordinates it is read at. A symmetry that keeps the
/// goal's shape takes words to words of equal length, so what a table says of the image of a state holds of the state.
/// </summary>
internal sealed class BoundTables
{
    /// <summary>No more readings than this.</summary>
    private const int MostReadings = 12;

    private readonly List<Coordinate> _coordinates = [];
    private readonly List<Reading> _readings = [];

    /// <param name="tables">Tables of one mechanism and base shape.</param>
    /// <param name="symmetries">Symmetries that keep the base shape and the metric, the identity first.</param>
    public BoundTables(IReadOnlyList<PruningTable> tables, IReadOnlyList<MechanismSymmetry?> symmetries)
    {
        var parts = new HashSet<string>();
        foreach (var symmetry in symmetries)
        {
            foreach (var table in tables.OrderByDescending(table => table.Mean))
            {
                // A symmetry that takes the colourings to themselves, whatever the colours, gives the same bounds again.
                if (_readings.Count < MostReadings && parts.Add($"{AxisChoice.Partition(table.First.ColourOfLabel, symmetry)}|{(table.Second is null ? "" : AxisChoice.Partition(table.Second.ColourOfLabel, symmetry))}"))
                {
                    _readings.Add(new Reading(table, Add(table.First, symmetry), table.Second is null ? -1 : Add(table.Second, symmetry)));
                }
            }
        }
    }

    public ReadOnlySpan<Coordinate> Coordinates => System.Runtime.InteropServices.CollectionsMarshal.AsSpan(_coordinates);

    public ReadOnlySpan<Reading> Readings => System.Runtime.InteropServices.CollectionsMarshal.AsSpan(_readings);

    /// <summary>The symmetries that keep a shape and the weights, the identity first as null; no more than a few hundred.</summary>
    public static List<MechanismSymmetry?> SymmetriesFor(Shape shape, Metric metric, CancellationToken cancellation)
    {
        var mechanism = shape.Mechanism;
        var symmetries = new List<MechanismSymmetry?> { null };
        var group = SymmetryGroup.Of(mechanism, cancellation).Fixing(shape, cancellation);
        if (group.Order > 1000)
        {
            return symmetries;
        }

        foreach (var sites in PermutationClosure.List([.. group.Generators.Select(generator => generator.Sites)], 1000)!.Order(Comparer<Permutation>.Create(Lexicographic)))
        {
            var symmetry = group.Verified(sites);
            if (!sites.IsIdentity && mechanism.Steps.All(step => metric.WeightOf(step) == metric.WeightOf(symmetry.Image(step))) && (metric.Kind != MetricKind.Run || KeepsRuns(symmetry)))
            {
                symmetries.Add(symmetry);
            }
        }

        return symmetries;
    }

    /// <summary>Writes the coordinates of a shape and labels counted from the goal; false where one has no value, so that the goal cannot be reached.</summary>
    public bool TryRank(Shape shape, Permutation labels, Span<int> values)
    {
        for (var i = 0; i < _coordinates.Count; i++)
        {
            var (coordinates, symmetry, _, _) = _coordinates[i];
            var image = symmetry is null ? shape : symmetry.Image(shape);
            values[i] = image is null ? -1 : coordinates.Rank(image.Key, symmetry is null ? labels : labels.ConjugateBy(symmetry.Sites));
            if (values[i] < 0)
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>The greatest bound at given values; in the units of the tables' metric times their unit.</summary>
    public int Bound(ReadOnlySpan<int> values)
    {
        var bound = 0;
        foreach (var reading in _readings)
        {
            bound = Math.Max(bound, reading.Table.Bound(values[reading.First], reading.Second < 0 ? 0 : values[reading.Second]));
        }

        return bound;
    }

    private int Add(CosetCoordinates coordinates, MechanismSymmetry? symmetry)
    {
        var known = _coordinates.FindIndex(other => ReferenceEquals(other.Values, coordinates) && ReferenceEquals(other.Symmetry, symmetry));
        if (known >= 0)
        {
            return known;
        }

        int[] steps = [.. coordinates.Mechanism.Steps.Select(step => symmetry is null ? step.Index : symmetry.Image(step).Index)];
        _coordinates.Add(new Coordinate(coordinates, symmetry, steps, coordinates.StepArray));
        return _coordinates.Count - 1;
    }

    private static bool KeepsRuns(MechanismSymmetry symmetry)
    {
        var classes = Metric.RunClasses(symmetry.Mechanism);
        var images = new Dictionary<int, int>();
        return symmetry.Mechanism.Steps.All(step =>
        {
            var image = classes[symmetry.Image(step).Index];
            return !images.TryAdd(classes[step.Index], image) ? images[classes[step.Index]] == image : images.Values.Count(other => other == image) == 1;
        });
    }

    private static int Lexicographic(Permutation one, Permutation other)
    {
        for (var point = 0; point < Math.Max(one.SupportEnd, other.SupportEnd); point++)
        {
            if (one[point] != other[point])
            {
                return one[point].CompareTo(other[point]);
            }
        }

        return 0;
    }

    /// <param name="Values">The coordinates.</param>
    /// <param name="Symmetry">What states are seen through; null for as they are.</param>
    /// <param name="Steps">For each step, the one that its image is.</param>
    /// <param name="Table">The step table.</param>
    public sealed record Coordinate(CosetCoordinates Values, MechanismSymmetry? Symmetry, int[] Steps, int[] Table);

    /// <param name="Table">The table.</param>
    /// <param name="First">The place of its first coordinate among those carried along.</param>
    /// <param name="Second">The place of its second; -1 where it has none.</param>
    public sealed record Reading(PruningTable Table, int First, int Second);
}
