using System.Collections.Immutable;

namespace Fusecraft.Solving;

// The distribution, pushed through the step tables turn by turn.
public sealed partial class RandomWalk
{
    /// <summary>The distances turn by turn, from the whole distribution in double precision.</summary>
    /// <param name="maxTurns">The most turns looked at.</param>
    /// <param name="until">Ends as soon as <see cref="WalkDistance.FromLimit"/> is at most this.</param>
    /// <param name="progress">Told of each turn.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes a multiplication for each state and step, and turn; two numbers a state. <see cref="WalkDistances.ErrorBound"/> bounds what rounding does.</remarks>
    /// <exception cref="ArgumentOutOfRangeException">The number of turns is negative, or the distance is not from 0 to 1.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public WalkDistances Distances(int maxTurns = 1000, double until = 0, IProgress<WalkDistance>? progress = null, CancellationToken cancellationToken = default)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(maxTurns);
        if (!(until is >= 0 and <= 1))
        {
            throw new ArgumentOutOfRangeException(nameof(until), until, $"A distance is from 0 to 1; this one is {until}.");
        }

        var pieces = Pieces(cancellationToken);
        var (now, next) = (new double[StateCount], new double[StateCount]);
        now[0] = 1;
        var found = ImmutableArray.CreateBuilder<WalkDistance>();
        for (var turns = 0; ; turns++)
        {
            found.Add(turns == 0 ? DistanceOf(now, 0, pieces) : Turn(now, next, turns, pieces));
            (now, next) = turns == 0 ? (now, next) : (next, now);
            progress?.Report(found[^1]);
            if (turns == maxTurns || found[^1].FromLimit <= until)
            {
                break;
            }
        }

        // Sums over states, over shapes for the stationary distribution, and single operations.
        var terms = pieces.TermsOfSum + ShapeCount + 16;
        return new WalkDistances(this, found.ToImmutable(), terms * RoundOff, _space.Rates.RoundingsOfTurn * RoundOff);
    }

    private WalkDistance Turn(double[] now, double[] next, int turns, FixedPieces pieces) => Distance(turns, pieces.Sum((first, last) =>
    {
        _space.Arrive(_space.Rates.Rates, now, next, first, last);
        return Differences(next, turns, first, last);
    }));

    private WalkDistance DistanceOf(double[] distribution, int turns, FixedPieces pieces) =>
        Distance(turns, pieces.Sum((first, last) => Differences(distribution, turns, first, last)));

    private static WalkDistance Distance(int turns, (double A, double B, double C) sums) => new(turns, Half(sums.A), Half(sums.B), Half(sums.C));

    private static double Half(double sum) => Math.Min(1, sum / 2);

    // From uniform, from stationary, from the limit.
    private (double A, double B, double C) Differences(double[] distribution, int turns, int first, int last)
    {
        var (period, rest, uniform) = (Period, turns % Period, 1.0 / StateCount);
        var (a, b, c) = (0.0, 0.0, 0.0);
        for (var at = first; at < last;)
        {
            var (end, stationary) = Run(at, last);
            if (period == 1)
            {
                for (; at < end; at++)
                {
                    a += Math.Abs(distribution[at] - uniform);
                    b += Math.Abs(distribution[at] - stationary);
                }

                continue;
            }

            for (; at < end; at++)
            {
                var here = distribution[at];
                a += Math.Abs(here - uniform);
                b += Math.Abs(here - stationary);
                c += Math.Abs(here - (_cycle.Classes[at] == rest ? period * stationary : 0));
            }
        }

        return (a, b, period == 1 ? b : c);
    }
}
