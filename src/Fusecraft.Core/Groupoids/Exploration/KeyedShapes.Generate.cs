using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics.X86;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

// Successors: free steps, moves, and a first look whether they are known.
internal sealed partial class KeyedShapes<TWidth>
{
    /// <summary>Byte tables pay beyond so many shapes.</summary>
    private const int ByteTableShapes = 512;

    /// <summary>So many shapes have their successors looked up together.</summary>
    private const int Batch = 32;

    private readonly StepMoves[] _moves;
    private readonly int[] _turnOf;
    private readonly bool[] _isForward;

    // For each step the number of a name that it shares, or -1; null where there is no such name.
    private readonly int[]? _names;

    public override void Generate(int first, int end, Candidates candidates)
    {
        candidates.Reset(first, (end - first) * _moves.Length, TWidth.Words(Words));
        var tables = typeof(TWidth) == typeof(OneWord) && Count >= ByteTableShapes ? Mechanism.Board.ByteTables : null;
        var isCached = Count <= CachedShapes;
        Span<int> lastOfName = _names is null ? [] : new int[_moves.Length];
        lastOfName.Fill(-1);
        for (var start = first; start < end; start += Batch)
        {
            var stop = Math.Min(end, start + Batch);
            var known = candidates.Count;
            if (tables is null)
            {
                GenerateByMoves(start, stop, candidates, lastOfName);
            }
            else
            {
                GenerateByTables(tables, start, stop, candidates);
            }

            if (!isCached)
            {
                DropKnown(known, candidates);
            }
        }
    }

    private static int[]? SharedNames(Mechanism mechanism)
    {
        int[]? names = null;
        var count = 0;
        foreach (var steps in mechanism.StepNames.Shared)
        {
            if (names is null)
            {
                names = new int[mechanism.Steps.Length];
                Array.Fill(names, -1);
            }

            foreach (var step in steps)
            {
                names[step.Index] = count;
            }

            count++;
        }

        return names;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void GenerateByMoves(int start, int stop, Candidates candidates, Span<int> lastOfName)
    {
        var words = TWidth.Words(Words);
        var count = candidates.Count;
        var records = candidates.Records;
        for (var shape = start; shape < stop; shape++)
        {
            var key = _keys.Entry(shape);
            var (freeForward, freeTurns, lastTurn) = (0, 0, -1);
            for (var step = 0; step < _moves.Length; step++)
            {
                if (!_moves[step].IsFree<TWidth>(key))
                {
                    continue;
                }

                freeForward += _isForward[step] ? 1 : 0;
                freeTurns += _turnOf[step] != lastTurn ? 1 : 0;
                lastTurn = _turnOf[step];
                if (_names is not null && _names[step] is >= 0 and var name)
                {
                    candidates.Clash = lastOfName[name] == shape && candidates.Clash < 0 ? shape : candidates.Clash;
                    lastOfName[name] = shape;
                }

                var next = records.AsSpan(count * words, words);
                _moves[step].Move<TWidth>(key, next);
                Put(candidates, count++, Hash(ref MemoryMarshal.GetReference(next)), shape, step);
            }

            candidates.Note(freeForward, freeTurns);
        }

        candidates.Count = count;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void GenerateByTables(ByteTables tables, int start, int stop, Candidates candidates)
    {
        var masks = Mechanism.Board.Masks!;
        var count = candidates.Count;
        var records = candidates.Records;
        for (var shape = start; shape < stop; shape++)
        {
            var key = _keys.At(shape);
            var free = tables.FreeSteps(key);
            candidates.Note(masks.FreeForwardSteps(free), masks.FreeTurns(free));
            candidates.Clash = candidates.Clash < 0 && masks.Clash(free) ? shape : candidates.Clash;
            for (; free != 0; free &= free - 1)
            {
                var step = BitOperations.TrailingZeroCount(free);
                records[count] = tables.Move(step, key);
                Put(candidates, count, Hash(ref records[count]), shape, step);
                count++;
            }
        }

        candidates.Count = count;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void Put(Candidates candidates, int at, ulong hash, int shape, int step)
    {
        candidates.Hashes[at] = hash;
        candidates.Origins[at] = ((uint)(shape - candidates.First) << 16) | (uint)step;
    }

    // Look-ups in three rounds, each announcing what the next one reads: table lines, keys, comparison.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private unsafe void DropKnown(int from, Candidates candidates)
    {
        var words = TWidth.Words(Words);
        var (records, hashes, origins) = (candidates.Records, candidates.Hashes, candidates.Origins);
        for (var i = from; i < candidates.Count; i++)
        {
            Announce(hashes[i]);
        }

        if (Sse.IsSupported)
        {
            for (var i = from; i < candidates.Count; i++)
            {
                var entry = _table[hashes[i] >> _shift];
                if (entry != 0 && entry >> 32 == Tag(hashes[i]))
                {
                    Sse.Prefetch0(Unsafe.AsPointer(ref _keys.At((int)(uint)entry - 1)));
                }
            }
        }

        var kept = from;
        for (var i = from; i < candidates.Count; i++)
        {
            if (Find(hashes[i], ref records[i * words]) < 0)
            {
                records.AsSpan(i * words, words).CopyTo(records.AsSpan(kept * words, words));
                hashes[kept] = hashes[i];
                origins[kept++] = origins[i];
            }
        }

        candidates.Count = kept;
    }
}
