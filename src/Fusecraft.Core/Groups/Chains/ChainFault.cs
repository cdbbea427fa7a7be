using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The checker of the chain's invariants, written without the fast paths.</summary>
internal static class ChainFault
{
    /// <summary>Names the first invariant that a chain breaks, or gives null. Proven chains are checked for completeness as well.</summary>
    public static string? FindFault<T>(this ChainTables<T> chain, bool proven)
        where T : unmanaged, IBinaryInteger<T>
    {
        for (var i = 0; i < chain.Count; i++)
        {
            var level = chain[i];
            if (level.OrbitPoint(0) != level.Point || !level.Inverses[0].SequenceEqual(chain.Identity) || level.OrbitLength < 2)
            {
                return $"Level {i}: the orbit must start with the base point, represented by the identity, and hold more.";
            }

            if (i > 0 && level.Position <= chain[i - 1].Position)
            {
                return $"Level {i}: the base points are out of order.";
            }

            if (level.Slots.Count(slot => slot >= 0) != level.OrbitLength)
            {
                return $"Level {i}: orbit and slots disagree.";
            }

            for (var s = 0; s < level.Generators.Count; s++)
            {
                if (!FixesEarlier(chain, i, level.Generators[s]))
                {
                    return $"Level {i}: generator {s} moves an earlier base point.";
                }
            }

            for (var x = 0; x < level.OrbitLength; x++)
            {
                if (level.Slots[level.OrbitPoint(x)] != x || int.CreateTruncating(level.Inverses[x][level.OrbitPoint(x)]) != level.Point)
                {
                    return $"Level {i}: the representative of orbit point {x} does not lead back to the base point.";
                }

                if (!FixesEarlier(chain, i, level.Inverses[x]))
                {
                    return $"Level {i}: the representative of orbit point {x} moves an earlier base point.";
                }

                for (var s = 0; s < level.Generators.Count; s++)
                {
                    if (level.Slots[int.CreateTruncating(level.Generators[s][level.OrbitPoint(x)])] < 0)
                    {
                        return $"Level {i}: generator {s} leads out of the orbit.";
                    }

                    if (proven && !SchreierGeneratorSiftsAway(chain, i, x, s))
                    {
                        return $"Level {i}: the Schreier generator of orbit point {x} and generator {s} does not sift away.";
                    }
                }
            }
        }

        return null;
    }

    private static bool FixesEarlier<T>(ChainTables<T> chain, int level, ReadOnlySpan<T> permutation)
        where T : unmanaged, IBinaryInteger<T>
    {
        for (var i = 0; i < level; i++)
        {
            if (int.CreateTruncating(permutation[chain[i].Point]) != chain[i].Point)
            {
                return false;
            }
        }

        return true;
    }

    private static bool SchreierGeneratorSiftsAway<T>(ChainTables<T> chain, int index, int x, int s)
        where T : unmanaged, IBinaryInteger<T>
    {
        var level = chain[index];
        var element = Permutation.FromTrustedImages<T>(level.Inverses[x]).Inverse() * Permutation.FromTrustedImages<T>(level.Generators[s]);
        for (var i = index; i < chain.Count; i++)
        {
            var slot = chain[i].Slots[element[chain[i].Point]];
            if (slot < 0)
            {
                return false;
            }

            element *= Permutation.FromTrustedImages<T>(chain[i].Inverses[slot]);
        }

        return element.IsIdentity;
    }
}
