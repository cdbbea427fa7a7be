using System.Collections.Immutable;
using System.Globalization;

namespace Fusecraft.Permutations;

/// <summary>
/// Reads and writes permutations as disjoint cycles, such as <c>(1 2 3)(5 6)</c> or <c>(gate sluice basin)</c>: each point goes to the one that follows it,
/// the last of a cycle to the first. The identity is <c>()</c>.
/// </summary>
/// <remarks>
/// Points are written 1-based unless they have names. Between points stand spaces; a comma too when the notation has no names other than plain numbers.
/// A cycle of one point fixes it. What is written starts each cycle with its smallest point, the cycles in the order of those, and leaves out fixed points.
/// Immutable, safe to share as far as its alias function is.
/// </remarks>
public sealed partial class CycleNotation
{
    private readonly ImmutableArray<string> _names;
    private readonly Dictionary<string, int>? _pointOf;
    private readonly Func<string, int?> _alias;
    private readonly bool _commas;

    /// <summary>Makes a notation whose point <c>i</c> is written <c>names[i]</c>.</summary>
    /// <param name="names">Distinct names without white space or parentheses, at most <see cref="Permutation.MaxDegree"/>; they bound the points that can be read.</param>
    /// <exception cref="ArgumentException">A name is empty, repeated, or holds a character that separates points; or there are too many.</exception>
    public CycleNotation(IEnumerable<string> names)
        : this(names, static _ => null)
    {
    }

    /// <summary>Makes a notation that also understands other names when reading.</summary>
    /// <param name="names">Distinct names without white space or parentheses, at most <see cref="Permutation.MaxDegree"/>; they bound the points that can be read.</param>
    /// <param name="alias">Gives the point, 0-based, that a name which is none of <paramref name="names"/> stands for, or null.</param>
    /// <exception cref="ArgumentException">A name is empty, repeated, or holds a character that separates points; or there are too many.</exception>
    public CycleNotation(IEnumerable<string> names, Func<string, int?> alias)
    {
        ArgumentNullException.ThrowIfNull(names);
        ArgumentNullException.ThrowIfNull(alias);
        _names = [.. names];
        _alias = alias;
        if (_names.Length > Permutation.MaxDegree)
        {
            throw new ArgumentException($"{_names.Length} names were given; at most {Permutation.MaxDegree} are supported.", nameof(names));
        }

        _pointOf = new Dictionary<string, int>(_names.Length);
        for (var i = 0; i < _names.Length; i++)
        {
            if (string.IsNullOrEmpty(_names[i]) || _names[i].Any(static c => char.IsWhiteSpace(c) || c is '(' or ')'))
            {
                throw new ArgumentException($"Name {i} is \"{_names[i]}\"; names must not be empty or hold white space or parentheses.", nameof(names));
            }

            if (!_pointOf.TryAdd(_names[i], i))
            {
                throw new ArgumentException($"Name {i} is \"{_names[i]}\", and so is name {_pointOf[_names[i]]}; names must be distinct.", nameof(names));
            }
        }

        _commas = _names.All(static name => name.All(char.IsAsciiDigit));
    }

    private CycleNotation()
    {
        _commas = true;
        _alias = static _ => null;
    }

    /// <summary>The notation with 1-based numbers, for points of any size up to <see cref="Permutation.MaxDegree"/>.</summary>
    public static CycleNotation Numbers { get; } = new();

    /// <summary>Writes a permutation as disjoint cycles.</summary>
    /// <exception cref="ArgumentException">The permutation moves a point that has no name.</exception>
    public string Format(Permutation permutation)
    {
        if (_pointOf is not null && permutation.SupportEnd > _names.Length)
        {
            var named = _names.IsEmpty ? "no point has a name" : $"only 0 … {_names.Length - 1} have names";
            throw new ArgumentException($"The permutation moves point {permutation.SupportEnd - 1}; {named}.", nameof(permutation));
        }

        using var text = new Scratch<char>(LengthBound(permutation));
        TryFormat(permutation, text.Span, out var length);
        return new string(text.Span[..length]);
    }

    /// <summary>Writes a permutation, all of whose moved points have names, into a span; false, with nothing counted as written, where it does not fit.</summary>
    internal bool TryFormat(Permutation permutation, Span<char> destination, out int charsWritten)
    {
        charsWritten = 0;
        if (permutation.IsIdentity)
        {
            charsWritten = "()".TryCopyTo(destination) ? 2 : 0;
            return charsWritten > 0;
        }

        var length = 0;
        foreach (var cycle in new CycleWalk(permutation))
        {
            for (var i = 0; i < cycle.Length; i++)
            {
                if (length >= destination.Length || !TryWriteName(cycle[i], destination[(length + 1)..], out var written))
                {
                    return false;
                }

                destination[length] = i == 0 ? '(' : ' ';
                length += 1 + written;
            }

            if (length >= destination.Length)
            {
                return false;
            }

            destination[length++] = ')';
        }

        charsWritten = length;
        return true;
    }

    private bool TryWriteName(int point, Span<char> destination, out int charsWritten)
    {
        if (_pointOf is null)
        {
            return (point + 1).TryFormat(destination, out charsWritten, default, CultureInfo.InvariantCulture);
        }

        charsWritten = _names[point].Length;
        return _names[point].TryCopyTo(destination);
    }

    // Each moved point takes its name, what stands before it, and at most one closing parenthesis.
    private int LengthBound(Permutation permutation)
    {
        const int DigitsOfLargest = 5;
        var length = "()".Length;
        for (var i = 0; i < permutation.SupportEnd; i++)
        {
            length += permutation[i] == i ? 0 : 2 + (_pointOf is null ? DigitsOfLargest : _names[i].Length);
        }

        return length;
    }
}
