using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// Breadth-first search over shapes up to symmetry. The representative of an orbit is its least key. An arc from a representative leads to a shape that some symmetry takes to a representative;
/// that symmetry is the arc's voltage.
/// </summary>
internal sealed class OrbitExplorer
{
    private const int ProgressInterval = 1 << 14;
    private readonly Mechanism _mechanism;
    private readonly SymmetryTable _table;
    private readonly ShapeStore _store;
    private readonly int _maxShapes;
    private readonly IProgress<ExplorationProgress>? _progress;
    private readonly CancellationToken _cancellation;
    private readonly List<int> _parents = [];
    private readonly List<ushort> _parentSteps = [];
    private readonly List<ushort> _parentVoltages = [];
    private readonly List<ushort> _stabilizerOrders = [];

    public OrbitExplorer(Mechanism mechanism, SymmetryTable table, ExplorationOptions options, IProgress<ExplorationProgress>? progress, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        _table = table;
        _store = new ShapeStore(mechanism.Board.Words);
        _maxShapes = options.MaxShapes;
        _progress = progress;
        _cancellation = cancellation;
    }

    public Mechanism Mechanism => _mechanism;

    public SymmetryTable Table => _table;

    public bool IsComplete { get; private set; } = true;

    public int Count => _store.Count;

    /// <summary>The symmetry that takes home to representative 0.</summary>
    public int HomeVoltage { get; private set; }

    /// <summary>All arcs in the order of their search; kept only where one-way steps make regions.</summary>
    public List<QuotientArc>? Arcs { get; private set; }

    public ReadOnlySpan<ulong> Key(int representative) => _store.Key(representative);

    public int StabilizerOrder(int representative) => _stabilizerOrders[representative];

    public int Parent(int representative) => _parents[representative];

    public int ParentStep(int representative) => _parentSteps[representative];

    public int ParentVoltage(int representative) => _parentVoltages[representative];

    /// <summary>The number of a representative; -1 where its orbit was not reached.</summary>
    public int Find(ReadOnlySpan<ulong> representative) => _store.Find(representative);

    /// <summary>Searches from home; <paramref name="onArc"/> is told of every arc, once its end has a number.</summary>
    public void Run(Action<QuotientArc>? onArc)
    {
        Arcs = onArc is null ? [] : null;
        var words = _mechanism.Board.Words;
        var moves = _mechanism.Board.Moves;
        Span<ulong> shape = new ulong[words];
        Span<ulong> next = new ulong[words];
        Span<ulong> least = new ulong[words];
        Span<ulong> image = new ulong[words];
        HomeVoltage = _table.Canonicalize(_mechanism.Board.HomeKey, least, image, out var stabilizer);
        FindOrAdd(least, -1, 0, 0, stabilizer);
        for (var current = 0; current < _store.Count; current++)
        {
            if (current % ProgressInterval == 0)
            {
                _cancellation.ThrowIfCancellationRequested();
                _progress?.Report(new ExplorationProgress(_store.Count, current));
            }

            _store.Key(current).CopyTo(shape);
            for (var step = 0; step < moves.Length; step++)
            {
                if (!moves[step].IsFree(shape))
                {
                    continue;
                }

                moves[step].Move(shape, next);
                var voltage = _table.Canonicalize(next, least, image, out stabilizer);
                var target = FindOrAdd(least, current, step, voltage, stabilizer);
                if (target < 0)
                {
                    IsComplete = false;
                    return;
                }

                var arc = new QuotientArc(current, step, target, voltage);
                Arcs?.Add(arc);
                onArc?.Invoke(arc);
            }
        }

        _store.Trim();
    }

    /// <summary>Where a step leads, with the voltage; null where it is barred.</summary>
    public QuotientArc? Follow(int representative, int step, ulong[] next, ulong[] least, ulong[] image)
    {
        var moves = _mechanism.Board.Moves[step];
        var key = _store.Key(representative);
        if (!moves.IsFree(key))
        {
            return null;
        }

        moves.Move(key, next);
        var voltage = _table.Canonicalize(next, least, image, out _);
        return new QuotientArc(representative, step, _store.Find(least), voltage);
    }

    private int FindOrAdd(ReadOnlySpan<ulong> key, int parent, int step, int voltage, int stabilizer)
    {
        var count = _store.Count;
        if (count >= _maxShapes)
        {
            return _store.Find(key);
        }

        var found = _mechanism.Board.Words == 1 ? _store.FindOrAdd<OneWord>(key) : _store.FindOrAdd<ManyWords>(key);
        if (found == count)
        {
            _parents.Add(parent);
            _parentSteps.Add((ushort)step);
            _parentVoltages.Add((ushort)voltage);
            _stabilizerOrders.Add((ushort)stabilizer);
        }

        return found;
    }
}

/// <summary>A free step from one representative, up to symmetry, to another: the step leads to a shape which the symmetry numbered <paramref name="Voltage"/> takes to the second.</summary>
internal readonly record struct QuotientArc(int From, int Step, int To, int Voltage);
