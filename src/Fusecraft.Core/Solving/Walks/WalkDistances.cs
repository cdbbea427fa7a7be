using System.Collections.Immutable;

namespace Fusecraft.Solving;

/// <summary>The distances of a random walk turn by turn.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class WalkDistances
{
    private readonly double _errorOfSums;
    private readonly double _errorOfTurn;

    internal WalkDistances(RandomWalk walk, ImmutableArray<WalkDistance> byTurns, double errorOfSums, double errorOfTurn)
    {
        Walk = walk;
        ByTurns = byTurns;
        _errorOfSums = errorOfSums;
        _errorOfTurn = errorOfTurn;
    }

    /// <summary>The walk.</summary>
    public RandomWalk Walk { get; }

    /// <summary>The distances after 0, 1, 2, … turns.</summary>
    public ImmutableArray<WalkDistance> ByTurns { get; }

    /// <summary>
    /// By how much rounding can have changed any of the distances. All terms are positive, so a turn adds at most one unit in the last place (2^-53) for each term of a sum and each rounding of a probability; the sums over
    /// the states are made of parts of at most some thousand terms. Holds for the distances from a stationary distribution where <see cref="RandomWalk.IsReversible"/> or
    /// <see cref="RandomWalk.IsUniform"/>; else add half of <see cref="RandomWalk.StationaryResidual"/> as a hint, which is no bound.
    /// </summary>
    public double ErrorBound => _errorOfSums + ((ByTurns.Length - 1) * _errorOfTurn);

    /// <summary>The least number of turns after which <see cref="WalkDistance.FromLimit"/> is at most this; null where the turns looked at do not suffice.</summary>
    /// <remarks>With a period p above 1 this is the answer for a number of turns drawn from as many as p in a row, from this one on: with p = 2, toss a coin for one turn more.</remarks>
    /// <exception cref="ArgumentOutOfRangeException">The distance is not from 0 to 1.</exception>
    public int? TurnsTo(double distance) => First(distance, static entry => entry.FromLimit);

    /// <summary>The least number of turns after which <see cref="WalkDistance.FromUniform"/> is at most this; null where the turns looked at do not suffice.</summary>
    /// <remarks>In the long run the distance from uniform comes no nearer to 0 than <see cref="RandomWalk.LeastFromUniform"/>. It may grow again with more turns.</remarks>
    /// <exception cref="ArgumentOutOfRangeException">The distance is not from 0 to 1.</exception>
    public int? TurnsToUniform(double distance) => First(distance, static entry => entry.FromUniform);

    private int? First(double distance, Func<WalkDistance, double> which)
    {
        if (!(distance is >= 0 and <= 1))
        {
            throw new ArgumentOutOfRangeException(nameof(distance), distance, $"A distance is from 0 to 1; this one is {distance}.");
        }

        foreach (var entry in ByTurns)
        {
            if (which(entry) <= distance)
            {
                return entry.Turns;
            }
        }

        return null;
    }
}
