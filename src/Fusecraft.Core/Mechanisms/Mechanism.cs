using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>
/// A puzzle whose turns are sometimes barred: sites, pieces, turns with guards, and the home shape made of blocks and marks. What bars a step never depends on the labels, only on
/// the shape.
/// </summary>
/// <remarks>Sites, pieces, turns and steps are numbered from 0 in code; texts use names. Immutable, safe to share.</remarks>
public sealed partial class Mechanism
{
    private readonly NameTable _names;
    private readonly ImmutableArray<string> _faceNames;
    private readonly Lazy<ShapeBoard> _board;
    private readonly Lazy<PermutationGroup> _unguardedGroup;
    private readonly Lazy<StepNames> _stepNames;
    private readonly Lazy<CubeNames?> _cubeNames;
    private readonly Lazy<SiteMover> _siteMover;
    private readonly Lazy<SiteRows> _siteRows;

    private readonly Lazy<ImmutableArray<Permutation>> _builtSymmetries;

    internal Mechanism(
        MechanismDefinition definition,
        Blueprint blueprint,
        NameTable names,
        List<TurnBlueprint> turns,
        List<(string Mark, int Site)> marks,
        List<int[]> blocks,
        ImmutableArray<int> colours)
    {
        _names = names;
        Definition = definition;
        PieceOfSite = blueprint.PieceOfSite;
        Adjacency = blueprint.Adjacency;
        _builtSymmetries = new Lazy<ImmutableArray<Permutation>>(() => blueprint.Symmetries?.Invoke() ?? []);
        ColourOfSite = colours;
        _faceNames = definition.Colours.Kind == ColourSchemeKind.Faces ? blueprint.FaceNames : [];
        HomeBlocks = [.. blocks.Select(block => block.ToImmutableArray())];
        MarkNames = [.. marks.Select(mark => mark.Mark).Distinct()];
        HomeMarks = [.. marks];
        Notation = new CycleNotation(blueprint.SiteNames, names.FindSite);
        SitesOfPiece = GroupSites(blueprint);
        var allTurns = ImmutableArray.CreateBuilder<Turn>(turns.Count);
        var steps = ImmutableArray.CreateBuilder<Step>(2 * turns.Count);
        foreach (var turn in turns)
        {
            var made = new Turn(allTurns.Count, turn, steps.Count);
            allTurns.Add(made);
            steps.Add(made.Forward);
            if (made.Backward is not null)
            {
                steps.Add(made.Backward);
            }
        }

        Turns = allTurns.DrainToImmutable();
        Steps = steps.DrainToImmutable();
        _board = new Lazy<ShapeBoard>(() => new ShapeBoard(this));
        _siteMover = new Lazy<SiteMover>(() => SiteMover.Of(this));
        _siteRows = new Lazy<SiteRows>(() => Mechanisms.SiteRows.Of(this));
        _stepNames = new Lazy<StepNames>(() => new StepNames(Steps));
        _cubeNames = new Lazy<CubeNames?>(() => Definition.Family is CubeFamily cube ? new CubeNames(cube.Size, Turns) : null);
        _unguardedGroup = new Lazy<PermutationGroup>(() => PermutationGroup.Generate(Turns.Select(turn => turn.Permutation), SiteCount));
    }

    /// <summary>What the mechanism is called.</summary>
    public string Name => Definition.Name;

    /// <summary>Free text about the mechanism; null where none was given.</summary>
    public string? About => Definition.About;

    /// <summary>The mechanism as it was written down.</summary>
    public MechanismDefinition Definition { get; }

    /// <summary>The number of sites; a state permutes 0 … SiteCount - 1.</summary>
    public int SiteCount => PieceOfSite.Length;

    /// <summary>The name of each site.</summary>
    public ImmutableArray<string> SiteNames => _names.SiteNames;

    /// <summary>Reads and writes permutations of the sites by name.</summary>
    public CycleNotation Notation { get; }

    /// <summary>The number of pieces, pieces without sites (such as a hidden core) included.</summary>
    public int PieceCount => PieceNames.Length;

    /// <summary>The name by which each piece is written.</summary>
    public ImmutableArray<string> PieceNames => _names.PieceNames;

    /// <summary>For each site, the number of the piece it belongs to.</summary>
    public ImmutableArray<int> PieceOfSite { get; }

    /// <summary>For each piece, its sites in ascending order; empty for a piece that shows none.</summary>
    public ImmutableArray<ImmutableArray<int>> SitesOfPiece { get; }

    /// <summary>Pairs of pieces that share a face; null where the mechanism knows no adjacency.</summary>
    public IReadOnlyList<(int A, int B)>? Adjacency { get; }

    /// <summary>The turns in the order of the file.</summary>
    public ImmutableArray<Turn> Turns { get; }

    /// <summary>All steps, turn by turn, forward before backward.</summary>
    public ImmutableArray<Step> Steps { get; }

    /// <summary>The blocks at home, each as ascending piece numbers.</summary>
    public ImmutableArray<ImmutableArray<int>> HomeBlocks { get; }

