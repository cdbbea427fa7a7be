using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// States, or classes of states that steps without weight lead between where all of these can be undone, with a list of the moves at each shape. The shapes of a class are a component, with a tree path <c>τ(s)</c> from its first
/// shape to each and the group <c>Z</c> of its loops; a state <c>g * τ(s)</c> belongs to the coset <c>g * Z</c>. Of each coset the member is held that brings, base point after base point of the chain of <c>Z</c>, the least label
/// there that can be brought. So a class is one key, however large it is. Without such steps each shape is a component.
/// </summary>
internal sealed class CensusClasses : CensusSpace
{
    /// <summary>So many moves are remembered before all are forgotten.</summary>
    private const int MostMoves = 1 << 20;

    private readonly Mechanism _mechanism;
    private readonly int[] _costs;
    private readonly int[] _runs;
    private readonly bool[] _joins;
    private readonly int _maxShapes;
    private readonly CancellationToken _cancellation;
    private readonly ShapeStore _shapes;
    private readonly List<(int Component, Permutation Path)> _places = [];
    private readonly List<Component> _components = [];
    private readonly Dictionary<int, Moves[]> _moves = [];
    private readonly CensusLabels _keys;
    private readonly ushort[] _straight;
    private readonly ushort[] _labels;
    private int _heldMoves;
    private ushort[] _moved;
    private ushort[] _spare;

