using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// What a metric counts as one from a shape on: a step, or, where steps of one class in a row count once (runs) or not at all (steps without weight), all that such steps can do. And which moves need not follow which: those
/// where another word of at most two moves does the same for no more, is free too, and comes first in a fixed order of all words.
/// </summary>
/// <remarks>
/// <para>Words are ordered by cost, then by the number of steps, then by the numbers of the steps. To replace a part of a word by a smaller one makes the word smaller, whatever stands before and behind it; so the smallest word from a
/// state to another, which is one of the cheapest, has no part that is left out, and none is ever lost. Where guards bar steps, a part is left out only where the smaller one is free at the same shape.</para>
/// <para>Shapes are numbered as they are met. Not safe to share; each thread has its own, and the order does not depend on it.</para>
/// </remarks>
internal sealed class MoveCatalogue
{
    /// <summary>Runs that can do more than this at one shape are refused.</summary>
    private const int MostRuns = 20_000;

    /// <summary>So many shapes are remembered before all are forgotten.</summary>
    private const int MostShapes = 1 << 17;

    private readonly Mechanism _mechanism;
    private readonly PairRules _pairs;
    private readonly int[][] _groups;
    private readonly int[] _costs;
    private readonly bool[] _isRun;
    private readonly MoveWord[] _roots;
    private readonly Dictionary<Permutation, int> _numbers = new() { [Permutation.Identity] = 0 };
    private readonly List<(int Parent, MoveWord Move, int End)> _found = [];
    private readonly HashSet<int> _seen = [];
    private ShapeStore _shapes;
    private List<MoveList?> _lists = [];

    public MoveCatalogue(Mechanism mechanism, Metric metric, PairRules pairs)
    {
        _mechanism = mechanism;
        _pairs = pairs;
        _shapes = new ShapeStore(mechanism.Board.Words);
        (_groups, _costs, _isRun) = Groups(mechanism, metric, new PruningMoves(mechanism, metric));
        _roots = [.. _groups.Select(_ => new MoveWord([], Permutation.Identity, 0, -1, 0, -1, new MoveWord?[mechanism.Steps.Length]))];
    }

    /// <summary>True where there are so many shapes that it is time to forget them.</summary>
    public bool IsFull => _shapes.Count > MostShapes;

    /// <summary>The steps by what is counted together: the steps of each group, what a move of the group costs in units, and whether its steps may follow each other within one move.</summary>
    public static (int[][] Groups, int[] Costs, bool[] IsRun) Groups(Mechanism mechanism, Metric metric, PruningMoves weights)
    {
        var classes = metric.Kind == MetricKind.Run ? Metric.RunClasses(mechanism) : [.. mechanism.Steps.Select(step => weights.Weights[step.Index] == 0 ? -1 : step.Index)];
        var groups = mechanism.Steps.GroupBy(step => classes[step.Index]).ToList();
        return (
            [.. groups.Select(group => group.Select(step => step.Index).ToArray())],
            [.. groups.Select(group => metric.Kind == MetricKind.Run ? 1 : weights.Weights[group.First().Index])],
            [.. groups.Select(group => metric.Kind == MetricKind.Run || weights.Weights[group.First().Index] == 0)]);
    }

    /// <summary>The key of a shape.</summary>
    public ReadOnlySpan<ulong> Key(int shape) => _shapes.Key(shape);

    public void Forget()
    {
        _shapes = new ShapeStore(_mechanism.Board.Words);
        _lists = [];
    }

    /// <summary>The number of a shape.</summary>
    public int Number(ReadOnlySpan<ulong> key)
    {
        var number = _mechanism.Board.Words == 1 ? _shapes.FindOrAdd<OneWord>(key) : _shapes.FindOrAdd<ManyWords>(key);
        if (number == _lists.Count)
        {
            _lists.Add(null);
        }

        return number;
    }

