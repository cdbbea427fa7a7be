using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>How many states there are at each distance from one, up to a greatest distance: a breadth-first search over states packed into few bits, for spaces too large for a complete table.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class DepthCensus
{
    private const int FewShapes = 1 << 14;

    private DepthCensus(Metric metric, int unit, List<BigInteger> counts, bool isCut, bool isWhole)
    {
        Metric = metric;
        Unit = unit;
        Counts = [.. counts];
        IsCut = isCut;
        IsWhole = isWhole;
    }

    /// <summary>How length is counted.</summary>
    public Metric Metric { get; }

    /// <summary>What all distances are multiples of: 1, or with weights their greatest common divisor.</summary>
    public int Unit { get; }

    /// <summary>Entry <c>d</c> is the number of states at distance <c>d</c> times <see cref="Unit"/>. Every entry is exact.</summary>
    public ImmutableArray<BigInteger> Counts { get; }

    /// <summary>True where the budget of states ended the census before the distance asked for; the distances it could not finish are left out.</summary>
    public bool IsCut { get; }

    /// <summary>True exactly where every state that can be reached is counted; false where some lie beyond the greatest distance, or beyond the budget.</summary>
    public bool IsWhole { get; }

    /// <summary>The number of all states that can be reached; null where <see cref="IsWhole"/> is false.</summary>
    public BigInteger? StateCount => IsWhole ? Sum(static _ => 1) : null;

    /// <summary>The mean distance of all states that can be reached; not a number where <see cref="IsWhole"/> is false.</summary>
    public double Mean => IsWhole ? (double)Sum(index => index * Unit) / (double)Sum(static _ => 1) : double.NaN;

    /// <summary>Counts states by their distance from one.</summary>
    /// <param name="from">A state with a shape.</param>
    /// <param name="greatest">The greatest distance that is counted, by the metric.</param>
    /// <param name="metric">How length is counted; null for steps. Weights may be 0.</param>
    /// <param name="maxStates">
    /// The most states that are held; each takes the words of its packed form, 16 bytes on a 3x3x3, and 8 to 16 bytes, with different weights 8 more. States that turns without weight lead between are held as one where each such turn
    /// can be undone, however many they are; their shapes are held, and bounded, besides.
    /// </param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">The state has no shape, or the metric weighs turns that are not there.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The distance is negative, or the budget below 1.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static DepthCensus Take(State from, int greatest, Metric? metric = null, int maxStates = 50_000_000, CancellationToken cancellationToken = default) =>
        Take(from, greatest, metric, maxStates, FewShapes, cancellationToken);

    /// <param name="from">A state with a shape.</param>
    /// <param name="greatest">The greatest distance.</param>
    /// <param name="metric">How length is counted; null for steps.</param>
    /// <param name="maxStates">The most states that are held.</param>
    /// <param name="fewShapes">Up to so many shapes a list of moves is made for each.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    internal static DepthCensus Take(State from, int greatest, Metric? metric, int maxStates, int fewShapes, CancellationToken cancellationToken)
    {
        ArgumentNullException.ThrowIfNull(from);
        ArgumentOutOfRangeException.ThrowIfNegative(greatest);
        ArgumentOutOfRangeException.ThrowIfLessThan(maxStates, 1);
        if (from.Shape is null)
        {
            throw new ArgumentException("The state lies where no turns can bring the puzzle; it has no shape and no free steps.", nameof(from));
        }

        metric ??= Metric.Step;
        metric.RequireTurnsOf(from.Mechanism, nameof(metric));
        var moves = new PruningMoves(from.Mechanism, metric);
        var space = SpaceOf(from.Shape, metric, moves, maxStates, fewShapes, cancellationToken);
        var run = new Run(space, greatest / moves.Unit, maxStates, cancellationToken);
        var isCut = !(space.IsUniform ? run.ByLevels(from.Shape) : run.ByWeights(from.Shape));
        return new DepthCensus(metric, moves.Unit, run.Counts, isCut, run.IsWhole);
    }

    private BigInteger Sum(Func<int, int> factor) => Counts.Select((count, index) => count * factor(index)).Aggregate(BigInteger.Zero, (sum, part) => sum + part);

    // A list of moves for each shape is the fastest where shapes are few; where they are many, each state finds its own.
    private static CensusSpace SpaceOf(Shape shape, Metric metric, PruningMoves moves, int maxStates, int fewShapes, CancellationToken cancellation)
    {
        var shapes = new ShapeStore(shape.Mechanism.Board.Words);
        shapes.FindOrAdd<ManyWords>(shape.Key);
        var key = new ulong[shape.Key.Length];
        var next = new ulong[shape.Key.Length];
        for (var i = 0; i < shapes.Count && shapes.Count <= fewShapes; i++)
        {
            shapes.Key(i).CopyTo(key);
            foreach (var step in shape.Mechanism.Board.Moves)
            {
                if (step.IsFree(key))
                {
                    step.Move(key, next);
                    shapes.FindOrAdd<ManyWords>(next);
                }
            }
        }

        return shapes.Count <= fewShapes
            ? new CensusClasses(shape.Mechanism, metric, moves, shapes.Count == 1 ? 0 : BitOperations.Log2((uint)shapes.Count - 1) + 1, maxStates, cancellation)
            : CensusClasses.Joins(shape.Mechanism, moves)
                ? new CensusClasses(shape.Mechanism, metric, moves, 31, maxStates, cancellation)
                : new CensusStates(shape.Mechanism, metric, moves);
    }

    // Labels are counted from where they are, so the state at the start is that of its shape with none displaced.
    private sealed class Run(CensusSpace space, int greatest, int maxStates, CancellationToken cancellation)
    {
        private readonly ShapeStore _store = new(space.Words);
        private readonly ulong[] _key = new ulong[space.Words];

        public List<BigInteger> Counts { get; } = [];

        public bool IsWhole { get; private set; }

        public bool ByLevels(Shape shape)
        {
            Start(shape);
            for (var (first, end) = (0, 1); ; (first, end) = (end, _store.Count))
            {
                var count = BigInteger.Zero;
                for (var node = first; node < end; node++)
                {
                    count += space.SizeOf(_store.Key(node));
                }

                Counts.Add(count);
                if (Counts.Count > greatest)
                {
                    IsWhole = AreAllKnown(first, static _ => true);
                    return true;
                }

                for (var node = first; node < end; node++)
                {
                    Expand(node);
                    for (var i = 0; i < space.Count; i++)
                    {
                        _store.FindOrAdd<ManyWords>(space[i]);
                    }

                    if (IsOver())
                    {
                        return false;
                    }
                }

                if (_store.Count == end)
                {
                    IsWhole = true;
                    return true;
                }
            }
        }

        // Dijkstra's algorithm with a list of nodes for each of the distances that one move can lead to.
        public bool ByWeights(Shape shape)
        {
            Start(shape);
            var distances = new List<int> { 0 };
            var waiting = Enumerable.Range(0, space.GreatestCost + 1).Select(_ => new List<int>()).ToArray();
            waiting[0].Add(0);
            var isCutShort = false;
            var waitingCount = 1L;
            for (var distance = 0; waitingCount > 0; distance++)
            {
                var count = BigInteger.Zero;
                var here = waiting[distance % waiting.Length];
                for (var at = 0; at < here.Count; at++)
                {
                    var node = here[at];
                    if (distances[node] != distance)
                    {
                        continue;
                    }

                    count += space.SizeOf(_store.Key(node));
                    Expand(node);
                    for (var i = 0; i < space.Count; i++)
                    {
                        if (space.CostOf(i) > greatest - distance)
                        {
                            isCutShort = true;
                            continue;
                        }

                        var there = distance + space.CostOf(i);
                        var number = _store.FindOrAdd<ManyWords>(space[i]);
                        if (number == distances.Count)
                        {
                            distances.Add(int.MaxValue);
                        }

                        if (there < distances[number])
                        {
                            distances[number] = there;
                            waiting[there % waiting.Length].Add(number);
                            waitingCount++;
                        }
                    }

                    if (IsOver())
                    {
                        return false;
                    }
                }

                waitingCount -= here.Count;
                here.Clear();
                Counts.Add(count);
            }

            IsWhole = !isCutShort || AreAllKnown(0, node => distances[node] > greatest - space.GreatestCost);
            while (IsWhole && Counts[^1].IsZero)
            {
                Counts.RemoveAt(Counts.Count - 1);
            }

            // Nothing lies between the last distance found and the greatest asked for.
            while (!IsWhole && Counts.Count <= greatest)
            {
                Counts.Add(BigInteger.Zero);
            }

            return true;
        }

        private void Start(Shape shape)
        {
            space.Start(shape, _key);
            _store.FindOrAdd<ManyWords>(_key);
        }

        // A store that grows moves its keys, so the key is copied.
        private void Expand(int node)
        {
            if (node % 1024 == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            _store.Key(node).CopyTo(_key);
            space.Expand(_key);
        }

        // The last nodes first, for these are likely to lead on.
        private bool AreAllKnown(int first, Predicate<int> isNearTheEnd)
        {
            for (var node = _store.Count - 1; node >= first; node--)
            {
                if (!isNearTheEnd(node))
                {
                    continue;
                }

                Expand(node);
                for (var i = 0; i < space.Count; i++)
                {
                    if (_store.Find(space[i]) < 0)
                    {
                        return false;
                    }
                }
            }

            return true;
        }

        private bool IsOver() => Math.Max(_store.Count, space.HeldShapes) > maxStates;
    }
}
