using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>States one by one.</summary>
internal sealed class CensusStates : CensusSpace
{
    private readonly StateNeighbours _neighbours;
    private readonly ColouredKeys _keys;
    private readonly int[] _weights;
    private readonly bool _isRun;

    public CensusStates(Mechanism mechanism, Metric metric, PruningMoves moves)
    {
        _neighbours = new StateNeighbours(mechanism, metric);
        _keys = _neighbours.Keys;
        _weights = moves.Weights;
        _isRun = metric.Kind == MetricKind.Run;
        IsUniform = moves.IsUniform;
        GreatestCost = moves.IsUniform ? 1 : _weights.DefaultIfEmpty(1).Max();
    }

    public override int Words => _keys.Words;

    public override bool IsUniform { get; }

    public override int GreatestCost { get; }

    public override void Start(Shape shape, Span<ulong> key) => _keys.TryPack(shape.Key, default, key);

    protected override void FindAll(ReadOnlySpan<ulong> key)
    {
        if (_isRun)
        {
            for (var group = 0; group < _neighbours.GroupCount; group++)
            {
                var found = _neighbours.Find(key, group, isForward: true);
                for (var i = 1; i < found; i++)
                {
                    _neighbours[i].CopyTo(Next());
                    Keep(1);
                }
            }

            return;
        }

        for (var step = 0; step < _weights.Length; step++)
        {
            if (_keys.TryMove<ManyWords>(step, key, Next()))
            {
                Keep(_weights[step]);
            }
        }
    }
}
