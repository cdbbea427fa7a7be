using System.Collections.Immutable;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>For each shape of a region the moves that a metric counts, with the shapes they lead to; moves that leave the region are left out.</summary>
internal sealed class MoveSet
{
    // Entry (place of the shape, slot) of each list; -1 where the slot is empty.
    private readonly int[] _targets;
    private readonly int[] _moves;

    private MoveSet(ImmutableArray<Move> moves, int width, int[] targets, int[] numbers, bool isBackward)
    {
        Moves = moves;
        Width = width;
        _targets = targets;
        _moves = numbers;
        IsBackward = isBackward;
    }

    /// <summary>All different moves.</summary>
    public ImmutableArray<Move> Moves { get; }

    /// <summary>The number of slots at each shape.</summary>
    public int Width { get; }

    /// <summary>True when each slot leads from the end of a move to its start.</summary>
    public bool IsBackward { get; }

    /// <summary>The place, within the region, of the shape that a slot leads to; -1 where the slot is empty.</summary>
    public int Target(int place, int slot) => _targets[(place * Width) + slot];

    /// <summary>The move of a slot that is not empty.</summary>
    public Move MoveAt(int place, int slot) => Moves[_moves[(place * Width) + slot]];

    /// <summary>The moves of a metric.</summary>
    public static MoveSet Of(RegionShapes region, Metric metric, CancellationToken cancellation)
    {
        if (metric.Kind == MetricKind.Run)
        {
            return new RunCollector(region, cancellation).Collect();
        }

        var steps = region.Mechanism.Steps;
        var targets = new int[checked(region.Count * steps.Length)];
        var numbers = new int[targets.Length];
        for (var place = 0; place < region.Count; place++)
        {
            for (var step = 0; step < steps.Length; step++)
            {
                targets[(place * steps.Length) + step] = region.After(place, step);
                numbers[(place * steps.Length) + step] = step;
            }
        }

        return new MoveSet([.. steps.Select(step => new Move([step], step.Permutation, metric.WeightOf(step)))], steps.Length, targets, numbers, isBackward: false);
    }

    /// <summary>The same moves, each found at the shape where it ends.</summary>
    public MoveSet Reversed(int shapeCount)
    {
        var arriving = new int[shapeCount];
        foreach (var target in _targets)
        {
            if (target >= 0)
            {
                arriving[target]++;
            }
        }

        var width = Math.Max(1, arriving.Max());
        var targets = new int[checked(shapeCount * width)];
        var numbers = new int[targets.Length];
        Array.Fill(targets, -1);
        Array.Clear(arriving);
        for (var entry = 0; entry < _targets.Length; entry++)
        {
            if (_targets[entry] is >= 0 and var target)
            {
                var slot = (target * width) + arriving[target]++;
                targets[slot] = entry / Width;
                numbers[slot] = _moves[entry];
            }
        }

        return new MoveSet(Moves, width, targets, numbers, !IsBackward);
    }

    /// <summary>Finds for each shape what one run can do.</summary>
    private sealed class RunCollector(RegionShapes region, CancellationToken cancellation)
    {
        private readonly int[] _classes = Metric.RunClasses(region.Mechanism);
        private readonly Dictionary<string, int> _numberOf = [];
        private readonly List<Move> _moves = [];
        private readonly List<(int Target, int Move)> _found = [];

        public MoveSet Collect()
        {
            var starts = new int[region.Count + 1];
            var steps = region.Mechanism.Steps.GroupBy(step => _classes[step.Index]).Select(group => group.ToArray()).ToArray();
            var width = 1;
            for (var place = 0; place < region.Count; place++)
            {
                cancellation.ThrowIfCancellationRequested();
                foreach (var group in steps)
                {
                    AddRuns(place, group);
                }

                starts[place + 1] = _found.Count;
                width = Math.Max(width, starts[place + 1] - starts[place]);
            }

            var targets = new int[checked(region.Count * width)];
            var numbers = new int[targets.Length];
            Array.Fill(targets, -1);
            for (var place = 0; place < region.Count; place++)
            {
                for (var i = starts[place]; i < starts[place + 1]; i++)
                {
                    (targets[(place * width) + i - starts[place]], numbers[(place * width) + i - starts[place]]) = _found[i];
                }
            }

            return new MoveSet([.. _moves], width, targets, numbers, isBackward: false);
        }

        // Breadth-first, so that each outcome has the fewest steps.
        private void AddRuns(int place, Step[] steps)
        {
            var seen = new HashSet<Permutation> { Permutation.Identity };
            var queue = new List<(int Place, Permutation Done, ImmutableArray<Step> Steps)> { (place, Permutation.Identity, []) };
            for (var i = 0; i < queue.Count; i++)
            {
                foreach (var step in steps)
                {
                    var target = region.After(queue[i].Place, step.Index);
                    var done = target < 0 ? default : queue[i].Done * step.Permutation;
                    if (target >= 0 && seen.Add(done))
                    {
                        queue.Add((target, done, queue[i].Steps.Add(step)));
                        _found.Add((target, Number(queue[^1].Steps, done)));
                    }
                }
            }
        }

        private int Number(ImmutableArray<Step> steps, Permutation permutation)
        {
            var key = string.Join(' ', steps.Select(step => step.Index));
            if (!_numberOf.TryGetValue(key, out var number))
            {
                number = _moves.Count;
                _numberOf.Add(key, number);
                _moves.Add(new Move(steps, permutation, 1));
            }

            return number;
        }
    }
}
