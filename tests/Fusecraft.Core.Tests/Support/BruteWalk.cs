using Fusecraft.Mechanisms;
using Fusecraft.Solving;
using MathNet.Numerics.LinearAlgebra;
using MathNet.Numerics.LinearAlgebra.Double;

namespace Fusecraft.Tests.Support;

/// <summary>A random walk as plainly as can be: states tried step by step, a matrix of all probabilities, and a linear system for the stationary distribution.</summary>
internal sealed class BruteWalk
{
    private readonly Dictionary<State, int> _numbers = [];

    public BruteWalk(Mechanism mechanism, WalkOptions options)
    {
        // The home region: what can be reached from home and leads back to its shape.
        var all = BruteDistances.Reachable(mechanism.HomeState);
        var back = BruteDistances.From([mechanism.HomeState], all, Metric.Step, backwards: true);
        States = all.FindAll(back.ContainsKey);
        for (var i = 0; i < States.Count; i++)
        {
            _numbers[States[i]] = i;
        }

        Matrix = new DenseMatrix(States.Count);
        for (var i = 0; i < States.Count; i++)
        {
            FillRow(i, options);
        }
    }

    public List<State> States { get; }

    /// <summary>The probability of going from one state, the row, to another.</summary>
    public DenseMatrix Matrix { get; }

    /// <summary>True when the walk gets from home everywhere and back.</summary>
    public bool IsConnected => Levels(Matrix).TrueForAll(level => level >= 0) && Levels(Matrix.Transpose()).TrueForAll(level => level >= 0);

    /// <summary>The greatest common divisor of the lengths of all closed ways.</summary>
    public int Period
    {
        get
        {
            var levels = Levels(Matrix);
            var period = 0;
            foreach (var (row, column, value) in Matrix.EnumerateIndexed(Zeros.AllowSkip))
            {
                period = value == 0 ? period : (int)System.Numerics.BigInteger.GreatestCommonDivisor(period, levels[row] + 1 - levels[column]);
            }

            return period;
        }
    }

    public Vector<double> Start()
    {
        var start = new DenseVector(States.Count);
        start[_numbers[States[0].Mechanism.HomeState]] = 1;
        return start;
    }

    public Vector<double> Next(Vector<double> distribution) => Matrix.LeftMultiply(distribution);

    public Vector<double> Uniform() => DenseVector.Create(States.Count, 1.0 / States.Count);

    /// <summary>The distribution that a turn does not change.</summary>
    public Vector<double> Stationary()
    {
        var system = (Matrix - DenseMatrix.CreateIdentity(States.Count)).Transpose();
        system.SetRow(0, DenseVector.Create(States.Count, 1));
        var right = new DenseVector(States.Count);
        right[0] = 1;
        return system.Solve(right);
    }

    public static double Distance(Vector<double> a, Vector<double> b) => (a - b).L1Norm() / 2;

    private void FillRow(int row, WalkOptions options)
    {
        var steps = States[row].Mechanism.Steps;
        double Weight(Step step) => options.Weights.TryGetValue(step.Name, out var weight) ? weight : 1;
        int Target(Step step) => States[row].TryStep(step, out var next) && _numbers.TryGetValue(next, out var number) ? number : -1;
        var eligible = steps.Where(step => options.Choice == WalkChoice.AllSteps || Target(step) >= 0).ToList();
        var total = eligible.Sum(Weight);
        Matrix[row, row] += total > 0 ? options.Holding : 1;
        foreach (var step in eligible)
        {
            var target = Target(step) is >= 0 and var number ? number : row;
            Matrix[row, target] += total > 0 ? (1 - options.Holding) * Weight(step) / total : 0;
        }
    }

    private List<int> Levels(Matrix<double> matrix)
    {
        var levels = Enumerable.Repeat(-1, States.Count).ToList();
        var home = _numbers[States[0].Mechanism.HomeState];
        levels[home] = 0;
        var queue = new Queue<int>([home]);
        while (queue.TryDequeue(out var state))
        {
            for (var next = 0; next < levels.Count; next++)
            {
                if (matrix[state, next] > 0 && levels[next] < 0)
                {
                    levels[next] = levels[state] + 1;
                    queue.Enqueue(next);
                }
            }
        }

        return levels;
    }
}
