using System.Collections.Immutable;
using System.Numerics;

namespace Fusecraft.Permutations;

public readonly partial struct Permutation
{
    /// <summary>The lengths of the cycles; fixed points are not counted. Computed anew each time, linear in <see cref="SupportEnd"/>.</summary>
    public CycleType CycleType
    {
        get
        {
            using var counts = new Scratch<int>(SupportEnd + 1);
            counts.Span.Clear();
            foreach (var cycle in new CycleWalk(this))
            {
                counts.Span[cycle.Length]++;
            }

            return CycleType.FromCounts(counts.Span);
        }
    }

    /// <summary>The smallest positive number of repetitions that gives the identity: the least common multiple of the cycle lengths; 1 for the identity.</summary>
    public BigInteger Order => CycleType.Order;

    /// <summary>Even or odd: the parity of a product is odd exactly when one factor is odd and the other even.</summary>
    public Parity Parity
    {
        get
        {
            var transpositions = 0;
            foreach (var cycle in new CycleWalk(this))
            {
                transpositions += cycle.Length - 1;
            }

            return (transpositions & 1) == 0 ? Parity.Even : Parity.Odd;
        }
    }

    /// <summary>The points moved, 0-based, in ascending order.</summary>
    public ImmutableArray<int> Support
    {
        get
        {
            var moved = ImmutableArray.CreateBuilder<int>(SupportEnd);
            for (var i = 0; i < SupportEnd; i++)
            {
                if (Image(i) != i)
                {
                    moved.Add(i);
                }
            }

            return moved.DrainToImmutable();
        }
    }

    /// <summary>The cycles of length two or more, each starting with its smallest point, in the order of those. Points are 0-based.</summary>
    public ImmutableArray<ImmutableArray<int>> Cycles()
    {
        var cycles = ImmutableArray.CreateBuilder<ImmutableArray<int>>();
        foreach (var cycle in new CycleWalk(this))
        {
            cycles.Add([.. cycle]);
        }

        return cycles.DrainToImmutable();
    }
}
