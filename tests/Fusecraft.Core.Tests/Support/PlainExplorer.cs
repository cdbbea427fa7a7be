using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Support;

/// <summary>A breadth-first search over shapes as simple as can be, one shape and one step at a time: the judge of the library's own.</summary>
internal sealed class PlainExplorer
{
    private readonly Mechanism _mechanism;
    private readonly int _maxShapes;
    private readonly ShapeStore _store;

    public PlainExplorer(Mechanism mechanism, int maxShapes = int.MaxValue)
    {
        _mechanism = mechanism;
        _maxShapes = maxShapes;
        _store = new ShapeStore(mechanism.Board.Words);
        Run();
    }

    public int Count => _store.Count;

    public bool IsComplete { get; private set; } = true;

    public long FreeTurns { get; private set; }

    public int DeadEnds { get; private set; }

    public int StuckShapes { get; private set; }

    public List<int> Parents { get; } = [-1];

    public List<int> ParentSteps { get; } = [0];

    public List<int> LevelStarts { get; } = [0];

    public ReadOnlySpan<ulong> Key(int shape) => _store.Key(shape);

    private void Run()
    {
        var moves = _mechanism.Board.Moves;
        var shape = new ulong[_mechanism.Board.Words];
        var next = new ulong[shape.Length];
        _store.FindOrAdd<ManyWords>(_mechanism.Home.Key);
        var levelEnd = 1;
        for (var current = 0; current < Count; current++)
        {
            if (current == levelEnd)
            {
                LevelStarts.Add(current);
                levelEnd = Count;
            }

            _store.Key(current).CopyTo(shape);
            var turns = new HashSet<Turn>();
            var forward = 0;
            for (var step = 0; step < moves.Length; step++)
            {
                if (!moves[step].IsFree(shape))
                {
                    continue;
                }

                turns.Add(_mechanism.Steps[step].Turn);
                forward += _mechanism.Steps[step].IsForward ? 1 : 0;
                moves[step].Move(shape, next);
                if (_store.FindOrAdd<ManyWords>(next) < Parents.Count)
                {
                    continue;
                }

                if (Parents.Count == _maxShapes)
                {
                    IsComplete = false;
                    _store.RemoveLast<ManyWords>();
                    LevelStarts.AddRange(Count > levelEnd ? [levelEnd, Count] : [Count]);
                    return;
                }

                Parents.Add(current);
                ParentSteps.Add(step);
            }

            FreeTurns += forward;
            DeadEnds += turns.Count == 1 ? 1 : 0;
            StuckShapes += turns.Count == 0 ? 1 : 0;
        }

        LevelStarts.Add(Count);
    }
}
