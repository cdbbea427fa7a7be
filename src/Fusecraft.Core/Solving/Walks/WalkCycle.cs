namespace Fusecraft.Solving;

/// <summary>The period of a random walk: the greatest common divisor of the lengths of all its ways from a state back to it; and for each state the rest of the lengths of the ways there from the base state.</summary>
internal sealed class WalkCycle
{
    private WalkCycle(int period, int[] classes)
    {
        Period = period;
        Classes = classes;
    }

    public int Period { get; }

    /// <summary>For each state the rest, modulo the period, of the number of turns after which it can be reached; empty where the period is 1.</summary>
    public int[] Classes { get; }

    /// <summary>Goes back from the base state breadth-first. Null where not all states lead there.</summary>
    public static WalkCycle? Of(WalkSpace space, CancellationToken cancellation)
    {
        var rates = space.Rates;
        var levels = new int[space.Count];
        Array.Fill(levels, -1);
        var queue = new int[space.Count];
        var count = 1;
        levels[0] = 0;
        var period = rates.Holds.AsSpan().IndexOfAnyExceptInRange(0, 0) >= 0 ? 1 : 0;
        for (var i = 0; i < count; i++)
        {
            if ((i & 0xFFFF) == 0)
            {
                cancellation.ThrowIfCancellationRequested();
            }

            var state = queue[i];
            var place = state / space.OfShape;
            for (var slot = 0; slot < rates.Width; slot++)
            {
                if (rates.Rates[(place * rates.Width) + slot] == 0)
                {
                    continue;
                }

                var source = space.Source(state, slot);
                if (levels[source] < 0)
                {
                    levels[source] = levels[state] + 1;
                    queue[count++] = source;
                }

                period = Gcd(period, Math.Abs(levels[state] + 1 - levels[source]));
            }
        }

        if (count < space.Count)
        {
            return null;
        }

        for (var state = 0; state < levels.Length && period > 1; state++)
        {
            levels[state] = (period - (levels[state] % period)) % period;
        }

        return new WalkCycle(Math.Max(1, period), period > 1 ? levels : []);
    }

    private static int Gcd(int a, int b)
    {
        while (b != 0)
        {
            (a, b) = (b, a % b);
        }

        return a;
    }
}
