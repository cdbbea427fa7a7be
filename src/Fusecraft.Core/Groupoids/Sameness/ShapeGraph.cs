namespace Fusecraft.Groupoids;

/// <summary>
/// The arrows of a groupoid in a table, with shapes and steps coloured so that those which a bijection of graphs exchanges have equal colours: by what leads to and from them, refined step by step.
/// </summary>
internal sealed class ShapeGraph
{
    private readonly int[] _targets;

    public ShapeGraph(ShapeGroupoid groupoid)
    {
        Groupoid = groupoid;
        StepCount = groupoid.Mechanism.Steps.Length;
        Count = groupoid.ShapeCount;
        _targets = new int[Count * StepCount];
        FreeCounts = new int[StepCount];
        Opposites = [.. groupoid.Mechanism.Steps.Select(step => step.Opposite?.Index ?? -1)];
        for (var shape = 0; shape < Count; shape++)
        {
            for (var step = 0; step < StepCount; step++)
            {
                var target = groupoid.Target(shape, step);
                _targets[(shape * StepCount) + step] = target;
                FreeCounts[step] += target >= 0 ? 1 : 0;
            }
        }

        Shapes = new ulong[Count];
        Steps = [.. Opposites.Select((opposite, step) => Hash.Mix((ulong)FreeCounts[step], opposite < 0 ? 0 : 1 + (ulong)FreeCounts[opposite]))];
    }

    public ShapeGroupoid Groupoid { get; }

    public int Count { get; }

    public int StepCount { get; }

    /// <summary>For each step the number of shapes where it is free.</summary>
    public int[] FreeCounts { get; }

    /// <summary>For each step its opposite, or -1.</summary>
    public int[] Opposites { get; }

    /// <summary>The colours of the shapes.</summary>
    public ulong[] Shapes { get; private set; }

    /// <summary>The colours of the steps.</summary>
    public ulong[] Steps { get; private set; }

    public int Target(int shape, int step) => _targets[(shape * StepCount) + step];

    /// <summary>One round of refinement; gives the number of colours of shapes afterwards.</summary>
    public int Refine()
    {
        var shapes = new ulong[Count];
        var own = new ulong[StepCount];
        for (var shape = 0; shape < Count; shape++)
        {
            for (var step = 0; step < StepCount; step++)
            {
                var target = Target(shape, step);
                if (target >= 0)
                {
                    var loop = target == shape ? 1UL : 0;
                    shapes[shape] += Hash.Mix(Steps[step] + loop, Shapes[target]);
                    shapes[target] += Hash.Mix(Hash.Mix(1, Steps[step]) + loop, Shapes[shape]);
                    own[step] += Hash.Mix(Shapes[shape], Shapes[target] + loop);
                }
            }
        }

        for (var shape = 0; shape < Count; shape++)
        {
            shapes[shape] = Hash.Mix(Shapes[shape], shapes[shape]);
        }

        var steps = new ulong[StepCount];
        for (var step = 0; step < StepCount; step++)
        {
            steps[step] = Hash.Mix(Hash.Mix(Steps[step], own[step]), Opposites[step] < 0 ? 2 : own[Opposites[step]]);
        }

        (Shapes, Steps) = (shapes, steps);
        return new HashSet<ulong>(shapes).Count;
    }
}
