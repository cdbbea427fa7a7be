using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Writes a mechanism down in C#, member by member as in a mechanism file: <c>MechanismBuilder.Cube("Weir gate", 3).Block("UFR", "UF").Build()</c>.
/// </summary>
/// <remarks>Names are checked by <see cref="Build"/>, which reports all mistakes at once. A builder is not to be shared between threads; what it makes is.</remarks>
public sealed class MechanismBuilder
{
    private readonly string _name;
    private readonly MechanismFamily? _family;
    private readonly ImmutableArray<string> _sites;
    private readonly List<string> _use = [];
    private readonly List<ImmutableArray<string>> _pieces = [];
    private readonly List<TurnDefinition> _turns = [];
    private readonly List<ImmutableArray<string>> _blocks = [];
    private readonly List<MarkDefinition> _marks = [];
    private string? _schema;
    private string? _about;
    private Goal _goal = Fusecraft.Mechanisms.Goal.Home;
    private ColourScheme _colours = ColourScheme.Distinct;

    private MechanismBuilder(string name, MechanismFamily? family, ImmutableArray<string> sites)
    {
        ArgumentNullException.ThrowIfNull(name);
        _name = name;
        _family = family;
        _sites = sites;
    }

    /// <summary>Begins a mechanism of its own with sites named <c>1</c> … <c>n</c>.</summary>
    /// <param name="name">What the mechanism is called.</param>
    /// <param name="siteCount">The number of sites, 1 to <see cref="Permutations.Permutation.MaxDegree"/>.</param>
    /// <exception cref="ArgumentOutOfRangeException">The number of sites is out of range.</exception>
    public static MechanismBuilder Custom(string name, int siteCount)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(siteCount, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(siteCount, Permutations.Permutation.MaxDegree);
        return new MechanismBuilder(name, null, Blueprint.NumberedNames(siteCount));
    }

    /// <summary>Begins a mechanism of its own.</summary>
    /// <param name="name">What the mechanism is called.</param>
    /// <param name="sites">The names of the sites, in the order of their numbers.</param>
    public static MechanismBuilder Custom(string name, params IEnumerable<string> sites) => new(name, null, [.. sites]);

    /// <summary>Begins a cube; see <see cref="CubeFamily"/>.</summary>
    /// <param name="name">What the mechanism is called.</param>
    /// <param name="size">Layers a side, 2 to 100.</param>
    /// <param name="centreTwist">For odd sizes: true when the twist of the face centres counts.</param>
    public static MechanismBuilder Cube(string name, int size, bool centreTwist = false) => new(name, new CubeFamily(size, centreTwist), []);

    /// <summary>Begins a sliding board; see <see cref="BoardFamily"/>.</summary>
    /// <param name="name">What the mechanism is called.</param>
    /// <param name="columns">Cells a row.</param>
    /// <param name="rows">Rows.</param>
    /// <param name="gaps">The cells that are gaps at home; none given: the last cell.</param>
    public static MechanismBuilder Board(string name, int columns, int rows, params IEnumerable<string> gaps) =>
        new(name, new BoardFamily(columns, rows, [.. gaps]), []);

    /// <summary>Begins a sliding board on a graph; see <see cref="GraphBoardFamily"/>.</summary>
    /// <param name="name">What the mechanism is called.</param>
    /// <param name="vertices">The names of the vertices, in the order of their numbers.</param>
    /// <param name="edges">Pairs of vertex names.</param>
    /// <param name="gaps">The vertices that are gaps at home; none given: the last vertex.</param>
    public static MechanismBuilder GraphBoard(string name, IEnumerable<string> vertices, IEnumerable<(string From, string To)> edges, params IEnumerable<string> gaps) =>
        new(name, new GraphBoardFamily([.. vertices], [.. edges], [.. gaps]), []);

    /// <summary>Names the JSON Schema that editors check the written file with.</summary>
    /// <param name="address">Kept, not read.</param>
    public MechanismBuilder Schema(string address)
    {
        _schema = address;
        return this;
    }

    /// <summary>Tells something about the mechanism.</summary>
    public MechanismBuilder About(string about)
    {
        _about = about;
        return this;
    }

    /// <summary>Makes one piece of several sites.</summary>
    /// <param name="sites">The names of the sites.</param>
    public MechanismBuilder Piece(params IEnumerable<string> sites)
    {
        _pieces.Add([.. sites]);
        return this;
    }

    /// <summary>Adds a turn.</summary>
    /// <param name="name">The turn's name.</param>
    /// <param name="moves">The permutation of the forward step: disjoint cycles of site names, such as <c>(1 2 3)(5 6)</c>.</param>
    /// <param name="describe">Says what else there is to the turn: its guards, what it carries, how it is written.</param>
    public MechanismBuilder Turn(string name, string moves, Action<TurnBuilder>? describe = null)
    {
        ArgumentNullException.ThrowIfNull(name);
        ArgumentNullException.ThrowIfNull(moves);
        var turn = new TurnBuilder(name, moves);
        describe?.Invoke(turn);
        _turns.Add(turn.ToDefinition());
        return this;
    }

    /// <summary>Keeps only these turns of the family, and those of further calls.</summary>
    /// <param name="turns">Names of turns, such as <c>U</c> or, for the half turn alone, <c>F2</c>.</param>
    public MechanismBuilder Use(params IEnumerable<string> turns)
    {
        _use.AddRange(turns);
        return this;
    }

    /// <summary>Fuses pieces at home.</summary>
    /// <param name="pieces">The names of two or more pieces.</param>
    public MechanismBuilder Block(params IEnumerable<string> pieces)
    {
        _blocks.Add([.. pieces]);
        return this;
    }

    /// <summary>Sets tokens of a mark on sites at home.</summary>
    /// <param name="name">The mark's name, such as <c>gap</c> or <c>pin</c>.</param>
    /// <param name="sites">The names of the sites.</param>
    public MechanismBuilder Mark(string name, params IEnumerable<string> sites)
    {
        ArgumentNullException.ThrowIfNull(name);
        _marks.Add(new MarkDefinition(name, [.. sites]));
        return this;
    }

    /// <summary>Says where a solver wants to get.</summary>
    public MechanismBuilder Goal(Goal goal)
    {
        ArgumentNullException.ThrowIfNull(goal);
        _goal = goal;
        return this;
    }

    /// <summary>Says which labels look alike.</summary>
    public MechanismBuilder Colours(ColourScheme colours)
    {
        ArgumentNullException.ThrowIfNull(colours);
        _colours = colours;
        return this;
    }

    /// <summary>What has been written down so far, not checked.</summary>
    public MechanismDefinition ToDefinition() => new()
    {
        Schema = _schema,
        Name = _name,
        About = _about,
        Family = _family,
        Use = [.. _use],
        Sites = _sites,
        Pieces = [.. _pieces],
        Turns = [.. _turns],
        Blocks = [.. _blocks],
        Marks = [.. _marks],
        Goal = _goal,
        Colours = _colours,
    };

    /// <summary>Makes the mechanism.</summary>
    /// <exception cref="MechanismFormatException">The definition has mistakes; the exception lists all of them.</exception>
    public Mechanism Build() => Mechanism.Create(ToDefinition());
}
