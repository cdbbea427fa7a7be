using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Two mechanisms side by side: whether they are one puzzle, whether their shape graphs are alike, whether their vertex groups are, and if not, where they first differ. Every answer is proven; what a
/// budget left open is null.
/// </summary>
/// <remarks>
/// <em>One puzzle</em>: some bijection of the sites takes turns to turns (for cubes a rotation or reflection of the solid, for even ones also one that moves the corner by which they are held), and
/// moved by it the home of the first is a shape of the home region of the second. Names of sites, turns and marks' homes do not matter; names of marks do. <em>Shape graphs alike</em>: a bijection of
/// the shapes takes arrows to arrows under a renaming of turns; what the turns do to labels does not matter. Immutable, safe to share.
/// </remarks>
public sealed class MechanismComparison
{
    private MechanismComparison(ShapeGroupoid first, ShapeGroupoid second)
    {
        FirstGroupoid = first;
        SecondGroupoid = second;
    }

    /// <summary>The first mechanism.</summary>
    public Mechanism First => FirstGroupoid.Mechanism;

    /// <summary>The second mechanism.</summary>
    public Mechanism Second => SecondGroupoid.Mechanism;

    /// <summary>The shapes of the first mechanism.</summary>
    public ShapeGroupoid FirstGroupoid { get; }

    /// <summary>The shapes of the second mechanism.</summary>
    public ShapeGroupoid SecondGroupoid { get; }

    /// <summary>How alike they are.</summary>
    public ComparisonVerdict Verdict { get; private init; }

    /// <summary>What the verdict rests on, in a sentence or two.</summary>
    public string Reason { get; private set; } = "";

    /// <summary>How one home becomes a shape of the other; null where they are not one puzzle, or that was not decided.</summary>
    public HomeMatch? HomeMatch { get; private init; }

    /// <summary>True when a bijection of shapes and a renaming of turns take one shape graph to the other, false when none does, null when that was not decided.</summary>
    public bool? HaveSameShapeGraph { get; private init; }

    /// <summary>The bijection of shapes; null where there is none or none was found.</summary>
    public ShapeGraphMatch? ShapeGraphMatch { get; private init; }

    /// <summary>Whether the vertex groups at the homes are one group up to relabelling.</summary>
    public VertexGroupComparison VertexGroups { get; private init; } = new(null, null, "not all shapes are known");

    /// <summary>Their figures side by side.</summary>
    public ImmutableArray<ComparedFigure> Figures { get; private init; }

    /// <summary>The first of the <see cref="Figures"/> that differs; null where none does.</summary>
    public ComparedFigure? FirstDifference => Figures.FirstOrDefault(figure => figure.Differs);

    /// <summary>Compares two mechanisms.</summary>
    /// <param name="first">The first mechanism.</param>
    /// <param name="second">The second mechanism; it may be the same.</param>
    /// <param name="options">How far to go; null for the defaults.</param>
    /// <param name="progress">Told now and then how far the explorations have come.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="MechanismFormatException">Two steps written alike are free in one reachable shape.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>Explores both, extracts both vertex groups, and takes memory for a table of all arrows where the shape graphs agree in their figures.</remarks>
    public static MechanismComparison Of(
        Mechanism first, Mechanism second, ComparisonOptions? options = null, IProgress<ExplorationProgress>? progress = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(first);
        ArgumentNullException.ThrowIfNull(second);
        options ??= ComparisonOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxShapes, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxTries, 1, nameof(options));
        var exploration = new ExplorationOptions { MaxShapes = options.MaxShapes };
        var one = ShapeGroupoid.Explore(first, exploration, progress, cancellationToken);
        var other = ReferenceEquals(first, second) ? one : ShapeGroupoid.Explore(second, exploration, progress, cancellationToken);
        var matching = new HomeMatching(first, other, options.MaxTries, cancellationToken);
        var home = matching.Find();
        if (!one.IsComplete || !other.IsComplete)
        {
            return new MechanismComparison(one, other)
            {
                Verdict = home is null ? ComparisonVerdict.Undecided : ComparisonVerdict.SamePuzzle,
                Reason = home is null ? "A budget ended the exploration before all shapes were found." : Explain(first, home),
                HomeMatch = home,
                Figures = ComparisonFigures.Of(one, other, null, null, cancellationToken),
            };
        }