    /// <summary>The moves at a shape.</summary>
    public MoveList At(int shape) => _lists[shape] ??= Make(_shapes.Key(shape).ToArray());

    /// <summary>A bit for each move that need not follow a move of a shape.</summary>
    public ulong[] Redundant(int shape, int move)
    {
        var list = At(shape);
        return list.Redundant[move] ??= FindRedundant(_shapes.Key(shape).ToArray(), list, move);
    }

    private MoveList Make(ulong[] shape)
    {
        _found.Clear();
        var end = new ulong[shape.Length];
        for (var group = 0; group < _groups.Length; group++)
        {
            var first = _found.Count;
            _seen.Clear();
            _seen.Add(0);
            Extend(-1, shape, _roots[group], group, end);
            for (var i = first; _isRun[group] && i < _found.Count; i++)
            {
                Extend(i, _shapes.Key(_found[i].End).ToArray(), _found[i].Move, group, end);
                if (_found.Count - first > MostRuns)
                {
                    throw new InvalidOperationException(
                        $"The steps {string.Join(", ", _groups[group].Select(step => _mechanism.Steps[step].Name))}, which are counted together, can do more than {MostRuns} different things in a row; that is too many to search.");
                }
            }
        }

        return new MoveList(_found);
    }

    private void Extend(int parent, ulong[] shape, MoveWord done, int group, ulong[] end)
    {
        foreach (var step in _groups[group])
        {
            var board = _mechanism.Board.Moves[step];
            if (!board.IsFree(shape))
            {
                continue;
            }

            var move = done.Next[step] ??= After(done, step, group);
            if (_seen.Add(move.PermutationNumber))
            {
                board.Move(shape, end);
                _found.Add((parent, move, Number(end)));
            }
        }
    }

    private MoveWord After(MoveWord done, int step, int group)
    {
        var permutation = done.Permutation * _mechanism.Steps[step].Permutation;
        _numbers.TryAdd(permutation, _numbers.Count);
        int[] steps = [.. done.Steps, step];
        return new MoveWord(steps, permutation, _numbers[permutation], _isRun[group] ? group : -1, _costs[group], _pairs.IdOf(steps), new MoveWord?[_mechanism.Steps.Length]);
    }

    private ulong[] FindRedundant(ulong[] shape, MoveList list, int move)
    {
        var next = At(list.Ends[move]);
        var redundant = new ulong[(next.Count + 63) / 64];
        for (var i = 0; i < next.Count; i++)
        {
            if ((list.Moves[move].Class >= 0 && next.Moves[i].Class == list.Moves[move].Class) || _pairs.HasSmallerWord(list.Moves[move].Id, next.Moves[i].Id, shape))
            {
                redundant[i >> 6] |= 1UL << i;
            }
        }

        return redundant;
    }
}

/// <summary>A move: its steps, what they do, the class it is a run of (-1 for none), its cost in units, the number by which <see cref="PairRules"/> knows it (-1 where it does not), and the moves that go on from it by one step.</summary>
internal sealed record MoveWord(int[] Steps, Permutation Permutation, int PermutationNumber, int Class, int Cost, int Id, MoveWord?[] Next);

/// <summary>The moves at a shape, each behind the one that it goes on from.</summary>
internal sealed class MoveList
{
    public MoveList(List<(int Parent, MoveWord Move, int End)> moves)
    {
        Parents = [.. moves.Select(move => move.Parent)];
        Moves = [.. moves.Select(move => move.Move)];
        Ends = [.. moves.Select(move => move.End)];
        Redundant = new ulong[Count][];
    }

    public int Count => Moves.Length;

    /// <summary>For each move the one that it goes on from, by one step; -1 where it is the first step itself.</summary>
    public int[] Parents { get; }

    public MoveWord[] Moves { get; }

    /// <summary>The shapes that the moves lead to.</summary>
    public int[] Ends { get; }

    public ulong[]?[] Redundant { get; }
}
