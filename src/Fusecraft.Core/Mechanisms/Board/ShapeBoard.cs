using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>
/// The one representation all constraints reduce to. A slot is a place for one token: a bond between two pieces, or a mark on a site. A shape is a bitset over the slots that home's
/// tokens can ever reach when guards are ignored and nothing is torn.
/// </summary>
internal sealed partial class ShapeBoard
{
    private readonly Mechanism _mechanism;
    private readonly List<Slot> _slots = [];
    private readonly Dictionary<Slot, int> _slotOf = [];
    private readonly HashSet<(int, int)>? _adjacent;
    private readonly StepMoves[] _moves;

    public ShapeBoard(Mechanism mechanism)
    {
        _mechanism = mechanism;
        _adjacent = mechanism.Adjacency is { } pairs ? [.. pairs.Select(pair => (Math.Min(pair.A, pair.B), Math.Max(pair.A, pair.B)))] : null;
        var home = HomeSlots();
        home.ForEach(slot => Add(slot));
        var pieceMaps = mechanism.Steps.Select(step => PieceMap(step.Permutation)).ToArray();
        var carries = mechanism.Steps.Select(step => Carries(step.Turn)).ToArray();

        // Close the slots under every step that does not tear them.
        for (var i = 0; i < _slots.Count; i++)
        {
            for (var s = 0; s < mechanism.Steps.Length; s++)
            {
                if (After(_slots[i], mechanism.Steps[s].Permutation, pieceMaps[s], carries[s]) is { } next)
                {
                    Add(next);
                }
            }
        }

        // Rounded up to a width that exploration is compiled for.
        var words = Math.Max(1, (_slots.Count + 63) / 64);
        Words = words <= 8 ? (int)BitOperations.RoundUpToPowerOf2((uint)words) : words;
        HomeKey = new ulong[Words];
        foreach (var slot in home)
        {
            Set(HomeKey, _slotOf[slot]);
        }

        _moves = new StepMoves[mechanism.Steps.Length];
        for (var s = 0; s < _moves.Length; s++)
        {
            var step = mechanism.Steps[s];
            var targets = _slots.Select(slot => After(slot, step.Permutation, pieceMaps[s], carries[s]) is { } next ? _slotOf[next] : -1).ToArray();
            _moves[s] = new StepMoves(Words, targets, step.Terms, mark => _slotOf.TryGetValue(mark, out var slot) ? slot : null);
        }
    }

    /// <summary>The number of 64-bit words of a shape's key.</summary>
    public int Words { get; }

    public int SlotCount => _slots.Count;

    public ulong[] HomeKey { get; }

    public ReadOnlySpan<StepMoves> Moves => _moves;

    public StepMoves Of(Step step)
    {
        ArgumentNullException.ThrowIfNull(step);
        if (step.Index >= _moves.Length || !ReferenceEquals(_mechanism.Steps[step.Index], step))
        {
            throw new ArgumentException($"Step {step} belongs to another mechanism than {_mechanism.Name}.", nameof(step));
        }

        return _moves[step.Index];
    }

    /// <summary>The key of home moved by a permutation of the sites; null where pieces are taken apart or a token leaves the slots.</summary>
    public ulong[]? KeyOf(Permutation labels)
    {
        if (PieceMapOrNull(labels) is not { } pieceMap)
        {
            return null;
        }

        var key = new ulong[Words];
        for (var i = 0; i < _slots.Count; i++)
        {
            if (IsSet(HomeKey, i))
            {
                if (!_slotOf.TryGetValue(_slots[i].Moved(labels, pieceMap), out var target))
                {
                    return null;
                }

                Set(key, target);
            }
        }

        return key;
    }

    public ImmutableArray<ImmutableArray<int>> BlocksOf(ReadOnlySpan<ulong> key)
    {
        var neighbours = new SortedDictionary<int, List<int>>();
        for (var i = 0; i < _slots.Count; i++)
        {
            if (_slots[i].Mark is null && IsSet(key, i))
            {
                Join(_slots[i].A, _slots[i].B);
                Join(_slots[i].B, _slots[i].A);
            }
        }

        var blocks = ImmutableArray.CreateBuilder<ImmutableArray<int>>();
        var seen = new HashSet<int>();
        foreach (var start in neighbours.Keys)
        {
            if (!seen.Add(start))
            {
                continue;
            }

            var block = new List<int> { start };
            for (var i = 0; i < block.Count; i++)
            {
                block.AddRange(neighbours[block[i]].Where(seen.Add));
            }

            block.Sort();
            blocks.Add([.. block]);
        }

        return blocks.DrainToImmutable();

        void Join(int a, int b)
        {
            if (!neighbours.TryGetValue(a, out var list))
            {
                neighbours.Add(a, list = []);
            }

            list.Add(b);
        }
    }