    /// <param name="mechanism">The mechanism.</param>
    /// <param name="metric">The metric.</param>
    /// <param name="moves">What it counts.</param>
    /// <param name="shapeBits">So many bits number every shape that can be met, up to 31.</param>
    /// <param name="maxShapes">With more shapes the work may stop anywhere.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public CensusClasses(Mechanism mechanism, Metric metric, PruningMoves moves, int shapeBits, int maxShapes, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        var joins = Joins(mechanism, moves);
        _joins = [.. moves.Weights.Select(weight => joins && weight == 0)];
        var isRun = metric.Kind == MetricKind.Run;
        _runs = isRun ? Metric.RunClasses(mechanism) : [];
        _costs = isRun ? [.. moves.Weights.Select(_ => 1)] : moves.Weights;
        _maxShapes = maxShapes;
        _cancellation = cancellation;
        _shapes = new ShapeStore(mechanism.Board.Words);
        _keys = new CensusLabels(mechanism, shapeBits);
        var count = _keys.Sites.Length;
        _straight = [.. Enumerable.Range(0, count).Select(site => (ushort)site)];
        (_labels, _moved, _spare) = (new ushort[count], new ushort[count], new ushort[count]);
        GreatestCost = _costs.DefaultIfEmpty(1).Max();
        IsUniform = mechanism.Steps.All(step => _joins[step.Index] || _costs[step.Index] == 1);
    }

    public override int Words => _keys.Words;

    public override bool IsUniform { get; }

    public override int GreatestCost { get; }

    public override int HeldShapes => _shapes.Count;

    /// <summary>True where a metric has steps without weight and each can be undone by another.</summary>
    public static bool Joins(Mechanism mechanism, PruningMoves moves) =>
        moves.Weights.Contains(0) && mechanism.Steps.All(step => moves.Weights[step.Index] > 0 || step.Turn.IsReversible);

    public override BigInteger SizeOf(ReadOnlySpan<ulong> key) => _components[_keys.Number(key)].Size;

    public override void Start(Shape shape, Span<ulong> key)
    {
        // The first shape of the first component is this one, with an empty path.
        var (component, _) = Place(shape.Key);
        Write(component, _straight, _straight, key);
    }

    protected override void FindAll(ReadOnlySpan<ulong> key)
    {
        var component = _keys.Number(key);
        if (!_moves.TryGetValue(component, out var all))
        {
            if (_heldMoves > MostMoves)
            {
                _moves.Clear();
                _heldMoves = 0;
            }

            all = FindMoves(component);
            _moves.Add(component, all);
        }

        _keys.Read(key, _labels);
        foreach (var moves in all)
        {
            for (var move = 0; move < moves.Targets.Length; move++)
            {
                Write(moves.Targets[move], _labels, moves.Sources[move], Next());
                Keep(moves.Cost);
            }
        }
    }

    // For each cost the cosets l * Z' that one move leads to from the states of the class of the identity: those of a move from the tree path to a shape, and what the loops make of these.
    private Moves[] FindMoves(int number)
    {
        var component = _components[number];
        var found = new SortedDictionary<int, ShapeStore>();
        for (var shape = component.First; shape < component.End; shape++)
        {
            foreach (var step in _mechanism.Steps)
            {
                if (!_joins[step.Index])
                {
                    if (!found.TryGetValue(_costs[step.Index], out var store))
                    {
                        found.Add(_costs[step.Index], store = new ShapeStore(Words));
                    }

                    Follow(shape, _places[shape].Path, step, store);
                }
            }
        }

        foreach (var store in found.Values)
        {
            Close(store, component);
            _heldMoves += store.Count;
        }

        return [.. found.Select(pair => List(pair.Key, pair.Value))];
    }

    // A step, and where runs are counted all that may follow it within its run.
    private void Follow(int shape, Permutation done, Step step, ShapeStore store)
    {
        var next = new ulong[Math.Max(1, _mechanism.Board.Words)];
        var key = new ulong[Words];
        var known = new ShapeStore(Words);
        var waiting = new Stack<(int Shape, Permutation Done, Step Step)>([(shape, done, step)]);
        while (store.Count <= _maxShapes && waiting.TryPop(out var move))
        {
            if (!TryMove(move.Shape, move.Step, next))
            {
                continue;
            }

            var (target, path) = Place(next);
            var after = move.Done * move.Step.Permutation;
            Write(target, Sources(after * path.Inverse()), _straight, key);
            store.FindOrAdd<ManyWords>(key);
            if (_runs.Length > 0 && known.Find(key) < 0)
            {
                known.FindOrAdd<ManyWords>(key);
                var there = _shapes.Find(next);
                foreach (var other in _mechanism.Steps)
                {
                    if (_runs[other.Index] == _runs[step.Index])
                    {
                        waiting.Push((there, after, other));
                    }
                }
            }
        }
    }

    private void Close(ShapeStore store, Component component)
    {
        var sources = new ushort[_straight.Length];
        var after = new ushort[_straight.Length];
        var key = new ulong[Words];
        for (var i = 0; component.Loops.Length > 0 && i < store.Count && store.Count <= _maxShapes; i++)
        {
            var target = _keys.Number(store.Key(i));
            _keys.Read(store.Key(i), sources);
            foreach (var loop in component.Loops)
            {
                for (var site = 0; site < sources.Length; site++)
                {
                    after[site] = loop[sources[site]];
                }

                Write(target, after, _straight, key);
                store.FindOrAdd<ManyWords>(key);
            }

            if (i % 1024 == 0)
            {
                _cancellation.ThrowIfCancellationRequested();
            }
        }
    }

    private Moves List(int cost, ShapeStore store)
    {
        var targets = new int[store.Count];
        var sources = new ushort[store.Count][];
        for (var i = 0; i < targets.Length; i++)
        {
            targets[i] = _keys.Number(store.Key(i));
            _keys.Read(store.Key(i), sources[i] = new ushort[_straight.Length]);
        }

        return new Moves(cost, targets, sources);
    }

    // Where a shape stands in its component, which is explored where the shape is new.
    private (int Component, Permutation Path) Place(ReadOnlySpan<ulong> key)
    {
        var first = _shapes.FindOrAdd<ManyWords>(key);
        if (first < _places.Count)
        {
            return _places[first];
        }

        var loops = new HashSet<Permutation>();
        var next = new ulong[Math.Max(1, _mechanism.Board.Words)];
        _places.Add((_components.Count, Permutation.Identity));
        for (var shape = first; shape < _places.Count && _places.Count <= _maxShapes; shape++)
        {
            foreach (var step in _mechanism.Steps)
            {
                if (!_joins[step.Index] || !TryMove(shape, step, next))
                {
                    continue;
                }

                var path = _places[shape].Path * step.Permutation;
                var there = _shapes.FindOrAdd<ManyWords>(next);
                if (there == _places.Count)
                {
                    _places.Add((_components.Count, path));
                }
                else if (path * _places[there].Path.Inverse() is { IsIdentity: false } loop)
                {
                    loops.Add(loop);
                }
            }
        }

        _components.Add(Describe(first, _places.Count, loops));
        return _places[first];
    }

    private Component Describe(int first, int end, HashSet<Permutation> loops)
    {
        if (loops.Count == 0)
        {
            return new Component(first, end, end - first, [], []);
        }

        var chain = StabilizerChain.Build(PermutationGroup.Generate(loops, _mechanism.SiteCount), null, _cancellation);
        var levels = new Level[chain.Base.Length];
        for (var level = 0; level < levels.Length; level++)
        {
            var orbit = chain.Orbit(level);
            levels[level] = new Level(
                Numbered(chain.Base[level]), [.. orbit.Select(Numbered)], [.. orbit.Select(point => Images(chain.Representative(level, point)))]);
        }

        return new Component(first, end, (end - first) * chain.Order, levels, [.. chain.StrongGenerators.Select(Sources)]);
    }

    private bool TryMove(int shape, Step step, ulong[] next)
    {
        var moves = _mechanism.Board.Moves[step.Index];
        if (!moves.IsFree(_shapes.Key(shape)))
        {
            return false;
        }

        moves.Move(_shapes.Key(shape), next);
        return true;
    }

    private ushort Numbered(int site) => (ushort)Array.BinarySearch(_keys.Sites, site);

    private ushort[] Images(Permutation permutation) => [.. _keys.Sites.Select(site => Numbered(permutation[site]))];

    private ushort[] Sources(Permutation permutation) => Images(permutation.Inverse());

    // Writes the chosen member of the coset of the labels that come from certain sites to each site.
    private void Write(int component, ushort[] labels, ushort[] sources, Span<ulong> key)
    {
        var levels = _components[component].Levels;
        if (levels.Length == 0)
        {
            _keys.Write(component, labels, sources, key);
            return;
        }

        for (var i = 0; i < sources.Length; i++)
        {
            _moved[i] = labels[sources[i]];
        }

        foreach (var level in levels)
        {
            var least = 0;
            for (var i = 1; i < level.Orbit.Length; i++)
            {
                least = _moved[level.Orbit[i]] < _moved[level.Orbit[least]] ? i : least;
            }

            if (level.Orbit[least] != level.Point)
            {
                var images = level.Images[least];
                for (var i = 0; i < images.Length; i++)
                {
                    _spare[i] = _moved[images[i]];
                }

                (_moved, _spare) = (_spare, _moved);
            }
        }

        _keys.Write(component, _moved, _straight, key);
    }

    /// <summary>Shapes with consecutive numbers; the number of states of a class; the chain of the loops; and their generators, inverted.</summary>
    private sealed record Component(int First, int End, BigInteger Size, Level[] Levels, ushort[][] Loops);

    /// <summary>A base point, its orbit, and for each orbit point where a member that takes the base point there takes all sites.</summary>
    private sealed record Level(ushort Point, ushort[] Orbit, ushort[][] Images);

    /// <summary>Moves of one cost: the component that each leads to, and for each of its sites the site that the label there comes from.</summary>
    private sealed record Moves(int Cost, int[] Targets, ushort[][] Sources);
}
