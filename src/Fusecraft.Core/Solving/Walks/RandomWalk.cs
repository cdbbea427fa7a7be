using System.Collections.Immutable;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// Shuffling by random turns: a walk over the states of a region, from its base state, that each turn does one step chosen at random. Says how far from uniform it is after any number of turns.
/// </summary>
/// <remarks>
/// <para>The walk never leaves the region: a step that would is barred to it. Where nothing is free it stays.</para>
/// <para>
/// What it tends to is its stationary distribution. With steps that bar each other this is in general not uniform: where each free step has a free opposite of the same weight and the walk chooses among the free
/// steps, a state is as likely as the weight of the steps free there. Choosing among all steps, those barred doing nothing, makes it uniform again. A walk whose returns all take a multiple of some period tends to
/// nothing at all: see <see cref="Period"/>.
/// </para>
/// <para>
/// From any other state of the base shape the distances are the same, because renaming labels takes the walk to itself; from another shape they may differ. Immutable, safe to share.
/// Source for the theory: D. A. Levin, Y. Peres, E. L. Wilmer, Markov Chains and Mixing Times, 2009 (not opened, from memory).
/// </para>
/// </remarks>
public sealed partial class RandomWalk
{
    private const double RoundOff = 1.0 / (1L << 53);
    private readonly RegionShapes _region;
    private readonly WalkSpace _space;
    private readonly WalkCycle _cycle;

    private RandomWalk(RegionShapes region, WalkSpace space, WalkOptions options, ImmutableArray<int> watched, CancellationToken cancellation)
    {
        _region = region;
        _space = space;
        Options = options;
        WatchedSites = watched;
        _cycle = WalkCycle.Of(space, cancellation)
            ?? throw new ArgumentException($"With steps of weight 0 the walk cannot go from every state of the region to every other.", nameof(options));
    }

    /// <summary>What the walk does each turn.</summary>
    public WalkOptions Options { get; }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism => _region.Mechanism;

    /// <summary>The number of states that the walk tells apart.</summary>
    public int StateCount => _space.Count;

    /// <summary>The number of shapes of the region.</summary>
    public int ShapeCount => _region.Count;

    /// <summary>True where only some labels are watched: then every distance is a lower bound for that of the walk over all states, and the gap an upper bound.</summary>
    public bool IsWatched => !WatchedSites.IsDefault;

    /// <summary>The home sites of the labels watched; default where all are.</summary>
    public ImmutableArray<int> WatchedSites { get; }

    /// <summary>The greatest common divisor of the numbers of turns after which the walk can be back in its state. Above 1 the walk has only one of so many parts of the states for itself at any time.</summary>
    public int Period => _cycle.Period;

    /// <summary>True when each step and its reverse are equally likely in the stationary distribution. Only then are there bounds from the spectrum.</summary>
    public bool IsReversible => _space.Rates.IsReversible;

    /// <summary>True when the stationary distribution is uniform.</summary>
    public bool IsUniform => _space.Rates.IsUniform;

    /// <summary>By how much one turn changes the stationary distribution as it was computed: the sum of all differences.</summary>
    public double StationaryResidual => StationaryShapes.Residual(_space.Rates, _space.Rates.Stationary);

    /// <summary>The distance of the stationary distribution from uniform.</summary>
    public double StationaryFromUniform
    {
        get
        {
            var sum = 0.0;
            foreach (var weight in _space.Rates.Stationary)
            {
                sum += Math.Abs(weight - (1.0 / ShapeCount));
            }

            return IsUniform ? 0 : sum / 2;
        }
    }

    /// <summary>What the distance from uniform comes down to in the long run: the least of its limits along the numbers of turns alike modulo the period. 0 where the period is 1 and the walk tends to uniform.</summary>
    public double LeastFromUniform => Period == 1 && IsUniform ? 0 : Enumerable.Range(0, Period).Min(LimitFromUniform);