    public ImmutableArray<(string Mark, int Site)> MarksOf(ReadOnlySpan<ulong> key)
    {
        var marks = new List<(string Mark, int Site)>();
        for (var i = 0; i < _slots.Count; i++)
        {
            if (_slots[i].Mark is { } mark && IsSet(key, i))
            {
                marks.Add((mark, _slots[i].A));
            }
        }

        return [.. marks.OrderBy(mark => _mechanism.MarkNames.IndexOf(mark.Mark)).ThenBy(mark => mark.Site)];
    }

    /// <summary>A mask of the slots of the given marks; null where one of them can never be there.</summary>
    public ulong[]? MaskOf(IEnumerable<(string Mark, int Site)> marks)
    {
        var mask = new ulong[Words];
        foreach (var (mark, site) in marks)
        {
            if (!_slotOf.TryGetValue(Slot.OfMark(mark, site), out var slot))
            {
                return null;
            }

            Set(mask, slot);
        }

        return mask;
    }

    private static bool IsSet(ReadOnlySpan<ulong> key, int slot) => (key[slot >> 6] >> slot & 1) != 0;

    private static void Set(Span<ulong> key, int slot) => key[slot >> 6] |= 1UL << slot;

    private static Slot? After(Slot slot, Permutation permutation, int[] pieceMap, bool[] carries)
    {
        // A mark moves with its site; a bond moves with its pieces, stays, or would be torn.
        if (slot.Mark is null && carries[slot.A] != carries[slot.B])
        {
            return null;
        }

        return slot.Moved(permutation, pieceMap);
    }

    private List<Slot> HomeSlots()
    {
        var slots = new List<Slot>();
        foreach (var block in _mechanism.HomeBlocks)
        {
            slots.AddRange(Bonds(block).Select(bond => Slot.OfBond(bond.A, bond.B)));
        }

        slots.AddRange(_mechanism.HomeMarks.Select(mark => Slot.OfMark(mark.Mark, mark.Site)));
        return slots;
    }

    // The canonical bonds of a block: its adjacent pairs where they hold it together, else all its pairs.
    private List<(int A, int B)> Bonds(ImmutableArray<int> block)
    {
        var all = new List<(int A, int B)>();
        for (var i = 0; i < block.Length; i++)
        {
            for (var k = i + 1; k < block.Length; k++)
            {
                all.Add((block[i], block[k]));
            }
        }

        if (_adjacent is null)
        {
            return all;
        }

        var adjacent = all.FindAll(_adjacent.Contains);
        var reached = new HashSet<int> { block[0] };
        for (var grew = true; grew;)
        {
            grew = false;
            foreach (var (a, b) in adjacent)
            {
                if (reached.Contains(a) != reached.Contains(b))
                {
                    reached.Add(a);
                    reached.Add(b);
                    grew = true;
                }
            }
        }

        return reached.Count == block.Length ? adjacent : all;
    }

    private void Add(Slot slot)
    {
        if (_slotOf.TryAdd(slot, _slots.Count))
        {
            _slots.Add(slot);
        }
    }

    private bool[] Carries(Turn turn)
    {
        var carries = new bool[_mechanism.PieceCount];
        foreach (var piece in turn.CarriedPieces)
        {
            carries[piece] = true;
        }

        return carries;
    }

    private int[] PieceMap(Permutation permutation) => PieceMapOrNull(permutation) ?? throw new InvalidOperationException("A step takes a piece apart.");

    private int[]? PieceMapOrNull(Permutation permutation)
    {
        var map = new int[_mechanism.PieceCount];
        for (var piece = 0; piece < map.Length; piece++)
        {
            var sites = _mechanism.SitesOfPiece[piece];
            map[piece] = piece;
            if (sites.IsEmpty)
            {
                continue;
            }

            map[piece] = _mechanism.PieceOfSite[permutation[sites[0]]];
            foreach (var site in sites)
            {
                if (_mechanism.PieceOfSite[permutation[site]] != map[piece])
                {
                    return null;
                }
            }

            if (_mechanism.SitesOfPiece[map[piece]].Length != sites.Length)
            {
                return null;
            }
        }

        return map;
    }
}
