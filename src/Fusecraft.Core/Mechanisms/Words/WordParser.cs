using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using System.Globalization;
using System.Numerics;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Reads words: <c>U R' F2 U2' R^-3 (U R)3 [A, B] [A: B]</c>. A name is the longest one known at its place; after a name that ends in a digit an exponent needs <c>^</c>.
/// A cube's other names are read like steps; once all brackets are written out the whole word is translated to steps, since what a name means depends on how the puzzle is held by then.
/// </summary>
internal sealed class WordParser
{
    private const int MaxLength = 1_000_000;
    private const int MaxDepth = 64;
    private readonly StepNames _names;
    private readonly CubeNames? _cubeNames;
    private readonly string _text;
    private int _at;
    private int _depth;
    private string? _problem;

    public WordParser(StepNames names, CubeNames? cubeNames, string text)
    {
        _names = names;
        _cubeNames = cubeNames;
        _text = text;
    }

    /// <summary>True when the word read has names that are not steps of the mechanism, and was translated to steps.</summary>
    public bool IsTranslated { get; private set; }

    public bool TryParse([NotNullWhen(true)] out Word? word, [NotNullWhen(false)] out string? problem)
    {
        var steps = Sequence();
        if (steps is not null && _at < _text.Length)
        {
            Fail($"found '{_text[_at]}', which closes nothing");
        }

        List<string>? translated = null;
        if (_problem is null && IsTranslated && !_cubeNames!.TryTranslate(steps!, out translated, out var missing))
        {
            _at = missing.At;
            Fail(missing.Text);
        }

        problem = _problem;
        word = _problem is null ? new Word(translated is not null ? [.. translated] : [.. steps!.Select(step => step.Name)]) : null;
        return word is not null;
    }

    // Steps up to a closing character or the end; null after a problem.
    private List<(string Name, int At)>? Sequence()
    {
        var steps = new List<(string Name, int At)>();
        while (true)
        {
            while (_at < _text.Length && char.IsWhiteSpace(_text[_at]))
            {
                _at++;
            }

            if (_at == _text.Length || _text[_at] is ')' or ']' or ',' or ':')
            {
                return steps;
            }

            if (Item() is not { } item)
            {
                return null;
            }

            if (steps.Count + item.Count > MaxLength)
            {
                return Fail($"the word has more than {MaxLength} steps");
            }

            steps.AddRange(item);
        }
    }

    private List<(string Name, int At)>? Item()
    {
        var start = _at;
        List<(string Name, int At)>? unit;
        var endsInDigit = false;
        if (_text[_at] is '(' or '[')
        {
            if (++_depth > MaxDepth)
            {
                return Fail($"brackets stand more than {MaxDepth} deep");
            }

            unit = _text[_at] == '(' ? Group() : Bracket();
            _depth--;
        }
        else
        {
            var name = _names.LongestPrefix(_text.AsSpan(_at));
            if (_cubeNames is not null && CubeNames.LongestPrefix(_text.AsSpan(_at)) is var other && other.Length > name.Length)
            {
                if (_cubeNames.WhyUnknown(other) is { } reason)
                {
                    return Fail($"found \"{other}\"; {reason}");
                }

                IsTranslated = true;
                name = other;
            }

            if (name.IsEmpty)
            {
                return Fail($"found \"{Unknown()}\"; the steps are {Listing()}");
            }

            unit = [(name.ToString(), _at)];
            _at += name.Length;
            endsInDigit = char.IsAsciiDigit(name[^1]);
        }

        return unit is null ? null : Repeat(unit, start, endsInDigit);
    }

    private List<(string Name, int At)>? Group()
    {
        _at++;
        var inner = Sequence();
        return inner is not null && Expect(')') ? inner : null;
    }

    // The commutator [A, B] is A B A' B', the conjugate [A: B] is A B A'.
    private List<(string Name, int At)>? Bracket()
    {
        _at++;
        if (Sequence() is not { } first)
        {
            return null;
        }

        if (_at == _text.Length || _text[_at] is not (',' or ':'))
        {
            return Fail("',' or ':' is missing; write [A, B] for A B A' B' or [A: B] for A B A'");
        }

        var isCommutator = _text[_at++] == ',';
        if (Sequence() is not { } second || !Expect(']'))
        {
            return null;
        }

        List<(string Name, int At)> steps = [.. first, .. second, .. Inverse(first)];
        if (isCommutator)
        {
            steps.AddRange(Inverse(second));
        }

        return steps;
    }

    private List<(string Name, int At)>? Repeat(List<(string Name, int At)> unit, int start, bool endsInDigit)
    {
        var exponent = BigInteger.One;
        var digits = _at;
        if (_at < _text.Length && _text[_at] == '^')
        {
            digits = ++_at;
            if (_at < _text.Length && _text[_at] == '-')
            {
                _at++;
            }
        }
        else if (endsInDigit)
        {
            digits = -1;
        }

        if (digits >= 0)
        {
            var first = _at;
            while (_at < _text.Length && char.IsAsciiDigit(_text[_at]))
            {
                _at++;
            }

            if (_at > first)
            {
                exponent = BigInteger.Parse(_text.AsSpan(digits, _at - digits), NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture);
            }
            else if (digits > start && _text[digits - 1] == '^')
            {
                return Fail("a whole number is missing after '^'");
            }
        }

        if (_at < _text.Length && _text[_at] == '\'')
        {
            exponent = -exponent;
            _at++;
        }

        if (_at < _text.Length && !char.IsWhiteSpace(_text[_at]) && _text[_at] is not ('(' or '[' or ')' or ']' or ',' or ':'))
        {
            return Fail($"found \"{Unknown()}\" behind \"{_text[start.._at]}\"; steps are separated by spaces" + (endsInDigit ? ", and an exponent is written with ^" : ""));
        }

        if (BigInteger.Abs(exponent) * unit.Count > MaxLength)
        {
            _at = start;
            return Fail($"the word has more than {MaxLength} steps");
        }

        var once = exponent.Sign < 0 ? Inverse(unit) : unit;
        var steps = new List<(string Name, int At)>();
        for (var i = (int)BigInteger.Abs(exponent); i > 0; i--)
        {
            steps.AddRange(once);
        }

        return steps;
    }

    private List<(string Name, int At)> Inverse(List<(string Name, int At)> steps)
    {
        var inverse = new List<(string Name, int At)>(steps.Count);
        for (var i = steps.Count - 1; i >= 0; i--)
        {
            inverse.Add((Opposite(steps[i].Name), steps[i].At));
        }

        return inverse;
    }

    // On cubes every name goes both ways, those that are no steps too.
    private string Opposite(string name) => _cubeNames is null ? _names.Opposite(name) : name.EndsWith('\'') ? name[..^1] : name + "'";

    private bool Expect(char closing)
    {
        if (_at < _text.Length && _text[_at] == closing)
        {
            _at++;
            return true;
        }

        Fail(_at == _text.Length ? $"the text ends where '{closing}' is missing" : $"found '{_text[_at]}' where '{closing}' is missing");
        return false;
    }

    private string Unknown()
    {
        var end = _at + 1;
        while (end < _text.Length && !char.IsWhiteSpace(_text[end]) && _text[end] is not ('(' or '[' or ')' or ']'))
        {
            end++;
        }

        return _text[_at..end];
    }

    private string Listing()
    {
        var names = _names.All.Take(25).ToList();
        return names.Count <= 24 ? string.Join(", ", names) : string.Join(", ", names.Take(20)) + ", …";
    }

    private List<(string Name, int At)>? Fail(string problem)
    {
        _problem ??= $"character {_at + 1}: {problem}";
        return null;
    }
}
