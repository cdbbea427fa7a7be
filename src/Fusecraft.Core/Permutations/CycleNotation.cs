using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using System.Globalization;
using System.Text;

namespace Fusecraft.Permutations;

/// <summary>
/// Reads and writes permutations as disjoint cycles, such as <c>(1 2 3)(5 6)</c> or <c>(gate sluice basin)</c>: each point goes to the one that follows it,
/// the last of a cycle to the first. The identity is <c>()</c>.
/// </summary>
/// <remarks>Points are written 1-based unless they have names. Between points stand spaces; commas too when the notation has no names other than plain numbers. Immutable, safe to share.</remarks>
public sealed class CycleNotation
{
    private readonly ImmutableArray<string> _names;
    private readonly Dictionary<string, int>? _pointOf;
    private readonly bool _commas;

    /// <summary>Makes a notation whose point <c>i</c> is written <c>names[i]</c>.</summary>
    /// <param name="names">Distinct names without white space or parentheses; they bound the points that can be read.</param>
    /// <exception cref="ArgumentException">A name is empty, repeated, or holds a character that separates points.</exception>
    public CycleNotation(IEnumerable<string> names)
        : this(names, static _ => null)
    {
    }

    /// <summary>Makes a notation that also understands other names when reading.</summary>
    /// <param name="names">Distinct names without white space or parentheses.</param>
    /// <param name="alias">Gives the point that a name which is none of <paramref name="names"/> stands for, or null.</param>
    /// <exception cref="ArgumentException">A name is empty, repeated, or holds a character that separates points.</exception>
    public CycleNotation(IEnumerable<string> names, Func<string, int?> alias)
    {
        ArgumentNullException.ThrowIfNull(names);
        ArgumentNullException.ThrowIfNull(alias);
        _names = [.. names];
        Alias = alias;
        _commas = _names.All(name => name.All(char.IsAsciiDigit));
        var pointOf = new Dictionary<string, int>(_names.Length);
        for (var i = 0; i < _names.Length; i++)
        {
            if (_names[i].Length == 0 || _names[i].Any(c => char.IsWhiteSpace(c) || c is '(' or ')') || !pointOf.TryAdd(_names[i], i))
            {
                throw new ArgumentException($"Name {i} is \"{_names[i]}\"; names must be distinct, not empty, and free of spaces and parentheses.", nameof(names));
            }
        }

        _pointOf = pointOf;
    }

    private CycleNotation()
    {
        _commas = true;
        Alias = static _ => null;
    }

    /// <summary>The notation with 1-based numbers, for points of any size up to <see cref="Permutation.MaxDegree"/>.</summary>
    public static CycleNotation Numbers { get; } = new();

    private Func<string, int?> Alias { get; }

    /// <summary>Writes a permutation as disjoint cycles.</summary>
    /// <exception cref="ArgumentException">The permutation moves a point that has no name.</exception>
    public string Format(Permutation permutation)
    {
        if (_pointOf is not null && permutation.SupportEnd > _names.Length)
        {
            throw new ArgumentException($"The permutation moves point {permutation.SupportEnd - 1}; only 0 … {_names.Length - 1} have names.", nameof(permutation));
        }

        var text = new StringBuilder();
        foreach (var cycle in permutation.Cycles())
        {
            text.Append('(').AppendJoin(' ', cycle.Select(NameOf)).Append(')');
        }

        return text.Length == 0 ? "()" : text.ToString();
    }

    /// <summary>Reads disjoint cycles.</summary>
    /// <exception cref="FormatException">The text is not a product of disjoint cycles; the message says where and what was found.</exception>
    public Permutation Parse(ReadOnlySpan<char> text) =>
        TryParse(text, out var permutation, out var problem) ? permutation : throw new FormatException(problem);

    /// <summary>Reads disjoint cycles, or says what is wrong with them.</summary>
    /// <param name="text">Cycles such as <c>(1 2 3)(5 6)</c>.</param>
    /// <param name="permutation">The permutation, or the identity where there is a problem.</param>
    /// <param name="problem">Where (1-based character), what was found and what would be right; null where there is no problem.</param>
    public bool TryParse(ReadOnlySpan<char> text, out Permutation permutation, [NotNullWhen(false)] out string? problem)
    {
        permutation = default;
        var imageOf = new Dictionary<int, int>();
        var cycle = new List<int>();
        var open = false;
        var any = false;
        for (var i = 0; i < text.Length;)
        {
            var c = text[i];
            if (char.IsWhiteSpace(c) || (c == ',' && open && _commas))
            {
                i++;
            }
            else if (c == '(')
            {
                if (open)
                {
                    problem = At(i, "found '(' inside a cycle; close the cycle with ')' first");
                    return false;
                }

                (open, any) = (true, true);
                cycle.Clear();
                i++;
            }
            else if (c == ')')
            {
                if (!open)
                {
                    problem = At(i, "found ')' without a '(' before it");
                    return false;
                }

                for (var k = 0; k < cycle.Count; k++)
                {
                    imageOf[cycle[k]] = cycle[(k + 1) % cycle.Count];
                }

                open = false;
                i++;
            }
            else
            {
                var end = i;
                while (end < text.Length && !char.IsWhiteSpace(text[end]) && text[end] is not ('(' or ')') && !(text[end] == ',' && _commas))
                {
                    end++;
                }

                var name = text[i..Math.Max(end, i + 1)];
                if (!open)
                {
                    problem = At(i, $"found \"{name}\" outside a cycle; cycles are written in parentheses, such as (1 2 3)");
                    return false;
                }

                if (PointOf(name) is not { } point)
                {
                    problem = At(i, _pointOf is null
                        ? $"found \"{name}\"; points are numbers from 1 to {Permutation.MaxDegree}"
                        : $"found \"{name}\", which is not the name of a point");
                    return false;
                }

                if (!imageOf.TryAdd(point, point))
                {
                    problem = At(i, $"found \"{name}\" a second time; cycles must be disjoint");
                    return false;
                }

                cycle.Add(point);
                i = end;
            }
        }

        if (open || !any)
        {
            problem = At(text.Length, open ? "the text ends inside a cycle; ')' is missing" : "found no cycle; the identity is written ()");
            return false;
        }

        var images = new int[imageOf.Count == 0 ? 0 : imageOf.Keys.Max() + 1];
        Lanes.Identity<int>(images);
        foreach (var (point, image) in imageOf)
        {
            images[point] = image;
        }

        permutation = Permutation.FromTrustedImages<int>(images);
        problem = null;
        return true;
    }

    private static string At(int index, string what) => string.Create(CultureInfo.InvariantCulture, $"character {index + 1}: {what}");

    private string NameOf(int point) => _pointOf is null ? (point + 1).ToString(CultureInfo.InvariantCulture) : _names[point];

    private int? PointOf(ReadOnlySpan<char> name)
    {
        if (_pointOf is not null)
        {
            var key = name.ToString();
            return _pointOf.TryGetValue(key, out var named) ? named : Alias(key);
        }

        return int.TryParse(name, NumberStyles.None, CultureInfo.InvariantCulture, out var number) && number is > 0 and <= Permutation.MaxDegree ? number - 1 : null;
    }
}
