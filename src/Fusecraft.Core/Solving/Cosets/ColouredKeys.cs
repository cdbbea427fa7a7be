using System.Numerics;
using System.Runtime.CompilerServices;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// States of which only the shape and the colour of the label on each site are kept, packed into as few bits as they need: behind the slots of the shape one field a piece, which holds the number of the pattern of
/// colours that the piece there shows. A piece that shows one pattern only, whatever is done, takes no bits.
/// </summary>
internal sealed class ColouredKeys
{
    private readonly Mechanism _mechanism;
    private readonly int[] _colours;
    private readonly int _boardWords;
    private readonly bool _hasSlots;
    private readonly bool _ignoresShapes;
    private readonly List<Dictionary<string, int>> _patterns = [];
    private readonly (int Word, int Shift, int Bits)[] _fields;
    private readonly StepFields[] _forward;
    private readonly StepFields[] _backward;

    /// <param name="mechanism">The mechanism.</param>
    /// <param name="colourOfLabel">For each label, by its home site, its colour: any number.</param>
    /// <param name="ignoresShapes">True to leave shapes out, and to take every step for free.</param>
    public ColouredKeys(Mechanism mechanism, ReadOnlySpan<int> colourOfLabel, bool ignoresShapes = false)
    {
        _ignoresShapes = ignoresShapes;
        _mechanism = mechanism;
        _colours = Dense(colourOfLabel);
        _boardWords = ignoresShapes ? 0 : mechanism.Board.Words;
        _hasSlots = mechanism.Board.SlotCount > 0;
        FindPatterns();
        _fields = new (int, int, int)[mechanism.PieceCount];
        Words = PlaceFields();
        _forward = [.. mechanism.Steps.Select(step => FieldsOf(step.Permutation))];
        _backward = [.. mechanism.Steps.Select(step => FieldsOf(step.Permutation.Inverse()))];
    }

    /// <summary>The number of words of a key.</summary>
    public int Words { get; }

    /// <summary>The key of a shape with labels: the label of site <c>i</c> is on site <c>labels[i]</c>. False where no steps of the mechanism can show such a pattern.</summary>
    public bool TryPack(ReadOnlySpan<ulong> shape, Permutation labels, Span<ulong> key)
    {
        key.Clear();
        shape[.._boardWords].CopyTo(key);
        var colourOn = new int[_mechanism.SiteCount];
        for (var label = 0; label < colourOn.Length; label++)
        {
            colourOn[labels[label]] = _colours[label];
        }

        for (var piece = 0; piece < _fields.Length; piece++)
        {
            if (!_patterns[piece].TryGetValue(Pattern(piece, colourOn), out var number))
            {
                return false;
            }

            if (_fields[piece].Bits > 0)
            {
                key[_fields[piece].Word] |= (ulong)number << _fields[piece].Shift;
            }
        }

        return true;
    }

    /// <summary>Writes the key after a step; false where it is barred.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public bool TryMove<TWidth>(int step, ReadOnlySpan<ulong> key, Span<ulong> next)
        where TWidth : struct, IShapeWidth
    {
        if (!_ignoresShapes)
        {
            var moves = _mechanism.Board.Moves[step];
            if (!moves.IsFree(key[.._boardWords]))
            {
                return false;
            }

            if (_hasSlots)
            {
                moves.Move(key[.._boardWords], next[.._boardWords]);
            }
            else
            {
                key[.._boardWords].CopyTo(next);
            }
        }

        MoveFields<TWidth>(_forward[step], key, next);
        return true;
    }

    /// <summary>Writes the key before a step; false where the step is barred there.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public bool TryMoveBack<TWidth>(int step, ReadOnlySpan<ulong> key, Span<ulong> previous)
        where TWidth : struct, IShapeWidth
    {
        if (!_ignoresShapes)
        {
            var moves = _mechanism.Board.Moves[step];
            if (_hasSlots)
            {
                moves.MoveBack(key[.._boardWords], previous[.._boardWords]);
            }
            else
            {
                key[.._boardWords].CopyTo(previous);
            }

            if (!moves.IsFree(previous[.._boardWords]))
            {
                return false;
            }
        }

        MoveFields<TWidth>(_backward[step], key, previous);
        return true;
    }

    // The words of the shape are in place already, with the fields behind its slots as they were.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private void MoveFields<TWidth>(StepFields step, ReadOnlySpan<ulong> key, Span<ulong> next)
        where TWidth : struct, IShapeWidth
    {
        var words = TWidth.Words(Words);
        for (var word = 0; word < words; word++)
        {
            next[word] = (word < _boardWords ? next[word] : key[word]) & step.Kept[word];
        }

        foreach (ref readonly var move in step.Moves.AsSpan())
        {
            next[move.ToWord] |= step.Moved[move.Offset + (int)(key[move.FromWord] >> move.Shift & move.Mask)];
        }
    }

