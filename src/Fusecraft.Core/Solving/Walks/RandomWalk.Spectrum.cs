using System.Collections.Immutable;
using System.Numerics;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Double;

namespace Fusecraft.Solving;

// The transition matrix and its eigenvalues.
public sealed partial class RandomWalk
{
    /// <summary>The most states of a reversible walk whose whole spectrum is computed.</summary>
    public const int MostStatesOfSpectrum = 1000;

    /// <summary>The most states of a walk that is not reversible whose spectrum is computed, and that is the whole one.</summary>
    public const int MostStatesOfOneWaySpectrum = 400;

    private const double Alike = 1e-8;
    private const double DenseError = 1e-10;

    /// <summary>The transition matrix: row from, column to, in the order of <see cref="StateNumbering"/> where no labels are left out.</summary>
    /// <exception cref="InvalidOperationException">There are more than a million states.</exception>
    public SparseMatrix TransitionMatrix() => StateCount <= 1_000_000
        ? SparseMatrix.OfIndexed(StateCount, StateCount, Entries())
        : throw new InvalidOperationException($"The walk has {StateCount} states; a matrix of more than a million rows is not made.");

    /// <summary>
    /// Eigenvalues: all of them, by a dense method, up to <see cref="MostStatesOfSpectrum"/> states; above, the second largest and the least by Lanczos's iteration with a residual. Walks that are not reversible have only the
    /// first, up to <see cref="MostStatesOfOneWaySpectrum"/> states.
    /// </summary>
    /// <param name="precision">The iteration ends when the residual is estimated to be at most this.</param>
    /// <param name="maxIterations">The iteration ends after so many products with the matrix at the latest; then <see cref="WalkSpectrum.ErrorBound"/> is larger. It takes as many more for the residual.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentOutOfRangeException">The precision is not above 0, or the number of iterations below 1.</exception>
    /// <exception cref="InvalidOperationException">The walk is not reversible and has more states than its spectrum is computed for.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public WalkSpectrum Spectrum(double precision = 1e-9, int maxIterations = 500, CancellationToken cancellationToken = default)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(precision);
        ArgumentOutOfRangeException.ThrowIfLessThan(maxIterations, 1);
        if (!IsReversible)
        {
            return StateCount <= MostStatesOfOneWaySpectrum
                ? Complete([.. DenseMatrix.OfMatrix(TransitionMatrix()).Evd(Symmetricity.Asymmetric).EigenValues])
                : throw new InvalidOperationException($"The walk is not reversible and has {StateCount} states; its spectrum is computed up to {MostStatesOfOneWaySpectrum}.");
        }

        return StateCount <= MostStatesOfSpectrum ? Complete([.. SymmetricMatrix().Evd(Symmetricity.Symmetric).EigenValues]) : Extreme(precision, maxIterations, cancellationToken);
    }

    /// <summary>The extreme eigenvalues of a reversible walk by iteration, whatever the number of states.</summary>
    internal WalkSpectrum Extreme(double precision, int maxIterations, CancellationToken cancellation)
    {
        var (second, least, error) = new LanczosIteration(_space, _cycle, Pieces(cancellation)).Extremes(precision, maxIterations);
        var values = ImmutableArray.CreateBuilder<Eigenvalue>();
        values.Add(new Eigenvalue(1, 1));
        values.Add(new Eigenvalue(second, null));
        if (second - least > Alike)
        {
            values.Add(new Eigenvalue(least, null));
        }

        if (Period == 2)
        {
            values.Add(new Eigenvalue(-1, 1));
        }

        return new WalkSpectrum(this, isComplete: false, values.ToImmutable(), error, Period * _space.Rates.Stationary[0] / _space.OfShape);
    }

    private WalkSpectrum Complete(List<Complex> values)
    {
        // One of them is 1; the others in order, those alike together.
        values.Remove(values.MinBy(value => (value - 1).Magnitude));
        var found = ImmutableArray.CreateBuilder<Eigenvalue>();
        found.Add(new Eigenvalue(1, 1));
        while (values.Count > 0)
        {
            var largest = values.MaxBy(value => value.Real);
            var alike = values.FindAll(value => (value - largest).Magnitude < Alike);
            values.RemoveAll(value => (value - largest).Magnitude < Alike);
            found.Add(new Eigenvalue(alike.Aggregate(Complex.Zero, (sum, value) => sum + value) / alike.Count, alike.Count));
        }

        return new WalkSpectrum(this, isComplete: true, found.ToImmutable(), DenseError, Period * _space.Rates.Stationary[0] / _space.OfShape);
    }

    private IEnumerable<(int Row, int Column, double Value)> Entries()
    {
        var rates = _space.Rates;
        var sums = new SortedDictionary<int, double>();
        for (var state = 0; state < StateCount; state++)
        {
            var place = state / _space.OfShape;
            sums.Clear();
            sums[state] = rates.Holds[place];
            for (var slot = 0; slot < rates.Width; slot++)
            {
                if (rates.Rates[(place * rates.Width) + slot] is > 0 and var rate)
                {
                    var source = _space.Source(state, slot);
                    sums[source] = sums.GetValueOrDefault(source) + rate;
                }
            }

            foreach (var (source, rate) in sums)
            {
                if (rate > 0)
                {
                    yield return (source, state, rate);
                }
            }
        }
    }

    // Similar to the transition matrix.
    private DenseMatrix SymmetricMatrix()
    {
        var matrix = new DenseMatrix(StateCount);
        foreach (var (row, column, value) in TransitionMatrix().EnumerateIndexed(Zeros.AllowSkip))
        {
            var rate = value * Math.Sqrt(_space.Rates.Stationary[row / _space.OfShape] / _space.Rates.Stationary[column / _space.OfShape]) / 2;
            matrix[row, column] += rate;
            matrix[column, row] += rate;
        }

        return matrix;
    }
}
