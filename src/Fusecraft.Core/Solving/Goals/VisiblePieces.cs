using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>What can be seen without any search: pieces stay whole, so every place of a piece shows the colours of some piece, and as many places show them as there are pieces with them.</summary>
internal static class VisiblePieces
{
    /// <summary>Why no arrangement of whole pieces shows the colours, in one sentence; null where one may.</summary>
    public static string? WhyImpossible(ColouredState colours)
    {
        var mechanism = colours.Mechanism;
        var left = new Dictionary<string, int>();
        for (var piece = 0; piece < mechanism.PieceCount; piece++)
        {
            var look = Look(mechanism, piece, mechanism.ColourOfSite);
            left[look] = left.GetValueOrDefault(look) + 1;
        }

        var there = new Dictionary<string, int>(left);
        for (var piece = 0; piece < mechanism.PieceCount; piece++)
        {
            var look = Look(mechanism, piece, colours.ColourOn);
            if (!left.TryGetValue(look, out var count))
            {
                return $"The place of {mechanism.PieceNames[piece]} shows {look}, which no piece does.";
            }

            if (count == 0)
            {
                return $"More places show {look} than the {there[look]} there {(there[look] == 1 ? "is" : "are")} of such pieces; one of them is that of {mechanism.PieceNames[piece]}.";
            }

            left[look] = count - 1;
        }

        return null;
    }

    private static string Look(Mechanism mechanism, int piece, IReadOnlyList<int> colourOn) =>
        string.Join(' ', mechanism.SitesOfPiece[piece].Select(site => colourOn[site]).Order().Select(mechanism.ColourName));
}
