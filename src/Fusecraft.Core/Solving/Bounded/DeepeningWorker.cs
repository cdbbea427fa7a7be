using System.Runtime.CompilerServices;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// One thread's part of an iterative deepening search: tries all words below a prefix whose length and bound stay within a limit, depth first. A node costs one look-up a coordinate and a reading or two of the tables; no permutation
/// is touched until all bounds are zero, and then the whole word is multiplied out.
/// </summary>
/// <remarks>Source: R. E. Korf, <em>Depth-first iterative-deepening</em>, Artificial Intelligence 27 (1985); pattern databases: J. C. Culberson, J. Schaeffer (1998) (both from memory).</remarks>
internal sealed class DeepeningWorker
{
    /// <summary>How many nodes are tried between two looks at the clock and at what other threads have found.</summary>
    private const long Stride = 1 << 13;

    private readonly DeepeningSearch _search;
    private readonly MoveCatalogue _catalogue;
    private readonly WordAutomaton? _automaton;
    private readonly BoundTables.Coordinate[] _coordinates;
    private readonly BoundTables.Reading[] _readings;
    private readonly int _stepCount;
    private readonly List<Level> _levels = [];
    private int _goalShape;
    private int _splitDepth;
    private List<int[]>? _prefixes;
    private long _maxNodes;
    private long _nextLook;
    private int _task;

    public DeepeningWorker(DeepeningSearch search)
    {
        _search = search;
        _catalogue = new MoveCatalogue(search.Mechanism, search.Metric, search.Pairs);
        _automaton = search.Automaton;
        _coordinates = search.Tables.Coordinates.ToArray();
        _readings = search.Tables.Readings.ToArray();
        _stepCount = search.Mechanism.Steps.Length;
    }

    /// <summary>How a part ended.</summary>
    public enum End
    {
        /// <summary>All words were tried.</summary>
        Exhausted,

        /// <summary>A word was found: <see cref="Word"/>.</summary>
        Found,

        /// <summary>The budget of nodes ended it.</summary>
        OutOfNodes,

        /// <summary>The clock, or another thread's find, ended it.</summary>
        Stopped,
    }

    /// <summary>The nodes tried by the last part.</summary>
    public long Nodes { get; private set; }

    /// <summary>The least length, in units, beyond the limit at which a word left out might lead to the goal; <see cref="int.MaxValue"/> where none was left out.</summary>
    public int NextLimit { get; private set; }

    /// <summary>The steps of the word found.</summary>
    public List<Step> Word { get; } = [];

    /// <summary>Tries all words, but for those of at least so many moves, whose beginnings are collected in order.</summary>
    public End Split(int limit, int depth, long maxNodes, List<int[]> prefixes)
    {
        _splitDepth = depth;
        _prefixes = prefixes;
        return Run([], limit, maxNodes, -1);
    }

    /// <summary>Tries all words that begin as one of the collected prefixes.</summary>
    public End Search(int[] prefix, int limit, long maxNodes, int task)
    {
        _splitDepth = int.MaxValue;
        _prefixes = null;
        return Run(prefix, limit, maxNodes, task);
    }

    private End Run(int[] prefix, int limit, long maxNodes, int task)
    {
        (Nodes, NextLimit, _maxNodes, _nextLook, _task) = (0, int.MaxValue, maxNodes, Stride, task);
        Word.Clear();
        var root = LevelAt(0);
        root.Shape = _catalogue.Number(_search.From.Key);
        root.State = 0;
        root.Refused = _automaton?.Refused(0) ?? [];
        root.Left = limit;
        _goalShape = _catalogue.Number(_search.Goal.Key);
        _search.RootValues.CopyTo(root.Values.AsSpan());
        if (_search.RootBound > limit)
        {
            NextLimit = _search.RootBound;
            return End.Exhausted;
        }

        if (prefix.Length == 0 && IsGoal(0))
        {
            return End.Found;
        }

        for (var depth = 0; depth < prefix.Length; depth++)
        {
            Open(depth);
            Enter(depth, prefix[depth]);
        }

        return Visit(prefix.Length, limit);
    }

    private End Visit(int depth, int limit)
    {
        if (depth >= _splitDepth)
        {
            _prefixes!.Add([.. _levels.Take(depth).Select(level => level.Move)]);
            return End.Exhausted;
        }

        if (_catalogue.IsFull)
        {
            Renumber(depth);
        }

        Open(depth);
        var level = _levels[depth];
        var refused = level.Refused;
        for (var move = 0; move < level.List.Count; move++)
        {
            if (refused.Length > 0 && (refused[move >> 6] >> move & 1) != 0)
            {
                continue;
            }

            if (Nodes >= _maxNodes)
            {
                return End.OutOfNodes;
            }

            if (++Nodes >= _nextLook)
            {
                _nextLook += Stride;
                if (_search.IsOver(_task))
                {
                    return End.Stopped;
                }
            }

            var left = level.Left - level.List.Moves[move].Cost;
            if (left < 0)
            {
                NextLimit = Math.Min(NextLimit, limit - left);
                continue;
            }

            if (!IsWithin(level, move, left, limit, out var mayBeGoal))
            {
                continue;
            }

            Enter(depth, move);
            if (mayBeGoal && IsGoal(depth + 1))
            {
                return End.Found;
            }

            var end = Visit(depth + 1, limit);
            if (end != End.Exhausted)
            {
                return end;
            }
        }

        return End.Exhausted;
    }

