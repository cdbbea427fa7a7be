using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Fusecraft.Solving;

/// <summary>
/// Breadth-first search that fills a <see cref="ResidueTable"/>. The first levels are lists of states whose neighbours are looked up one by one. In later ones each row that is not full asks the rows of its neighbours
/// whose states were reached last, a word at a time; so a thread writes its own rows only, and the outcome does not depend on the threads.
/// </summary>
internal sealed class ResidueSearch
{
    /// <summary>The first levels, as long as they have fewer than one in so many states, are lists.</summary>
    private const int ListShare = 2048;
    private const int RowsAPiece = 16;
    private readonly RowTable _moves;
    private readonly ResidueTable _table;
    private readonly int[] _unreached;
    private readonly ParallelOptions _options;
    private readonly IProgress<DistanceProgress>? _progress;
    private readonly List<long> _counts = [];

    // For each row whether states of the last level, and of the one being made, lie in it.
    private byte[] _holdsLast;
    private byte[] _holdsNext;
    private long _reached;

    private ResidueSearch(RowTable moves, int threads, IProgress<DistanceProgress>? progress, CancellationToken cancellation)
    {
        _moves = moves;
        _table = new ResidueTable(moves.RowCount, moves.RowStates);
        _unreached = new int[moves.RowCount];
        Array.Fill(_unreached, moves.RowStates);
        _holdsLast = new byte[moves.RowCount];
        _holdsNext = new byte[moves.RowCount];
        _options = new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancellation };
        _progress = progress;
    }

    /// <summary>Fills a table from some states at distance 0.</summary>
    /// <param name="moves">Moves each of which has a reverse.</param>
    /// <param name="starts">The states, each once.</param>
    /// <param name="threads">The degree of parallelism.</param>
    /// <param name="progress">Told of each level.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <returns>The table and the number of states at each distance.</returns>
    public static (ResidueTable Table, List<long> Counts) Run(
        RowTable moves, IEnumerable<long> starts, int threads, IProgress<DistanceProgress>? progress, CancellationToken cancellation)
    {
        var search = new ResidueSearch(moves, threads, progress, cancellation);
        search.Run(starts);
        return (search._table, search._counts);
    }

    private void Run(IEnumerable<long> starts)
    {
        var level = new List<long>();
        foreach (var state in starts)
        {
            Reach(state, 0, level);
        }

        // Older states of the same residue are asked along with the last level's; they bring nothing new. So a list once given up cannot be had again.
        List<long>? list = level;
        for (long count = level.Count; count > 0;)
        {
            _counts.Add(count);
            _reached += count;
            _progress?.Report(new DistanceProgress(_counts.Count - 1, _reached, _moves.StateCount));
            _options.CancellationToken.ThrowIfCancellationRequested();
            (_holdsLast, _holdsNext) = (_holdsNext, _holdsLast);
            _holdsNext.AsSpan().Clear();
            if (list is not null && count * ListShare < _moves.StateCount)
            {
                list = Expand(list);
                count = list.Count;
            }
            else
            {
                list = null;
                count = Pull();
            }
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private List<long> Expand(List<long> level)
    {
        var next = new List<long>();
        for (var i = 0; i < level.Count; i++)
        {
            if (i % 65536 == 65535)
            {
                _options.CancellationToken.ThrowIfCancellationRequested();
            }

            for (var slot = 0; slot < _moves.Slots; slot++)
            {
                var state = _moves.After(level[i], slot);
                if (state >= 0)
                {
                    Reach(state, _counts.Count, next);
                }
            }
        }

        return next;
    }

    private void Reach(long state, int distance, List<long> level)
    {
        var (row, within) = Math.DivRem(state, _moves.RowStates);
        if (_table.Code(row, (int)within) == 0)
        {
            _table.Set(row, (int)within, ResidueTable.CodeOf(distance));
            _unreached[row]--;
            _holdsNext[row] = 1;
            level.Add(state);
        }
    }

    private long Pull()
    {
        var total = 0L;
        var pieces = (_moves.RowCount + RowsAPiece - 1) / RowsAPiece;
        Parallel.For(
            0,
            pieces,
            _options,
            () => new RowPuller(this),
            (piece, _, puller) =>
            {
                puller.Pull(piece * RowsAPiece, Math.Min(_moves.RowCount, (piece + 1) * RowsAPiece));
                return puller;
            },
            puller => Interlocked.Add(ref total, puller.Count));
        return total;
    }

    /// <summary>The bytes that hold a bit for each state of a word.</summary>
    private interface IByteCount
    {
        static abstract uint Count { get; }
    }

    private readonly struct One : IByteCount
    {
        public static uint Count => 1;
    }

    private readonly struct Two : IByteCount
    {
        public static uint Count => 2;
    }

    private readonly struct Three : IByteCount
    {
        public static uint Count => 3;
    }

    private readonly struct Four : IByteCount
    {
        public static uint Count => 4;
    }

    /// <summary>Makes a level for some rows, with memory of its own.</summary>
    private sealed class RowPuller
    {
        // Reading a word past the last element of the bits must stay inside.
        private const int Slack = 2;
        private readonly ResidueSearch _search;
        private readonly RowTable _moves;
        private readonly uint[] _source;
        private readonly uint[] _words;
        private readonly uint[] _bits;
        private readonly int _lastCode;
        private readonly int _nextCode;

        public RowPuller(ResidueSearch search)
        {
            _search = search;
            _moves = search._moves;
            _source = new uint[search._table.RowElements + Slack];
            _words = new uint[_moves.WordCount];
            _bits = new uint[search._table.RowElements + Slack];
            _lastCode = ResidueTable.CodeOf(search._counts.Count - 1);
            _nextCode = ResidueTable.CodeOf(search._counts.Count);
        }

        /// <summary>The number of states reached.</summary>
        public long Count { get; private set; }

        public void Pull(int from, int to)
        {
            for (var row = from; row < to; row++)
            {
                if (_search._unreached[row] == 0 || !Gather(row))
                {
                    continue;
                }

                Pack();
                var reached = _search._table.Reach(row, _bits, _nextCode);
                if (reached > 0)
                {
                    _search._unreached[row] -= reached;
                    _search._holdsNext[row] = 1;
                    Count += reached;
                }
            }
        }

        // Every neighbour by a move is also a neighbour by its reverse, so it is enough to ask where the moves lead.
        private bool Gather(int row)
        {
            var any = false;
            for (var slot = 0; slot < _moves.Slots; slot++)
            {
                var source = _moves.TargetRow(row, slot);
                if (source < 0 || _search._holdsLast[source] == 0)
                {
                    continue;
                }

                if (!any)
                {
                    _words.AsSpan().Clear();
                    any = true;
                }

                _search._table.CopyBits(source, _lastCode, _source);
                switch (_moves.WordBytes)
                {
                    case 1: Add<One>(_moves.WordMap(row, slot)); break;
                    case 2: Add<Two>(_moves.WordMap(row, slot)); break;
                    case 3: Add<Three>(_moves.WordMap(row, slot)); break;
                    default: Add<Four>(_moves.WordMap(row, slot)); break;
                }
            }

            return any;
        }

        // The number of bytes is a constant of the compiled code, so what a shorter word does not need is not there.
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        private void Add<TBytes>(ReadOnlySpan<uint> map)
            where TBytes : struct, IByteCount
        {
            ref var source = ref Unsafe.As<uint, byte>(ref MemoryMarshal.GetArrayDataReference(_source));
            ref var gather = ref MemoryMarshal.GetReference(_moves.Gather);
            ref var words = ref MemoryMarshal.GetArrayDataReference(_words);
            var mask = (1ul << _moves.WordStates) - 1;
            for (var i = 0; i < map.Length; i++)
            {
                var entry = map[i];
                var first = entry >> 5;
                var bits = (Unsafe.ReadUnaligned<ulong>(ref Unsafe.Add(ref source, first >> 3)) >> (int)(first & 7)) & mask;
                ref var table = ref Unsafe.Add(ref gather, ((entry & 31) * TBytes.Count) << 8);
                var word = Unsafe.Add(ref table, (uint)bits & 255);
                if (TBytes.Count > 1)
                {
                    word |= Unsafe.Add(ref table, 256 + (((uint)bits >> 8) & 255));
                }

                if (TBytes.Count > 2)
                {
                    word |= Unsafe.Add(ref table, 512 + (((uint)bits >> 16) & 255));
                }

                if (TBytes.Count > 3)
                {
                    word |= Unsafe.Add(ref table, 768 + ((uint)bits >> 24));
                }

                Unsafe.Add(ref words, i) |= word;
            }
        }

        // From a number a word to a bit a state.
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        private void Pack()
        {
            var (held, filled, to) = (0UL, 0, 0);
            for (var i = 0; i < _words.Length; i++)
            {
                held |= (ulong)_words[i] << filled;
                filled += _moves.WordStates;
                if (filled >= 32)
                {
                    _bits[to++] = (uint)held;
                    held >>= 32;
                    filled -= 32;
                }
            }

            _bits[to] = (uint)held;
        }
    }
}
