using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Reporting;

/// <summary>A word followed step by step from a state, as far as its steps are free.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class WordTrace
{
    private WordTrace(State start, State end, ImmutableArray<TracedStep> steps, BarredStep? barred)
    {
        Start = start;
        End = end;
        Steps = steps;
        Barred = barred;
    }

    /// <summary>The state before the first step.</summary>
    public State Start { get; }

    /// <summary>The state after the last step that was free.</summary>
    public State End { get; }

    /// <summary>The steps that were done, in order.</summary>
    public ImmutableArray<TracedStep> Steps { get; }

    /// <summary>The step that ended the trace and what bars it; null where the whole word was done.</summary>
    public BarredStep? Barred { get; }

    /// <summary>Follows a word from a state.</summary>
    /// <param name="start">The state before the first step.</param>
    /// <param name="word">A word of the state's mechanism.</param>
    /// <exception cref="InvalidOperationException">The state has no shape, so it has no steps at all.</exception>
    public static WordTrace Of(State start, Word word)
    {
        ArgumentNullException.ThrowIfNull(start);
        ArgumentNullException.ThrowIfNull(word);
        var shape = start.Shape ?? throw new InvalidOperationException("The state lies where no turns can bring the puzzle; it has no shape and no steps.");
        var steps = ImmutableArray.CreateBuilder<TracedStep>();
        BarredStep? barred = null;
        var end = start;
        foreach (var name in word.Names)
        {
            if (!start.Mechanism.StepNames.TryResolve(shape, name, out var step, out var barrier))
            {
                barred = new BarredStep(steps.Count, name, barrier);
                break;
            }

            end = end.After(step);
            shape = end.Shape!;
            steps.Add(new TracedStep(step, shape));
        }

        return new WordTrace(start, end, steps.DrainToImmutable(), barred);
    }
}
