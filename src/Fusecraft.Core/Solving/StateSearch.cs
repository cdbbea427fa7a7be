using System.Collections.Immutable;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// Breadth-first search from both ends over coloured shapes: a shape together with the colour of the label on each site. With all labels of different colours these are the states themselves;
/// with some labels of one colour, what matters of them. Level by level, the smaller side first, so the first meeting is a shortest path.
/// </summary>
internal sealed class StateSearch
{
    private readonly Mechanism _mechanism;
    private readonly CancellationToken _cancellation;
    private readonly int _boardWords;
    private readonly int _words;
    private readonly SiteMover _mover;
    private readonly Side _forward;
    private readonly Side _backward;

    /// <param name="mechanism">The mechanism.</param>
    /// <param name="cancellation">Ends the search early.</param>
    public StateSearch(Mechanism mechanism, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        _cancellation = cancellation;
        _boardWords = mechanism.Board.Words;
        _mover = mechanism.SiteMover;
        _words = _boardWords + _mover.Words;
        _forward = new Side(_words);
        _backward = new Side(_words);
    }

    /// <summary>How a search ended.</summary>
    public enum Outcome
    {
        /// <summary>The two sides met: <see cref="Path"/> is a shortest path.</summary>
        Found,

        /// <summary>One side has seen all it can reach: there is no path.</summary>
        NoPath,

        /// <summary>There is no path of at most the greatest length asked for.</summary>
        NoneThatShort,

        /// <summary>The budget of states ended the search.</summary>
        OutOfStates,
    }

    /// <summary>The steps of the path found.</summary>
    public ImmutableArray<Step> Path { get; private set; } = [];

    /// <summary>No path is shorter than this; grows during the search.</summary>
    public int LowerBound { get; private set; }

    /// <summary>The states held by both sides.</summary>
    public int StateCount => _forward.Store.Count + _backward.Store.Count;

    /// <summary>Adds a place to start from.</summary>
    /// <param name="shape">The shape.</param>
    /// <param name="colourOn">For each site the colour of the label on it, as numbers below the number of sites.</param>
    public void AddStart(Shape shape, ReadOnlySpan<int> colourOn) => AddEnd(_forward, shape, colourOn);

    /// <summary>Adds a place to arrive at.</summary>
    /// <inheritdoc cref="AddStart" path="/param"/>
    public void AddGoal(Shape shape, ReadOnlySpan<int> colourOn) => AddEnd(_backward, shape, colourOn);

    /// <summary>Searches, or goes on searching with a larger budget.</summary>
    public Outcome Run(int maxStates, int? maxLength)
    {
        if (LowerBound == 0)
        {
            for (var i = 0; i < _forward.Store.Count; i++)
            {
                if (_backward.Store.Find<ManyWords>(_forward.Store.Key(i)) >= 0)
                {
                    return Outcome.Found;
                }
            }

            LowerBound = 1;
        }

        while (true)
        {
            if (_forward.IsExhausted || _backward.IsExhausted)
            {
                return Outcome.NoPath;
            }

            if (LowerBound > maxLength)
            {
                return Outcome.NoneThatShort;
            }

            var side = _forward.LevelSize <= _backward.LevelSize ? _forward : _backward;
            if (Expand(side, maxStates) is { } outcome)
            {
                return outcome;
            }
        }
    }

    // Expands a level; null where it was finished without a meeting.
    private Outcome? Expand(Side side, int maxStates)
    {
        var other = ReferenceEquals(side, _forward) ? _backward : _forward;
        Span<ulong> node = new ulong[_words];
        Span<ulong> next = new ulong[_words];
        var moves = _mechanism.Board.Moves;
        for (; side.Next < side.LevelEnd; side.Next++)
        {
            if (side.Next % 1024 == 0)
            {
                _cancellation.ThrowIfCancellationRequested();
            }

            if (StateCount >= maxStates)
            {
                return Outcome.OutOfStates;
            }

            side.Store.Key(side.Next).CopyTo(node);
            for (var step = 0; step < moves.Length; step++)
            {
                if (!(ReferenceEquals(side, _forward) ? TryForward(moves[step], step, node, next) : TryBackward(moves[step], step, node, next)))
                {
                    continue;
                }

                var count = side.Store.Count;
                if (side.Store.FindOrAdd<ManyWords>(next) < count)
                {
                    continue;
                }

                side.Parents.Add((side.Next, step));
                var meeting = other.Store.Find<ManyWords>(next);
                if (meeting >= 0)
                {
                    Path = ReferenceEquals(side, _forward) ? Join(count, meeting) : Join(meeting, count);
                    return Outcome.Found;
                }
            }
        }

        side.LevelEnd = side.Store.Count;
        LowerBound++;
        return null;
    }

    private bool TryForward(StepMoves moves, int step, ReadOnlySpan<ulong> node, Span<ulong> next)
    {
        if (!moves.IsFree(node[.._boardWords]))
        {
            return false;
        }

        moves.Move(node[.._boardWords], next[.._boardWords]);
        _mover.Move(step, node[_boardWords..], next[_boardWords..]);
        return true;
    }

    private bool TryBackward(StepMoves moves, int step, ReadOnlySpan<ulong> node, Span<ulong> previous)
    {
        moves.MoveBack(node[.._boardWords], previous[.._boardWords]);
        if (!moves.IsFree(previous[.._boardWords]))
        {
            return false;
        }

        _mover.MoveBack(step, node[_boardWords..], previous[_boardWords..]);
        return true;
    }

    private ImmutableArray<Step> Join(int forward, int backward)
    {
        var steps = new List<Step>();
        for (; _forward.Parents[forward].Node >= 0; forward = _forward.Parents[forward].Node)
        {
            steps.Add(_mechanism.Steps[_forward.Parents[forward].Step]);
        }

        steps.Reverse();
        for (; _backward.Parents[backward].Node >= 0; backward = _backward.Parents[backward].Node)
        {
            steps.Add(_mechanism.Steps[_backward.Parents[backward].Step]);
        }

        return [.. steps];
    }

    private void AddEnd(Side side, Shape shape, ReadOnlySpan<int> colourOn)
    {
        var node = new ulong[_words];
        shape.Key.CopyTo(node);
        _mover.Load(colourOn, node.AsSpan(_boardWords));
        var count = side.Store.Count;
        if (side.Store.FindOrAdd<ManyWords>(node) == count)
        {
            side.Parents.Add((-1, -1));
            side.LevelEnd = side.Store.Count;
        }
    }

    private sealed class Side(int words)
    {
        public ShapeStore Store { get; } = new(words);

        public List<(int Node, int Step)> Parents { get; } = [];

        /// <summary>The next node to expand.</summary>
        public int Next { get; set; }

        /// <summary>The end of the level that is being expanded.</summary>
        public int LevelEnd { get; set; }

        public int LevelSize => LevelEnd - Next;

        public bool IsExhausted => Next == Store.Count;
    }
}
