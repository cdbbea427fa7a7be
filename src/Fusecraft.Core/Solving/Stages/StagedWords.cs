using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>Short words of one region: its stages, chosen and built when they are first wanted, the descent through them, and the shortening of words.</summary>
internal sealed class StagedWords
{
    /// <summary>The first of the budgets that a time limit goes through, each twice the one before.</summary>
    private const long FirstBudget = 200_000;

    private readonly StagedOptions _options;
    private readonly StagePlan? _plan;
    private readonly VertexGroup _group;
    private readonly int[] _classes;
    private readonly WindowShortening? _shortening;

    public StagedWords(VertexGroup group, StagedOptions options, CancellationToken cancellation)
    {
        _group = group;
        _classes = Metric.RunClasses(group.Groupoid.Mechanism);
        _options = options;
        _plan = StagePlan.Make(group, options.Metric, options.MaxTableBytes, cancellation);
        _shortening = _plan is null ? null : new WindowShortening(group.Groupoid.Mechanism, _plan.Whole, options.Metric);
    }

    /// <summary>The stages; empty where there are none that fit.</summary>
    public IReadOnlyList<Stage> Stages => _plan?.Stages ?? [];

    /// <summary>A word that brings all labels home at the base shape; null where the stages do not fit or the budget ends first.</summary>
    /// <param name="shape">The groupoid's number of the shape.</param>
    /// <param name="labels">Where the labels are.</param>
    /// <param name="cancellation">Ends the work early.</param>
    /// <returns>The steps, and the number of moves that may be tried so as to find them again.</returns>
    public (List<Step> Steps, long Nodes)? Find(int shape, Permutation labels, CancellationToken cancellation)
    {
        if (Stages.Count == 0)
        {
            return null;
        }

        if (_options.TimeLimit is not { } limit)
        {
            return Run(shape, labels, _options.MaxNodes, static () => false, cancellation) is { } steps ? (steps, _options.MaxNodes) : null;
        }

        // Whole budgets only, so that the one reported finds the same word again.
        var start = TimeProvider.System.GetTimestamp();
        bool IsOver() => TimeProvider.System.GetElapsedTime(start) >= limit;
        (List<Step> Steps, long Nodes)? best = null;
        for (var budget = FirstBudget; budget == FirstBudget || !IsOver(); budget *= 2)
        {
            if (Run(shape, labels, budget, budget == FirstBudget ? static () => false : IsOver, cancellation) is { } steps && (best is null || IsBetter(steps, best.Value.Steps)))
            {
                best = (steps, budget);
            }
        }

        return best;
    }

    /// <summary>A word with the same permutation between the same shapes, no longer.</summary>
    /// <param name="shape">The groupoid's number of the shape where it starts; the word stays in the region.</param>
    /// <param name="steps">The word.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public List<Step> Shorten(int shape, IReadOnlyList<Step> steps, CancellationToken cancellation) =>
        _shortening?.Shorten(_plan!.Whole.LocalOf(shape), steps, cancellation) ?? PathShortening.Shorten(steps);

    private List<Step>? Run(int shape, Permutation labels, long maxNodes, Func<bool> isOver, CancellationToken cancellation)
    {
        var mechanism = _group.Groupoid.Mechanism;
        List<Step>? best = null;
        var descent = new StagedDescent(Stages, isOver, cancellation);
        descent.Run(Stages[0].Frame.LocalOf(shape), _plan!.Signs?.Signed(labels) ?? labels, maxNodes, word =>
        {
            var shortened = PathShortening.Shorten([.. word.Select(step => mechanism.Steps[step])]);
            if (best is null || IsBetter(shortened, best))
            {
                best = shortened;
            }
        });
        return isOver() ? null : best;
    }

    private bool IsBetter(List<Step> one, List<Step> other) =>
        (_options.Metric.LengthOf(one, _classes), one.Count).CompareTo((_options.Metric.LengthOf(other, _classes), other.Count)) < 0;
}
