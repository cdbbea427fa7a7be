using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

// Successors: free steps, sums, and a look at the bits. In rounds over a few shapes, each announcing to the memory what the next one reads.
internal sealed partial class ProductShapes<T>
{
    private const int Batch = 64;

    public override void Generate(int first, int end, Candidates candidates)
    {
        candidates.Reset(first, (end - first) * _steps, 1);
        Span<int> positions = stackalloc int[Batch * _parts.Length];
        for (var start = first; start < end; start += Batch)
        {
            var stop = Math.Min(end, start + Batch);
            var known = candidates.Count;
            Locate(start, stop, positions);
            if (_parts.Length == 2)
            {
                MoveTwo(start, stop, positions, candidates);
            }
            else
            {
                MoveAny(start, stop, positions, candidates);
            }

            DropFound(known, candidates);
        }
    }

    // The positions of each shape on the tracks.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void Locate(int start, int stop, Span<int> positions)
    {
        var at = 0;
        for (var shape = start; shape < stop; shape++)
        {
            var code = ulong.CreateTruncating(_codes.At(shape));
            for (var i = 0; i < _parts.Length; i++)
            {
                (var position, code) = Math.DivRem(code, _product.Radices[i]);
                positions[at++] = (int)position;
                Memory.Announce(ref _terms[i][position]);
                ref var row = ref MemoryMarshal.GetArrayDataReference(_parts[i]).At(position * (uint)_steps);
                Memory.Announce(ref row);
                Memory.Announce(ref row.At((uint)_steps - 1));
            }
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void MoveTwo(int start, int stop, Span<int> positions, Candidates candidates)
    {
        ref var found = ref MemoryMarshal.GetArrayDataReference(_found);
        ref var records = ref MemoryMarshal.GetArrayDataReference(candidates.Records);
        ref var origins = ref MemoryMarshal.GetArrayDataReference(candidates.Origins);
        var count = (ulong)candidates.Count;
        for (var shape = start; shape < stop; shape++)
        {
            var (one, other) = (positions[2 * (shape - start)], positions[(2 * (shape - start)) + 1]);
            ref var ones = ref MemoryMarshal.GetArrayDataReference(_parts[0]).At((ulong)one * (uint)_steps);
            ref var others = ref MemoryMarshal.GetArrayDataReference(_parts[1]).At((ulong)other * (uint)_steps);
            var origin = (uint)(shape - candidates.First) << 16;
            for (var free = Free(shape, _terms[0][one] & _terms[1][other], candidates); free != 0; free &= free - 1)
            {
                var step = (ulong)BitOperations.TrailingZeroCount(free);
                var code = ulong.CreateTruncating(ones.At(step) + others.At(step));
                Memory.Announce(ref found.At(code >> 6));
                records.At(count) = code;
                origins.At(count++) = origin | (uint)step;
            }
        }

        candidates.Count = (int)count;
    }

    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void MoveAny(int start, int stop, Span<int> positions, Candidates candidates)
    {
        var count = candidates.Count;
        for (var shape = start; shape < stop; shape++)
        {
            var here = positions.Slice((shape - start) * _parts.Length, _parts.Length);
            var terms = ulong.MaxValue;
            for (var i = 0; i < here.Length; i++)
            {
                terms &= _terms[i][here[i]];
            }

            for (var free = Free(shape, terms, candidates); free != 0; free &= free - 1)
            {
                var step = BitOperations.TrailingZeroCount(free);
                var next = T.Zero;
                for (var i = 0; i < here.Length; i++)
                {
                    next += _parts[i][(here[i] * _steps) + step];
                }

                var code = ulong.CreateTruncating(next);
                Memory.Announce(ref _found[code >> 6]);
                candidates.Records[count] = code;
                candidates.Origins[count++] = ((uint)(shape - candidates.First) << 16) | (uint)step;
            }
        }

        candidates.Count = count;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private ulong Free(int shape, ulong terms, Candidates candidates)
    {
        var free = _masks.StepsOf(terms);
        candidates.Note(_masks.FreeForwardSteps(free), _masks.FreeTurns(free));
        candidates.Clash = candidates.Clash < 0 && _masks.Clash(free) ? shape : candidates.Clash;
        return free;
    }

    // Each is written in any case, and kept if it is new: cheaper than a jump that nothing foretells.
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    private void DropFound(int from, Candidates candidates)
    {
        ref var found = ref MemoryMarshal.GetArrayDataReference(_found);
        ref var records = ref MemoryMarshal.GetArrayDataReference(candidates.Records);
        ref var origins = ref MemoryMarshal.GetArrayDataReference(candidates.Origins);
        var (kept, end) = ((ulong)from, (ulong)candidates.Count);
        for (var i = kept; i < end; i++)
        {
            var code = records.At(i);
            records.At(kept) = code;
            origins.At(kept) = origins.At(i);
            kept += ~(found.At(code >> 6) >> (int)code) & 1;
        }

        candidates.Count = (int)kept;
    }
}
