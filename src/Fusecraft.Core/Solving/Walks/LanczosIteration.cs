using Fusecraft.Permutations;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Double;

namespace Fusecraft.Solving;

/// <summary>
/// The second largest and the least eigenvalue of a reversible walk from products with its symmetric form alone (C. Lanczos, An iteration method for the solution of the eigenvalue problem, J. Res. Nat. Bur. Standards 45,
/// 1950; source not opened). The vectors of the eigenvalues 1 and, with period 2, -1 are known and taken out of every vector.
/// </summary>
/// <remarks>Only three vectors are kept: the vectors of the results come from a second pass that does the same again. Copies of eigenvalues, which come of not keeping more, do no harm to the extreme ones.</remarks>
internal sealed class LanczosIteration(WalkSpace space, WalkCycle cycle, FixedPieces pieces)
{
    private const ulong Seed = 1;
    private const int FirstLook = 8;
    private const double Nothing = 1e-13;
    private readonly double[] _roots = [.. space.Rates.Stationary.Select(weight => Math.Sqrt(weight / space.OfShape))];
    private double[] _before = [];
    private double[] _now = [];
    private double[] _next = [];

    /// <summary>The two eigenvalues, and a bound for how far each is from a true one.</summary>
    public (double Second, double Least, double Error) Extremes(double precision, int maxIterations)
    {
        var (diagonal, beside) = (new List<double>(), new List<double>());
        Start();
        var look = FirstLook;
        while (true)
        {
            var (alpha, beta) = Advance(beside.Count == 0 ? 0 : beside[^1]);
            diagonal.Add(alpha);
            beside.Add(beta);
            var ended = beta <= Nothing || diagonal.Count == maxIterations;
            if (!ended && diagonal.Count < look)
            {
                continue;
            }

            look += Math.Max(FirstLook, look / 4);
            var (least, second) = Solve(diagonal, beside);
            if (ended || beta * Math.Max(Math.Abs(least[^1]), Math.Abs(second[^1])) <= precision)
            {
                return Confirm(least, second, beside);
            }
        }
    }

    // The vectors, in the basis of the iteration, of the least and the largest eigenvalue of the small matrix.
    private static (Vector<double> Least, Vector<double> Largest) Solve(List<double> diagonal, List<double> beside)
    {
        var matrix = new DenseMatrix(diagonal.Count);
        for (var i = 0; i < diagonal.Count; i++)
        {
            matrix[i, i] = diagonal[i];
            if (i > 0)
            {
                matrix[i, i - 1] = matrix[i - 1, i] = beside[i - 1];
            }
        }

        var vectors = matrix.Evd(Symmetricity.Symmetric).EigenVectors;
        return (vectors.Column(0), vectors.Column(diagonal.Count - 1));
    }

    // The same vectors once more, summed up to those of the results, whose quotients and residuals are then taken.
    private (double Second, double Least, double Error) Confirm(Vector<double> least, Vector<double> second, List<double> beside)
    {
        var (forLeast, forSecond) = (new double[space.Count], new double[space.Count]);
        Start();
        for (var i = 0; i < least.Count; i++)
        {
            var (x, y) = (least[i], second[i]);
            pieces.Sum((first, last) =>
            {
                for (var state = first; state < last; state++)
                {
                    forLeast[state] += x * _now[state];
                    forSecond[state] += y * _now[state];
                }

                return default;
            });
            if (i + 1 < least.Count)
            {
                Advance(i == 0 ? 0 : beside[i - 1]);
            }
        }

        var (a, b) = (Quotient(forSecond), Quotient(forLeast));
        return (a.Value, b.Value, Math.Max(a.Residual, b.Residual) + Nothing);
    }

    private (double Value, double Residual) Quotient(double[] vector)
    {
        var (product, square, _) = pieces.Sum((first, last) =>
        {
            space.Arrive(space.Rates.Symmetric, vector, _next, first, last);
            return (Dot(vector, _next, first, last), Dot(vector, vector, first, last), 0);
        });
        var value = product / square;
        var (rest, _, _) = pieces.Sum((first, last) =>
        {
            var sum = 0.0;
            for (var state = first; state < last; state++)
            {
                var difference = _next[state] - (value * vector[state]);
                sum += difference * difference;
            }

            return (sum, 0, 0);
        });
        return (value, Math.Sqrt(rest / square));
    }

    private void Start()
    {
        (_before, _now, _next) = (new double[space.Count], new double[space.Count], new double[space.Count]);
        var random = new SeededRandom(Seed);
        for (var state = 0; state < _next.Length; state++)
        {
            _next[state] = ((random.NextUInt64() >> 11) * (1.0 / (1L << 53))) - 0.5;
        }

        Normalise(TakeOut(null, 0, 0));
        (_now, _next) = (_next, _now);
    }

    // One product with the matrix: what of it lies along the vector itself, and how long the rest is, which becomes the next vector.
    private (double Alpha, double Beta) Advance(double betaBefore)
    {
        var alpha = pieces.Sum((first, last) =>
        {
            space.Arrive(space.Rates.Symmetric, _now, _next, first, last);
            return (Dot(_now, _next, first, last), 0, 0);
        }).A;
        var beta = TakeOut(_now, alpha, betaBefore);
        if (beta > Nothing)
        {
            Normalise(beta);
        }

        (_before, _now, _next) = (_now, _next, _before);
        return (alpha, beta);
    }

    // Takes shares of the last two vectors, and the vectors known, out of the next; gives its length.
    private double TakeOut(double[]? now, double alpha, double beta)
    {
        if (now is not null)
        {
            pieces.Sum((first, last) =>
            {
                for (var state = first; state < last; state++)
                {
                    _next[state] -= (alpha * now[state]) + (beta * _before[state]);
                }

                return default;
            });
        }

        var (along, across, _) = pieces.Sum((first, last) => Shares(first, last));
        return Math.Sqrt(pieces.Sum((first, last) => (Subtract(along, across, first, last), 0, 0)).A);
    }

    private (double Along, double Across, double None) Shares(int first, int last)
    {
        var (along, across) = (0.0, 0.0);
        for (var at = first; at < last;)
        {
            var (end, root) = Run(at, last);
            for (var state = at; state < end; state++)
            {
                along += root * _next[state];
            }

            for (var state = at; state < end && cycle.Period == 2; state++)
            {
                across += root * _next[state] * Sign(state);
            }

            at = end;
        }

        return (along, across, 0);
    }

    private double Subtract(double along, double across, int first, int last)
    {
        var sum = 0.0;
        for (var at = first; at < last;)
        {
            var (end, root) = Run(at, last);
            for (var state = at; state < end; state++)
            {
                var rest = _next[state] - (root * (cycle.Period == 2 ? along + (Sign(state) * across) : along));
                _next[state] = rest;
                sum += rest * rest;
            }

            at = end;
        }

        return sum;
    }

    private int Sign(int state) => 1 - (2 * cycle.Classes[state]);

    // The states from one on that have its shape, and the root of the stationary probability of each.
    private (int End, double Root) Run(int at, int last)
    {
        var place = at / space.OfShape;
        return ((int)Math.Min(last, (place + 1L) * space.OfShape), _roots[place]);
    }

    private void Normalise(double length) => pieces.Sum((first, last) =>
    {
        for (var state = first; state < last; state++)
        {
            _next[state] /= length;
        }

        return default;
    });

    private static double Dot(double[] a, double[] b, int first, int last)
    {
        var sum = 0.0;
        for (var state = first; state < last; state++)
        {
            sum += a[state] * b[state];
        }

        return sum;
    }
}