    /// <summary>The names of the marks.</summary>
    public ImmutableArray<string> MarkNames { get; }

    /// <summary>The marks at home, each with its site.</summary>
    public ImmutableArray<(string Mark, int Site)> HomeMarks { get; }

    /// <summary>Where a solver wants to get.</summary>
    public Goal Goal => Definition.Goal;

    /// <summary>For each site, the number of the colour its label shows; labels with the same number look alike.</summary>
    public ImmutableArray<int> ColourOfSite { get; }

    /// <summary>The shape at home.</summary>
    public Shape Home => new(this, Board.HomeKey);

    /// <summary>The state with every label home.</summary>
    public State HomeState => new(this, default, Home);

    /// <summary>The group generated by all turns with blocks and guards ignored: what the puzzle could do if nothing were ever barred.</summary>
    public PermutationGroup UnguardedGroup => _unguardedGroup.Value;

    /// <summary>True when every free step can be undone at once, so that all shapes reachable from home form one region.</summary>
    public bool IsReversible => Turns.All(turn => turn.IsReversible);

    internal ShapeBoard Board => _board.Value;

    internal SiteRows SiteRows => _siteRows.Value;

    internal StepNames StepNames => _stepNames.Value;

    internal SiteMover SiteMover => _siteMover.Value;

    /// <summary>The symmetries that whoever built the mechanism knows of, as permutations of the sites, the identity first; empty where it came without. Not all need take turns to turns.</summary>
    internal ImmutableArray<Permutation> BuiltSymmetries => _builtSymmetries.Value;

    /// <summary>Makes a mechanism from its definition.</summary>
    /// <exception cref="MechanismFormatException">The definition has mistakes; all of them are listed.</exception>
    public static Mechanism Create(MechanismDefinition definition)
    {
        ArgumentNullException.ThrowIfNull(definition);
        var problems = new ProblemList();
        return MechanismCompiler.Compile(definition, problems) ?? throw problems.ToException();
    }

    /// <summary>Makes a plain permutation group a mechanism with one shape: the generators are turns that are always free, named <c>g1</c>, <c>g2</c>, ….</summary>
    /// <param name="name">What the mechanism is called.</param>
    /// <param name="generators">Permutations other than the identity; the sites are the points up to the largest one moved.</param>
    /// <exception cref="ArgumentException">A generator is the identity.</exception>
    public static Mechanism FromGenerators(string name, params IEnumerable<Permutation> generators)
    {
        ArgumentNullException.ThrowIfNull(generators);
        var all = generators.ToList();
        var siteCount = all.Count == 0 ? 1 : Math.Max(1, all.Max(generator => generator.SupportEnd));
        return FromGenerators(name, siteCount, all.Select((generator, i) => ($"g{i + 1}", generator)));
    }

    /// <summary>Makes a plain permutation group a mechanism with one shape: the generators are turns that are always free.</summary>
    /// <param name="name">What the mechanism is called.</param>
    /// <param name="siteCount">The number of sites.</param>
    /// <param name="generators">Permutations other than the identity, each with the name of its turn.</param>
    /// <exception cref="ArgumentException">A generator is the identity or moves a point beyond the sites.</exception>
    /// <exception cref="MechanismFormatException">A name cannot be a turn's name, or stands twice.</exception>
    public static Mechanism FromGenerators(string name, int siteCount, params IEnumerable<(string Name, Permutation Permutation)> generators)
    {
        ArgumentNullException.ThrowIfNull(generators);
        var turns = ImmutableArray.CreateBuilder<TurnDefinition>();
        foreach (var (turn, permutation) in generators)
        {
            if (permutation.IsIdentity || permutation.SupportEnd > siteCount)
            {
                throw new ArgumentException($"Generator {turn} is {permutation}; a generator moves some of the points 1 … {siteCount} and no others.", nameof(generators));
            }

            turns.Add(new TurnDefinition { Name = turn, Moves = permutation.ToString() });
        }

        return Create(new MechanismDefinition { Name = name, Sites = Blueprint.NumberedNames(siteCount), Turns = turns.DrainToImmutable() });
    }

    /// <summary>The number of the site with the given name, or null. Understands every name a mechanism file may use.</summary>
    public int? FindSite(string name) => _names.FindSite(name);

    /// <summary>The number of the piece with the given name, one of its sites or a name of its own, or null.</summary>
    public int? FindPiece(string name) => _names.FindPiece(name);

    /// <summary>The turn with the given name, or null.</summary>
    public Turn? FindTurn(string name) => Turns.FirstOrDefault(turn => turn.Name == name);

    /// <inheritdoc/>
    public override string ToString() => Name;

    private static ImmutableArray<ImmutableArray<int>> GroupSites(Blueprint blueprint)
    {
        var sites = new List<int>[blueprint.PieceNames.Length];
        for (var piece = 0; piece < sites.Length; piece++)
        {
            sites[piece] = [];
        }

        for (var site = 0; site < blueprint.PieceOfSite.Length; site++)
        {
            sites[blueprint.PieceOfSite[site]].Add(site);
        }

        return [.. sites.Select(list => list.ToImmutableArray())];
    }
}
