using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>Removes what a word does in vain: steps undone at once, and runs of one turn that could be shorter.</summary>
internal static class PathShortening
{
    /// <summary>
    /// A word with the same permutation and the same shapes at its ends, no longer than the given one. Only runs of reversible turns
    /// are touched.
    /// </summary>
    public static List<Step> Shorten(IReadOnlyList<Step> steps)
    {
        var runs = new List<(Turn Turn, int Count, Step? Single)>();
        foreach (var step in steps)
        {
            if (!step.Turn.IsReversible)
            {
                runs.Add((step.Turn, 0, step));
                continue;
            }

            var count = step.IsForward ? 1 : -1;
            if (runs.Count > 0 && runs[^1].Single is null && runs[^1].Turn == step.Turn)
            {
                count += runs[^1].Count;
                runs.RemoveAt(runs.Count - 1);
            }

            count = Reduce(count, step.Turn);
            if (count != 0)
            {
                runs.Add((step.Turn, count, null));
            }
        }

        var shortened = new List<Step>();
        foreach (var (turn, count, single) in runs)
        {
            if (single is not null)
            {
                shortened.Add(single);
            }

            for (var i = 0; i < Math.Abs(count); i++)
            {
                shortened.Add(count > 0 ? turn.Forward : turn.Backward!);
            }
        }

        return shortened;
    }

    private static int Reduce(int count, Turn turn)
    {
        // Of order k, n times is n mod k times; and where no guard can bar the other sense, the shorter way round.
        var order = turn.Permutation.Order;
        count = (int)(count % order);
        return turn.HasGuard || 2 * Math.Abs(count) <= order ? count : count - (Math.Sign(count) * (int)order);
    }
}
