using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// The shapes reachable from home up to symmetry: one representative of each orbit, and the exact totals that a plain exploration counts, with a fraction of its memory. Two shapes are one up to
/// symmetry when some symmetry of the turns takes one to the other.
/// </summary>
/// <remarks>
/// A representative is the least image of its shapes, so it may itself not be reachable: a symmetry may carry home out of reach. Representatives are numbered from 0, that of home, in the order of a
/// breadth-first search. Takes memory for the key of each representative and about 22 bytes more; where turns go one way, also 16 bytes for each of their free steps. Steps written alike are
/// not looked for; <see cref="ShapeGroupoid.Explore"/> does so. Immutable, safe to share.
/// </remarks>
public sealed class ShapeOrbits
{
    private readonly OrbitExplorer _explorer;
    private readonly QuotientRegions _regions;

    private ShapeOrbits(SymmetryGroup symmetries, OrbitExplorer explorer, QuotientRegions regions)
    {
        Symmetries = symmetries;
        _explorer = explorer;
        _regions = regions;
        if (IsComplete)
        {
            Count();
        }
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism => Symmetries.Mechanism;

    /// <summary>The symmetries used: those given that can take a reachable shape to a reachable one; of more than 384 a subgroup.</summary>
    public SymmetryGroup Symmetries { get; }

    /// <summary>False when a budget ended the exploration: then there are more shapes, and no total is known.</summary>
    public bool IsComplete => _explorer.IsComplete;

    /// <summary>The number of shapes up to symmetry; of those found so far, when not complete.</summary>
    public int RepresentativeCount => _explorer.Count;

    /// <summary>The number of shapes reachable from home; null when not complete.</summary>
    public long? ShapeCount { get; private set; }

    /// <summary>The number of pairs (reachable shape, turn) whose forward step is free; null when not complete.</summary>
    public long? FreeTurnCount { get; private set; }

    /// <summary>The number of reachable shapes where exactly one turn has a free step, in either sense; null when not complete.</summary>
    public long? DeadEndCount { get; private set; }

    /// <summary>The number of reachable shapes where no step is free; null when not complete.</summary>
    public long? StuckShapeCount { get; private set; }

    /// <summary>The number of regions; null when not complete.</summary>
    public long? RegionCount { get; private set; }

    /// <summary>The number of pairs (reachable shape, free step) that leave their region; null when not complete.</summary>
    public long? PassageCount { get; private set; }

    /// <summary>The number of regions that are traps: not the home region, and no passage leads out; null when not complete.</summary>
    public long? TrapCount { get; private set; }

    /// <summary>The number of shapes of the home region; null when not complete.</summary>
    public long? HomeRegionShapeCount { get; private set; }

    /// <summary>How many of the <see cref="Symmetries"/> take the home region to itself; null when not complete.</summary>
    public int? HomeRegionSymmetryCount { get; private set; }

    /// <summary>Finds all shapes reachable from home, up to symmetry.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="symmetries">Symmetries of the mechanism; null for all that <see cref="SymmetryGroup.Of"/> gives.</param>
    /// <param name="options">How far to go, counted in representatives; null for no limit but memory.</param>
    /// <param name="progress">Told now and then how far the exploration has come, in representatives.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">The symmetries are those of another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>Takes time for one image under each symmetry for each free step of a representative.</remarks>
    public static ShapeOrbits Explore(
        Mechanism mechanism,
        SymmetryGroup? symmetries = null,
        ExplorationOptions? options = null,
        IProgress<ExplorationProgress>? progress = null,
        CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        symmetries ??= SymmetryGroup.Of(mechanism, cancellationToken);
        if (!ReferenceEquals(symmetries.Mechanism, mechanism))
        {
            throw new ArgumentException($"The symmetries are those of another mechanism than {mechanism.Name}.", nameof(symmetries));
        }

        options ??= ExplorationOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxShapes, 1, nameof(options));
        var table = new SymmetryTable(symmetries);
        var explorer = new OrbitExplorer(mechanism, table, options, progress, cancellationToken);
        var regions = new QuotientRegions(explorer);
        regions.Run();
        var used = symmetries.Order == table.Count
            ? symmetries
            : symmetries.Subgroup(PermutationGroup.Generate(table.Sites.Where(sites => !sites.IsIdentity), mechanism.SiteCount));
        return new ShapeOrbits(used, explorer, regions);
    }

    /// <summary>A representative by its number.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such representative.</exception>
    public Shape RepresentativeAt(int representative)
    {
        RequireRepresentative(representative);
        return new Shape(Mechanism, _explorer.Key(representative));
    }

    /// <summary>The number of reachable shapes that symmetries take to a representative.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such representative.</exception>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    public int OrbitSize(int representative)
    {
        RequireRepresentative(representative);
        RequireComplete();
        return Over(representative).Lifts.Count / _explorer.StabilizerOrder(representative);
    }

