using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// The shapes that some moves reach from a base shape, without leaving its region, and what each move does at each of them: the shape it leads to, and the loop at the base shape that it makes with the paths of a spanning
/// tree, τ(s)·m·τ(s')⁻¹. A state is a shape with a member of the loops' group, and a move takes the member on by its loop. Many arcs share one loop.
/// </summary>
internal sealed class StageFrame
{
    private readonly ShapeGroupoid _groupoid;
    private readonly Dictionary<int, int> _local = [];
    private readonly List<int> _shapes = [];
    private readonly List<(int Parent, int Move)> _tree = [];

    private StageFrame(ShapeGroupoid groupoid, StageMove[] moves, int siteCount)
    {
        _groupoid = groupoid;
        Moves = moves;
        SiteCount = siteCount;
    }

    public StageMove[] Moves { get; }

    /// <summary>The number of points that the moves' permutations act on: the sites, and what else a descent keeps track of.</summary>
    public int SiteCount { get; }

    public int ShapeCount => _shapes.Count;

    /// <summary>The shape after a move, at <c>shape * Moves.Length + move</c>; -1 where the move is barred.</summary>
    public int[] Targets { get; private set; } = [];

    /// <summary>The loops of the arcs, each once; the identity first.</summary>
    public List<Permutation> Loops { get; } = [Permutation.Identity];

    /// <summary>The number of the loop of an arc, at <c>shape * Moves.Length + move</c>; -1 where the move is barred.</summary>
    public int[] LoopOf { get; private set; } = [];

    /// <summary>For each shape the inverse of the permutation of its tree path.</summary>
    public Permutation[] Back { get; private set; } = [];

    /// <summary>The number here of a shape of the groupoid; -1 where the moves do not reach it. The base shape is number 0.</summary>
    public int LocalOf(int shape) => _local.GetValueOrDefault(shape, -1);

    /// <summary>The shape after a step; -1 where it is barred or the moves do not reach it.</summary>
    public int After(int shape, int step) => _groupoid.Target(_shapes[shape], step) is >= 0 and var target ? LocalOf(target) : -1;

    /// <summary>Finds the shapes; null where there are more than a number of them.</summary>
    public static StageFrame? Explore(ShapeGroupoid groupoid, int baseShape, StageMove[] moves, int maxShapes, CancellationToken cancellation, int? siteCount = null)
    {
        var frame = new StageFrame(groupoid, moves, siteCount ?? groupoid.Mechanism.SiteCount);
        var region = groupoid.RegionOf(baseShape);
        var targets = new List<int>();
        frame.Add(baseShape, -1, -1);
        for (var shape = 0; shape < frame.ShapeCount; shape++)
        {
            if (shape % 256 == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            for (var move = 0; move < moves.Length; move++)
            {
                var target = frame._shapes[shape];
                foreach (var step in moves[move].Steps)
                {
                    target = target < 0 ? -1 : groupoid.Target(target, step);
                }

                target = target >= 0 && groupoid.RegionOf(target) == region ? target : -1;
                targets.Add(target < 0 ? -1 : frame._local.TryGetValue(target, out var local) ? local : frame.Add(target, shape, move));
            }

            if (frame.ShapeCount > maxShapes)
            {
                return null;
            }
        }

        frame.Targets = [.. targets];
        frame.WriteLoops();
        return frame;
    }

    /// <summary>The group of the loops at the base shape that the moves make, proven: every arc was looked at.</summary>
    public PermutationGroup LoopGroup(CancellationToken cancellation)
    {
        var generators = new List<Permutation>();
        var group = PermutationGroup.Generate([], SiteCount);
        foreach (var loop in Loops)
        {
            cancellation.ThrowIfCancellationRequested();
            if (!group.Contains(loop))
            {
                generators.Add(loop);
                group = PermutationGroup.Generate(generators, SiteCount);
            }
        }

        return group;
    }

    private void WriteLoops()
    {
        var labels = new Permutation[ShapeCount];
        Back = new Permutation[ShapeCount];
        for (var shape = 1; shape < ShapeCount; shape++)
        {
            labels[shape] = labels[_tree[shape].Parent] * Moves[_tree[shape].Move].Permutation;
            Back[shape] = labels[shape].Inverse();
        }

        var numbers = new Dictionary<Permutation, int> { [Permutation.Identity] = 0 };
        LoopOf = new int[Targets.Length];
        for (var arc = 0; arc < Targets.Length; arc++)
        {
            if (Targets[arc] < 0)
            {
                LoopOf[arc] = -1;
                continue;
            }

            var loop = labels[arc / Moves.Length] * Moves[arc % Moves.Length].Permutation * Back[Targets[arc]];
            if (!numbers.TryGetValue(loop, out LoopOf[arc]))
            {
                LoopOf[arc] = Loops.Count;
                numbers.Add(loop, Loops.Count);
                Loops.Add(loop);
            }
        }
    }

    private int Add(int shape, int parent, int move)
    {
        _local.Add(shape, _shapes.Count);
        _shapes.Add(shape);
        _tree.Add((parent, move));
        return _shapes.Count - 1;
    }
}