        var (group, otherGroup) = (one.VertexGroupAt(0, cancellationToken), other.VertexGroupAt(0, cancellationToken));
        var figures = ComparisonFigures.Of(one, other, group, otherGroup, cancellationToken);
        var graph = CompareGraphs(one, other, home, options, cancellationToken, out var haveSameGraph);

        // The first group, moved by the symmetry, is the one at the shape where its home has come to; the path back takes it home.
        Permutation? guess = home is { IsRepinned: false } ? home.Sites * home.Path.Permutation.Inverse() : null;
        var comparison = new MechanismComparison(one, other)
        {
            Verdict = home is not null ? ComparisonVerdict.SamePuzzle
                : !matching.IsDecided ? ComparisonVerdict.Undecided
                : haveSameGraph == true ? ComparisonVerdict.SameShapeGraph : ComparisonVerdict.Different,
            HomeMatch = home,
            HaveSameShapeGraph = haveSameGraph,
            ShapeGraphMatch = graph,
            VertexGroups = new GroupRelabelling(group.Group, otherGroup.Group, options.MaxTries, cancellationToken).Decide(guess),
            Figures = figures,
        };
        comparison.Reason = home is not null ? Explain(first, home) : comparison.ExplainDifference(matching);
        return comparison;
    }

    private static ShapeGraphMatch? CompareGraphs(ShapeGroupoid one, ShapeGroupoid other, HomeMatch? home, ComparisonOptions options, CancellationToken cancellation, out bool? areSame)
    {
        if (home is { IsRepinned: false })
        {
            areSame = true;
            return new ShapeGraphMatch(0, home.Shape, [.. home.Steps]);
        }

        areSame = false;
        if (one.ShapeCount != other.ShapeCount || one.Mechanism.Steps.Length != other.Mechanism.Steps.Length || one.Regions.Length != other.Regions.Length
            || one.HomeRegion.ShapeCount != other.HomeRegion.ShapeCount || one.PassageCount != other.PassageCount)
        {
            return null;
        }

        if ((long)one.ShapeCount * one.Mechanism.Steps.Length > Math.Min(options.MaxTries, Array.MaxLength))
        {
            areSame = null;
            return null;
        }

        var matching = new ShapeGraphMatching(one, other, options.MaxTries, cancellation);
        var match = matching.Find();
        areSame = match is not null ? true : matching.EndedByBudget ? null : false;
        return match;
    }

    private static string Explain(Mechanism first, HomeMatch home)
    {
        var renamed = first.Turns.Where(turn => home.Steps[turn.Forward.Index].Name != turn.Forward.Name)
            .Select(turn => $"{turn.Forward.Name} becomes {home.Steps[turn.Forward.Index].Name}").ToList();
        var moved = renamed.Count == 0 ? "" : $", moved so that {string.Join(", ", renamed)},";
        var held = home.IsRepinned ? ", held by another corner," : "";
        var path = home.Path.Length == 0 ? "is the home of the second" : $"is the shape of the second after {home.Path.Word}";
        var note = home.IsRepinned ? " Shapes are relative to the corner held, so their number and the vertex groups may differ; the states are as many." : "";
        return $"The home of the first{(moved + held).Replace(",,", ",", StringComparison.Ordinal)} {path}.{note}";
    }

    private string ExplainDifference(HomeMatching matching)
    {
        var homes = !matching.IsDecided ? "Whether some symmetry takes one home to a shape of the other was not settled."
            : (matching.IsOfSolids ? "No rotation or reflection" : "No bijection of the sites") + (matching.TurnsDiffer
                ? " takes the turns of one to those of the other."
                : " that keeps the turns takes the home of the first to a shape of the second's home region.");
        var graphs = HaveSameShapeGraph switch
        {
            true => " Yet their shape graphs are alike under a renaming of turns.",
            null => " Whether their shape graphs are alike was not settled.",
            false => "",
        };
        var difference = FirstDifference is { } figure
            ? $" First difference: {figure.Name}, {figure.First} and {figure.Second}."
            : HaveSameShapeGraph == false ? " First difference: how the shapes hang together; all figures agree."
            : VertexGroups.AreAlike == false ? $" First difference: the vertex groups; {VertexGroups.Reason}." : "";
        return homes + graphs + difference;
    }
}
