using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

// Custom mechanisms: sites, pieces and turns written out.
internal sealed partial class MechanismCompiler
{
    private Blueprint? ReadCustom()
    {
        if (NameRules.CheckSites(_definition.Sites, "$.sites", _problems) is not { } sites)
        {
            return null;
        }

        var siteOf = Enumerable.Range(0, sites.Length).ToDictionary(i => sites[i]);
        var (pieceOfSite, sitesOfPiece) = ReadPieces(siteOf);
        var blueprint = new Blueprint
        {
            SiteNames = sites,
            PieceOfSite = pieceOfSite,
            PieceNames = [.. sitesOfPiece.Select(piece => sites[piece[0]])],
            Turns = [],
        };
        var names = new NameTable(blueprint);
        var notation = new CycleNotation(sites);
        var seen = new HashSet<string>();
        var marks = _definition.Marks.Select(mark => mark.Name).ToHashSet();
        foreach (var turn in _definition.Turns)
        {
            var path = JsonPath.Member("$.turns", turn.Name);
            if (!NameRules.IsTurnName(turn.Name))
            {
                _problems.Add(path, $"turn name \"{turn.Name}\"", $"a turn's name starts with a letter or a digit and is made of {NameRules.Characters}");
            }
            else if (!seen.Add(turn.Name))
            {
                _problems.Add(path, $"turn \"{turn.Name}\" a second time", "turn names are distinct");
            }

            if (ReadTurn(turn, path, notation, names, pieceOfSite, sitesOfPiece, marks) is { } read)
            {
                blueprint.Turns.Add(read);
            }
        }

        return blueprint;
    }

    private (ImmutableArray<int> PieceOfSite, List<int[]> SitesOfPiece) ReadPieces(Dictionary<string, int> siteOf)
    {
        var group = Enumerable.Repeat(-1, siteOf.Count).ToArray();
        for (var i = 0; i < _definition.Pieces.Length; i++)
        {
            var list = _definition.Pieces[i];
            if (list.IsEmpty)
            {
                _problems.Add($"$.pieces[{i}]", "an empty piece", "a piece lists its sites");
            }

            for (var k = 0; k < list.Length; k++)
            {
                var path = $"$.pieces[{i}][{k}]";
                if (!siteOf.TryGetValue(list[k], out var site))
                {
                    _problems.Add(path, $"\"{list[k]}\"", $"should be the name of a site: {Listing(siteOf.Keys)}");
                }
                else if (group[site] >= 0)
                {
                    _problems.Add(path, $"\"{list[k]}\" a second time", "a site belongs to one piece");
                }
                else
                {
                    group[site] = i;
                }
            }
        }

        // Pieces are numbered by their first site.
        var pieceOfSite = new int[group.Length];
        var sitesOfPiece = new List<List<int>>();
        var pieceOfGroup = new Dictionary<int, int>();
        for (var site = 0; site < group.Length; site++)
        {
            if (group[site] < 0 || !pieceOfGroup.TryGetValue(group[site], out var piece))
            {
                piece = sitesOfPiece.Count;
                sitesOfPiece.Add([]);
                if (group[site] >= 0)
                {
                    pieceOfGroup.Add(group[site], piece);
                }
            }

            pieceOfSite[site] = piece;
            sitesOfPiece[piece].Add(site);
        }

        return ([.. pieceOfSite], [.. sitesOfPiece.Select(piece => piece.ToArray())]);
    }