    /// <summary>The number of the representative of a shape; -1 where no shape of its orbit was found.</summary>
    /// <exception cref="ArgumentException">The shape belongs to another mechanism.</exception>
    public int RepresentativeOf(Shape shape)
    {
        ArgumentNullException.ThrowIfNull(shape);
        if (!ReferenceEquals(shape.Mechanism, Mechanism))
        {
            throw new ArgumentException($"The shape belongs to another mechanism than {Mechanism.Name}.", nameof(shape));
        }

        var least = new ulong[shape.Key.Length];
        _explorer.Table.Canonicalize(shape.Key, least, new ulong[least.Length], out _);
        return _explorer.Find(least);
    }

    /// <summary>The vertex group at home, the same that <see cref="ShapeGroupoid.VertexGroupAt"/> finds, from the representatives alone; proven.</summary>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>
    /// Closed paths up to symmetry generate an extension of the vertex group by the symmetries of the home region; the vertex group is what in it moves no shape. Takes time for one sift an arc of a
    /// representative.
    /// </remarks>
    /// <exception cref="InvalidOperationException">A budget ended the exploration.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public PermutationGroup VertexGroupAtHome(CancellationToken cancellationToken = default)
    {
        RequireComplete();
        return QuotientExtraction.Run(_explorer, _regions, cancellationToken);
    }

    private QuotientRegions.Component Over(int representative) => _regions.Components[_regions.ComponentOf(representative)];

    private void Count()
    {
        var (shapes, deadEnds, stuck, passages, homeShapes) = (0L, 0L, 0L, 0L, 0L);
        var hasPassage = new bool[_regions.Components.Count];
        for (var representative = 0; representative < RepresentativeCount; representative++)
        {
            var size = OrbitSize(representative);
            var freeTurns = FreeTurnsAt(representative);
            shapes += size;
            deadEnds += freeTurns == 1 ? size : 0;
            stuck += freeTurns == 0 ? size : 0;
            homeShapes += _regions.ComponentOf(representative) == 0 ? size : 0;
        }

        foreach (var arc in _explorer.Arcs ?? [])
        {
            var component = _regions.ComponentOf(arc.From);
            if (component != _regions.ComponentOf(arc.To))
            {
                passages += OrbitSize(arc.From);
                hasPassage[component] = true;
            }
        }

        ShapeCount = shapes;
        DeadEndCount = deadEnds;
        StuckShapeCount = stuck;
        PassageCount = passages;
        HomeRegionShapeCount = homeShapes;
        HomeRegionSymmetryCount = _regions.Components[0].Group.Members.Count;
        FreeTurnCount = CountFreeTurns();
        RegionCount = _regions.Components.Sum(component => (long)component.RegionCount);
        TrapCount = _regions.Components.Where((component, number) => number > 0 && !hasPassage[number]).Sum(component => (long)component.RegionCount);
    }

    private int FreeTurnsAt(int representative)
    {
        var key = _explorer.Key(representative);
        var (count, lastTurn) = (0, -1);
        foreach (var step in Mechanism.Steps)
        {
            if (step.Turn.Index != lastTurn && Mechanism.Board.Moves[step.Index].IsFree(key))
            {
                lastTurn = step.Turn.Index;
                count++;
            }
        }

        return count;
    }

    // A reflection takes forward steps to backward ones, so each free step of a representative is followed to all shapes it stands for: it counts where it has become a forward one.
    private long CountFreeTurns()
    {
        var table = _explorer.Table;
        var steps = Mechanism.Steps;
        var forward = new Dictionary<(int Component, int Label), int[]>();
        var total = 0L;
        for (var representative = 0; representative < RepresentativeCount; representative++)
        {
            var at = (_regions.ComponentOf(representative), _regions.LabelOf(representative));
            if (!forward.TryGetValue(at, out var counts))
            {
                forward.Add(at, counts = new int[steps.Length]);
                foreach (var lift in Over(representative).Lifts)
                {
                    var images = table.Steps[table.Product(at.Item2, lift)];
                    for (var step = 0; step < counts.Length; step++)
                    {
                        counts[step] += steps[images[step]].IsForward ? 1 : 0;
                    }
                }
            }

            var here = 0L;
            var key = _explorer.Key(representative);
            for (var step = 0; step < counts.Length; step++)
            {
                here += Mechanism.Board.Moves[step].IsFree(key) ? counts[step] : 0;
            }

            total += here / _explorer.StabilizerOrder(representative);
        }

        return total;
    }

    private void RequireRepresentative(int representative)
    {
        if ((uint)representative >= (uint)RepresentativeCount)
        {
            throw new ArgumentOutOfRangeException(nameof(representative), representative, $"There are {RepresentativeCount} representatives, numbered from 0.");
        }
    }

    private void RequireComplete()
    {
        if (!IsComplete)
        {
            throw new InvalidOperationException("A budget ended the exploration, so this is not known; explore further.");
        }
    }
}
