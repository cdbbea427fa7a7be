namespace Fusecraft.Mechanisms;

/// <summary>Guesses which of the known names a mistyped one was meant to be.</summary>
internal static class NearMiss
{
    /// <summary>The known name with the fewest typing slips from the given one, case apart; null when all are too far.</summary>
    internal static string? Of(string name, ReadOnlySpan<string> known)
    {
        const int longest = 40;
        if (name.Length > longest)
        {
            return null;
        }

        string? best = null;
        var bestSlips = Math.Min(3, (name.Length / 2) + 1);
        foreach (var candidate in known)
        {
            var slips = Slips(name.ToLowerInvariant(), candidate.ToLowerInvariant());
            if (slips < bestSlips)
            {
                (best, bestSlips) = (candidate, slips);
            }
        }

        return best;
    }

    /// <summary>
    /// The least number of letters left out, added, replaced or exchanged with their neighbour that makes one text of the other (optimal string alignment;
    /// F. J. Damerau, A technique for computer detection and correction of spelling errors, 1964).
    /// </summary>
    private static int Slips(string a, string b)
    {
        var slips = new int[a.Length + 1, b.Length + 1];
        for (var i = 0; i <= a.Length; i++)
        {
            for (var j = 0; j <= b.Length; j++)
            {
                slips[i, j] = (i, j) switch
                {
                    (0, _) => j,
                    (_, 0) => i,
                    _ => Math.Min(slips[i - 1, j - 1] + (a[i - 1] == b[j - 1] ? 0 : 1), Math.Min(slips[i - 1, j], slips[i, j - 1]) + 1),
                };
                if (i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1])
                {
                    slips[i, j] = Math.Min(slips[i, j], slips[i - 2, j - 2] + 1);
                }
            }
        }

        return slips[a.Length, b.Length];
    }
}
