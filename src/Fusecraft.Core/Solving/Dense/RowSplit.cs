using System.Numerics;

namespace Fusecraft.Solving;

/// <summary>Where the levels of a chain are divided: the first make the row, the next the word, the last the place within it.</summary>
/// <param name="RowLevels">The number of levels that make the row.</param>
/// <param name="WordLevels">The first level that makes the place.</param>
internal readonly record struct RowSplit(int RowLevels, int WordLevels)
{
    private const int MostRowStates = 1 << 24;

    /// <summary>The division that takes the least memory, and nearly the least time, for a number of shapes and of moves at each.</summary>
    public static RowSplit For(IReadOnlyList<int> orbitLengths, int shapes, int slots)
    {
        var levels = orbitLengths.Count;
        var wordLevels = levels;
        var (states, best) = (1, WordCost(1));
        for (var level = levels - 1; level >= 0 && states * orbitLengths[level] <= RowTable.MaxWordStates; level--)
        {
            states *= orbitLengths[level];
            if (WordCost(states) < best)
            {
                (wordLevels, best) = (level, WordCost(states));
            }
        }

        var wordStates = orbitLengths.Skip(wordLevels).Aggregate(1, (product, length) => product * length);
        var order = orbitLengths.Aggregate(BigInteger.One, (product, length) => product * length);
        var (rowLevels, least) = (wordLevels, double.PositiveInfinity);
        var rowStates = (double)wordStates;
        for (var level = wordLevels; level >= 0 && rowStates <= MostRowStates; level--)
        {
            var rows = shapes * (double)order / rowStates;
            var bytes = (rows * slots * 8) + (Math.Min(rowStates, rows * slots) * rowStates / wordStates * 4);
            if (bytes < least)
            {
                (rowLevels, least) = (level, bytes);
            }

            rowStates *= level == 0 ? 1 : orbitLengths[level - 1];
        }

        return new RowSplit(rowLevels, wordLevels);
    }

    /// <summary>The number of rows, the states of one, and at most how many entries maps of words have.</summary>
    public (long Rows, int RowStates, long MapEntries) Sizes(IReadOnlyList<int> orbitLengths, int shapes, int slots)
    {
        var (rows, rowStates, wordStates) = ((long)shapes, 1, 1);
        for (var level = 0; level < orbitLengths.Count; level++)
        {
            rows *= level < RowLevels ? orbitLengths[level] : 1;
            rowStates *= level < RowLevels ? 1 : orbitLengths[level];
            wordStates *= level < WordLevels ? 1 : orbitLengths[level];
        }

        return (rows, rowStates, Math.Min(rowStates, rows * slots) * (rowStates / wordStates));
    }

    // A look-up for the word and one for each byte of its bits; tables for more than two bytes leave the nearest memory.
    private static double WordCost(int states) => (1 + (states > 16 ? 0.6 : 0.4) * ((states + 7) / 8)) / states;
}
