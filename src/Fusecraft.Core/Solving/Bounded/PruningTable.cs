using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Lower bounds on the length of words to a goal: the exact distance, for each value of a coordinate (or for each pair of values of two) from which the goal's can be reached. What is forgotten of the states can only make
/// words shorter, so no bound exceeds the true distance.
/// </summary>
/// <remarks>
/// The goal is any state with the base shape; labels are counted from it. A bound is <see cref="Never"/> where no word at all leads there. Distances that the table has no room for count as the greatest it can tell.
/// Immutable, safe to share.
/// </remarks>
public sealed partial class PruningTable
{
    /// <summary>The bound of a state from which the goal cannot be reached.</summary>
    public const int Never = int.MaxValue;

    /// <summary>Tables with more entries have 4 bits an entry where the metric is not one of weights, else 8.</summary>
    private const long MostByteEntries = 1 << 26;

    private readonly byte[]? _bytes;
    private readonly ulong[]? _nibbles;
    private readonly int _unit;
    private readonly int _innerCount;
    private readonly int _unseen;

    private PruningTable(CosetCoordinates first, CosetCoordinates? second, Metric metric, int unit, byte[]? bytes, ulong[]? nibbles, bool isCut, ImmutableArray<long> counts)
    {
        First = first;
        Second = second;
        Metric = metric;
        IsCut = isCut;
        Counts = counts;
        _unit = unit;
        _bytes = bytes;
        _nibbles = nibbles;
        _innerCount = second?.Count ?? 1;
        _unseen = !isCut ? Never : (bytes is null ? NibbleCells.Unseen : ByteCells.Unseen) * unit;
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism => First.Mechanism;

    /// <summary>How length is counted.</summary>
    public Metric Metric { get; }

    /// <summary>The first coordinate.</summary>
    public CosetCoordinates First { get; }

    /// <summary>The second coordinate; null where there is one only.</summary>
    public CosetCoordinates? Second { get; }

    /// <summary>The shape of goals.</summary>
    public Shape BaseShape => First.BaseShape;

    /// <summary>The number of entries: the product of the numbers of coordinates. Pairs that belong to no state stay unused.</summary>
    public long EntryCount => (long)First.Count * _innerCount;

    /// <summary>The bytes that the entries take.</summary>
    public long ByteCount => _bytes?.LongLength ?? (8 * _nibbles!.LongLength);

    /// <summary>How many entries have which distance: entry <c>d</c> counts those at distance <c>d</c> times <see cref="Unit"/>.</summary>
    public ImmutableArray<long> Counts { get; }

    /// <summary>What all distances are multiples of: 1, or with weights their greatest common divisor.</summary>
    public int Unit => _unit;

    /// <summary>True where some distances are greater than the table can tell.</summary>
    public bool IsCut { get; }

    /// <summary>The mean distance over the entries whose distance is known.</summary>
    public double Mean
    {
        get
        {
            var sum = 0d;
            for (var distance = 0; distance < Counts.Length; distance++)
            {
                sum += (double)Counts[distance] * distance;
            }

            return sum * _unit / Counts.Sum();
        }
    }

    /// <summary>The table of one coordinate, or of all pairs of two.</summary>
    /// <param name="first">A coordinate.</param>
    /// <param name="second">Another of the same mechanism with the same base shape, or null. Two that share little tell most together.</param>
    /// <param name="metric">How length is counted; null for steps.</param>
    /// <param name="options">What it may take; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <returns>The table; null where it would take more bytes than the options allow.</returns>
    /// <exception cref="ArgumentException">The coordinates belong to different mechanisms or base shapes; or some step cannot be undone, and they are not those from which the base can be reached; or the metric weighs turns that are not there.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>Breadth-first over the reversed steps, on several threads where the metric is not one of weights; some nanoseconds an entry and step.</remarks>
    public static PruningTable? Build(
        CosetCoordinates first, CosetCoordinates? second = null, Metric? metric = null, PruningOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(first);
        metric ??= Metric.Step;
        options ??= PruningOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.DegreeOfParallelism, 1, nameof(options));
        RequireFit(first, second, metric);

        var (outer, inner) = Ordered(first, second);
        var moves = new PruningMoves(first.Mechanism, metric);
        var entries = (long)outer.Count * (inner?.Count ?? 1);
        var isNarrow = moves.IsUniform && entries > MostByteEntries;
        if (isNarrow ? entries / 2 > options.MaxBytes || entries / 16 > Array.MaxLength : entries > Math.Min(options.MaxBytes, Array.MaxLength))
        {
            return null;
        }

        var outerSteps = StepArrays.Of(outer);
        var innerSteps = inner is null ? StepArrays.Single(outer.StepCount) : StepArrays.Of(inner);
        if (isNarrow)
        {
            var nibbles = GC.AllocateUninitializedArray<ulong>((int)((entries + 15) / 16));
            nibbles.AsSpan().Fill(ulong.MaxValue);
            var sweep = new PruningSweep<NibbleCells>(new NibbleCells(nibbles), outerSteps, innerSteps, moves, options.DegreeOfParallelism, cancellationToken);
            sweep.Run();
            return new PruningTable(outer, inner, metric, moves.Unit, null, nibbles, sweep.IsCut, [.. sweep.Counts]);
        }
        else
        {
            var bytes = GC.AllocateUninitializedArray<byte>((int)entries);
            bytes.AsSpan().Fill((byte)ByteCells.Unseen);
            var sweep = new PruningSweep<ByteCells>(new ByteCells(bytes), outerSteps, innerSteps, moves, options.DegreeOfParallelism, cancellationToken);
            sweep.Run();
            return new PruningTable(outer, inner, metric, moves.Unit, bytes, null, sweep.IsCut, [.. sweep.Counts]);
        }
    }

