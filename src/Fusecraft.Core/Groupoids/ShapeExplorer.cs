using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// Breadth-first search over shapes from a first one. Shapes are numbered in the order of their finding, so by their distance from the first; the numbering depends on nothing but the
/// mechanism and the first shape.
/// </summary>
internal sealed class ShapeExplorer
{
    private const int ProgressInterval = 1 << 16;
    private readonly Mechanism _mechanism;
    private readonly int _maxShapes;
    private readonly IProgress<ExplorationProgress>? _progress;
    private readonly CancellationToken _cancellation;

    public ShapeExplorer(Mechanism mechanism, ExplorationOptions options, IProgress<ExplorationProgress>? progress, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        _maxShapes = options.MaxShapes;
        _progress = progress;
        _cancellation = cancellation;
        Store = new ShapeStore(mechanism.Board.Words);
    }

    public ShapeStore Store { get; }

    /// <summary>Ends the search as soon as this shape is found; null to go on.</summary>
    public ulong[]? StopAt { get; init; }

    public bool IsComplete { get; private set; } = true;

    /// <summary>Pairs (shape, turn) whose forward step is free, over the shapes whose steps were all tried.</summary>
    public long FreeTurns { get; private set; }

    public int DeadEnds { get; private set; }

    public int StuckShapes { get; private set; }

    /// <summary>For each shape the shape it was found from; -1 for the first.</summary>
    public List<int> Parents { get; } = [-1];

    /// <summary>For each shape the number of the step it was found by.</summary>
    public List<ushort> ParentSteps { get; } = [0];

    /// <summary>The first shape of each distance, and at the end the number of shapes.</summary>
    public List<int> LevelStarts { get; } = [0];

    public void Run(ReadOnlySpan<ulong> first)
    {
        switch (_mechanism.Board.Words)
        {
            case 1: Run<OneWord>(first); break;
            case 2: Run<TwoWords>(first); break;
            case 4: Run<FourWords>(first); break;
            case 8: Run<EightWords>(first); break;
            default: Run<ManyWords>(first); break;
        }

        LevelStarts.Add(Store.Count);
        Store.Trim();
    }

    /// <summary>The steps of a shortest path from the first shape.</summary>
    public ImmutableArray<Step> PathTo(int shape)
    {
        var steps = new List<Step>();
        for (; Parents[shape] >= 0; shape = Parents[shape])
        {
            steps.Add(_mechanism.Steps[ParentSteps[shape]]);
        }

        steps.Reverse();
        return [.. steps];
    }

    private void Run<TWidth>(ReadOnlySpan<ulong> first)
        where TWidth : struct, IShapeWidth
    {
        var moves = _mechanism.Board.Moves;
        var names = new SharedNames(_mechanism);
        var turnOf = Array.ConvertAll([.. _mechanism.Steps], step => step.Turn.Index);
        var isForward = Array.ConvertAll([.. _mechanism.Steps], step => step.IsForward);
        Span<ulong> shape = new ulong[_mechanism.Board.Words];
        Span<ulong> next = new ulong[shape.Length];
        Store.FindOrAdd<TWidth>(first);
        var levelEnd = 1;
        for (var current = 0; current < Store.Count; current++)
        {
            if (current == levelEnd)
            {
                LevelStarts.Add(current);
                levelEnd = Store.Count;
            }

            if (current % ProgressInterval == 0)
            {
                _cancellation.ThrowIfCancellationRequested();
                _progress?.Report(new ExplorationProgress(Store.Count, current));
            }

            // Copied, because the store may grow while its steps are tried.
            Store.Key<TWidth>(current).CopyTo(shape);
            var (freeTurns, lastTurn) = (0, -1);
            for (var step = 0; step < moves.Length; step++)
            {
                if (!moves[step].IsFree<TWidth>(shape))
                {
                    continue;
                }

                names.Note(step, current);
                FreeTurns += isForward[step] ? 1 : 0;
                if (turnOf[step] != lastTurn)
                {
                    lastTurn = turnOf[step];
                    freeTurns++;
                }

                moves[step].Move<TWidth>(shape, next);
                var target = Store.FindOrAdd<TWidth>(next);
                if (target == Parents.Count)
                {
                    if (target >= _maxShapes)
                    {
                        IsComplete = false;
                        Store.RemoveLast<TWidth>();
                        return;
                    }

                    Parents.Add(current);
                    ParentSteps.Add((ushort)step);
                    if (StopAt is not null && next.SequenceEqual(StopAt))
                    {
                        return;
                    }
                }
            }

            DeadEnds += freeTurns == 1 ? 1 : 0;
            StuckShapes += freeTurns == 0 ? 1 : 0;
        }
    }

    /// <summary>Holds that no two steps written alike are free together.</summary>
    private sealed class SharedNames
    {
        private readonly Mechanism _mechanism;
        private readonly int[] _nameOf;
        private readonly (int Shape, int Step)[] _last;

        public SharedNames(Mechanism mechanism)
        {
            _mechanism = mechanism;
            _nameOf = new int[mechanism.Steps.Length];
            Array.Fill(_nameOf, -1);
            var count = 0;
            foreach (var steps in mechanism.StepNames.Shared)
            {
                steps.ForEach(step => _nameOf[step.Index] = count);
                count++;
            }

            _last = new (int, int)[count];
            Array.Fill(_last, (-1, -1));
        }

        public void Note(int step, int shape)
        {
            var name = _nameOf[step];
            if (name < 0)
            {
                return;
            }

            if (_last[name].Shape == shape)
            {
                var (one, other) = (_mechanism.Steps[_last[name].Step], _mechanism.Steps[step]);
                throw new MechanismFormatException([new MechanismProblem(
                    $"$.turns.{other.Turn.Name}",
                    null,
                    null,
                    $"steps of the turns \"{one.Turn.Name}\" and \"{other.Turn.Name}\", both written \"{one.Name}\" and free in one reachable shape",
                    "steps may share a name only where no two of them are ever free together; change \"as\" or \"backAs\"")]);
            }

            _last[name] = (shape, step);
        }
    }
}
