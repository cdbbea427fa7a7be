using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>A named permutation of sites with the pieces it carries, made of a forward step and, unless it is one-way, a backward step.</summary>
public sealed class Turn
{
    internal Turn(int index, TurnBlueprint blueprint, int firstStep)
    {
        Index = index;
        Name = blueprint.Name;
        Permutation = blueprint.Moves;
        CarriedPieces = [.. blueprint.Carried];
        HasOwnBackGuard = blueprint.Back is not null;
        Forward = new Step(this, firstStep, isForward: true, blueprint.As, Permutation, [.. blueprint.Guard]);
        if (!blueprint.IsOneWay)
        {
            var back = blueprint.Back ?? blueprint.Guard.Select(term => Moved(term, Permutation));
            Backward = new Step(this, firstStep + 1, isForward: false, blueprint.BackAs, Permutation.Inverse(), [.. back]);
        }
    }

    /// <summary>The turn's number in the mechanism, from 0, in the order of the file.</summary>
    public int Index { get; }

    /// <summary>The turn's name.</summary>
    public string Name { get; }

    /// <summary>The permutation of the forward step.</summary>
    public Permutation Permutation { get; }

    /// <summary>The numbers of the pieces carried, ascending.</summary>
    public ImmutableArray<int> CarriedPieces { get; }

    /// <summary>The forward step.</summary>
    public Step Forward { get; }

    /// <summary>The backward step; null for a one-way turn.</summary>
    public Step? Backward { get; }

    /// <summary>True when there is no backward step.</summary>
    public bool IsOneWay => Backward is null;

    /// <summary>True when the backward step is free exactly where it undoes a free forward step, so that every arc can be walked both ways.</summary>
    public bool IsReversible => Backward is not null && !HasOwnBackGuard;

    internal bool HasOwnBackGuard { get; }

    /// <summary>True when something besides torn blocks can bar the forward step.</summary>
    internal bool HasGuard => Forward.Terms.All(term => term.Needs.Length + term.BarredBy.Length > 0 || term.When is not null);

    /// <inheritdoc/>
    public override string ToString() => Name;

    // A condition holds before the step exactly when the moved condition holds after it.
    private static GuardTerm Moved(GuardTerm term, Permutation by) => new(
        [.. term.Needs.Select(need => (need.Mark, by[need.Site]))],
        [.. term.BarredBy.Select(bar => (bar.Mark, by[bar.Site]))])
    {
        When = term.When,
        IsReadAtEnd = true,
    };
}
