using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>Numbers all keys that can be reached from a base, or from which it can be reached, breadth-first, and fills the table of steps between them.</summary>
internal sealed class CosetEnumeration
{
    private const int Unknown = -2;
    private readonly Mechanism _mechanism;
    private readonly ColouredKeys _keys;
    private readonly CosetOptions _options;
    private readonly CancellationToken _cancellation;
    private readonly int _steps;
    private readonly int _most;

    // For each step its opposite where that always undoes it, else -1.
    private readonly int[] _undoes;

    public CosetEnumeration(Mechanism mechanism, ColouredKeys keys, CosetOptions options, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        _keys = keys;
        _options = options;
        _cancellation = cancellation;
        _steps = mechanism.Steps.Length;
        _most = Math.Min(options.MaxCoordinates, Array.MaxLength / Math.Max(1, _steps));
        _undoes = [.. mechanism.Steps.Select(step => step.Turn.IsReversible || (options.IgnoresShapes && !step.Turn.IsOneWay) ? step.Opposite!.Index : -1)];
        Store = new ShapeStore(keys.Words);
    }

    public ShapeStore Store { get; }

    public int[] StepTable { get; private set; } = [];

    /// <summary>False where there are more than allowed.</summary>
    public bool Run<TWidth>()
        where TWidth : struct, IShapeWidth
    {
        var key = new ulong[_keys.Words];
        if (!_keys.TryPack((_options.BaseShape ?? _mechanism.Home).Key, default, key))
        {
            throw new InvalidOperationException("The base has no key.");
        }

        Store.FindOrAdd<TWidth>(key);
        Grow(16);

        // Where every step can be undone both senses find the same, and forwards each arc is looked up once only.
        var isDone = _options.TowardsBase && !_mechanism.IsReversible ? GoBack<TWidth>(key) : GoOn<TWidth>(key);
        if (isDone)
        {
            var table = StepTable;
            Array.Resize(ref table, Store.Count * _steps);
            StepTable = table;
            Store.Trim();
        }

        return isDone;
    }

    private bool GoOn<TWidth>(ulong[] key)
        where TWidth : struct, IShapeWidth
    {
        var next = new ulong[key.Length];
        for (var from = 0; from < Store.Count; from++)
        {
            Check(from);
            Store.Key<TWidth>(from).CopyTo(key);
            for (var step = 0; step < _steps; step++)
            {
                ref var entry = ref StepTable[(from * _steps) + step];
                if (entry != Unknown)
                {
                    continue;
                }

                if (!_keys.TryMove<TWidth>(step, key, next))
                {
                    entry = -1;
                    continue;
                }

                var to = Store.FindOrAdd<TWidth>(next);
                if (Store.Count > _most)
                {
                    return false;
                }

                entry = to;
                Grow(Store.Count);
                if (_undoes[step] >= 0)
                {
                    StepTable[(to * _steps) + _undoes[step]] = from;
                }
            }
        }

        return true;
    }

    private bool GoBack<TWidth>(ulong[] key)
        where TWidth : struct, IShapeWidth
    {
        var previous = new ulong[key.Length];
        for (var to = 0; to < Store.Count; to++)
        {
            Check(to);
            Store.Key<TWidth>(to).CopyTo(key);
            for (var step = 0; step < _steps; step++)
            {
                if (!_keys.TryMoveBack<TWidth>(step, key, previous))
                {
                    continue;
                }

                var from = Store.FindOrAdd<TWidth>(previous);
                if (Store.Count > _most)
                {
                    return false;
                }

                Grow(Store.Count);
                StepTable[(from * _steps) + step] = to;
            }
        }

        // What was never met leads away for good, or is barred.
        StepTable.AsSpan().Replace(Unknown, -1);
        return true;
    }

    private void Grow(int count)
    {
        var old = StepTable.Length;
        if ((long)count * _steps > old)
        {
            var table = StepTable;
            Array.Resize(ref table, (int)Math.Min((long)_most * _steps, Math.Max((long)count * _steps, 2L * old)));
            table.AsSpan(old).Fill(Unknown);
            StepTable = table;
        }
    }

    private void Check(int done)
    {
        if (done % 1024 == 0)
        {
            _cancellation.ThrowIfCancellationRequested();
        }
    }
}
