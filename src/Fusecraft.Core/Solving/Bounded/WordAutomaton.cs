using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// For mechanisms with one shape, where moves are always free: an automaton that reads words move by move and refuses those with a part that a smaller word of the same permutation could replace. Smaller words are found
/// breadth-first among all short ones; the automaton is that of Aho and Corasick for the parts refused.
/// </summary>
/// <remarks>Source: A. V. Aho, M. J. Corasick, <em>Efficient string matching</em>, Comm. ACM 18 (1975); for its use in searches L. A. Taylor, R. E. Korf, <em>Pruning duplicate nodes in depth-first search</em> (1993) (both from memory). Immutable, safe to share.</remarks>
internal sealed class WordAutomaton
{
    /// <summary>No more words than this are compared.</summary>
    private const int MostWords = 60_000;

    private readonly List<int[]> _next = [];
    private readonly List<ulong[]> _refused = [];
    private readonly int _moves;

    public WordAutomaton(MoveList moves, CancellationToken cancellation)
    {
        _moves = moves.Count;
        var words = new List<Entry> { new(-1, -1, 0, Permutation.Identity, []) };
        var best = new Dictionary<Permutation, int> { [Permutation.Identity] = 0 };
        var refused = new HashSet<int>();
        var children = new List<int[]>();
        for (var word = 0; word < words.Count && words.Count + moves.Count <= MostWords; word++)
        {
            cancellation.ThrowIfCancellationRequested();
            if (refused.Contains(word))
            {
                children.Add([]);
                continue;
            }

            var next = new int[moves.Count];
            for (var move = 0; move < moves.Count; move++)
            {
                next[move] = words.Count;
                var made = new Entry(word, move, words[word].Cost + moves.Moves[move].Cost, words[word].Permutation * moves.Moves[move].Permutation, [.. words[word].Steps, .. moves.Moves[move].Steps]);
                words.Add(made);
                if (words[word].Move >= 0 && moves.Moves[move].Class >= 0 && moves.Moves[move].Class == moves.Moves[words[word].Move].Class)
                {
                    refused.Add(words.Count - 1);
                }
                else if (!best.TryAdd(made.Permutation, words.Count - 1))
                {
                    var other = best[made.Permutation];
                    var isLess = PairRules.Compare(made.Steps, made.Cost, words[other].Steps, words[other].Cost) < 0;
                    refused.Add(isLess ? other : words.Count - 1);
                    best[made.Permutation] = isLess ? words.Count - 1 : other;
                }
            }

            children.Add(next);
        }

        Build(refused, children);
    }

    /// <summary>The number of states.</summary>
    public int StateCount => _next.Count;

    /// <summary>The state after a move that is not refused; state 0 has read nothing.</summary>
    public int Next(int state, int move) => _next[state][move];

    /// <summary>A bit for each move that is refused.</summary>
    public ulong[] Refused(int state) => _refused[state];

    // States are the words without refused parts whose moves were tried; what goes beyond them falls back to the longest end that is such a word.
    private void Build(HashSet<int> refused, List<int[]> children)
    {
        var queue = new Queue<(int Word, int Behind)>([(0, -1)]);
        var states = 1;
        while (queue.TryDequeue(out var state))
        {
            var (word, behind) = state;
            var next = behind < 0 ? new int[_moves] : (int[])_next[behind].Clone();
            var bits = behind < 0 ? new ulong[(_moves + 63) / 64] : (ulong[])_refused[behind].Clone();
            for (var move = 0; move < _moves; move++)
            {
                var child = children[word][move];
                if (refused.Contains(child))
                {
                    bits[move >> 6] |= 1UL << move;
                }
                else if (child < children.Count && (bits[move >> 6] >> move & 1) == 0)
                {
                    // Behind the first move alone there is nothing; else what stands behind goes along.
                    queue.Enqueue((child, behind < 0 ? 0 : next[move]));
                    next[move] = states++;
                }
            }

            _next.Add(next);
            _refused.Add(bits);
        }
    }

    private sealed record Entry(int Parent, int Move, int Cost, Permutation Permutation, int[] Steps);
}
