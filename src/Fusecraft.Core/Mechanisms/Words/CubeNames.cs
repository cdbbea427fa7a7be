using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using System.Globalization;

namespace Fusecraft.Mechanisms;

/// <summary>
/// The trade's names of cube turns, read as a hand does them: each turns some layers, counted from the side of the holder, and whole-cube turns change how the puzzle is held. Translated to cut turns of the
/// mechanism, whose reference (the core, or the corner DBL) stays where it is: what turns the reference turns the rest of the cube the other way, and changes the hold.
/// </summary>
internal sealed class CubeNames
{
    // In this order opposite sides differ in the last bit.
    private const string Faces = "LRDUBF";

    // A clockwise quarter turn seen from R, U or F takes what is on each side to the next one.
    private static readonly string[] Rounds = ["UBDF", "FLBR", "URDL"];

    private readonly int _size;
    private readonly ImmutableArray<Turn> _turns;
    private readonly Dictionary<string, Turn> _turnByName;

    public CubeNames(int size, ImmutableArray<Turn> turns)
    {
        _size = size;
        _turns = turns;
        _turnByName = turns.ToDictionary(turn => turn.Name);
    }

    /// <summary>The text at the start that could be a name for some size: perhaps a number, a letter, perhaps a <c>w</c>. Empty where there is none.</summary>
    public static ReadOnlySpan<char> LongestPrefix(ReadOnlySpan<char> text)
    {
        var end = 0;
        while (end < text.Length && char.IsAsciiDigit(text[end]))
        {
            end++;
        }

        if (end == text.Length || !(Faces.Contains(text[end]) || (end == 0 && "MESxyz".Contains(text[end]))))
        {
            return default;
        }

        var isFace = Faces.Contains(text[end++]);
        return isFace && end < text.Length && text[end] == 'w' ? text[..(end + 1)] : text[..end];
    }

    /// <summary>Why this size does not have a name that <see cref="LongestPrefix"/> found; null where it does.</summary>
    public string? WhyUnknown(ReadOnlySpan<char> name) => TryRead(name, out _, out var problem) ? null : problem;

    /// <summary>Translates names with all brackets written out, each perhaps with <c>'</c> behind it, to steps of the mechanism.</summary>
    /// <param name="names">What was written, with the place of each in the text.</param>
    /// <param name="steps">The names of the steps.</param>
    /// <param name="problem">Which name needs a turn that the mechanism does not use, and its place.</param>
    public bool TryTranslate(List<(string Name, int At)> names, [NotNullWhen(true)] out List<string>? steps, out (string Text, int At) problem)
    {
        steps = [];
        problem = default;

        // For each side of the holder, which face of the puzzle is there.
        int[] held = [0, 1, 2, 3, 4, 5];
        for (var i = 0; i < names.Count;)
        {
            // A name several times in a row: so each of its cuts is turned at one go, and half turns are found.
            var (name, at) = names[i];
            var count = 0;
            for (; i < names.Count && names[i].Name == name; i++)
            {
                count++;
            }

            var isBack = name.EndsWith('\'');
            var stem = isBack ? name[..^1] : name;
            if (stem.EndsWith('2'))
            {
                count *= 2;
                stem = stem[..^1];
            }

            TryRead(stem, out var layers, out _);
            var face = held[layers.Face];
            var quarters = isBack ? -count : count;
            if (!TryTurnBeyond(face, layers.Last, quarters, steps, out var missing) || !TryTurnBeyond(face, layers.First - 1, -quarters, steps, out missing))
            {
                problem = ($"\"{name}\" needs {missing}; the turns are {string.Join(", ", _turns.Take(24))}{(_turns.Length > 24 ? ", …" : "")}", at);
                return false;
            }

            if (MovesReference(face, layers.Last) != MovesReference(face, layers.First - 1))
            {
                Turn(held, layers.Face, quarters);
            }
        }

        return true;
    }