    /// <summary>Makes the walk over the states of the home region.</summary>
    /// <param name="mechanism">The mechanism; it is explored and its vertex group at home computed.</param>
    /// <param name="options">What the walk does, and limits; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">A weight is negative or of no step; or with weights of 0 the walk cannot go from every state to every other.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The probability of holding is not in 0 … 1, or a limit below 1.</exception>
    /// <exception cref="InvalidOperationException">There are more states than allowed.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static RandomWalk Of(Mechanism mechanism, WalkOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        options = Checked(options);
        return FromBase(ShapeGroupoid.Explore(mechanism, cancellationToken: cancellationToken).VertexGroupAt(0, cancellationToken), options, cancellationToken);
    }

    /// <summary>Makes the walk over the states of a vertex group's region, from its base shape.</summary>
    /// <param name="group">The vertex group at the base shape.</param>
    /// <param name="options">What the walk does, and limits; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <inheritdoc cref="Of(Mechanism, WalkOptions?, CancellationToken)" path="/exception"/>
    public static RandomWalk FromBase(VertexGroup group, WalkOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(group);
        options = Checked(options);
        if (group.StateCount > options.MaxStates)
        {
            throw new InvalidOperationException($"The region has {group.StateCount} states; {options.MaxStates} are allowed. Watch some labels only, for a lower bound.");
        }

        var numbering = StateNumbering.Of(group);
        var rates = new WalkRates(numbering.Region, options);
        var space = new NumberedWalkSpace(numbering, rates, options.DegreeOfParallelism, cancellationToken);
        return new RandomWalk(numbering.Region, space, options, default, cancellationToken);
    }

    /// <summary>Makes the walk over what can be seen of states of the home region when only the shape and some labels are watched. Its distances are lower bounds for those of the walk over all states.</summary>
    /// <param name="mechanism">The mechanism; it is explored.</param>
    /// <param name="sites">The home sites of the labels watched; none for the shape alone.</param>
    /// <param name="options">What the walk does, and limits; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">A site is given twice or is none; or as for the walk over all states.</exception>
    /// <inheritdoc cref="Of(Mechanism, WalkOptions?, CancellationToken)" path="/exception"/>
    public static RandomWalk Watching(Mechanism mechanism, IEnumerable<int> sites, WalkOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(sites);
        options = Checked(options);
        var watched = sites.ToImmutableArray();
        if (watched.Distinct().Count() != watched.Length || watched.Any(site => (uint)site >= (uint)mechanism.SiteCount))
        {
            throw new ArgumentException($"The sites watched are different ones of 0 … {mechanism.SiteCount - 1}; found {string.Join(", ", watched)}.", nameof(sites));
        }

        var region = new RegionShapes(ShapeGroupoid.Explore(mechanism, cancellationToken: cancellationToken), 0);
        var rates = new WalkRates(region, options);
        var space = WatchedWalkSpace.Of(region, rates, [.. watched], default, options, cancellationToken);
        return new RandomWalk(region, space, options, watched, cancellationToken);
    }

    /// <summary>The probability of a state in the stationary distribution; of what is watched of it, where only some labels are. It depends on the shape alone.</summary>
    /// <param name="shape">A shape of the region.</param>
    /// <exception cref="ArgumentException">The shape is not one of the region.</exception>
    public double StationaryProbability(Shape shape)
    {
        ArgumentNullException.ThrowIfNull(shape);
        var place = ReferenceEquals(shape.Mechanism, Mechanism) ? _region.PlaceOf(_region.Groupoid.IndexOf(shape)) : -1;
        return place >= 0 ? _space.Rates.Stationary[place] / _space.OfShape : throw new ArgumentException($"The shape {shape} is not in the region of the walk.", nameof(shape));
    }

    private static WalkOptions Checked(WalkOptions? options)
    {
        options ??= WalkOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxStates, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.DegreeOfParallelism, 1, nameof(options));
        return options.Holding is >= 0 and < 1
            ? options
            : throw new ArgumentOutOfRangeException(nameof(options), options.Holding, $"The probability of holding is 0 or more and below 1; this one is {options.Holding}.");
    }

    private FixedPieces Pieces(CancellationToken cancellation) => new(StateCount, _space.Unit, Options.DegreeOfParallelism, cancellation);

    // The limit along the numbers of turns alike to this one modulo the period.
    private double LimitFromUniform(int turns) => Pieces(default).Sum((first, last) =>
    {
        var (uniform, sum) = (1.0 / StateCount, 0.0);
        for (var at = first; at < last;)
        {
            var (end, stationary) = Run(at, last);
            for (; at < end; at++)
            {
                sum += Math.Abs((Period == 1 ? stationary : _cycle.Classes[at] == turns ? Period * stationary : 0) - uniform);
            }
        }

        return (sum, 0, 0);
    }).A / 2;

    // The states from one on that have its shape, and the stationary probability of each.
    private (int End, double Stationary) Run(int at, int last)
    {
        var place = at / _space.OfShape;
        return ((int)Math.Min(last, (place + 1L) * _space.OfShape), _space.Rates.Stationary[place] / _space.OfShape);
    }
}
