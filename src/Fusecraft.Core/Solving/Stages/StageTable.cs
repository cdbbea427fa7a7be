namespace Fusecraft.Solving;

/// <summary>The least cost to home over the product of some components of a stage, one byte a state: no state of the stage can be brought home for less.</summary>
internal sealed class StageTable
{
    private const byte Unseen = byte.MaxValue;
    private const int Greatest = 250;
    private readonly byte[] _costs;
    private readonly int[] _sizes;

    private StageTable(int[] components, int[] sizes, byte[] costs)
    {
        Components = components;
        _sizes = sizes;
        _costs = costs;
    }

    /// <summary>The numbers of the components in the stage.</summary>
    public int[] Components { get; }

    /// <summary>The number of entries.</summary>
    public int Length => _costs.Length;

    /// <summary>The least cost to home of any state with these coordinates.</summary>
    public int Cost(int shape, ReadOnlySpan<int> coordinates)
    {
        var at = shape;
        for (var i = 0; i < Components.Length; i++)
        {
            at = (at * _sizes[i]) + coordinates[Components[i]];
        }

        return _costs[at];
    }

    /// <summary>Fills a table by breadth-first search back from home, cheapest first.</summary>
    public static StageTable Build(StageFrame frame, IReadOnlyList<StageComponent> all, int[] components, CancellationToken cancellation)
    {
        StageComponent[] chosen = [.. components.Select(component => all[component])];
        int[] sizes = [.. chosen.Select(component => component.Count)];
        var perShape = sizes.Aggregate(1, (product, size) => checked(product * size));
        var costs = new byte[checked(frame.ShapeCount * perShape)];
        Array.Fill(costs, Unseen);
        var (moves, loops) = (frame.Moves.Length, frame.Loops.Count);
        int[] shapesBefore = Before(frame.Targets, moves);
        int[][] before = [.. chosen.Select(component => Before(component.After, frame.Loops.Count))];
        costs[0] = 0;
        var greatestMove = frame.Moves.Select(move => move.Cost).DefaultIfEmpty(0).Max();
        Span<int> parts = stackalloc int[chosen.Length];
        for (int cost = 0, last = 0; cost <= last + greatestMove && cost < Greatest; cost++)
        {
            cancellation.ThrowIfCancellationRequested();
            for (var index = Next(costs, 0, cost); index >= 0; index = Next(costs, index + 1, cost))
            {
                last = cost;
                var rest = index;
                for (var i = chosen.Length - 1; i >= 0; i--)
                {
                    (rest, parts[i]) = (rest / sizes[i], rest % sizes[i]);
                }

                for (var move = 0; move < moves; move++)
                {
                    var shape = shapesBefore[(rest * moves) + move];
                    if (shape < 0)
                    {
                        continue;
                    }

                    var previous = shape;
                    var loop = frame.LoopOf[(shape * moves) + move];
                    for (var i = 0; i < chosen.Length; i++)
                    {
                        previous = (previous * sizes[i]) + before[i][(parts[i] * loops) + loop];
                    }

                    var total = Math.Min(cost + frame.Moves[move].Cost, Greatest);
                    if (costs[previous] > total)
                    {
                        costs[previous] = (byte)total;
                    }
                }
            }
        }

        return new StageTable(components, sizes, costs);
    }

    private static int Next(byte[] costs, int from, int cost)
    {
        var found = from >= costs.Length ? -1 : costs.AsSpan(from).IndexOf((byte)cost);
        return found < 0 ? -1 : from + found;
    }

    // A move takes different shapes to different ones, a loop different arrangements.
    private static int[] Before(int[] targets, int moves)
    {
        var before = new int[targets.Length];
        Array.Fill(before, -1);
        for (var i = 0; i < targets.Length; i++)
        {
            if (targets[i] >= 0)
            {
                before[(targets[i] * moves) + (i % moves)] = i / moves;
            }
        }

        return before;
    }
}
