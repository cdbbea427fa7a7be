namespace Fusecraft.Solving;

/// <summary>
/// All words of one stage from a state, cheapest first: iterative deepening with the stage's tables (Korf, <em>Depth-first iterative-deepening</em>, Artificial Intelligence 27 (1985), from memory). A word ends where the stage's
/// goal is first met.
/// </summary>
internal sealed class StageWords
{
    private readonly Stage _stage;
    private readonly Func<bool> _isOver;
    private readonly int _width;
    private readonly List<int> _word = [];
    private int[] _coordinates;

    /// <param name="stage">The stage.</param>
    /// <param name="isOver">Asked now and then; true ends the search.</param>
    public StageWords(Stage stage, Func<bool> isOver)
    {
        _isOver = isOver;
        _stage = stage;
        _width = stage.Components.Length;
        _coordinates = new int[16 * _width];
    }

    /// <summary>The moves tried so far.</summary>
    public long Nodes { get; private set; }

    /// <summary>The least cost beyond the last limit at which there may be words; <see cref="int.MaxValue"/> where there are none.</summary>
    public int NextCost { get; private set; }

    /// <summary>Words that cost as much as this or more are not looked for.</summary>
    public int Bound { get; set; } = int.MaxValue;

    /// <summary>How much what is left counts against what was done. With more than 1 the search goes straight for the goal and finds words sooner that may cost more.</summary>
    public int Weight { get; set; } = 1;

    /// <summary>Visits the words that cost more than one limit and at most another. With a weight above 1 the limit is one of weighted costs on the way.</summary>
    /// <param name="shape">The frame's number of the shape.</param>
    /// <param name="coordinates">The coordinates of the state.</param>
    /// <param name="above">Cheaper words, and those that cost just this, are passed over.</param>
    /// <param name="limit">The greatest cost.</param>
    /// <param name="maxNodes">The search ends when <see cref="Nodes"/> is at this number.</param>
    /// <param name="found">Given the moves and their cost; true ends the search.</param>
    /// <returns>True where every word was visited.</returns>
    public bool Visit(int shape, ReadOnlySpan<int> coordinates, int above, int limit, long maxNodes, Func<List<int>, int, bool> found)
    {
        _word.Clear();
        coordinates.CopyTo(_coordinates);
        NextCost = int.MaxValue;
        var least = _stage.LeastCost(shape, coordinates);
        if (least * Weight > limit)
        {
            NextCost = least < Bound ? least * Weight : int.MaxValue;
            return true;
        }

        if (least == 0)
        {
            return above >= 0 || !found(_word, 0);
        }

        return Descend(shape, 0, -1, 0, above, limit, maxNodes, found);
    }

    private bool Descend(int shape, int depth, int last, int cost, int above, int limit, long maxNodes, Func<List<int>, int, bool> found)
    {
        if ((depth + 2) * _width > _coordinates.Length)
        {
            Array.Resize(ref _coordinates, 2 * _coordinates.Length);
        }

        var moves = _stage.Frame.Moves;
        var (targets, loopOf, loops) = (_stage.Frame.Targets, _stage.Frame.LoopOf, _stage.Frame.Loops.Count);
        var here = depth * _width;
        var there = here + _width;
        for (var move = 0; move < moves.Length; move++)
        {
            var total = cost + moves[move].Cost;
            var next = targets[(shape * moves.Length) + move];
            if (next < 0 || !_stage.MayFollow(last, move))
            {
                continue;
            }

            if (++Nodes >= maxNodes || ((Nodes & 0xFFFF) == 0 && _isOver()))
            {
                return false;
            }

            var left = 0;
            if (total <= limit && total < Bound)
            {
                var loop = loopOf[(shape * moves.Length) + move];
                for (var i = 0; i < _width; i++)
                {
                    _coordinates[there + i] = _stage.Components[i].After[(_coordinates[here + i] * loops) + loop];
                }

                left = _stage.LeastCost(next, _coordinates.AsSpan(there, _width));
            }

            if (total + left >= Bound)
            {
                continue;
            }

            if (total + (left * Weight) > limit)
            {
                NextCost = Math.Min(NextCost, total + (left * Weight));
                continue;
            }

            _word.Add(move);
            if (left == 0)
            {
                if (total > above && found(_word, total))
                {
                    return false;
                }
            }
            else if (!Descend(next, depth + 1, move, total, above, limit, maxNodes, found))
            {
                return false;
            }

            _word.RemoveAt(_word.Count - 1);
        }

        return true;
    }
}
