using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Says whether a bijection from the sites of one mechanism to those of another (perhaps the same) takes pieces to pieces and turns to turns: each step, conjugated, is a step, it carries the
/// pieces that it should, its guard reads the same marks, and what belongs to one turn still does. Forward may become backward, as reflections do.
/// </summary>
internal sealed class StepMatcher
{
    private readonly Mechanism _from;
    private readonly Mechanism _to;
    private readonly bool _keepsAdjacency;
    private readonly Permutation[] _holdings;
    private readonly Dictionary<Permutation, List<int>> _stepsDoing = [];
    private readonly string[] _guards;
    private readonly HashSet<int>[] _carried;
    private readonly HashSet<(int, int)> _adjacent;

    /// <param name="from">The mechanism whose sites are moved.</param>
    /// <param name="to">The mechanism to which they are moved.</param>
    /// <param name="keepsAdjacency">True when pieces that share a face must do so afterwards.</param>
    /// <param name="holdings">Rotations of the whole puzzle: a step counts as another when it does the same up to such a rotation, and carries what the other leaves. None for plain equality.</param>
    public StepMatcher(Mechanism from, Mechanism to, bool keepsAdjacency, IEnumerable<Permutation>? holdings = null)
    {
        _from = from;
        _to = to;
        _keepsAdjacency = keepsAdjacency;
        _holdings = [Permutation.Identity, .. holdings?.Where(holding => !holding.IsIdentity) ?? []];
        foreach (var step in to.Steps)
        {
            if (!_stepsDoing.TryGetValue(step.Permutation, out var list))
            {
                _stepsDoing.Add(step.Permutation, list = []);
            }

            list.Add(step.Index);
        }

        _guards = [.. to.Steps.Select(step => GuardForm.Of(step.Terms))];
        _carried = [.. to.Turns.Select(turn => turn.CarriedPieces.ToHashSet())];
        _adjacent = [.. (to.Adjacency ?? []).Select(Ordered)];
    }

    /// <summary>For each step of the first mechanism the step of the second that it becomes; null where the bijection does not take turns to turns.</summary>
    public int[]? Match(Permutation sites) => Match(sites, out _);

    /// <inheritdoc cref="Match(Permutation)"/>
    public int[]? Match(Permutation sites, out int[] pieces)
    {
        pieces = [];
        if (_from.SiteCount != _to.SiteCount || _from.Turns.Length != _to.Turns.Length || PieceMap(_from, _to, sites) is not { } pieceMap || !KeepsAdjacency(pieceMap))
        {
            return null;
        }

        pieces = pieceMap;
        var stepMap = new int[_from.Steps.Length];
        var taken = new bool[_to.Turns.Length];
        foreach (var turn in _from.Turns)
        {
            var carried = turn.CarriedPieces.Select(piece => pieceMap[piece]).ToHashSet();
            if (FindStep(turn, turn.Permutation.ConjugateBy(sites), carried, sites, taken) is not { } target)
            {
                return null;
            }

            taken[target.Turn.Index] = true;
            stepMap[turn.Forward.Index] = target.Index;
            if (turn.Backward is { } backward)
            {
                stepMap[backward.Index] = target.Opposite!.Index;
            }
        }

        return stepMap;
    }

    /// <summary>Where a bijection of the sites takes the pieces, -1 for a hidden piece that the second mechanism has not; null where it takes a piece apart.</summary>
    public static int[]? PieceMap(Mechanism from, Mechanism to, Permutation sites)
    {
        var map = new int[from.PieceCount];
        for (var piece = 0; piece < map.Length; piece++)
        {
            var own = from.SitesOfPiece[piece];
            if (own.IsEmpty)
            {
                map[piece] = to.FindPiece(from.PieceNames[piece]) is { } hidden && to.SitesOfPiece[hidden].IsEmpty ? hidden : -1;
                continue;
            }

            map[piece] = to.PieceOfSite[sites[own[0]]];
            if (to.SitesOfPiece[map[piece]].Length != own.Length)
            {
                return null;
            }

            foreach (var site in own)
            {
                if (to.PieceOfSite[sites[site]] != map[piece])
                {
                    return null;
                }
            }
        }

        return map;
    }

    private static (int A, int B) Ordered((int A, int B) pair) => pair.A < pair.B ? pair : (pair.B, pair.A);

    private bool KeepsAdjacency(int[] pieceMap)
    {
        if (!_keepsAdjacency || _from.Adjacency is not { } pairs)
        {
            return true;
        }

        foreach (var (a, b) in pairs)
        {
            if (!_adjacent.Contains(Ordered((pieceMap[a], pieceMap[b]))))
            {
                return false;
            }
        }

        return pairs.Count == _adjacent.Count;
    }

    private Step? FindStep(Turn turn, Permutation moved, HashSet<int> carried, Permutation sites, bool[] taken)
    {
        string? forward = null;
        string? backward = null;
        for (var i = 0; i < _holdings.Length; i++)
        {
            if (!_stepsDoing.TryGetValue(moved * _holdings[i], out var candidates))
            {
                continue;
            }

            foreach (var index in candidates)
            {
                var step = _to.Steps[index];
                if (taken[step.Turn.Index] || turn.IsOneWay != step.Turn.IsOneWay || !Carries(step.Turn.Index, carried, isComplement: i > 0))
                {
                    continue;
                }

                forward ??= GuardForm.Of(turn.Forward.Terms, sites);
                backward ??= turn.Backward is null ? "" : GuardForm.Of(turn.Backward.Terms, sites);
                if (forward == _guards[index] && (step.Opposite is null || backward == _guards[step.Opposite.Index]))
                {
                    return step;
                }
            }
        }

        return null;
    }

    private bool Carries(int turn, HashSet<int> pieces, bool isComplement)
    {
        var own = _carried[turn];
        return isComplement ? own.Count + pieces.Count == _to.PieceCount && !own.Overlaps(pieces) : own.SetEquals(pieces);
    }
}
