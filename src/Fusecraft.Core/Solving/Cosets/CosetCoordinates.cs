using System.Collections.Immutable;
using System.Runtime.CompilerServices;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// What is left of the states when some labels look alike: pairs of a shape and of the colour of the label on each site, numbered from 0, with a table of what each step does to them. For searches that solver authors
/// write themselves, and for lower bounds: no word between two states is shorter than the shortest one between their coordinates.
/// </summary>
/// <remarks>
/// <para>Conventions: colours belong to labels, and a label is named by its home site. Coordinate 0 is the base: the base shape with every label at home. Numbers go by the order of a breadth-first search from the base, steps in
/// their order, so they depend on the mechanism, the colouring and the options alone. Doing step <c>t</c> in a state with coordinate <c>c</c> gives one with coordinate <c>StepTable[c * StepCount + t]</c>.</para>
/// <para>With one shape, coordinates are right cosets of the stabilizer of the colouring. Where the base shape is not home, labels are counted from there: see <see cref="Rank(State, State)"/>. Immutable, safe to share.</para>
/// </remarks>
public sealed class CosetCoordinates
{
    private readonly ColouredKeys _keys;
    private readonly ShapeStore _store;
    private readonly int[] _stepTable;

    private CosetCoordinates(Mechanism mechanism, ImmutableArray<int> colours, CosetOptions options, ColouredKeys keys, ShapeStore store, int[] stepTable)
    {
        Mechanism = mechanism;
        ColourOfLabel = colours;
        BaseShape = options.BaseShape ?? mechanism.Home;
        TowardsBase = options.TowardsBase;
        IgnoresShapes = options.IgnoresShapes;
        _keys = keys;
        _store = store;
        _stepTable = stepTable;
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>For each label, by its home site, its colour.</summary>
    public ImmutableArray<int> ColourOfLabel { get; }

    /// <summary>The shape of coordinate 0.</summary>
    public Shape BaseShape { get; }

    /// <summary>True where the coordinates are those from which coordinate 0 can be reached; false where they are those that can be reached from it.</summary>
    public bool TowardsBase { get; }

    /// <summary>True where shapes are left out and every step counts as free.</summary>
    public bool IgnoresShapes { get; }

    /// <summary>The number of coordinates.</summary>
    public int Count => _store.Count;

    /// <summary>The number of steps of the mechanism: the length of a row of <see cref="StepTable"/>.</summary>
    public int StepCount => Mechanism.Steps.Length;

    /// <summary>
    /// Row by row, for each coordinate and each step the coordinate after it: entry <c>coordinate * StepCount + step.Index</c>. It is -1 where the step is barred, and, with <see cref="TowardsBase"/>, where it leads to where there
    /// is no way back to the base.
    /// </summary>
    public ReadOnlySpan<int> StepTable => _stepTable;

    /// <summary>The coordinates of a colouring of the labels.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="colourOfLabel">For each label, by its home site, its colour: any number. Labels of one colour look alike.</param>
    /// <param name="options">Where to start and how far to go; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <returns>The coordinates; null where there are more than the options allow.</returns>
    /// <exception cref="ArgumentException">There are not as many colours as sites, or the base shape belongs to another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>Takes one look-up in a hash table a coordinate and step, half of them where steps can be undone: less than a second for a million coordinates of twelve steps.</remarks>
    public static CosetCoordinates? OfColouring(
        Mechanism mechanism, ReadOnlySpan<int> colourOfLabel, CosetOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        options ??= CosetOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxCoordinates, 1, nameof(options));
        if (colourOfLabel.Length != mechanism.SiteCount)
        {
            throw new ArgumentException($"{colourOfLabel.Length} colours were given; {mechanism.Name} has {mechanism.SiteCount} sites.", nameof(colourOfLabel));
        }

        if (options.BaseShape is { } shape && !ReferenceEquals(shape.Mechanism, mechanism))
        {
            throw new ArgumentException($"The base shape belongs to the mechanism {shape.Mechanism.Name}, not to {mechanism.Name}.", nameof(options));
        }

        var keys = new ColouredKeys(mechanism, colourOfLabel, options.IgnoresShapes);
        var run = new CosetEnumeration(mechanism, keys, options, cancellationToken);
        var isComplete = keys.Words switch
        {
            1 => run.Run<OneWord>(),
            2 => run.Run<TwoWords>(),
            4 => run.Run<FourWords>(),
            _ => run.Run<ManyWords>(),
        };
        return isComplete ? new CosetCoordinates(mechanism, [.. colourOfLabel], options, keys, run.Store, run.StepTable) : null;
    }