    private static int[] Dense(ReadOnlySpan<int> colours)
    {
        var numbers = new Dictionary<int, int>();
        var dense = new int[colours.Length];
        for (var i = 0; i < colours.Length; i++)
        {
            numbers.TryAdd(colours[i], numbers.Count);
            dense[i] = numbers[colours[i]];
        }

        return dense;
    }

    private string Pattern(int piece, int[] colourOn) => string.Create(_mechanism.SitesOfPiece[piece].Length, (Sites: _mechanism.SitesOfPiece[piece], colourOn), static (text, source) =>
    {
        for (var i = 0; i < text.Length; i++)
        {
            text[i] = (char)source.colourOn[source.Sites[i]];
        }
    });

    // The patterns that steps can ever bring to each piece's place, guards and blocks disregarded.
    private void FindPatterns()
    {
        var queue = new Queue<(int Piece, string Pattern)>();
        for (var piece = 0; piece < _mechanism.PieceCount; piece++)
        {
            _patterns.Add([]);
            Add(piece, Pattern(piece, _colours));
        }

        while (queue.TryDequeue(out var shown))
        {
            foreach (var step in _mechanism.Steps)
            {
                var (piece, pattern) = Moved(shown.Piece, shown.Pattern, step.Permutation);
                Add(piece, pattern);
            }
        }

        void Add(int piece, string pattern)
        {
            if (_patterns[piece].TryAdd(pattern, _patterns[piece].Count))
            {
                queue.Enqueue((piece, pattern));
            }
        }
    }

    private (int Piece, string Pattern) Moved(int piece, string pattern, Permutation by)
    {
        var sites = _mechanism.SitesOfPiece[piece];
        if (sites.IsEmpty)
        {
            return (piece, pattern);
        }

        var target = _mechanism.PieceOfSite[by[sites[0]]];
        var targetSites = _mechanism.SitesOfPiece[target];
        Span<char> moved = new char[pattern.Length];
        for (var i = 0; i < moved.Length; i++)
        {
            moved[targetSites.AsSpan().BinarySearch(by[sites[i]])] = pattern[i];
        }

        return (target, new string(moved));
    }

    // Behind the slots of the last word of the shape, unless a condition in code reads those words whole.
    private int PlaceFields()
    {
        var free = _ignoresShapes ? 0 : _mechanism.Board.SlotCount;
        foreach (var moves in _mechanism.Board.Moves)
        {
            free = moves.HasConditions ? 64 * _boardWords : free;
        }

        for (var piece = 0; piece < _fields.Length; piece++)
        {
            var bits = _patterns[piece].Count <= 1 ? 0 : BitOperations.Log2((uint)_patterns[piece].Count - 1) + 1;
            if ((free & 63) + bits > 64)
            {
                free = (free + 63) & ~63;
            }

            _fields[piece] = (free >> 6, free & 63, bits);
            free += bits;
        }

        var words = Math.Max(Math.Max(1, _boardWords), (free + 63) / 64);
        return words <= 8 ? (int)BitOperations.RoundUpToPowerOf2((uint)words) : words;
    }

    private StepFields FieldsOf(Permutation permutation)
    {
        var kept = new ulong[Words];
        Array.Fill(kept, ulong.MaxValue);
        var moves = new List<FieldMove>();
        var moved = new List<ulong>();
        for (var piece = 0; piece < _fields.Length; piece++)
        {
            var (word, shift, bits) = _fields[piece];
            if (bits == 0 || _mechanism.SitesOfPiece[piece].All(site => permutation[site] == site))
            {
                continue;
            }

            // A key of damaged origin could hold numbers without a pattern; none is ever made here.
            var contributions = new ulong[1 << bits];
            var target = -1;
            foreach (var (pattern, number) in _patterns[piece])
            {
                (target, var shown) = Moved(piece, pattern, permutation);
                contributions[number] = (ulong)_patterns[target][shown] << _fields[target].Shift;
            }

            var mask = (1UL << bits) - 1;
            kept[word] &= ~(mask << shift);
            moves.Add(new FieldMove(word, shift, mask, _fields[target].Word, moved.Count));
            moved.AddRange(contributions);
        }

        return new StepFields(kept, [.. moves], [.. moved]);
    }

    private readonly record struct FieldMove(int FromWord, int Shift, ulong Mask, int ToWord, int Offset);

    private sealed record StepFields(ulong[] Kept, FieldMove[] Moves, ulong[] Moved);
}
