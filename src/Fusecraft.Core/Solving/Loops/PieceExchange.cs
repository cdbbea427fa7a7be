using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>A wanted exchange: which piece is to go to the place of which, in whatever position, and whether all others are to stay as they are or may go anywhere.</summary>
/// <remarks>Pieces are named by where they are, not by where they come from. Immutable, safe to share.</remarks>
public sealed class PieceExchange
{
    private PieceExchange(Mechanism mechanism, ImmutableSortedDictionary<int, int> targets, bool keepsOthers)
    {
        Mechanism = mechanism;
        Targets = targets;
        KeepsOthers = keepsOthers;
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>For each place named, by its piece at home, the place to which what is there goes; itself for what has to stay, perhaps turned.</summary>
    public IReadOnlyDictionary<int, int> Targets { get; }

    /// <summary>True when every site of all other places keeps its label; false when these may be exchanged and turned at will.</summary>
    public bool KeepsOthers { get; }

    /// <summary>Reads an exchange.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="cycles">Pieces that go round, such as <c>(UF UR UB)</c> or <c>(UF UR)(UFR UBR)</c>: each to the place of the next, the last to that of the first. <c>(UF)</c> stays in its place.</param>
    /// <param name="keepsOthers">True when all others have to stay as they are.</param>
    /// <exception cref="FormatException">The text is no list of cycles, names a piece twice or one that is none, or sends a piece where one of another number of sites is.</exception>
    public static PieceExchange Parse(Mechanism mechanism, string cycles, bool keepsOthers)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(cycles);
        var targets = ImmutableSortedDictionary.CreateBuilder<int, int>();
        foreach (var part in cycles.Trim().Split(')', StringSplitOptions.RemoveEmptyEntries))
        {
            var text = part.Trim();
            int[] pieces = text.StartsWith('(')
                ? [.. text[1..].Split((char[]?)null, StringSplitOptions.RemoveEmptyEntries).Select(name => mechanism.FindPiece(name) ?? throw new FormatException($"\"{name}\" is not a piece of {mechanism.Name}."))]
                : throw new FormatException($"\"{cycles}\" is no list of cycles of pieces, such as (a b c).");
            for (var i = 0; i < pieces.Length; i++)
            {
                var target = pieces[(i + 1) % pieces.Length];
                if (mechanism.SitesOfPiece[pieces[i]].Length != mechanism.SitesOfPiece[target].Length)
                {
                    throw new FormatException($"{mechanism.PieceNames[pieces[i]]} cannot go to the place of {mechanism.PieceNames[target]}: they have different numbers of sites.");
                }

                if (!targets.TryAdd(pieces[i], target))
                {
                    throw new FormatException($"{mechanism.PieceNames[pieces[i]]} is named twice.");
                }
            }
        }

        return targets.Count > 0 && cycles.TrimEnd().EndsWith(')')
            ? new PieceExchange(mechanism, targets.ToImmutable(), keepsOthers)
            : throw new FormatException($"\"{cycles}\" is no list of cycles of pieces, such as (a b c).");
    }

    /// <summary>True when a permutation of the sites does the exchange.</summary>
    internal bool IsDoneBy(ReadOnlySpan<int> images)
    {
        for (var site = 0; site < images.Length; site++)
        {
            var piece = Mechanism.PieceOfSite[site];
            if (Targets.TryGetValue(piece, out var target) ? Mechanism.PieceOfSite[images[site]] != target : KeepsOthers && images[site] != site)
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>The labels, by the sites where they are, as colours: those of a named piece alike, all others different or, where they are free, alike.</summary>
    internal int[] Source()
    {
        var free = -1;
        var colours = new int[Mechanism.SiteCount];
        for (var site = 0; site < colours.Length; site++)
        {
            var piece = Mechanism.PieceOfSite[site];
            colours[site] = Targets.ContainsKey(piece) ? Mechanism.SitesOfPiece[piece][0] : KeepsOthers ? site : free = free < 0 ? site : free;
        }

        return colours;
    }

    /// <summary>The colours of <see cref="Source"/> after the exchange, by the sites where they are then.</summary>
    internal int[] Target()
    {
        var colours = Source();
        foreach (var (piece, target) in Targets)
        {
            foreach (var site in Mechanism.SitesOfPiece[target])
            {
                colours[site] = Mechanism.SitesOfPiece[piece][0];
            }
        }

        return colours;
    }
}
