using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>The step table of a coordinate turned over: for each step a list over all coordinates, in both senses.</summary>
internal sealed class StepArrays
{
    private StepArrays(int count, int[][] after, int[][] before)
    {
        Count = count;
        After = after;
        Before = before;
    }

    public int Count { get; }

    /// <summary>For each step, for each coordinate the one after the step, or -1.</summary>
    public int[][] After { get; }

    /// <summary>For each step, for each coordinate the one before the step, or -1.</summary>
    public int[][] Before { get; }

    /// <summary>A coordinate that has one value only.</summary>
    public static StepArrays Single(int steps)
    {
        int[][] all = [.. Enumerable.Repeat<int[]>([0], steps)];
        return new StepArrays(1, all, all);
    }

    public static StepArrays Of(CosetCoordinates coordinates)
    {
        var (count, steps) = (coordinates.Count, coordinates.StepCount);
        var table = coordinates.StepTable;
        var after = new int[steps][];
        for (var step = 0; step < steps; step++)
        {
            var list = after[step] = new int[count];
            for (var i = 0; i < count; i++)
            {
                list[i] = table[(i * steps) + step];
            }
        }

        return new StepArrays(count, after, [.. coordinates.Mechanism.Steps.Select(step => Reversed(step, after))]);
    }

    // Steps move shapes and colours one to one, so no two coordinates have the same one after a step.
    private static int[] Reversed(Step step, int[][] after)
    {
        if (step.Turn.IsReversible && step.Opposite is { } opposite)
        {
            return after[opposite.Index];
        }

        var before = new int[after[step.Index].Length];
        Array.Fill(before, -1);
        for (var i = 0; i < before.Length; i++)
        {
            if (after[step.Index][i] is >= 0 and var target)
            {
                before[target] = i;
            }
        }

        return before;
    }
}
