using System.Diagnostics.CodeAnalysis;
using System.Globalization;
using System.Runtime.InteropServices;

namespace Fusecraft.Permutations;

public sealed partial class CycleNotation
{
    /// <summary>Reads disjoint cycles.</summary>
    /// <exception cref="FormatException">The text is not a product of disjoint cycles; the message says where and what was found.</exception>
    public Permutation Parse(ReadOnlySpan<char> text) =>
        TryParse(text, out var permutation, out var problem) ? permutation : throw new FormatException(problem);

    /// <summary>Reads disjoint cycles, or says what is wrong with them. Time and memory are linear in the length of the text and the largest point.</summary>
    /// <param name="text">Cycles such as <c>(1 2 3)(5 6)</c>.</param>
    /// <param name="permutation">The permutation, or the identity where there is a problem.</param>
    /// <param name="problem">Where (1-based character), what was found and what would be right; null where there is no problem.</param>
    /// <exception cref="InvalidOperationException">The alias function gave a point that has no name.</exception>
    public bool TryParse(ReadOnlySpan<char> text, out Permutation permutation, [NotNullWhen(false)] out string? problem)
    {
        var reader = new Reader(this, text);
        problem = reader.Read();
        permutation = problem is null ? reader.ToPermutation() : default;
        return problem is null;
    }

    private int? PointOf(ReadOnlySpan<char> name)
    {
        if (_pointOf is null)
        {
            return int.TryParse(name, NumberStyles.None, CultureInfo.InvariantCulture, out var number) && number is > 0 and <= Permutation.MaxDegree ? number - 1 : null;
        }

        if (_pointOf.GetAlternateLookup<ReadOnlySpan<char>>().TryGetValue(name, out var named))
        {
            return named;
        }

        var point = _alias(name.ToString());
        return point is null || (uint)point < (uint)_names.Length
            ? point
            : throw new InvalidOperationException($"The alias function makes \"{name}\" point {point}; only 0 … {_names.Length - 1} have names.");
    }

    /// <summary>One pass over the text. Each part returns what is wrong, or null.</summary>
    private ref struct Reader
    {
        private const int Unmet = -1;
        private readonly CycleNotation _notation;
        private readonly ReadOnlySpan<char> _text;
        private readonly List<int> _images = [];
        private bool _open;
        private bool _any;
        private bool _afterComma;
        private int _first;
        private int _last;

        public Reader(CycleNotation notation, ReadOnlySpan<char> text)
        {
            _notation = notation;
            _text = text;
        }

        public string? Read()
        {
            for (var i = 0; i < _text.Length;)
            {
                var next = i + 1;
                var problem = _text[i] switch
                {
                    '(' => Open(),
                    ')' => Close(),
                    ',' when _open && _notation._commas => Comma(),
                    var c when char.IsWhiteSpace(c) => null,
                    _ => Point(_text[i..(next = EndOfName(i))]),
                };
                if (problem is not null)
                {
                    return At(i, problem);
                }

                i = next;
            }

            return _open ? At(_text.Length, "the text ends inside a cycle; ')' is missing")
                : _any ? null
                : At(_text.Length, "found no cycle; the identity is written ()");
        }

        public readonly Permutation ToPermutation()
        {
            var images = CollectionsMarshal.AsSpan(_images);
            for (var i = 0; i < images.Length; i++)
            {
                images[i] = images[i] == Unmet ? i : images[i];
            }

            return Permutation.FromTrustedImages<int>(images);
        }

        private static string At(int index, string what) => $"character {index + 1}: {what}";

        private readonly int EndOfName(int start)
        {
            var end = start + 1;
            while (end < _text.Length && !char.IsWhiteSpace(_text[end]) && _text[end] is not ('(' or ')') && !(_text[end] == ',' && _notation._commas))
            {
                end++;
            }

            return end;
        }

        private string? Open()
        {
            if (_open)
            {
                return "found '(' inside a cycle; close the cycle with ')' first";
            }

            (_open, _any, _first, _last) = (true, true, Unmet, Unmet);
            return null;
        }

        private string? Close()
        {
            if (!_open)
            {
                return "found ')' without a '(' before it";
            }

            if (_afterComma)
            {
                return "found ')' after a comma; a point is missing between them";
            }

            if (_last != Unmet)
            {
                _images[_last] = _first;
            }

            _open = false;
            return null;
        }

        private string? Comma()
        {
            if (_afterComma || _last == Unmet)
            {
                return "found ',' without a point before it";
            }

            _afterComma = true;
            return null;
        }

        private string? Point(ReadOnlySpan<char> name)
        {
            if (!_open)
            {
                return $"found \"{name}\" outside a cycle; cycles are written in parentheses, such as (1 2 3)";
            }

            if (_notation.PointOf(name) is not { } point)
            {
                return _notation._pointOf is null
                    ? $"found \"{name}\"; points are numbers from 1 to {Permutation.MaxDegree}"
                    : $"found \"{name}\", which is not the name of a point";
            }

            while (_images.Count <= point)
            {
                _images.Add(Unmet);
            }

            if (_images[point] != Unmet)
            {
                return $"found \"{name}\" a second time; every point may stand once only";
            }

            _images[point] = point;
            if (_last == Unmet)
            {
                _first = point;
            }
            else
            {
                _images[_last] = point;
            }

            (_last, _afterComma) = (point, false);
            return null;
        }
    }
}
