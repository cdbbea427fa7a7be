using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>How many states there are at each distance from one, up to a greatest distance: a breadth-first search over states packed into few bits, for spaces too large for a complete table.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class DepthCensus
{
    private DepthCensus(Metric metric, int unit, List<long> counts, bool isCut, bool isWhole)
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
    public ImmutableArray<long> Counts { get; }

    /// <summary>True where the budget of states ended the census before the distance asked for; the distances it could not finish are left out.</summary>
    public bool IsCut { get; }

    /// <summary>True where the census met no state that it did not count, so that all states are counted; false where some lie beyond, or where it did not look beyond the greatest distance.</summary>
    public bool IsWhole { get; }

    /// <summary>Counts states by their distance from one.</summary>
    /// <param name="from">A state with a shape.</param>
    /// <param name="greatest">The greatest distance that is counted, by the metric.</param>
    /// <param name="metric">How length is counted; null for steps. Weights may be 0.</param>
    /// <param name="maxStates">The most states that are held; each takes the words of its packed form, 16 bytes on a 3x3x3, and 8 bytes, with weights 8 more.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">The state has no shape, or the metric weighs turns that are not there.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The distance is negative, or the budget below 1.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static DepthCensus Take(State from, int greatest, Metric? metric = null, int maxStates = 50_000_000, CancellationToken cancellationToken = default)
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
        var run = new Run(new StateNeighbours(from.Mechanism, metric), moves.Weights, greatest / moves.Unit, maxStates, cancellationToken);
        var isCut = !(moves.IsUniform ? run.ByLevels(from.Shape) : run.ByWeights(from.Shape));
        return new DepthCensus(metric, moves.Unit, run.Counts, isCut, run.IsWhole);
    }

    // Labels are counted from where they are, so the state at the start is that of its shape with none displaced.
    private sealed class Run(StateNeighbours neighbours, int[] weights, int greatest, int maxStates, CancellationToken cancellation)
    {
        private readonly ShapeStore _store = new(neighbours.Words);
        private readonly ulong[] _key = new ulong[neighbours.Words];

        public List<long> Counts { get; } = [];

        public bool IsWhole { get; private set; }

        public bool ByLevels(Shape shape)
        {
            Start(shape);
            Counts.Add(1);
            for (var (start, end) = (0, 1); Counts.Count <= greatest; (start, end) = (end, _store.Count))
            {
                for (var state = start; state < end; state++)
                {
                    for (var group = 0; group < neighbours.GroupCount; group++)
                    {
                        var found = neighbours.Find(_store.Key(state), group, isForward: true);
                        for (var i = 1; i < found; i++)
                        {
                            _store.FindOrAdd<ManyWords>(neighbours[i]);
                        }
                    }

                    if (IsOver(state))
                    {
                        return false;
                    }
                }

                IsWhole = _store.Count == end;
                if (IsWhole)
                {
                    return true;
                }

                Counts.Add(_store.Count - end);
            }

            return true;
        }

        // Dijkstra's algorithm with a list of states for each distance.
        public bool ByWeights(Shape shape)
        {
            Start(shape);
            var distances = new List<int> { 0 };
            var waiting = Enumerable.Range(0, greatest + 1).Select(_ => new List<int>()).ToArray();
            waiting[0].Add(0);
            var next = new ulong[neighbours.Words];
            IsWhole = true;
            for (var distance = 0; distance <= greatest; distance++)
            {
                var count = 0L;
                for (var i = 0; i < waiting[distance].Count; i++)
                {
                    var state = waiting[distance][i];
                    if (distances[state] != distance)
                    {
                        continue;
                    }

                    count++;
                    _store.Key(state).CopyTo(_key);
                    for (var step = 0; step < weights.Length; step++)
                    {
                        if (!neighbours.Keys.TryMove<ManyWords>(step, _key, next))
                        {
                            continue;
                        }

                        var there = distance + weights[step];
                        if (there > greatest)
                        {
                            IsWhole &= _store.Find(next) >= 0;
                            continue;
                        }

                        var known = _store.Count;
                        var number = _store.FindOrAdd<ManyWords>(next);
                        if (number == known)
                        {
                            distances.Add(int.MaxValue);
                        }

                        if (there < distances[number])
                        {
                            distances[number] = there;
                            waiting[there].Add(number);
                        }
                    }

                    if (IsOver(i))
                    {
                        IsWhole = false;
                        return false;
                    }
                }

                waiting[distance] = [];
                Counts.Add(count);
            }

            return true;
        }

        private void Start(Shape shape)
        {
            neighbours.Keys.TryPack(shape.Key, default, _key);
            _store.FindOrAdd<ManyWords>(_key);
        }

        private bool IsOver(int state)
        {
            if (state % 1024 == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            return _store.Count > maxStates;
        }
    }
}
