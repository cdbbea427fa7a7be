using System.Diagnostics;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>States of a region as numbers: the place of the shape, then the digits of <c>labels · τ(shape)⁻¹</c> along a stabilizer chain of the vertex group.</summary>
internal abstract class StateDigits
{
    /// <summary>The orbit lengths along the chain.</summary>
    public abstract IReadOnlyList<int> OrbitLengths { get; }

    /// <summary>The number of a state among those of the shape at a place; -1 where the labels cannot be reached.</summary>
    public abstract long Rank(int place, Permutation labels);

    /// <summary>The labels of the state of this number at a place.</summary>
    public abstract Permutation Unrank(int place, long number);

    /// <summary>The permutation τ of the path to the shape at a place.</summary>
    public abstract Permutation Path(int place);

    /// <summary>Works out what moves do to rows of states.</summary>
    public abstract RowTable Tabulate(MoveSet moves, RowSplit split, int threads, CancellationToken cancellation);

    public static StateDigits Create(RegionShapes region, StabilizerChain chain) =>
        region.Mechanism.SiteCount <= 256 ? new StateDigits<byte>(region, chain) : new StateDigits<ushort>(region, chain);
}

/// <summary>With lanes of one width.</summary>
internal sealed class StateDigits<T> : StateDigits
    where T : unmanaged, IBinaryInteger<T>
{
    private const int RowsAPiece = 256;
    private readonly RegionShapes _region;
    private readonly DigitChain<T> _chain;
    private readonly int _stride;
    private readonly T[] _labels;
    private readonly T[] _inverseLabels;
    private readonly int[] _orbitLengths;

    public StateDigits(RegionShapes region, StabilizerChain chain)
    {
        _region = region;
        _chain = new DigitChain<T>(chain, region.Mechanism.SiteCount);
        _stride = _chain.Stride;
        _orbitLengths = [.. chain.OrbitLengths];
        _labels = region.Labels<T>(_stride);
        _inverseLabels = new T[_labels.Length];
        for (var at = 0; at < _labels.Length; at += _stride)
        {
            Lanes.InvertPadded<T>(_labels.AsSpan(at, _stride), _inverseLabels.AsSpan(at, _stride));
        }
    }

    public override IReadOnlyList<int> OrbitLengths => _orbitLengths;

    public override long Rank(int place, Permutation labels)
    {
        if (labels.SupportEnd > _region.Mechanism.SiteCount)
        {
            return -1;
        }

        using var scratch = new Scratch<T>(_stride);
        labels.CopyLanes(scratch.Span);
        Lanes.ComposePadded<T>(scratch.Span, Label(_inverseLabels, place), scratch.Span);
        var number = _chain.Strip(scratch.Span, 0, _chain.Count);
        return number >= 0 && Lanes.IsIdentity<T>(scratch.Span) ? number : -1;
    }

    public override Permutation Unrank(int place, long number)
    {
        using var member = new Scratch<T>(_stride);
        using var scratch = new Scratch<T>(_stride);
        _chain.Write(number, 0, _chain.Count, member.Span, scratch.Span);
        Lanes.ComposePadded<T>(member.Span, Label(_labels, place), scratch.Span);
        return Permutation.FromTrustedImages<T>(scratch.Span);
    }

    public override Permutation Path(int place) => Permutation.FromTrustedImages(Label(_labels, place));

    public override RowTable Tabulate(MoveSet moves, RowSplit split, int threads, CancellationToken cancellation)
    {
        var levels = _chain.Count;
        var cosets = (int)_chain.Size(0, split.RowLevels);
        var wordCount = (int)_chain.Size(split.RowLevels, split.WordLevels);
        var wordStates = (int)_chain.Size(split.WordLevels, levels);
        var rows = checked(_region.Count * cosets);
        var targets = new int[checked(rows * moves.Width)];
        var maps = new int[targets.Length];
        var parallel = new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancellation };
        ForPieces(rows, RowsAPiece, parallel, (from, to) => FillRows(moves, split, cosets, from, to, targets, maps));

        // Maps are numbered in the order of the members that make them.
        var numbers = new int[(long)wordCount * wordStates];
        Array.Fill(numbers, -1);
        for (var i = 0; i < maps.Length; i++)
        {
            if (targets[i] >= 0)
            {
                numbers[maps[i]] = 0;
            }
        }

        var members = new List<int>();
        for (var member = 0; member < numbers.Length; member++)
        {
            if (numbers[member] == 0)
            {
                numbers[member] = members.Count;
                members.Add(member);
            }
        }

        for (var i = 0; i < maps.Length; i++)
        {
            maps[i] = targets[i] < 0 ? 0 : numbers[maps[i]];
        }

        var wordMaps = new uint[checked((long)members.Count * wordCount)];
        ForPieces(members.Count, Math.Max(1, RowsAPiece / wordCount), parallel, (from, to) => FillMaps(members, split, wordCount, wordStates, from, to, wordMaps));
        return new RowTable(rows, moves.Width, wordCount, wordStates, targets, maps, wordMaps, Places(split, wordStates));
    }

    private static void ForPieces(int count, int piece, ParallelOptions options, Action<int, int> work)
    {
        if (options.MaxDegreeOfParallelism == 1 || count <= piece)
        {
            work(0, count);
            return;
        }

        Parallel.For(0, (count + piece - 1) / piece, options, i => work(i * piece, Math.Min(count, (i + 1) * piece)));
    }

    // r_c · τ(s)·m·τ(s')⁻¹ = k · r_c', with k in the group of the levels that make words and places.
    private void FillRows(MoveSet moves, RowSplit split, int cosets, int from, int to, int[] targets, int[] maps)
    {
        var loops = new T[moves.Width * _stride];
        var (representative, product) = (new T[_stride], new T[_stride]);
        var place = -1;
        for (var row = from; row < to; row++)
        {
            if (row / cosets != place)
            {
                place = row / cosets;
                FillLoops(moves, place, loops, product);
            }

            _chain.Write(row % cosets, 0, split.RowLevels, representative, product);
            for (var slot = 0; slot < moves.Width; slot++)
            {
                var entry = (row * moves.Width) + slot;
                var target = moves.Target(place, slot);
                targets[entry] = -1;
                if (target >= 0)
                {
                    Lanes.ComposePadded<T>(representative, loops.AsSpan(slot * _stride, _stride), product);
                    targets[entry] = (target * cosets) + (int)_chain.Strip(product, 0, split.RowLevels);
                    maps[entry] = (int)_chain.Strip(product, split.RowLevels, _chain.Count);
                    Debug.Assert(Lanes.IsIdentity<T>(product), "A loop is no member of the vertex group.");
                }
            }
        }
    }

    private void FillLoops(MoveSet moves, int place, T[] loops, T[] scratch)
    {
        for (var slot = 0; slot < moves.Width; slot++)
        {
            var target = moves.Target(place, slot);
            if (target < 0)
            {
                continue;
            }

            var permutation = moves.MoveAt(place, slot).Permutation;
            var loop = loops.AsSpan(slot * _stride, _stride);
            (moves.IsBackward ? permutation.Inverse() : permutation).CopyLanes(scratch.AsSpan());
            Lanes.ComposePadded<T>(Label(_labels, place), scratch, loop);
            Lanes.ComposePadded<T>(loop, Label(_inverseLabels, target), loop);
        }
    }

    // q_w · k = p · q_w', with p in the group of the levels that make places.
    private void FillMaps(List<int> members, RowSplit split, int wordCount, int wordStates, int from, int to, uint[] wordMaps)
    {
        var (member, word, scratch) = (new T[_stride], new T[_stride], new T[_stride]);
        for (var map = from; map < to; map++)
        {
            _chain.Write(members[map], split.RowLevels, _chain.Count, member, scratch);
            for (var i = 0; i < wordCount; i++)
            {
                _chain.Write(i, split.RowLevels, split.WordLevels, word, scratch);
                Lanes.ComposePadded<T>(word, member, word);
                var target = (uint)_chain.Strip(word, split.RowLevels, split.WordLevels);
                wordMaps[((long)map * wordCount) + i] = (target * (uint)wordStates << 5) | (uint)_chain.Strip(word, split.WordLevels, _chain.Count);
            }
        }
    }

    private byte[] Places(RowSplit split, int wordStates)
    {
        var places = new byte[wordStates * wordStates];
        var (permutation, place, scratch) = (new T[_stride], new T[_stride], new T[_stride]);
        for (var p = 0; p < wordStates; p++)
        {
            _chain.Write(p, split.WordLevels, _chain.Count, permutation, scratch);
            for (var x = 0; x < wordStates; x++)
            {
                _chain.Write(x, split.WordLevels, _chain.Count, place, scratch);
                Lanes.ComposePadded<T>(place, permutation, place);
                places[(p * wordStates) + x] = (byte)_chain.Strip(place, split.WordLevels, _chain.Count);
            }
        }

        return places;
    }

    private ReadOnlySpan<T> Label(T[] labels, int place) => labels.AsSpan(place * _stride, _stride);
}
