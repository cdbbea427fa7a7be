using System.Numerics;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// Fills distances to the base over all pairs of two coordinates, level by level over the reversed steps. An outer coordinate picks a row of the inner one's values; as steps take rows to rows, little memory is touched at a time.
/// While few entries are far, those of the last level hand on; once few are unseen, these ask for neighbours of the last level.
/// </summary>
internal sealed class PruningSweep<TCells>
    where TCells : struct, IDistanceCells
{
    private readonly TCells _cells;
    private readonly StepArrays _outer;
    private readonly StepArrays _inner;
    private readonly PruningMoves _moves;
    private readonly int _threads;
    private readonly CancellationToken _cancellation;

    public PruningSweep(TCells cells, StepArrays outer, StepArrays inner, PruningMoves moves, int threads, CancellationToken cancellation)
    {
        _cells = cells;
        _outer = outer;
        _inner = inner;
        _moves = moves;
        _threads = threads;
        _cancellation = cancellation;
    }

    /// <summary>How many entries are at each distance, by units of the metric.</summary>
    public List<long> Counts { get; } = [];

    /// <summary>True where distances beyond the last one were left out because the cells do not hold them.</summary>
    public bool IsCut { get; private set; }

    private long EntryCount => (long)_outer.Count * _inner.Count;

    public void Run()
    {
        _cells.Set(0, 0);
        if (_moves.IsUniform)
        {
            RunUniform();
        }
        else
        {
            RunWeighted();
        }
    }

    private void RunUniform()
    {
        var seen = 1L;
        Counts.Add(1);
        for (var distance = 0; Counts[distance] > 0; distance++)
        {
            if (distance + 1 == TCells.Unseen)
            {
                IsCut = true;
                return;
            }

            var pulls = Counts[distance] > EntryCount - seen;
            var found = ForRows(pulls ? row => Pull(row, distance) : row => Push(row, distance));

            // Several may set one entry, so those set are counted afterwards.
            if (!pulls)
            {
                found = ForRows(row => Count(row, distance + 1));
            }

            Counts.Add(found);
            seen += found;
        }

        Counts.RemoveAt(Counts.Count - 1);
    }

    private long ForRows(Func<Row, long> work)
    {
        _cancellation.ThrowIfCancellationRequested();
        if (_threads == 1 || EntryCount < 1 << 16)
        {
            var row = new Row(_inner.Count);
            var sum = 0L;
            for (row.Outer = 0; row.Outer < _outer.Count; row.Outer++)
            {
                sum += work(row);
            }

            return sum;
        }

        var total = 0L;
        var chunk = Math.Clamp((1 << 15) / _inner.Count, 1, 1 + (_outer.Count / (8 * _threads)));
        Parallel.For(
            0,
            (_outer.Count + chunk - 1) / chunk,
            new ParallelOptions { MaxDegreeOfParallelism = _threads, CancellationToken = _cancellation },
            () => new Row(_inner.Count),
            (part, _, row) =>
            {
                var end = Math.Min(_outer.Count, (part + 1) * chunk);
                for (row.Outer = part * chunk; row.Outer < end; row.Outer++)
                {
                    row.Sum += work(row);
                }

                return row;
            },
            row => Interlocked.Add(ref total, row.Sum));
        return total;
    }

    private long Count(Row row, int distance) => _cells.Collect((long)row.Outer * _inner.Count, _inner.Count, distance, row.Start);

    // The entries of a row at a distance set those one move before them.
    private long Push(Row row, int distance)
    {
        var count = _cells.Collect((long)row.Outer * _inner.Count, _inner.Count, distance, row.Start);
        if (count == 0)
        {
            return 0;
        }

        foreach (var chain in _moves.Chains)
        {
            if (!PushChain(row, count, chain.Step, chain.Length, distance) && chain.Back >= 0)
            {
                PushChain(row, count, chain.Back, chain.Length, distance);
            }
        }

        foreach (var steps in _moves.Tangles)
        {
            for (var i = 0; i < count; i++)
            {
                foreach (var (outer, inner) in row.Tangle(row.Outer, row.Start[i], steps, _outer.Before, _inner.Before))
                {
                    SetIfUnseen(((long)outer * _inner.Count) + inner, distance + 1);
                }
            }
        }

        return count;
    }

    // False where a barred step ended it.
    private bool PushChain(Row row, int count, int step, int length, int distance)
    {
        var outer = row.Outer;
        var before = _inner.Before[step];
        var isWhole = true;
        row.Start.AsSpan(0, count).CopyTo(row.At);
        for (var j = 0; j < length; j++)
        {
            outer = _outer.Before[step][outer];
            if (outer < 0)
            {
                return false;
            }

            // Where one part alone knows of shapes, it alone may be barred.
            var start = (long)outer * _inner.Count;
            foreach (ref var inner in row.At.AsSpan(0, count))
            {
                inner = inner < 0 ? -1 : before[inner];
                if (inner < 0)
                {
                    isWhole = false;
                }
                else
                {
                    SetIfUnseen(start + inner, distance + 1);
                }
            }
        }

        return isWhole;
    }

    private void SetIfUnseen(long entry, int distance)
    {
        if (_cells.Get(entry) == TCells.Unseen)
        {
            _cells.Set(entry, distance);
        }
    }

    // The unseen entries of a row look for one of the last level one move ahead.
    private long Pull(Row row, int distance)
    {
        var unseen = _cells.Collect((long)row.Outer * _inner.Count, _inner.Count, TCells.Unseen, row.Start);
        var left = unseen;
        foreach (var chain in _moves.Chains)
        {
            if (!PullChain(row, ref left, chain.Step, chain.Length, distance) && chain.Back >= 0)
            {
                PullChain(row, ref left, chain.Back, chain.Length, distance);
            }
        }

        foreach (var steps in _moves.Tangles)
        {
            for (var i = left - 1; i >= 0; i--)
            {
                foreach (var (outer, inner) in row.Tangle(row.Outer, row.Start[i], steps, _outer.After, _inner.After))
                {
                    if (_cells.Get(((long)outer * _inner.Count) + inner) == distance)
                    {
                        Found(row, ref left, i, distance);
                        break;
                    }
                }
            }
        }

        return unseen - left;
    }

    private bool PullChain(Row row, ref int left, int step, int length, int distance)
    {
        var outer = row.Outer;
        var after = _inner.After[step];
        var isWhole = true;
        row.Start.AsSpan(0, left).CopyTo(row.At);
        for (var j = 0; j < length; j++)
        {
            outer = _outer.After[step][outer];
            if (outer < 0)
            {
                return false;
            }

            var start = (long)outer * _inner.Count;
            for (var i = left - 1; i >= 0; i--)
            {
                var inner = row.At[i] < 0 ? -1 : after[row.At[i]];
                row.At[i] = inner;
                isWhole &= inner >= 0;
                if (inner >= 0 && _cells.Get(start + inner) == distance)
                {
                    row.At[i] = row.At[left - 1];
                    Found(row, ref left, i, distance);
                }
            }
        }

        return isWhole;
    }

    private void Found(Row row, ref int left, int i, int distance)
    {
        _cells.Set(((long)row.Outer * _inner.Count) + row.Start[i], distance + 1);
        row.Start[i] = row.Start[--left];
    }

    // Dijkstra's algorithm with distances for buckets; steps without weight are followed at once.
    private void RunWeighted()
    {
        var row = new Row(_inner.Count);
        var stack = new Stack<long>();
        for (var distance = 0; distance < TCells.Unseen; distance++)
        {
            _cancellation.ThrowIfCancellationRequested();
            for (var outer = 0; outer < _outer.Count; outer++)
            {
                var start = (long)outer * _inner.Count;
                var count = _cells.Collect(start, _inner.Count, distance, row.Start);
                foreach (var inner in row.Start.AsSpan(0, count))
                {
                    stack.Push(start + inner);
                }

                while (stack.TryPop(out var entry))
                {
                    Relax(entry, distance, stack);
                }
            }

            row.Sum = 0;
            for (row.Outer = 0; row.Outer < _outer.Count; row.Outer++)
            {
                row.Sum += Count(row, distance);
            }

            Counts.Add(row.Sum);
        }

        while (Counts.Count > 1 && Counts[^1] == 0)
        {
            Counts.RemoveAt(Counts.Count - 1);
        }
    }

    private void Relax(long entry, int distance, Stack<long> stack)
    {
        var (outer, inner) = ((int)(entry / _inner.Count), (int)(entry % _inner.Count));
        for (var step = 0; step < _moves.Weights.Length; step++)
        {
            var (outerBefore, innerBefore) = (_outer.Before[step][outer], _inner.Before[step][inner]);
            if (outerBefore < 0 || innerBefore < 0)
            {
                continue;
            }

            var before = ((long)outerBefore * _inner.Count) + innerBefore;
            var there = distance + _moves.Weights[step];
            if (there >= TCells.Unseen)
            {
                IsCut |= _cells.Get(before) == TCells.Unseen;
            }
            else if (there < _cells.Get(before))
            {
                _cells.Set(before, there);
                if (there == distance)
                {
                    stack.Push(before);
                }
            }
        }
    }

    private sealed class Row(int length)
    {
        private readonly List<(int Outer, int Inner)> _met = [];

        public int Outer { get; set; }

        public long Sum { get; set; }

        public int[] Start { get; } = new int[length];

        public int[] At { get; } = new int[length];

        /// <summary>All that some steps lead to in any order and number, but for where they start.</summary>
        public ReadOnlySpan<(int Outer, int Inner)> Tangle(int outer, int inner, int[] steps, int[][] outerSteps, int[][] innerSteps)
        {
            _met.Clear();
            _met.Add((outer, inner));
            for (var i = 0; i < _met.Count; i++)
            {
                foreach (var step in steps)
                {
                    var next = (outerSteps[step][_met[i].Outer], innerSteps[step][_met[i].Inner]);
                    if (next.Item1 >= 0 && next.Item2 >= 0 && !_met.Contains(next))
                    {
                        _met.Add(next);
                    }
                }
            }

            return System.Runtime.InteropServices.CollectionsMarshal.AsSpan(_met)[1..];
        }
    }
}
