namespace Fusecraft.Solving;

/// <summary>Splits work on many states into pieces that depend on nothing but the number of states, and adds what the pieces give in their order: so no sum depends on the number of threads.</summary>
internal sealed class FixedPieces
{
    // The states of a piece, up to a unit more.
    private const int Most = 4096;
    private readonly ParallelOptions _options;
    private readonly (double A, double B, double C)[] _sums;

    /// <param name="count">The number of states.</param>
    /// <param name="unit">Pieces are whole multiples of this many states.</param>
    /// <param name="threads">How many threads work.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public FixedPieces(int count, int unit, int threads, CancellationToken cancellation)
    {
        Count = count;
        Size = (Most + unit - 1) / unit * unit;
        _sums = new (double, double, double)[(count + Size - 1) / Size];
        _options = new ParallelOptions { MaxDegreeOfParallelism = threads, CancellationToken = cancellation };
    }

    public int Count { get; }

    public int Size { get; }

    /// <summary>The most terms that stand one behind the other in a sum.</summary>
    public int TermsOfSum => Size + _sums.Length;

    /// <summary>Does work for the states from a first to before a last, and adds up what it gives.</summary>
    public (double A, double B, double C) Sum(Func<int, int, (double A, double B, double C)> work)
    {
        if (_options.MaxDegreeOfParallelism == 1)
        {
            for (var i = 0; i < _sums.Length; i++)
            {
                _options.CancellationToken.ThrowIfCancellationRequested();
                Do(i);
            }
        }
        else
        {
            Parallel.For(0, _sums.Length, _options, Do);
        }

        var (a, b, c) = (0.0, 0.0, 0.0);
        foreach (var sum in _sums)
        {
            a += sum.A;
            b += sum.B;
            c += sum.C;
        }

        return (a, b, c);

        void Do(int i) => _sums[i] = work(i * Size, (int)Math.Min(Count, (i + 1L) * Size));
    }
}
