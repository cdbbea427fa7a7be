using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;

namespace Fusecraft.Mechanisms;

/// <summary>Which steps a written name can mean. <c>X'</c> means the opposite of a step written <c>X</c>, unless some step is itself written so.</summary>
internal sealed class StepNames
{
    private readonly Dictionary<string, List<Step>> _written = [];

    public StepNames(ImmutableArray<Step> steps)
    {
        foreach (var step in steps)
        {
            if (!_written.TryGetValue(step.Name, out var list))
            {
                _written.Add(step.Name, list = []);
            }

            list.Add(step);
        }
    }

    /// <summary>Names that are written for several steps, with those steps.</summary>
    public IEnumerable<List<Step>> Shared => _written.Values.Where(list => list.Count > 1);

    public IEnumerable<string> All => _written.Keys;

    /// <summary>The longest name at the start of the text; empty where there is none.</summary>
    public ReadOnlySpan<char> LongestPrefix(ReadOnlySpan<char> text)
    {
        var lookup = _written.GetAlternateLookup<ReadOnlySpan<char>>();
        var end = 0;
        while (end < text.Length && (NameRules.IsNameCharacter(text[end]) || (text[end] == '\'' && end > 0)))
        {
            end++;
            if (text[end - 1] == '\'')
            {
                break;
            }
        }

        for (; end > 0; end--)
        {
            if (lookup.ContainsKey(text[..end]))
            {
                return text[..end];
            }
        }

        return default;
    }

    /// <summary>How the opposite of a step written <paramref name="name"/> is written: by its own name where that is the same for all of them, else with <c>'</c>.</summary>
    public string Opposite(string name)
    {
        if (_written.TryGetValue(name, out var steps))
        {
            var opposite = steps[0].Opposite?.Name;
            return opposite is not null && steps.TrueForAll(step => step.Opposite?.Name == opposite) ? opposite : name + "'";
        }

        return name[..^1];
    }

    /// <summary>Finds the step that a name means in a shape, or what bars it.</summary>
    public bool TryResolve(Shape shape, string name, [NotNullWhen(true)] out Step? step, [NotNullWhen(false)] out Barrier? barrier)
    {
        step = null;
        if (!_written.TryGetValue(name, out var candidates))
        {
            var forward = name.EndsWith('\'') && _written.TryGetValue(name[..^1], out var steps)
                ? steps
                : throw new ArgumentException($"The mechanism {shape.Mechanism.Name} has no step written {name}.", nameof(name));
            candidates = [.. forward.Select(candidate => candidate.Opposite).OfType<Step>()];
            if (candidates.Count == 0)
            {
                barrier = Barrier.OneWay(forward[0].Turn);
                return false;
            }
        }

        var free = candidates.FindAll(shape.IsFree);
        barrier = free.Count switch
        {
            1 => null,
            0 => candidates.Count == 1 ? shape.WhyBarred(candidates[0])! : Barrier.NoneFree(shape, candidates),
            _ => Barrier.Ambiguous(free),
        };
        step = barrier is null ? free[0] : null;
        return barrier is null;
    }
}
