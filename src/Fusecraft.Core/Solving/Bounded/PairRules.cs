using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>For each pair of moves in a row the smaller words of at most two moves that do the same: above all, commuting moves in the other order, and moves that cancel. Immutable, safe to share.</summary>
internal sealed class PairRules
{
    /// <summary>With more moves than this no pairs are compared.</summary>
    private const int MostMoves = 256;

    private readonly Mechanism _mechanism;
    private readonly Dictionary<string, int> _ids = [];
    private readonly int[][][][] _smaller = [];

    public PairRules(Mechanism mechanism, Metric metric)
    {
        _mechanism = mechanism;
        var moves = Moves(mechanism, metric);
        if (moves.Count > MostMoves)
        {
            return;
        }

        moves.ForEach(move => _ids.Add(Key(move.Steps), _ids.Count));
        var words = new Dictionary<Permutation, List<Entry>> { [Permutation.Identity] = [new Entry([], 0)] };
        foreach (var first in moves)
        {
            Add(words, first.Permutation, new Entry(first.Steps, first.Cost));
            foreach (var second in moves)
            {
                if (first.Class < 0 || first.Class != second.Class)
                {
                    Add(words, first.Permutation * second.Permutation, new Entry([.. first.Steps, .. second.Steps], first.Cost + second.Cost));
                }
            }
        }

        _smaller = new int[moves.Count][][][];
        for (var i = 0; i < moves.Count; i++)
        {
            _smaller[i] = new int[moves.Count][][];
            for (var k = 0; k < moves.Count; k++)
            {
                var own = new Entry([.. moves[i].Steps, .. moves[k].Steps], moves[i].Cost + moves[k].Cost);
                _smaller[i][k] = !words.TryGetValue(moves[i].Permutation * moves[k].Permutation, out var same) ? []
                    : [.. same.Where(other => other.CompareTo(own) < 0).Select(other => other.Steps)];
            }
        }
    }

    /// <summary>The number of a move; -1 where it is not known here.</summary>
    public int IdOf(int[] steps) => _ids.GetValueOrDefault(Key(steps), -1);

    /// <summary>True where a smaller word does at a shape what two moves do there.</summary>
    public bool HasSmallerWord(int first, int second, ReadOnlySpan<ulong> shape)
    {
        if (first < 0 || second < 0)
        {
            return false;
        }

        foreach (var word in _smaller[first][second])
        {
            if (IsFree(word, shape))
            {
                return true;
            }
        }

        return false;
    }

    /// <summary>Orders words: by cost, by number of steps, by the numbers of the steps.</summary>
    public static int Compare(int[] steps, int cost, int[] otherSteps, int otherCost)
    {
        var order = cost.CompareTo(otherCost);
        order = order != 0 ? order : steps.Length.CompareTo(otherSteps.Length);
        return order != 0 ? order : steps.AsSpan().SequenceCompareTo(otherSteps);
    }

    private bool IsFree(int[] word, ReadOnlySpan<ulong> shape)
    {
        Span<ulong> at = shape.Length <= 64 ? stackalloc ulong[shape.Length] : new ulong[shape.Length];
        Span<ulong> next = shape.Length <= 64 ? stackalloc ulong[shape.Length] : new ulong[shape.Length];
        shape.CopyTo(at);
        foreach (var step in word)
        {
            var moves = _mechanism.Board.Moves[step];
            if (!moves.IsFree(at))
            {
                return false;
            }

            moves.Move(at, next);
            next.CopyTo(at);
        }

        return true;
    }

    private static void Add(Dictionary<Permutation, List<Entry>> words, Permutation permutation, Entry word)
    {
        if (!words.TryGetValue(permutation, out var list))
        {
            words.Add(permutation, list = []);
        }

        list.Add(word);
    }

    // Single steps, and of a turn whose steps make runs all its powers, forwards and backwards.
    private static List<(int[] Steps, int Class, int Cost, Permutation Permutation)> Moves(Mechanism mechanism, Metric metric)
    {
        var weights = new PruningMoves(mechanism, metric);
        var (groups, costs, isRun) = MoveCatalogue.Groups(mechanism, metric, weights);
        var moves = new List<(int[], int, int, Permutation)>();
        for (var group = 0; group < groups.Length; group++)
        {
            foreach (var step in groups[group])
            {
                var permutation = mechanism.Steps[step].Permutation;
                var done = permutation;
                for (var count = 1; !done.IsIdentity && count <= MostMoves; count++)
                {
                    moves.Add(([.. Enumerable.Repeat(step, count)], isRun[group] ? group : -1, costs[group], done));
                    done *= permutation;
                    if (!isRun[group])
                    {
                        break;
                    }
                }
            }
        }

        return moves;
    }

    private static string Key(int[] steps) => string.Join(' ', steps);

    private readonly record struct Entry(int[] Steps, int Cost) : IComparable<Entry>
    {
        public int CompareTo(Entry other) => Compare(Steps, Cost, other.Steps, other.Cost);
    }
}
