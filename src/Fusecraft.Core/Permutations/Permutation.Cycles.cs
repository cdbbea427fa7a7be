using System.Collections.Immutable;
using System.Numerics;

namespace Fusecraft.Permutations;

public readonly partial struct Permutation
{
    /// <summary>The lengths of the cycles; fixed points are not counted.</summary>
    public CycleType CycleType => CycleType.Of(Cycles());

    /// <summary>The smallest positive number of repetitions that gives the identity: the least common multiple of the cycle lengths.</summary>
    public BigInteger Order => CycleType.Order;

    /// <summary>Even or odd.</summary>
    public Parity Parity => CycleType.Parity;

    /// <summary>The points moved, in ascending order.</summary>
    public ImmutableArray<int> Support
    {
        get
        {
            var moved = ImmutableArray.CreateBuilder<int>();
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

    /// <summary>The cycles of length two or more, each starting with its smallest point, in the order of those.</summary>
    public ImmutableArray<ImmutableArray<int>> Cycles()
    {
        var cycles = ImmutableArray.CreateBuilder<ImmutableArray<int>>();
        var seen = new bool[SupportEnd];
        for (var start = 0; start < seen.Length; start++)
        {
            if (seen[start] || Image(start) == start)
            {
                continue;
            }

            var cycle = ImmutableArray.CreateBuilder<int>();
            for (var point = start; !seen[point]; point = Image(point))
            {
                seen[point] = true;
                cycle.Add(point);
            }

            cycles.Add(cycle.DrainToImmutable());
        }

        return cycles.DrainToImmutable();
    }
}
