using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// A permutation of the sites that takes pieces to pieces and every turn to a turn: conjugated by it, each step becomes a step that carries the pieces it should and whose guard reads the same
/// marks at the moved sites. A reflection takes forward steps of some turns to backward ones. Home need not be kept.
/// </summary>
/// <remarks>
/// Shapes are moved along: where step <c>t</c> takes shape <c>s</c> to <c>s'</c>, the image of <c>t</c> takes the image of <c>s</c> to that of <c>s'</c>. Immutable, safe to share.
/// </remarks>
public sealed class MechanismSymmetry
{
    private readonly int[] _pieces;
    private readonly int[] _steps;

    internal MechanismSymmetry(Mechanism mechanism, Permutation sites, int[] pieces, int[] steps)
    {
        Mechanism = mechanism;
        Sites = sites;
        _pieces = pieces;
        _steps = steps;
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>Where each site goes.</summary>
    public Permutation Sites { get; }

    internal int[] Pieces => _pieces;

    internal int[] Steps => _steps;

    /// <summary>The step that a step becomes: its permutation is <c>step.Permutation.ConjugateBy(Sites)</c>.</summary>
    /// <exception cref="ArgumentException">The step belongs to another mechanism.</exception>
    public Step Image(Step step)
    {
        Mechanism.Board.Of(step);
        return Mechanism.Steps[_steps[step.Index]];
    }

    /// <summary>The shape that a shape becomes; null where no turns, guards and blocks disregarded, could ever bring home's tokens there.</summary>
    /// <exception cref="ArgumentException">The shape belongs to another mechanism.</exception>
    public Shape? Image(Shape shape)
    {
        ArgumentNullException.ThrowIfNull(shape);
        return ReferenceEquals(shape.Mechanism, Mechanism)
            ? PlacedShape.Of(shape).Moved(Sites, _pieces).In(Mechanism)
            : throw new ArgumentException($"The shape belongs to another mechanism than {Mechanism.Name}.", nameof(shape));
    }

    /// <summary>Where the sites go, in cycles of their names.</summary>
    public override string ToString() => Mechanism.Notation.Format(Sites);
}
