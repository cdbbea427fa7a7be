using System.Diagnostics.CodeAnalysis;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Where the labels are: the permutation that took them from home. Marks and blocks ride on the sites, so a state has a shape: home moved by that permutation.
/// </summary>
/// <remarks>Value equality within one mechanism. Immutable, safe to share.</remarks>
public sealed class State : IEquatable<State>
{
    internal State(Mechanism mechanism, Permutation labels, Shape? shape)
    {
        Mechanism = mechanism;
        Labels = labels;
        Shape = shape;
    }

    /// <summary>The mechanism this is a state of.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>Where each label went: the label whose home is site <c>i</c> is on site <c>Labels[i]</c>.</summary>
    public Permutation Labels { get; }

    /// <summary>
    /// The shape; null where no turns can ever bring the puzzle into it: a piece is taken apart, or a block or mark lies where it can never come. No step is free then.
    /// </summary>
    public Shape? Shape { get; }

    /// <summary>True when both have the same labels on the same sites of the same mechanism.</summary>
    public static bool operator ==(State? left, State? right) => left is null ? right is null : left.Equals(right);

    /// <summary>True when the two states differ.</summary>
    public static bool operator !=(State? left, State? right) => !(left == right);

    /// <summary>True when the step can be done in this state.</summary>
    public bool IsFree(Step step) => Shape is not null && Shape.IsFree(step);

    /// <summary>What bars the step, or null when it is free.</summary>
    /// <exception cref="InvalidOperationException">The state has no <see cref="Shape"/>.</exception>
    public Barrier? WhyBarred(Step step) => RequireShape().WhyBarred(step);

    /// <summary>Does a step.</summary>
    /// <param name="step">A step of this mechanism.</param>
    /// <param name="next">The state after it, or null where it is barred.</param>
    /// <returns>False where the step is barred.</returns>
    public bool TryStep(Step step, [NotNullWhen(true)] out State? next)
    {
        ArgumentNullException.ThrowIfNull(step);
        next = Shape?.After(step) is { } shape ? new State(Mechanism, Labels * step.Permutation, shape) : null;
        return next is not null;
    }

    /// <summary>Does a step that is known to be free.</summary>
    /// <exception cref="InvalidOperationException">The step is barred; the message says by what.</exception>
    public State After(Step step) => TryStep(step, out var next) ? next : throw new InvalidOperationException($"Step {step} is barred: {WhyBarred(step)}.");

    /// <summary>Does the steps of a word from left to right as far as they are free.</summary>
    /// <param name="word">A word of this mechanism.</param>
    /// <param name="end">The state after the last free step before a barred one; after the whole word where none is barred.</param>
    /// <param name="barred">The step that is barred and what bars it; null where the whole word was done.</param>
    /// <returns>False where a step is barred.</returns>
    public bool TryApply(Word word, out State end, [NotNullWhen(false)] out BarredStep? barred)
    {
        ArgumentNullException.ThrowIfNull(word);
        end = this;
        for (var i = 0; i < word.Length; i++)
        {
            if (!Mechanism.StepNames.TryResolve(end.RequireShape(), word.Names[i], out var step, out var barrier))
            {
                barred = new BarredStep(i, word.Names[i], barrier);
                return false;
            }

            end = end.After(step);
        }

        barred = null;
        return true;
    }

    /// <summary>Does the steps of a word from left to right.</summary>
    /// <exception cref="InvalidOperationException">A step is barred; the message says which and by what.</exception>
    public State Apply(Word word) => TryApply(word, out var end, out var barred) ? end : throw new InvalidOperationException($"The word cannot be done: {barred}.");

    /// <inheritdoc/>
    public bool Equals(State? other) => other is not null && ReferenceEquals(Mechanism, other.Mechanism) && Labels == other.Labels;

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as State);

    /// <inheritdoc/>
    public override int GetHashCode() => Labels.GetHashCode();

    /// <summary>Disjoint cycles of site names: where the labels went.</summary>
    public override string ToString() => Mechanism.Notation.Format(Labels);

    private Shape RequireShape() => Shape ?? throw new InvalidOperationException("The state lies where no turns can bring the puzzle; it has no shape and no free steps.");
}
