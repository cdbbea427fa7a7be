using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>The distance of every state of a region: how many states there are at each, which are farthest, and shortest words by descent.</summary>
/// <remarks>
/// Two bits a state where every step has a reverse of equal cost and lengths are counted by steps or runs; else one or two bytes. Distances are exact. Only paths within the region count: for a table to the goal that
/// is no loss where the goal lies in the region, for a path that leaves it never returns. Immutable, safe to share; <see cref="Dispose"/> only gives back a mapped file.
/// </remarks>
public sealed partial class DistanceTable : IDisposable
{
    private readonly MoveSet _moves;
    private readonly RowTable _rows;
    private readonly ResidueTable? _residues;
    private readonly WideTable? _wide;
    private readonly long _order;
    private readonly bool _startsAtBase;
    private readonly bool _hasFreeMoves;

    // The moves lead towards the states of distance 0.
    private DistanceTable(StateNumbering numbering, DistanceOptions options, MoveSet moves, RowTable rows, ResidueTable? residues, WideTable? wide, IEnumerable<long> counts, bool startsAtBase)
    {
        Numbering = numbering;
        Metric = options.Metric;
        Origin = options.Origin;
        _moves = moves;
        _rows = rows;
        _residues = residues;
        _wide = wide;
        _order = (long)numbering.Group.Order;
        Counts = [.. counts];
        _startsAtBase = startsAtBase;
        _hasFreeMoves = moves.Moves.Any(move => move.Cost == 0);
    }

    /// <summary>The numbering of the states.</summary>
    public StateNumbering Numbering { get; }

    /// <summary>How lengths are counted.</summary>
    public Metric Metric { get; }

    /// <summary>Which way distances are measured.</summary>
    public DistanceOrigin Origin { get; }

    /// <summary>The number of states at each distance from 0 to <see cref="Greatest"/>.</summary>
    public ImmutableArray<long> Counts { get; }

    /// <summary>The number of states that have a distance; less than all of the region only where some cannot reach the goal within it.</summary>
    public long StateCount => Counts.Sum();

    /// <summary>The greatest distance; -1 where no state has one, because the goal cannot be reached in the region.</summary>
    public int Greatest => Counts.Length - 1;

    /// <summary>The mean distance; not a number where no state has one.</summary>
    public double Mean => (double)Counts.Select((count, distance) => count * (BigInteger)distance).Aggregate(BigInteger.Zero, (sum, part) => sum + part) / StateCount;

    /// <summary>The memory that the distances take, in bytes, mapped or not.</summary>
    public long Bytes => (_residues?.Memory ?? _wide!.Memory).Bytes;

    /// <summary>Makes a table by breadth-first search over all states.</summary>
    /// <param name="numbering">The states; <see cref="StateNumbering.Of(Mechanism, CancellationToken)"/> numbers those of the home region.</param>
    /// <param name="options">The metric, the sense and the limits; null for the defaults.</param>
    /// <param name="progress">Told of each distance.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes about one look-up for a word of up to 32 states, a move and a distance, far less than one random read of memory a state and move.</remarks>
    /// <exception cref="ArgumentException">The metric weighs a turn that the mechanism does not have.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The memory or the degree of parallelism is below 1.</exception>
    /// <exception cref="InvalidOperationException">The table would take more memory than allowed; <see cref="BytesFor"/> tells beforehand.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static DistanceTable Build(
        StateNumbering numbering, DistanceOptions? options = null, IProgress<DistanceProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        options = Checked(numbering, options);
        var needed = BytesFor(numbering, options);
        if (needed > options.MaxBytes)
        {
            throw new InvalidOperationException(
                $"A table of the {numbering.Count} states of {numbering.Mechanism.Name} takes about {needed} bytes; {options.MaxBytes} are allowed.");
        }

