using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>Finds sites and pieces by any of their names.</summary>
internal sealed class NameTable
{
    private readonly Dictionary<string, int> _siteOf;
    private readonly Blueprint _blueprint;

    public NameTable(Blueprint blueprint)
    {
        _blueprint = blueprint;
        _siteOf = Enumerable.Range(0, blueprint.SiteNames.Length).ToDictionary(i => blueprint.SiteNames[i]);
    }

    public ImmutableArray<string> SiteNames => _blueprint.SiteNames;

    public ImmutableArray<string> PieceNames => _blueprint.PieceNames;

    public int? FindSite(string name) => _siteOf.TryGetValue(name, out var site) ? site : _blueprint.SiteAlias(name);

    public int? FindPiece(string name) => _blueprint.PieceAlias(name) ?? (FindSite(name) is { } site ? _blueprint.PieceOfSite[site] : null);
}
