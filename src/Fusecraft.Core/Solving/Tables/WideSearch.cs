using System.Numerics;
using System.Runtime.CompilerServices;

namespace Fusecraft.Solving;

/// <summary>
/// Shortest distances over moves of any costs from 0 on, distance by distance: the states of a distance hand it on, first along moves of cost 0 until nothing changes, then along the others, one cost after the
/// other, so that all threads write the same number wherever they meet and the outcome does not depend on them.
/// </summary>
/// <remarks>Source: the bucket search of R. B. Dial, <em>Algorithm 360: shortest-path forest with topological ordering</em>, Comm. ACM 12 (1969) (from memory), with the table itself in place of buckets.</remarks>
internal sealed class WideSearch<T>
    where T : unmanaged, IBinaryInteger<T>, IMinMaxValue<T>
{
    private const int RowsAPiece = 64;
    private readonly RowTable _table;
    private readonly MoveSet _moves;
    private readonly int _rowsAShape;
    private readonly TableMemory _distances;
    private readonly ParallelOptions _options;
    private readonly IProgress<DistanceProgress>? _progress;
    private readonly List<long> _counts = [];

    private WideSearch(RowTable table, MoveSet moves, int shapeCount, int threads, IProgress<DistanceProgress>? progress, CancellationToken cancellation)
    {
        _table = table;
        _moves = moves;
        _rowsAShape = table.RowCount / shapeCount;
        _distances = TableMemory.Allocate(table.StateCount * Unsafe.SizeOf<T>());
        for (var row = 0; row < table.RowCount; row++)
        {
            Row(row).Fill(T.MaxValue);
        }

        _options = new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancellation };
        _progress = progress;
    }

    /// <summary>Finds the distances from some states along the moves.</summary>
    /// <param name="table">What the moves do.</param>
    /// <param name="moves">The moves themselves, for their costs.</param>
    /// <param name="shapeCount">The number of shapes.</param>
    /// <param name="starts">The states at distance 0.</param>
    /// <param name="threads">The degree of parallelism.</param>
    /// <param name="progress">Told of each distance.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <returns>The distances and how many states have each; null where one does not fit the numbers.</returns>
    public static (WideTable Table, List<long> Counts)? Run(
        RowTable table, MoveSet moves, int shapeCount, IEnumerable<long> starts, int threads, IProgress<DistanceProgress>? progress, CancellationToken cancellation)
    {
        var search = new WideSearch<T>(table, moves, shapeCount, threads, progress, cancellation);
        return search.Run(starts) ? (new WideTable(search._distances, Unsafe.SizeOf<T>()), search._counts) : null;
    }

    private bool Run(IEnumerable<long> starts)
    {
        foreach (var state in starts)
        {
            _distances.At<T>(state) = T.Zero;
        }

        // Without any move the states at distance 0 are to be counted all the same.
        int[] costs = _moves.Moves.IsEmpty ? [1] : [.. _moves.Moves.Select(move => move.Cost).Distinct().Order()];
        var greatest = costs[^1];
        var reached = 0L;
        for (var (distance, empty) = (0, 0); empty <= greatest; distance++)
        {
            if (distance + greatest >= int.CreateTruncating(T.MaxValue))
            {
                return false;
            }

            var count = 0L;
            if (costs.Contains(0))
            {
                for (var before = -1L; count != before;)
                {
                    (before, count) = (count, Spread(distance, 0));
                }
            }

            foreach (var cost in costs)
            {
                if (cost > 0)
                {
                    count = Spread(distance, cost);
                }
            }

            empty = count == 0 ? empty + 1 : 0;
            reached += count;
            _counts.Add(count);
            _progress?.Report(new DistanceProgress(distance, reached, _table.StateCount));
        }

        while (_counts.Count > 0 && _counts[^1] == 0)
        {
            _counts.RemoveAt(_counts.Count - 1);
        }

        return true;
    }

    // Hands a distance on along the moves of one cost; returns how many states had it.
    private long Spread(int distance, int cost)
    {
        var total = 0L;
        Parallel.For(
            0,
            (_table.RowCount + RowsAPiece - 1) / RowsAPiece,
            _options,
            () => 0L,
            (piece, _, count) =>
            {
                for (var row = piece * RowsAPiece; row < Math.Min(_table.RowCount, (piece + 1) * RowsAPiece); row++)
                {
                    count += SpreadRow(row, distance, cost);
                }

                return count;
            },
            count => Interlocked.Add(ref total, count));
        return total;
    }

    private int SpreadRow(int row, int distance, int cost)
    {
        var sought = T.CreateTruncating(distance);
        var next = T.CreateTruncating(distance + cost);
        var states = Row(row);
        var place = row / _rowsAShape;
        var count = 0;
        for (var at = states.IndexOf(sought); at >= 0;)
        {
            count++;
            for (var slot = 0; slot < _table.Slots; slot++)
            {
                var target = _table.TargetRow(row, slot);
                if (target >= 0 && _moves.MoveAt(place, slot).Cost == cost)
                {
                    ref var other = ref _distances.At<T>(((long)target * _table.RowStates) + _table.After(row, at, slot));
                    if (other > next)
                    {
                        other = next;
                    }
                }
            }

            var further = states[(at + 1)..].IndexOf(sought);
            at = further < 0 ? -1 : at + 1 + further;
        }

        return count;
    }

    private Span<T> Row(int row) => _distances.Slice<T>((long)row * _table.RowStates, _table.RowStates);
}
