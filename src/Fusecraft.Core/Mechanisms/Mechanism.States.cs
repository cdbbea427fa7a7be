using System.Diagnostics.CodeAnalysis;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

// How states and words of a mechanism are read.
public sealed partial class Mechanism
{
    /// <summary>Reads a word: step names separated by spaces, with exponents, repeats, commutators and conjugates; for cubes also the trade's other names (<c>2U M x</c>), translated to steps. See the conventions page of the docs.</summary>
    /// <exception cref="FormatException">The text is no word of this mechanism; the message says where and what would be right.</exception>
    public Word ParseWord(string text) => TryParseWord(text, out var word, out var problem) ? word : throw new FormatException(problem);

    /// <summary>Reads a word, or says what is wrong with it.</summary>
    /// <param name="text">Such as <c>U R' F2 (U D')3 [R, U]</c>.</param>
    /// <param name="word">The word with all brackets written out; of steps of this mechanism only.</param>
    /// <param name="problem">Where (1-based character), what was found and what would be right; null where there is no problem.</param>
    public bool TryParseWord(string text, [NotNullWhen(true)] out Word? word, [NotNullWhen(false)] out string? problem)
    {
        ArgumentNullException.ThrowIfNull(text);
        return new WordParser(StepNames, _cubeNames.Value, text).TryParse(out word, out problem);
    }

    /// <summary>The state in which the labels have been moved by the given permutation.</summary>
    /// <param name="labels">Where each label went from home, as a permutation of the sites.</param>
    /// <exception cref="ArgumentException">The permutation moves a point that is no site.</exception>
    public State StateOf(Permutation labels)
    {
        if (labels.SupportEnd > SiteCount)
        {
            throw new ArgumentException($"The permutation moves point {labels.SupportEnd - 1}; the sites are 0 … {SiteCount - 1}.", nameof(labels));
        }

        return new State(this, labels, Board.KeyOf(labels) is { } key ? new Shape(this, key) : null);
    }

    /// <summary>Reads a state: <c>home</c>, a word from home, or disjoint cycles of site names (where the labels went).</summary>
    /// <param name="text">The text; what starts with <c>(</c> and can be read as cycles is read as cycles.</param>
    /// <exception cref="FormatException">The text is none of the three, or the word has a step that is barred; the message says where.</exception>
    public State ParseState(string text)
    {
        ArgumentNullException.ThrowIfNull(text);
        var trimmed = text.Trim();
        if (trimmed == "home")
        {
            return HomeState;
        }

        string? cycleProblem = null;
        if (trimmed.StartsWith('(') && Notation.TryParse(trimmed, out var labels, out cycleProblem))
        {
            return StateOf(labels);
        }

        var parser = new WordParser(StepNames, _cubeNames.Value, text);
        if (!parser.TryParse(out var word, out var problem))
        {
            throw new FormatException(cycleProblem is null
                ? $"\"{text}\" is neither \"home\", nor cycles of sites, nor a word: {problem}"
                : $"\"{text}\" is neither cycles of sites ({cycleProblem}) nor a word ({problem})");
        }

        return HomeState.TryApply(word, out var state, out var barred)
            ? state
            : throw new FormatException($"the word \"{text}\"{(parser.IsTranslated ? $", read as \"{word.ToFoldedString()}\"," : "")} cannot be done from home: {barred}");
    }
}
