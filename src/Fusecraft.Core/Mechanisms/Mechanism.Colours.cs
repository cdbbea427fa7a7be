using System.Diagnostics.CodeAnalysis;

namespace Fusecraft.Mechanisms;

// Colours by their names.
public sealed partial class Mechanism
{
    /// <summary>The colours that a state shows: on each site that of the label there.</summary>
    /// <exception cref="ArgumentException">The state belongs to another mechanism.</exception>
    public ColouredState ColoursOf(State state)
    {
        ArgumentNullException.ThrowIfNull(state);
        if (!ReferenceEquals(state.Mechanism, this))
        {
            throw new ArgumentException($"The state belongs to the mechanism {state.Mechanism.Name}, not to {Name}.", nameof(state));
        }

        var labels = state.Labels.Inverse();
        return new ColouredState(this, [.. Enumerable.Range(0, SiteCount).Select(site => ColourOfSite[labels[site]])]);
    }

    /// <summary>Reads which colour each site shows.</summary>
    /// <param name="text">
    /// <c>home</c>; or the sites that differ from home, each as <c>site=colour</c>, separated by spaces; or the colours of all sites in their order, separated by spaces, which may be left out where the names of all
    /// colours are single letters. A colour goes by its face, such as <c>U</c>, where faces are coloured; else by the name of any site that shows it at home.
    /// </param>
    /// <exception cref="FormatException">The text is none of the three; the message says what is wrong.</exception>
    public ColouredState ParseColours(string text) => TryParseColours(text, out var colours, out var problem) ? colours : throw new FormatException(problem);

    /// <summary>Reads which colour each site shows, or says what is wrong. See <see cref="ParseColours"/>.</summary>
    /// <param name="text">The text.</param>
    /// <param name="colours">The colours on the sites.</param>
    /// <param name="problem">What was found and what would be right; null where there is no problem.</param>
    public bool TryParseColours(string text, [NotNullWhen(true)] out ColouredState? colours, [NotNullWhen(false)] out string? problem)
    {
        ArgumentNullException.ThrowIfNull(text);
        var words = text.Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries);
        var on = ColourOfSite.ToArray();
        problem = text.Trim() == "home" ? null : text.Contains('=', StringComparison.Ordinal) ? ReadPairs(words, on) : ReadList(words, on);
        colours = problem is null ? new ColouredState(this, [.. on]) : null;
        return problem is null;
    }

    /// <summary>What a colour is called: by its face, else by the first site that shows it at home.</summary>
    internal string ColourName(int colour) => _faceNames.IsEmpty ? SiteNames[ColourOfSite.IndexOf(colour)] : _faceNames[colour];

    private int? FindColour(string name) =>
        _faceNames.IndexOf(name) is >= 0 and var face ? face : FindSite(name) is { } site ? ColourOfSite[site] : null;

    private string? ReadPairs(string[] words, int[] on)
    {
        var seen = new HashSet<int>();
        foreach (var word in words)
        {
            var equals = word.IndexOf('=', StringComparison.Ordinal);
            if (equals < 0)
            {
                return $"found \"{word}\"; a site that differs from home is written site=colour";
            }

            if (FindSite(word[..equals]) is not { } site)
            {
                return $"found \"{word}\"; \"{word[..equals]}\" is not the name of a site";
            }

            if (!seen.Add(site))
            {
                return $"found \"{word}\"; the site {SiteNames[site]} was given before";
            }

            if (FindColour(word[(equals + 1)..]) is not { } colour)
            {
                return $"found \"{word}\"; {NoColour(word[(equals + 1)..])}";
            }

            on[site] = colour;
        }

        return null;
    }

    private string? ReadList(string[] words, int[] on)
    {
        if (words.Length != SiteCount && !_faceNames.IsEmpty)
        {
            words = [.. words.SelectMany(word => word.Select(letter => $"{letter}"))];
        }

        if (words.Length != SiteCount)
        {
            return $"found {words.Length} colours; there are {SiteCount} sites";
        }

        for (var site = 0; site < words.Length; site++)
        {
            if (FindColour(words[site]) is not { } colour)
            {
                return $"found \"{words[site]}\" for the site {SiteNames[site]}; {NoColour(words[site])}";
            }

            on[site] = colour;
        }

        return null;
    }

    private string NoColour(string name) => _faceNames.IsEmpty
        ? $"\"{name}\" is no colour: a colour goes by the name of a site that shows it at home"
        : $"\"{name}\" is no colour; the colours are {string.Join(", ", _faceNames)}";
}
