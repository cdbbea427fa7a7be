namespace Fusecraft.Solving;

/// <summary>
/// The stationary distribution of a random walk on the shapes of a region. On states it is the same within each shape: renaming the labels takes the walk to itself, and there is only one such distribution.
/// </summary>
/// <remarks>
/// In closed form where each free step has a free reverse: by the free weight of a shape, or uniform. Else by elimination without subtractions, so to nearly full precision (Grassmann, Taksar, Heyman, Regenerative
/// analysis and steady state distributions for Markov chains, Oper. Res. 33, 1985; source not opened), for many shapes by iteration.
/// </remarks>
internal static class StationaryShapes
{
    private const int MostEliminated = 1500;
    private const int MostIterations = 200_000;
    private const double Fine = 1e-15;
    private const double Exact = 4e-14;

    /// <param name="rates">The walk.</param>
    /// <param name="mostEliminated">The most shapes for which the distribution is found by elimination.</param>
    public static double[] Of(WalkRates rates, int mostEliminated = MostEliminated)
    {
        var uniform = Normal([.. Enumerable.Repeat(1.0, rates.PlaceCount)]);
        var byFreeWeight = Normal(rates.FreeWeights);
        return IsStationary(rates, uniform) ? uniform : IsStationary(rates, byFreeWeight) ? byFreeWeight
            : rates.PlaceCount <= mostEliminated ? Eliminate(rates) : Iterate(rates, uniform);
    }

    /// <summary>How much one turn changes a distribution: the sum of all differences.</summary>
    public static double Residual(WalkRates rates, double[] shapes)
    {
        var next = rates.Next(shapes);
        var sum = 0.0;
        for (var place = 0; place < next.Length; place++)
        {
            sum += Math.Abs(next[place] - shapes[place]);
        }

        return sum;
    }

    private static bool IsStationary(WalkRates rates, double[] shapes)
    {
        var next = rates.Next(shapes);
        for (var place = 0; place < next.Length; place++)
        {
            if (Math.Abs(next[place] - shapes[place]) > Exact * shapes[place])
            {
                return false;
            }
        }

        return true;
    }

    private static double[] Eliminate(WalkRates rates)
    {
        var count = rates.PlaceCount;
        var matrix = new double[count][];
        for (var place = 0; place < count; place++)
        {
            matrix[place] = new double[count];
        }

        for (var place = 0; place < count; place++)
        {
            for (var slot = 0; slot < rates.Width; slot++)
            {
                if (rates.Rates[(place * rates.Width) + slot] is > 0 and var rate)
                {
                    matrix[rates.Arriving.Target(place, slot)][place] += rate;
                }
            }
        }

        for (var last = count - 1; last > 0; last--)
        {
            var row = matrix[last].AsSpan(0, last);
            var leaving = 0.0;
            foreach (var rate in row)
            {
                leaving += rate;
            }

            for (var i = 0; i < last; i++)
            {
                var through = matrix[i][last] /= leaving;
                for (var j = 0; j < last && through > 0; j++)
                {
                    matrix[i][j] += through * row[j];
                }
            }
        }

        var shapes = new double[count];
        shapes[0] = 1;
        for (var j = 1; j < count; j++)
        {
            for (var i = 0; i < j; i++)
            {
                shapes[j] += shapes[i] * matrix[i][j];
            }
        }

        return Normal(shapes);
    }

    // Standing still at every other turn changes nothing but the period.
    private static double[] Iterate(WalkRates rates, double[] shapes)
    {
        for (var i = 0; i < MostIterations; i++)
        {
            var next = rates.Next(shapes);
            var change = 0.0;
            for (var place = 0; place < next.Length; place++)
            {
                change += Math.Abs(next[place] - shapes[place]);
                next[place] = (next[place] + shapes[place]) / 2;
            }

            shapes = Normal(next);
            if (change <= Fine)
            {
                break;
            }
        }

        return shapes;
    }

    private static double[] Normal(double[] weights)
    {
        var sum = weights.Sum();
        return sum == 0 ? weights : [.. weights.Select(weight => weight / sum)];
    }
}
