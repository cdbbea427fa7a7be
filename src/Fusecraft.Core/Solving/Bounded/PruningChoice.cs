using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Chooses coordinates for goals of a shape and builds tables of pairs of them: for each orbit of pieces the pair that tells most states apart within the budget. How many a pair tells apart is estimated from how often a walk
/// meets the same pair again.
/// </summary>
internal sealed class PruningChoice
{
    /// <summary>No coordinate has more values, but for the one of shapes.</summary>
    private const int MostValues = 1 << 18;

    /// <summary>With more shapes than this coordinates leave them out, and shapes make a coordinate of their own.</summary>
    private const int MostShapesWithin = 64;

    private const int MostTables = 4;

    /// <summary>The pairs of an orbit that are looked at, the largest ones.</summary>
    private const int MostPairs = 12;

    /// <summary>Pairs met on a walk, and the steps between two meetings.</summary>
    private const int Meetings = 1 << 15;
    private const int Apart = 12;

    private readonly Shape _goal;
    private readonly Metric _metric;
    private readonly PruningOptions _options;
    private readonly IReadOnlyList<MechanismSymmetry?> _symmetries;
    private readonly CancellationToken _cancellation;
    private CosetCoordinates? _shapes;
    private bool _ignoresShapes;

    private PruningChoice(Shape goal, Metric metric, PruningOptions options, IReadOnlyList<MechanismSymmetry?> symmetries, CancellationToken cancellation)
    {
        _goal = goal;
        _metric = metric;
        _options = options;
        _symmetries = symmetries;
        _cancellation = cancellation;
    }

    private Mechanism Mechanism => _goal.Mechanism;

    /// <summary>Chooses and builds. None where even the smallest does not fit the budget.</summary>
    public static List<PruningTable> Build(Shape goal, Metric metric, PruningOptions options, IReadOnlyList<MechanismSymmetry?> symmetries, CancellationToken cancellation)
    {
        var choice = new PruningChoice(goal, metric, options, symmetries, cancellation);
        var left = options.MaxBytes;
        var tables = new List<PruningTable>();
        foreach (var pair in choice.BestPairs())
        {
            var limits = new PruningOptions { MaxBytes = left, DegreeOfParallelism = options.DegreeOfParallelism };
            if (tables.Count < MostTables && PruningCache.Get(pair.First, pair.Second, metric, limits, options.CacheFolder, cancellation) is { } table)
            {
                tables.Add(table);
                left -= table.ByteCount;
            }
        }

        return tables;
    }

    // The best pair of each orbit of pieces, best first.
    private List<Pair> BestPairs()
    {
        // Shapes alone first; where there are many, colourings do without them.
        var bytes = Math.Max(1, 4L * Mechanism.Steps.Length);
        var mostShapes = (int)Math.Clamp(_options.MaxBytes / bytes, 1, 1 << 22);
        _shapes = Coordinates(new int[Mechanism.SiteCount], mostShapes, ignoresShapes: false);
        _ignoresShapes = _shapes is null || _shapes.Count > MostShapesWithin;
        var choice = new AxisChoice(Mechanism, _symmetries);
        var best = new List<Pair>();
        foreach (var orbit in choice.Orbits)
        {
            _cancellation.ThrowIfCancellationRequested();
            var axes = AxesOf(orbit, choice);
            var pairs = new List<Pair>(axes.Select(axis => new Pair(axis, null)));
            for (var i = 0; i < axes.Count; i++)
            {
                for (var k = 0; k < i; k++)
                {
                    pairs.Add(new Pair(axes[i], axes[k]));
                }

                if (_ignoresShapes && _shapes is not null)
                {
                    pairs.Add(new Pair(axes[i], _shapes));
                }
            }

            // Large tables take half a byte an entry, so one has no more than half of all.
            pairs.RemoveAll(pair => pair.Size > _options.MaxBytes);
            var looked = pairs.OrderByDescending(pair => pair.Size).Take(MostPairs).Select(pair => pair with { Told = Estimate(pair) }).ToList();
            if (looked.Count > 0)
            {
                best.Add(looked.MaxBy(pair => pair.Told)!);
            }
        }

        if (best.Count == 0 && _shapes is not null)
        {
            best.Add(new Pair(_shapes, null));
        }

        return [.. best.OrderByDescending(pair => pair.Told)];
    }

    private List<CosetCoordinates> AxesOf(int[] orbit, AxisChoice choice)
    {
        var axes = new List<CosetCoordinates>();
        var pieces = choice.PieceCount(orbit);

        // Ever more pieces until they are too many; then as many of those that follow.
        var first = Math.Max(1, AddPlaces(0, pieces));
        AddPlaces(first, Math.Min(first, pieces - first));
        foreach (var lie in choice.Lies(orbit))
        {
            if (Coordinates(lie, MostValues, _ignoresShapes) is { } coordinates)
            {
                axes.Add(coordinates);
            }
        }

        return axes;

        int AddPlaces(int start, int most)
        {
            for (var count = 1; count <= most; count++)
            {
                if (Coordinates(choice.Places(orbit, start, count), MostValues, _ignoresShapes) is not { } coordinates)
                {
                    return count - 1;
                }

                axes.Add(coordinates);
            }

            return most;
        }
    }

    private CosetCoordinates? Coordinates(int[] colours, int most, bool ignoresShapes) => CosetCoordinates.OfColouring(
        Mechanism, colours, new CosetOptions { BaseShape = _goal, TowardsBase = true, MaxCoordinates = most, IgnoresShapes = ignoresShapes }, _cancellation);

    // How many pairs of values there are: with n of them, m met at random meet about m² / 2n times again.
    private double Estimate(Pair pair)
    {
        if (pair.Second is null)
        {
            return pair.First.Count;
        }

        var random = new SeededRandom(1);
        var seen = new HashSet<long>();
        var board = Mechanism.Board.Moves;
        var (shape, next) = (_goal.Key.ToArray(), new ulong[_goal.Key.Length]);
        var (first, second, again) = (0, 0, 0);
        for (var met = 0; met < Meetings; met++)
        {
            for (var i = 0; i < Apart; i++)
            {
                var step = random.NextInt32(board.Length);
                if (!board[step].IsFree(shape))
                {
                    continue;
                }

                board[step].Move(shape, next);
                next.CopyTo(shape, 0);
                first = pair.First.StepArray[(first * board.Length) + step];
                second = pair.Second.StepArray[(second * board.Length) + step];
                if (first < 0 || second < 0)
                {
                    // From here no way leads back.
                    (first, second) = (0, 0);
                    _goal.Key.CopyTo(shape);
                }
            }

            again += seen.Add(((long)first * pair.Second.Count) + second) ? 0 : 1;
        }

        return Math.Min(pair.Size, 0.5 * Meetings * Meetings / Math.Max(1, again));
    }

    private sealed record Pair(CosetCoordinates First, CosetCoordinates? Second)
    {
        public double Told { get; init; }

        public long Size => (long)First.Count * (Second?.Count ?? 1);
    }
}