        return Build(numbering, options, options.Origin == DistanceOrigin.FromBase, progress, cancellationToken);
    }

    /// <summary>A table of the distances to the base state, whatever the goal.</summary>
    internal static DistanceTable BuildToBase(StateNumbering numbering, DistanceOptions options, CancellationToken cancellation) =>
        Build(numbering, options with { Origin = DistanceOrigin.ToGoal }, startsAtBase: true, null, cancellation);

    private static DistanceTable Build(
        StateNumbering numbering, DistanceOptions options, bool startsAtBase, IProgress<DistanceProgress>? progress, CancellationToken cancellationToken)
    {
        var starts = startsAtBase ? [0L] : GoalStates.Of(numbering);
        var (forward, descent) = Moves(numbering, options, cancellationToken);
        var along = numbering.Tabulate(forward, options.DegreeOfParallelism, cancellationToken);
        if (ReferenceEquals(forward, descent))
        {
            var (table, counts) = ResidueSearch.Run(along, starts, options.DegreeOfParallelism, progress, cancellationToken);
            return new DistanceTable(numbering, options, descent, along, table, null, counts, startsAtBase);
        }

        var (wide, wideCounts) =
            WideSearch<byte>.Run(along, forward, numbering.ShapeCount, starts, options.DegreeOfParallelism, progress, cancellationToken)
            ?? WideSearch<ushort>.Run(along, forward, numbering.ShapeCount, starts, options.DegreeOfParallelism, progress, cancellationToken)
            ?? throw new InvalidOperationException($"A distance is above {ushort.MaxValue - 1}, the greatest that a table holds.");
        return new DistanceTable(numbering, options, descent, numbering.Tabulate(descent, options.DegreeOfParallelism, cancellationToken), null, wide, wideCounts, startsAtBase);
    }

    /// <summary>The memory that a table is expected to take with what it needs besides, in bytes.</summary>
    /// <exception cref="ArgumentException">The metric weighs a turn that the mechanism does not have.</exception>
    public static long BytesFor(StateNumbering numbering, DistanceOptions? options = null)
    {
        options = Checked(numbering, options);
        var states = numbering.Count;
        var slots = Math.Max(1, numbering.Mechanism.Steps.Length) * (HasReverses(numbering.Mechanism, options.Metric) ? 1 : 2);
        var (rows, rowStates, maps) = RowSplit.For(numbering.Digits.OrbitLengths, numbering.ShapeCount, slots).Sizes(numbering.Digits.OrbitLengths, numbering.ShapeCount, slots);
        var distances = HasReverses(numbering.Mechanism, options.Metric) ? ResidueTable.BytesFor(rows, rowStates) : states;

        // Rows and shapes each know where every move leads; shapes also have the permutations of their paths, to and fro.
        var labels = 2L * Lanes.PaddedLength(numbering.Mechanism.SiteCount) * (numbering.Mechanism.SiteCount > 256 ? 2 : 1);
        return distances + (rows * ((8L * slots) + 6)) + (4L * maps) + (numbering.ShapeCount * ((8L * slots) + labels));
    }

    /// <summary>The distance of a state; -1 where it has none.</summary>
    /// <remarks>With two bits a state it is found by descent, one look-up for each move and step of the way.</remarks>
    /// <exception cref="ArgumentException">The state belongs to another mechanism.</exception>
    public int DistanceOf(State state) => Numbering.Rank(state) is >= 0 and var number ? DistanceOf(number) : -1;

    /// <summary>The distance of the state of a number; -1 where it has none.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such number.</exception>
    public int DistanceOf(long number)
    {
        RequireNumber(number);
        if (_wide is not null)
        {
            return _wide.Distance(number);
        }

        if (Code(number) == 0)
        {
            return -1;
        }

        var distance = 0;
        for (var next = Nearer(number); next.Slot >= 0; next = Nearer(next.State))
        {
            distance++;
        }

        return distance;
    }

    /// <summary>Gives back a mapped file. The table cannot be used afterwards.</summary>
    public void Dispose() => (_residues?.Memory ?? _wide!.Memory).Dispose();

    private static DistanceOptions Checked(StateNumbering numbering, DistanceOptions? options)
    {
        ArgumentNullException.ThrowIfNull(numbering);
        options ??= DistanceOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxBytes, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.DegreeOfParallelism, 1, nameof(options));
        options.Metric.RequireTurnsOf(numbering.Mechanism, nameof(options));
        return options;
    }

    private static bool HasReverses(Mechanism mechanism, Metric metric) => mechanism.IsReversible && metric.Kind != MetricKind.Weights;

    // The moves along which distances spread, and those that lead back; the same where each move has a reverse.
    private static (MoveSet Forward, MoveSet Descent) Moves(StateNumbering numbering, DistanceOptions options, CancellationToken cancellation)
    {
        var moves = MoveSet.Of(numbering.Region, options.Metric, cancellation);
        if (HasReverses(numbering.Mechanism, options.Metric))
        {
            return (moves, moves);
        }

        var reversed = moves.Reversed(numbering.ShapeCount);
        return options.Origin == DistanceOrigin.FromBase ? (moves, reversed) : (reversed, moves);
    }

    private int Code(long state)
    {
        var (row, within) = Math.DivRem(state, _rows.RowStates);
        return _residues!.Code(row, (int)within);
    }

    private void RequireNumber(long number)
    {
        if ((ulong)number >= (ulong)Numbering.Count)
        {
            throw new ArgumentOutOfRangeException(nameof(number), number, $"There are {Numbering.Count} states, numbered from 0.");
        }
    }
}
