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
        var buckets = new SortedDictionary<int, List<(Permutation Permutation, int Shape, int Before, int Move)>>
        {
            [0] = [(Permutation.Identity, shape, -1, -1)],
        };
        while (buckets.Count > 0 && _entries.Count < maxCount)
        {
            var (cost, bucket) = buckets.First();
            buckets.Remove(cost);
            foreach (var (permutation, at, before, by) in bucket)
            {
                if (!_numbers.TryAdd(permutation, _entries.Count))
                {
                    continue;
                }

                _entries.Add((permutation, at, cost, before, by));
                for (var move = 0; move < frame.Moves.Length; move++)
                {
                    var target = frame.Targets[(at * frame.Moves.Length) + move];
                    if (target >= 0 && !(by >= 0 && frame.Moves[by].Class >= 0 && frame.Moves[by].Class == frame.Moves[move].Class))
                    {
                        var total = cost + frame.Moves[move].Cost;
                        if (!buckets.TryGetValue(total, out var list))
                        {
                            buckets.Add(total, list = []);
                        }

                        list.Add((permutation * frame.Moves[move].Permutation, target, _entries.Count - 1, move));
                    }
                }

                if (_entries.Count >= maxCount)
                {
                    break;
                }
            }
        }
    }

    /// <summary>The number of permutations.</summary>
    public int Count => _entries.Count;

    public Permutation this[int entry] => _entries[entry].Permutation;

    /// <summary>The cost of the word for a permutation; entries are in the order of cost.</summary>
    public int Cost(int entry) => _entries[entry].Cost;

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
}
