using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>What the cheapest words from one shape bring about: every permutation up to some cost, with a word for each.</summary>
internal sealed class ShortBall
{
    private readonly StageFrame _frame;
    private readonly List<(Permutation Permutation, int Shape, int Cost, int Before, int Move)> _entries = [];
    private readonly Dictionary<Permutation, int> _numbers = [];

    /// <summary>Searches from a shape, cheapest words first, until there are so many permutations.</summary>
    public ShortBall(StageFrame frame, int shape, int maxCount)
    {
        _frame = frame;
        Add(Permutation.Identity, shape, 0, -1, -1);
        var buckets = new SortedDictionary<int, List<(int Before, int Move)>>();
        Announce(0, buckets);
        while (buckets.Count > 0)
        {
            var (cost, bucket) = buckets.First();
            buckets.Remove(cost);
            foreach (var (before, move) in bucket)
            {
                if (Count == maxCount)
                {
                    return;
                }

                if (Add(this[before] * frame.Moves[move].Permutation, frame.Targets[(Shape(before) * frame.Moves.Length) + move], cost, before, move))
                {
                    Announce(Count - 1, buckets);
                }
            }
        }
    }

    /// <summary>The number of permutations.</summary>
    public int Count => _entries.Count;

    public Permutation this[int entry] => _entries[entry].Permutation;

    /// <summary>The frame's number of the shape that the word leads to.</summary>
    public int Shape(int entry) => _entries[entry].Shape;

    /// <summary>The cost of the word for a permutation; entries are in the order of cost.</summary>
    public int Cost(int entry) => _entries[entry].Cost;

    /// <summary>The class of the last move of the word; -2 for the empty one.</summary>
    public int LastClass(int entry) => _entries[entry].Move < 0 ? -2 : _frame.Moves[_entries[entry].Move].Class;

    /// <summary>The number of a permutation; -1 where no word here brings it about.</summary>
    public int Find(Permutation permutation) => _numbers.GetValueOrDefault(permutation, -1);

    /// <summary>The steps of the word for a permutation.</summary>
    public int[] Word(int entry)
    {
        var moves = new List<int>();
        for (; _entries[entry].Before >= 0; entry = _entries[entry].Before)
        {
            moves.Add(_entries[entry].Move);
        }

        moves.Reverse();
        return [.. moves.SelectMany(move => _frame.Moves[move].Steps)];
    }

    private bool Add(Permutation permutation, int shape, int cost, int before, int move)
    {
        if (!_numbers.TryAdd(permutation, Count))
        {
            return false;
        }

        _entries.Add((permutation, shape, cost, before, move));
        return true;
    }

    private void Announce(int entry, SortedDictionary<int, List<(int Before, int Move)>> buckets)
    {
        var moves = _frame.Moves;
        for (var move = 0; move < moves.Length; move++)
        {
            if (_frame.Targets[(Shape(entry) * moves.Length) + move] >= 0 && (moves[move].Class < 0 || LastClass(entry) != moves[move].Class))
            {
                var total = Cost(entry) + moves[move].Cost;
                if (!buckets.TryGetValue(total, out var bucket))
                {
                    buckets.Add(total, bucket = []);
                }

                bucket.Add((entry, move));
            }
        }
    }
}