    /// <summary>The table by which some pieces are told apart, and all others look alike.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="pieces">Numbers of pieces.</param>
    /// <param name="metric">How length is counted; null for steps.</param>
    /// <param name="options">What it may take; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <returns>The table for goals with the home shape; null where it would take more bytes than the options allow.</returns>
    /// <exception cref="ArgumentOutOfRangeException">There is no such piece.</exception>
    public static PruningTable? OfPieces(Mechanism mechanism, IEnumerable<int> pieces, Metric? metric = null, PruningOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(pieces);
        return OfColouring(mechanism, CosetCoordinates.ColoursOfPieces(mechanism, pieces), metric, options, cancellationToken);
    }

    /// <summary>The table of a colouring of the labels.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="colourOfLabel">For each label, by its home site, its colour.</param>
    /// <param name="metric">How length is counted; null for steps.</param>
    /// <param name="options">What it may take; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <returns>The table for goals with the home shape; null where it would take more bytes than the options allow.</returns>
    /// <exception cref="ArgumentException">There are not as many colours as sites.</exception>
    public static PruningTable? OfColouring(
        Mechanism mechanism, ReadOnlySpan<int> colourOfLabel, Metric? metric = null, PruningOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        options ??= PruningOptions.Default;
        var limits = new CosetOptions { MaxCoordinates = (int)Math.Clamp(options.MaxBytes, 1, CosetOptions.Default.MaxCoordinates), TowardsBase = true };
        return CosetCoordinates.OfColouring(mechanism, colourOfLabel, limits, cancellationToken) is { } coordinates
            ? Build(coordinates, null, metric, options, cancellationToken)
            : null;
    }

    /// <summary>The table of a subgroup, such as one generated by powers of some turns: labels in one of its orbits look alike.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="subgroup">A group that acts on the sites.</param>
    /// <param name="metric">How length is counted; null for steps.</param>
    /// <param name="options">What it may take; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <returns>The table for goals with the home shape; null where it would take more bytes than the options allow.</returns>
    /// <exception cref="ArgumentException">The group moves points that are no sites.</exception>
    public static PruningTable? OfSubgroup(
        Mechanism mechanism, PermutationGroup subgroup, Metric? metric = null, PruningOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(subgroup);
        if (subgroup.Degree > mechanism.SiteCount)
        {
            throw new ArgumentException($"The group acts on {subgroup.Degree} points; {mechanism.Name} has {mechanism.SiteCount} sites.", nameof(subgroup));
        }

        return OfColouring(mechanism, AxisChoice.OrbitColours(subgroup.Generators, mechanism.SiteCount), metric, options, cancellationToken);
    }

    /// <summary>No word from one state to another is shorter; <see cref="Never"/> where there is none at all.</summary>
    /// <param name="from">A state of the mechanism.</param>
    /// <param name="goal">A state with the base shape.</param>
    /// <exception cref="ArgumentException">A state belongs to another mechanism, or the goal's shape is not the base shape.</exception>
    public int Bound(State from, State goal)
    {
        var first = First.Rank(from, goal);
        var second = Second?.Rank(from, goal) ?? 0;
        return first < 0 || second < 0 ? Never : Bound(first, second);
    }

    /// <summary>The bound of a state whose labels are counted from home, for a table whose base shape is home.</summary>
    /// <inheritdoc cref="Bound(State, State)"/>
    public int Bound(State from) => Bound(from, Mechanism.HomeState);

    /// <summary>The bound of values of the two coordinates.</summary>
    internal int Bound(int first, int second)
    {
        var entry = ((long)first * _innerCount) + second;
        if (_bytes is not null)
        {
            var value = _bytes[entry];
            return value == ByteCells.Unseen ? _unseen : value * _unit;
        }
        else
        {
            var value = (int)(_nibbles![entry >> 4] >> (int)(entry & 15) * 4) & 15;
            return value == NibbleCells.Unseen ? _unseen : value * _unit;
        }
    }

    /// <summary>The entry that a bound is read from, so that memory can be told early.</summary>
    internal void Announce(int first, int second)
    {
        var entry = ((long)first * _innerCount) + second;
        if (_bytes is not null)
        {
            Groupoids.Memory.Announce(ref _bytes[entry], 1);
        }
        else
        {
            Groupoids.Memory.Announce(ref System.Runtime.CompilerServices.Unsafe.As<ulong, byte>(ref _nibbles![entry >> 4]), 1);
        }
    }

    private static void RequireFit(CosetCoordinates first, CosetCoordinates? second, Metric metric)
    {
        if (second is not null && (!ReferenceEquals(first.Mechanism, second.Mechanism) || first.BaseShape != second.BaseShape))
        {
            throw new ArgumentException("The two coordinates belong to different mechanisms or base shapes.", nameof(second));
        }

        if (!first.Mechanism.IsReversible && !(first.TowardsBase && second?.TowardsBase != false))
        {
            throw new ArgumentException($"Some step of {first.Mechanism.Name} cannot be undone; bounds need coordinates from which the base can be reached (CosetOptions.TowardsBase).", nameof(first));
        }

        metric.RequireTurnsOf(first.Mechanism, nameof(metric));
    }
}