    // Forgets all shapes but those that the word at hand goes through.
    private void Renumber(int depth)
    {
        var keys = _levels.Take(depth + 1).Select(level => _catalogue.Key(level.Shape).ToArray()).ToList();
        _catalogue.Forget();
        _goalShape = _catalogue.Number(_search.Goal.Key);
        for (var i = 0; i <= depth; i++)
        {
            _levels[i].Shape = _catalogue.Number(keys[i]);
            if (i < depth)
            {
                _levels[i].List = _catalogue.At(_levels[i].Shape);
            }
        }
    }

    // Makes the moves of a node ready. The memory of the first table is told of all of them before any is read.
    private void Open(int depth)
    {
        var level = _levels[depth];
        var list = level.List = _catalogue.At(level.Shape);
        level.Ready(list.Count);
        if (_readings.Length == 0)
        {
            return;
        }

        var reading = _readings[0];
        var needed = Math.Max(reading.First, reading.Second) + 1;
        for (var move = 0; move < list.Count; move++)
        {
            if (Reach(level, move, needed))
            {
                var row = move * _coordinates.Length;
                reading.Table.Announce(level.Next[row + reading.First], reading.Second < 0 ? 0 : level.Next[row + reading.Second]);
            }
        }
    }

    // Bounds of what a move leads to: false where one of them is beyond what is left.
    private bool IsWithin(Level level, int move, int left, int limit, out bool mayBeGoal)
    {
        var greatest = 0;
        var row = move * _coordinates.Length;
        mayBeGoal = false;
        foreach (var reading in _readings)
        {
            if (!Reach(level, move, Math.Max(reading.First, reading.Second) + 1))
            {
                return false;
            }

            var bound = reading.Table.Bound(level.Next[row + reading.First], reading.Second < 0 ? 0 : level.Next[row + reading.Second]);
            if (bound == PruningTable.Never)
            {
                return false;
            }

            bound = _search.InUnits(bound);
            if (bound > left)
            {
                NextLimit = Math.Min(NextLimit, limit - left + bound);
                return false;
            }

            greatest = Math.Max(greatest, bound);
        }

        mayBeGoal = greatest == 0 && level.List.Ends[move] == _goalShape;
        return true;
    }

    // Works out the first coordinates of what a move leads to; false where one has no value.
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private bool Reach(Level level, int move, int needed) => level.Known[move] >= needed || ReachFurther(level, move, needed);

    private bool ReachFurther(Level level, int move, int needed)
    {
        if (level.Known[move] < 0)
        {
            return false;
        }

        var parent = level.List.Parents[move];
        if (parent >= 0 && !Reach(level, parent, needed))
        {
            level.Known[move] = -1;
            return false;
        }

        var step = level.List.Moves[move].Steps[^1];
        var row = move * _coordinates.Length;
        var before = parent * _coordinates.Length;
        for (var i = level.Known[move]; i < needed; i++)
        {
            var coordinate = _coordinates[i];
            var value = parent < 0 ? level.Values[i] : level.Next[before + i];
            value = coordinate.Table[(value * _stepCount) + coordinate.Steps[step]];
            if (value < 0)
            {
                level.Known[move] = -1;
                return false;
            }

            level.Next[row + i] = value;
        }

        level.Known[move] = needed;
        return true;
    }

    private void Enter(int depth, int move)
    {
        var next = LevelAt(depth + 1);
        var level = _levels[depth];
        var list = level.List;
        level.Move = move;
        next.Shape = list.Ends[move];
        next.Left = level.Left - list.Moves[move].Cost;
        if (_automaton is not null)
        {
            next.State = _automaton.Next(level.State, move);
            next.Refused = _automaton.Refused(next.State);
        }
        else
        {
            next.Refused = _catalogue.Redundant(level.Shape, move);
        }

        Reach(level, move, _coordinates.Length);
        level.Next.AsSpan(move * _coordinates.Length, _coordinates.Length).CopyTo(next.Values);
    }

    // Multiplies the word out.
    private bool IsGoal(int depth)
    {
        if (_levels[depth].Shape != _goalShape)
        {
            return false;
        }

        var labels = _search.Labels;
        for (var i = 0; i < depth; i++)
        {
            labels *= _levels[i].List.Moves[_levels[i].Move].Permutation;
        }

        if (!labels.IsIdentity)
        {
            return false;
        }

        for (var i = 0; i < depth; i++)
        {
            Word.AddRange(_levels[i].List.Moves[_levels[i].Move].Steps.Select(step => _search.Mechanism.Steps[step]));
        }

        return true;
    }

    private Level LevelAt(int depth)
    {
        if (depth == _levels.Count)
        {
            _levels.Add(new Level(_coordinates.Length));
        }

        return _levels[depth];
    }

    private sealed class Level(int coordinates)
    {
        public int Shape { get; set; }

        public int State { get; set; }

        public int Left { get; set; }

        public int Move { get; set; }

        public MoveList List { get; set; } = null!;

        public ulong[] Refused { get; set; } = [];

        /// <summary>The coordinates here.</summary>
        public int[] Values { get; } = new int[coordinates];

        /// <summary>The coordinates after each move.</summary>
        public int[] Next { get; private set; } = [];

        /// <summary>How many of them are worked out; -1 where one has no value.</summary>
        public int[] Known { get; private set; } = [];

        public void Ready(int moves)
        {
            if (Known.Length < moves)
            {
                Known = new int[moves];
                Next = new int[moves * coordinates];
            }

            Known.AsSpan(0, moves).Clear();
        }
    }
}
