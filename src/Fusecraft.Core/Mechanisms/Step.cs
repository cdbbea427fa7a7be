using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>One sense of a turn: a permutation, the condition under which it is free, and its opposite. The primitive of which all words are made.</summary>
public sealed class Step
{
    internal Step(Turn turn, int index, bool isForward, string name, Permutation permutation, ImmutableArray<GuardTerm> terms)
    {
        Turn = turn;
        Index = index;
        IsForward = isForward;
        Name = name;
        Permutation = permutation;
        Terms = terms;
    }

    /// <summary>The turn this step belongs to.</summary>
    public Turn Turn { get; }

    /// <summary>The step's number in the mechanism, from 0: turn by turn, forward before backward.</summary>
    public int Index { get; }

    /// <summary>True for the forward step of its turn.</summary>
    public bool IsForward { get; }

    /// <summary>How the step is written in words. Several steps may share a name as long as no two of them are ever free together.</summary>
    public string Name { get; }

    /// <summary>Where the step takes each site. Doing it in state <c>g</c> gives <c>g * Permutation</c>.</summary>
    public Permutation Permutation { get; }

    /// <summary>The other step of the turn; null where there is none. It is not always free after this one: see <see cref="Turn.IsReversible"/>.</summary>
    public Step? Opposite => IsForward ? Turn.Backward : Turn.Forward;

    internal ImmutableArray<GuardTerm> Terms { get; }

    /// <inheritdoc/>
    public override string ToString() => Name;
}
