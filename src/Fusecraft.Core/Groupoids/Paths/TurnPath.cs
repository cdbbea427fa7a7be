using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Free steps in a row from one shape to another: an arrow of the groupoid. Two paths compose only where they meet: the first must end in the shape where the second starts.
/// </summary>
/// <remarks>Steps are done from left to right, and <see cref="Permutation"/> is their product in that order. Immutable, safe to share.</remarks>
public sealed partial class TurnPath
{
    private readonly Lazy<Permutation> _permutation;

    private TurnPath(Shape source, Shape target, ImmutableArray<Step> steps)
    {
        Source = source;
        Target = target;
        Steps = steps;
        _permutation = new Lazy<Permutation>(() => Product(Steps));
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism => Source.Mechanism;

    /// <summary>The shape where the path starts.</summary>
    public Shape Source { get; }

    /// <summary>The shape where the path ends.</summary>
    public Shape Target { get; }

    /// <summary>The steps in the order in which they are done.</summary>
    public ImmutableArray<Step> Steps { get; }

    /// <summary>The number of steps.</summary>
    public int Length => Steps.Length;

    /// <summary>Where the path takes the label on each site.</summary>
    public Permutation Permutation => _permutation.Value;

    /// <summary>True when the path ends in the shape where it starts.</summary>
    public bool IsLoop => Source == Target;

    /// <summary>The path as it is written.</summary>
    public Word Word => Word.Of(Steps);

    /// <summary>The path without steps at a shape.</summary>
    public static TurnPath At(Shape shape)
    {
        ArgumentNullException.ThrowIfNull(shape);
        return new TurnPath(shape, shape, []);
    }

    /// <summary>Does steps one after the other from a shape.</summary>
    /// <param name="source">The shape where the path starts.</param>
    /// <param name="steps">Steps of the shape's mechanism.</param>
    /// <exception cref="ArgumentException">A step is barred; the message says which and by what.</exception>
    public static TurnPath Follow(Shape source, params IEnumerable<Step> steps)
    {
        ArgumentNullException.ThrowIfNull(source);
        ImmutableArray<Step> list = [.. steps];
        var shape = source;
        for (var i = 0; i < list.Length; i++)
        {
            shape = shape.After(list[i])
                ?? throw new ArgumentException($"The path cannot be done: {new BarredStep(i, list[i].Name, shape.WhyBarred(list[i])!)}.", nameof(steps));
        }

        return new TurnPath(source, shape, list);
    }

    /// <summary>Does the steps of a word from a shape.</summary>
    /// <exception cref="ArgumentException">A step is barred; the message says which and by what.</exception>
    public static TurnPath Follow(Shape source, Word word)
    {
        ArgumentNullException.ThrowIfNull(source);
        ArgumentNullException.ThrowIfNull(word);
        var steps = ImmutableArray.CreateBuilder<Step>(word.Length);
        var shape = source;
        foreach (var name in word.Names)
        {
            if (!source.Mechanism.StepNames.TryResolve(shape, name, out var step, out var barrier))
            {
                throw new ArgumentException($"The path cannot be done: {new BarredStep(steps.Count, name, barrier)}.", nameof(word));
            }

            steps.Add(step);
            shape = shape.After(step)!;
        }

        return new TurnPath(source, shape, steps.DrainToImmutable());
    }

    /// <summary>This path, then the next.</summary>
    /// <exception cref="ArgumentException">The paths do not meet: the next one starts in another shape than this one ends in.</exception>
    public TurnPath Then(TurnPath next)
    {
        ArgumentNullException.ThrowIfNull(next);
        return Target == next.Source
            ? new TurnPath(Source, next.Target, Steps.AddRange(next.Steps))
            : throw new ArgumentException($"The paths do not meet: the first ends in {Target}, the second starts in {next.Source}.", nameof(next));
    }

    /// <summary>This path, then the next; false where they do not meet.</summary>
    public bool TryThen(TurnPath next, [NotNullWhen(true)] out TurnPath? path)
    {
        ArgumentNullException.ThrowIfNull(next);
        path = Target == next.Source ? Then(next) : null;
        return path is not null;
    }

    /// <summary>This loop done several times.</summary>
    /// <param name="count">0 or more.</param>
    /// <exception cref="InvalidOperationException">The path is no loop.</exception>
    public TurnPath Repeat(int count)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(count);
        if (!IsLoop && count != 1)
        {
            throw new InvalidOperationException($"Only a loop can be repeated; this path goes from {Source} to {Target}.");
        }

        return new TurnPath(Source, Target, [.. Enumerable.Repeat(Steps, count).SelectMany(steps => steps)]);
    }

    /// <summary>The word.</summary>
    public override string ToString() => Word.ToString();

    private static Permutation Product(ImmutableArray<Step> steps)
    {
        var product = Permutation.Identity;
        foreach (var step in steps)
        {
            product *= step.Permutation;
        }

        return product;
    }
}
