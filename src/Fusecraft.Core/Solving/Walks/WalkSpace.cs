namespace Fusecraft.Solving;

/// <summary>The states that a random walk goes over, numbered from 0, the base state: shape by shape, as many in each. Knows from where each can be reached in one turn.</summary>
internal abstract class WalkSpace(WalkRates rates, int count)
{
    public WalkRates Rates { get; } = rates;

    public int Count { get; } = count;

    /// <summary>The number of states of each shape.</summary>
    public int OfShape { get; } = count / rates.PlaceCount;

    /// <summary>The states that are worked on together come in multiples of this.</summary>
    public abstract int Unit { get; }

    /// <summary>The state from which the step of a slot arrives; -1 where the slot is empty.</summary>
    public abstract int Source(int state, int slot);

    /// <summary>For the states from a first to before a last, whole units, adds up what arrives in one turn.</summary>
    /// <param name="rates">For each place and slot how much of what is at the source arrives.</param>
    /// <param name="from">What is at each state.</param>
    /// <param name="to">What is there after the turn.</param>
    /// <param name="first">The first state.</param>
    /// <param name="last">The state after the last.</param>
    public void Arrive(double[] rates, double[] from, double[] to, int first, int last)
    {
        for (var at = first; at < last;)
        {
            var place = at / OfShape;
            var end = (int)Math.Min(last, (place + 1L) * OfShape);
            var hold = Rates.Holds[place];
            for (; at < end; at++)
            {
                to[at] = hold * from[at];
            }
        }

        Add(rates, from, to, first, last);
    }

    protected abstract void Add(double[] rates, double[] from, double[] to, int first, int last);
}