    private TurnBlueprint? ReadTurn(TurnDefinition turn, string path, CycleNotation notation, NameTable names, ImmutableArray<int> pieceOfSite, List<int[]> sitesOfPiece, HashSet<string> marks)
    {
        var carried = new SortedSet<int>();
        for (var i = 0; i < turn.Carries.Length; i++)
        {
            if (names.FindPiece(turn.Carries[i]) is not { } piece)
            {
                _problems.Add($"{path}.carries[{i}]", $"\"{turn.Carries[i]}\"", "\"carries\" lists pieces, each by one of its sites");
            }
            else if (!carried.Add(piece))
            {
                _problems.Add($"{path}.carries[{i}]", $"piece \"{turn.Carries[i]}\" a second time", "each piece is listed once");
            }
        }

        var guard = ReadGuard(turn.Guard, path, names, marks);
        var back = turn.Back is null ? null : ReadGuard(turn.Back, $"{path}.back", names, marks);
        if (turn.IsOneWay && turn.Back is not null)
        {
            _problems.Add($"{path}.back", "\"back\" beside \"oneWay\": true", "a one-way turn has no backward step; leave one of the two out");
        }

        if (turn.IsOneWay && turn.BackAs is not null)
        {
            _problems.Add($"{path}.backAs", "\"backAs\" beside \"oneWay\": true", "a one-way turn has no backward step; leave one of the two out");
        }

        CheckStepName(turn.As, $"{path}.as");
        CheckStepName(turn.BackAs, $"{path}.backAs");
        if (turn.Moves.Length == 0 && _problems.Concerns($"{path}.moves"))
        {
            return null;
        }

        if (!notation.TryParse(turn.Moves, out var moves, out var problem))
        {
            _problems.Add($"{path}.moves", $"\"{turn.Moves}\"", $"should be disjoint cycles of sites ({problem})");
            return null;
        }

        if (moves.IsIdentity)
        {
            _problems.Add($"{path}.moves", $"\"{turn.Moves}\", which moves nothing", "a turn moves at least two sites");
            return null;
        }

        foreach (var site in moves.Support)
        {
            var piece = sitesOfPiece[pieceOfSite[site]];
            var target = pieceOfSite[moves[piece[0]]];
            carried.Add(pieceOfSite[site]);
            if (sitesOfPiece[target].Length != piece.Length || piece.Any(other => pieceOfSite[moves[other]] != target))
            {
                _problems.Add($"{path}.moves", $"cycles that take piece \"{string.Join(' ', piece.Select(other => names.SiteNames[other]))}\" to no whole piece", "a turn takes every piece to a piece");
                return null;
            }
        }

        var written = turn.As ?? turn.Name;
        return new TurnBlueprint(turn.Name, moves, [.. carried])
        {
            Guard = guard,
            IsOneWay = turn.IsOneWay,
            Back = back,
            As = written,
            BackAs = turn.BackAs ?? written + "'",
        };
    }

    private void CheckStepName(string? name, string path)
    {
        if (name is not null && !NameRules.IsTurnName(name) && !(name.EndsWith('\'') && NameRules.IsTurnName(name.AsSpan(0, name.Length - 1))))
        {
            _problems.Add(path, $"\"{name}\"", $"a step's name starts with a letter or a digit, is made of {NameRules.Characters}, and may end in '");
        }
    }

    private List<GuardTerm> ReadGuard(GuardDefinition guard, string path, NameTable names, HashSet<string> marks)
    {
        var own = new GuardTerm(Read(guard.Needs, $"{path}.needs"), Read(guard.BarredBy, $"{path}.barredBy")) { When = guard.When };
        if (guard.AnyOf.IsEmpty)
        {
            return [own];
        }

        var terms = new List<GuardTerm>();
        for (var i = 0; i < guard.AnyOf.Length; i++)
        {
            terms.AddRange(ReadGuard(guard.AnyOf[i], $"{path}.anyOf[{i}]", names, marks).Select(own.And));
        }

        return terms;

        (string, int)[] Read(ImmutableArray<string> entries, string listPath)
        {
            var read = new List<(string, int)>();
            for (var i = 0; i < entries.Length; i++)
            {
                if (ResolveMark(entries[i], $"{listPath}[{i}]", names, marks) is { } mark)
                {
                    if (read.Contains(mark))
                    {
                        _problems.Add($"{listPath}[{i}]", $"\"{entries[i]}\" a second time", "each entry of a guard is listed once");
                    }

                    read.Add(mark);
                }
            }

            return [.. read];
        }
    }
}