    private bool TryRead(ReadOnlySpan<char> name, out Layers layers, [NotNullWhen(false)] out string? problem)
    {
        var isWide = name[^1] == 'w';
        var letter = isWide ? name[^2] : name[^1];
        var digits = name[..^(isWide ? 2 : 1)];
        var whole = "xyz".IndexOf(letter, StringComparison.Ordinal);
        var middle = "MES".IndexOf(letter, StringComparison.Ordinal);
        if (whole >= 0)
        {
            layers = new Layers("RUF"[whole], 1, _size);
            problem = null;
            return true;
        }

        if (middle >= 0)
        {
            layers = new Layers("LDF"[middle], (_size + 1) / 2, (_size + 1) / 2);
            problem = _size % 2 == 1 ? null : $"a cube of size {_size} has no middle layer";
            return problem is null;
        }

        if (digits.IsEmpty)
        {
            layers = new Layers(letter, 1, isWide ? 2 : 1);
            problem = !isWide || _size > 2 ? null : WhyNotWide();
            return problem is null;
        }

        var isInside = int.TryParse(digits, NumberStyles.None, CultureInfo.InvariantCulture, out var number) && digits[0] != '0' && number >= 2 && number < _size;
        layers = new Layers(letter, isWide ? 1 : number, number);
        problem = isInside ? null : isWide ? WhyNotWide() : _size == 2 ? "a cube of size 2 has no inner layers" : $"the inner layers of a cube of size {_size} are {Range()}";
        return isInside;

        string WhyNotWide() => _size == 2 ? "a cube of size 2 has no wide turns; x, y and z turn it whole" : $"wide turns of a cube of size {_size} take {Range()} layers";

        string Range() => _size == 3 ? "2" : $"2 to {_size - 1}";
    }

    // Turns the first layers seen from a face of the puzzle, against the reference.
    private bool TryTurnBeyond(int face, int layers, int quarters, List<string> steps, [NotNullWhen(false)] out string? missing)
    {
        missing = null;
        if (MovesReference(face, layers))
        {
            // The rest goes the other way, which is clockwise seen from the opposite face.
            face ^= 1;
            layers = _size - layers;
        }

        if (layers == 0)
        {
            return true;
        }

        var name = CubeFamily.TurnName(Faces[face], layers);
        if (!_turnByName.TryGetValue(name, out var turn))
        {
            if (!_turnByName.TryGetValue(name + "2", out turn) || quarters % 2 != 0)
            {
                missing = turn is null ? $"the turn {name}, which the mechanism does not have" : $"a quarter turn of {name}, of which the mechanism has the half turn {name}2 alone";
                return false;
            }

            quarters /= 2;
        }

        var step = quarters > 0 ? turn.Forward : turn.Backward!;
        for (var i = Math.Abs(quarters); i > 0; i--)
        {
            steps.Add(step.Name);
        }

        return true;
    }

    // Odd sizes are held by the core in the middle, even ones by the corner DBL.
    private bool MovesReference(int face, int layers) => layers >= (_size % 2 == 1 ? (_size + 1) / 2 : face % 2 == 0 ? 1 : _size);

    // Turns the puzzle in the holder's hands, clockwise seen from a side.
    private static void Turn(int[] held, int side, int quarters)
    {
        var round = Rounds[side / 2];
        var by = (((side % 2 == 1 ? quarters : -quarters) % 4) + 4) % 4;
        var before = (int[])held.Clone();
        for (var i = 0; i < 4; i++)
        {
            held[Faces.IndexOf(round[(i + by) % 4], StringComparison.Ordinal)] = before[Faces.IndexOf(round[i], StringComparison.Ordinal)];
        }
    }

    /// <summary>The layers that a name turns clockwise, seen from a side of the holder and counted from 1 there.</summary>
    private readonly record struct Layers(int Face, int First, int Last)
    {
        public Layers(char face, int first, int last)
            : this(Faces.IndexOf(face, StringComparison.Ordinal), first, last)
        {
        }
    }
}