    /// <summary>The coordinates by which some pieces are told apart from each other and from all others, which look alike.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="pieces">Numbers of pieces: those that, at home, have the labels that stay distinct.</param>
    /// <param name="options">Where to start and how far to go; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <returns>The coordinates; null where there are more than the options allow.</returns>
    /// <exception cref="ArgumentOutOfRangeException">There is no such piece.</exception>
    /// <exception cref="ArgumentException">The base shape belongs to another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static CosetCoordinates? OfPieces(Mechanism mechanism, IEnumerable<int> pieces, CosetOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(pieces);
        return OfColouring(mechanism, ColoursOfPieces(mechanism, pieces), options, cancellationToken);
    }

    internal int[] StepArray => _stepTable;

    /// <summary>The coordinate after a step; -1 where there is none.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such coordinate.</exception>
    /// <exception cref="ArgumentException">The step belongs to another mechanism.</exception>
    public int After(int coordinate, Step step)
    {
        if ((uint)coordinate >= (uint)Count)
        {
            throw new ArgumentOutOfRangeException(nameof(coordinate), coordinate, $"There are {Count} coordinates, numbered from 0.");
        }

        Mechanism.Board.Of(step);
        return _stepTable[(coordinate * StepCount) + step.Index];
    }

    /// <summary>The coordinate of a state, whose labels are counted from home; -1 where it has none. For coordinates whose base shape is home.</summary>
    /// <exception cref="ArgumentException">The state belongs to another mechanism, or the base shape is not home.</exception>
    public int Rank(State state) => Rank(state, Mechanism.HomeState);

    /// <summary>The coordinate of a state as seen from an origin, a state with the base shape: the label that the origin has on site <c>i</c> counts as that of site <c>i</c>. -1 where it has none.</summary>
    /// <exception cref="ArgumentException">A state belongs to another mechanism, or the origin's shape is not the base shape.</exception>
    public int Rank(State state, State origin)
    {
        ArgumentNullException.ThrowIfNull(state);
        ArgumentNullException.ThrowIfNull(origin);
        if (!ReferenceEquals(state.Mechanism, Mechanism) || !ReferenceEquals(origin.Mechanism, Mechanism))
        {
            throw new ArgumentException($"A state belongs to another mechanism than {Mechanism.Name}.", nameof(state));
        }

        if (origin.Shape != BaseShape)
        {
            throw new ArgumentException($"Labels are counted from a state with the shape {origin.Shape}; the base shape is {BaseShape}.", nameof(origin));
        }

        return state.Shape is null ? -1 : Rank(state.Shape.Key, origin.Labels.Inverse() * state.Labels);
    }

    /// <summary>The coordinate of a shape and labels counted from the base; -1 where there is none.</summary>
    [SkipLocalsInit]
    internal int Rank(ReadOnlySpan<ulong> shape, Permutation labels)
    {
        Span<ulong> key = _keys.Words <= 64 ? stackalloc ulong[_keys.Words] : new ulong[_keys.Words];
        if (!_keys.TryPack(shape, labels, key))
        {
            return -1;
        }

        return _keys.Words switch
        {
            1 => _store.Find<OneWord>(key),
            2 => _store.Find<TwoWords>(key),
            4 => _store.Find<FourWords>(key),
            _ => _store.Find<ManyWords>(key),
        };
    }

    internal static int[] ColoursOfPieces(Mechanism mechanism, IEnumerable<int> pieces)
    {
        var colours = new int[mechanism.SiteCount];
        foreach (var piece in pieces)
        {
            if ((uint)piece >= (uint)mechanism.PieceCount)
            {
                throw new ArgumentOutOfRangeException(nameof(pieces), piece, $"There are {mechanism.PieceCount} pieces, numbered from 0.");
            }

            foreach (var site in mechanism.SitesOfPiece[piece])
            {
                colours[site] = site + 1;
            }
        }

        return colours;
    }
}
