using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>What bars a step: a block by its pieces, or marks by name and site.</summary>
public sealed class Barrier
{
    private readonly string _text;

    private Barrier(BarrierKind kind, string text, ImmutableArray<int> block = default)
    {
        Kind = kind;
        _text = text;
        TornBlock = block.IsDefault ? [] : block;
    }

    /// <summary>What kind of thing bars the step; a torn block is named before marks.</summary>
    public BarrierKind Kind { get; }

    /// <summary>The pieces of a block of which the step carries only a part; empty for other kinds.</summary>
    public ImmutableArray<int> TornBlock { get; }

    /// <summary>One clause that names the block, the marks or the turn.</summary>
    public override string ToString() => _text;

    internal static Barrier Of(Shape shape, Step step)
    {
        var mechanism = shape.Mechanism;
        var carried = step.Turn.CarriedPieces;
        foreach (var block in shape.Blocks)
        {
            var inside = block.Count(carried.Contains);
            if (inside > 0 && inside < block.Length)
            {
                return new Barrier(
                    BarrierKind.TornBlock,
                    $"it would tear the block [{string.Join(' ', block.Select(piece => mechanism.PieceNames[piece]))}]",
                    block);
            }
        }

        var marks = shape.Marks.ToHashSet();
        var alternatives = step.Terms.Select(term => string.Join(" and ", Unmet(mechanism, term, marks).DefaultIfEmpty("its condition in code does not hold")));
        return new Barrier(BarrierKind.Guard, string.Join(", or ", alternatives.Distinct()));
    }

    internal static Barrier OneWay(Turn turn) => new(BarrierKind.OneWay, $"turn {turn.Name} goes one way only");

    internal static Barrier NoneFree(Shape shape, IReadOnlyList<Step> steps)
    {
        var reasons = steps.Take(4).Select(step => $"{step.Turn.Name}: {Of(shape, step)}");
        return new Barrier(BarrierKind.NoneFree, $"none of the {steps.Count} steps written so is free ({string.Join("; ", reasons)}{(steps.Count > 4 ? "; …" : "")})");
    }

    internal static Barrier Ambiguous(IReadOnlyList<Step> steps) =>
        new(BarrierKind.NoneFree, $"it could mean the turns {string.Join(" and ", steps.Select(step => step.Turn.Name))}, which are free together");

    private static IEnumerable<string> Unmet(Mechanism mechanism, GuardTerm term, HashSet<(string, int)> marks)
    {
        foreach (var need in term.Needs.Where(need => !marks.Contains(need)))
        {
            yield return $"it needs {need.Mark}@{mechanism.SiteNames[need.Site]}";
        }

        foreach (var bar in term.BarredBy.Where(marks.Contains))
        {
            yield return $"{bar.Mark}@{mechanism.SiteNames[bar.Site]} is in the way";
        }
    }
}
