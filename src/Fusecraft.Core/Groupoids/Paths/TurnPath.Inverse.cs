using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

public sealed partial class TurnPath
{
    // A way back longer than this is no use to anybody.
    private const int MaxInverseLength = 1_000_000;

    /// <summary>The path that undoes this one, made of free steps: from <see cref="Target"/> to <see cref="Source"/>, with the inverse permutation.</summary>
    /// <remarks>
    /// Each step is undone by its opposite where that is free. Where it is not (a one-way turn, a back guard), a shortest way back of shapes is searched; with
    /// the step it makes a loop of some finite order, and going on around that loop undoes the step. Such an inverse can be much longer than the path.
    /// </remarks>
    /// <exception cref="InvalidOperationException">There is no way back: a step leaves its region.</exception>
    public TurnPath Inverse() => TryInverse(out var inverse, out var problem) ? inverse : throw new InvalidOperationException(problem);

    /// <summary>The path that undoes this one, or false where there is no way back.</summary>
    public bool TryInverse([NotNullWhen(true)] out TurnPath? inverse) => TryInverse(out inverse, out _);

    private bool TryInverse([NotNullWhen(true)] out TurnPath? inverse, [NotNullWhen(false)] out string? problem)
    {
        inverse = null;
        var shapes = new List<Shape> { Source };
        foreach (var step in Steps)
        {
            shapes.Add(shapes[^1].After(step)!);
        }

        var steps = ImmutableArray.CreateBuilder<Step>();
        for (var i = Steps.Length - 1; i >= 0; i--)
        {
            if (Steps[i].Opposite is { } opposite && shapes[i + 1].IsFree(opposite))
            {
                steps.Add(opposite);
                continue;
            }

            if (ShapePath.Find(shapes[i + 1], shapes[i]) is not { } back)
            {
                problem = $"There is no way back from step {i + 1} ({Steps[i]}): it leaves its region.";
                return false;
            }

            // With a = the step and b = the way back, a⁻¹ = b (a b)^(k-1), where k is the order of the loop a b.
            var order = (Steps[i].Permutation * Product(back)).Order;
            if (steps.Count + (order * (back.Length + 1)) > MaxInverseLength)
            {
                problem = $"The way back from step {i + 1} ({Steps[i]}) would take more than {MaxInverseLength} steps.";
                return false;
            }

            steps.AddRange(back);
            for (var turn = 1; turn < order; turn++)
            {
                steps.Add(Steps[i]);
                steps.AddRange(back);
            }
        }

        inverse = new TurnPath(Target, Source, steps.DrainToImmutable());
        problem = null;
        return true;
    }
}
