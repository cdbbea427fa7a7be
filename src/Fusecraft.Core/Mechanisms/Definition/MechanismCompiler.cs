using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>Turns a definition into a mechanism: resolves names, expands families, and collects every mistake on the way.</summary>
internal sealed partial class MechanismCompiler
{
    private readonly MechanismDefinition _definition;
    private readonly ProblemList _problems;

    private MechanismCompiler(MechanismDefinition definition, ProblemList problems)
    {
        _definition = definition;
        _problems = problems;
    }

    /// <summary>The mechanism, or null where <paramref name="problems"/> is not empty afterwards.</summary>
    public static Mechanism? Compile(MechanismDefinition definition, ProblemList problems)
    {
        var compiler = new MechanismCompiler(definition, problems);
        var blueprint = compiler.MakeBlueprint();
        if (blueprint is null)
        {
            return null;
        }

        var names = new NameTable(blueprint);
        var turns = compiler.SelectTurns(blueprint.Turns);
        var marks = compiler.ReadMarks(blueprint, names);
        var blocks = compiler.ReadBlocks(names);
        compiler.CheckGoal(names, [.. marks.Select(mark => mark.Mark)]);
        var colours = compiler.ReadColours(blueprint, names);
        return problems.IsEmpty ? new Mechanism(definition, blueprint, names, turns, marks, blocks, colours) : null;
    }

    private Blueprint? MakeBlueprint()
    {
        if (string.IsNullOrWhiteSpace(_definition.Name))
        {
            _problems.Add("$.name", "an empty name", "a mechanism has a name");
        }

        if (_definition.Family is { } family)
        {
            if (!_definition.Sites.IsEmpty || !_definition.Turns.IsEmpty || !_definition.Pieces.IsEmpty)
            {
                _problems.Add("$.family", "a family beside sites, pieces or turns", "give either a family, or sites and turns");
            }

            return family.Expand(_problems);
        }

        if (!_definition.Use.IsEmpty)
        {
            _problems.Add("$.use", "\"use\" without a family", "\"use\" picks turns of a family; leave it out");
        }

        return ReadCustom();
    }

    private List<TurnBlueprint> SelectTurns(List<TurnBlueprint> all)
    {
        if (_definition.Use.IsEmpty || _definition.Family is null)
        {
            return all;
        }

        var selected = new List<TurnBlueprint>();
        var taken = new HashSet<string>();
        for (var i = 0; i < _definition.Use.Length; i++)
        {
            var path = $"$.use[{i}]";
            var name = _definition.Use[i];
            var turn = all.Find(candidate => candidate.Name == name);
            var whole = turn ?? (name.EndsWith('2') ? all.Find(candidate => candidate.Name == name[..^1]) : null);
            if (whole is null)
            {
                _problems.Add(path, $"\"{name}\"", $"should be a turn of this family, or its half turn with 2 behind it: {Listing(all.Select(candidate => candidate.Name))}");
            }
            else if (!taken.Add(whole.Name))
            {
                _problems.Add(path, $"turn \"{whole.Name}\" a second time", "each turn is used once, whole or as its half turn");
            }
            else if (turn is null && whole.Moves.Power(2).IsIdentity)
            {
                _problems.Add(path, $"\"{name}\", which moves nothing", $"turn \"{whole.Name}\" undoes itself; use it whole");
            }
            else
            {
                selected.Add(turn ?? new TurnBlueprint(name, whole.Moves.Power(2), whole.Carried) { Guard = whole.Guard });
            }
        }

        return selected;
    }

    private List<(string Mark, int Site)> ReadMarks(Blueprint blueprint, NameTable names)
    {
        var marks = new List<(string Mark, int Site)>(blueprint.Marks);
        var fromFamily = blueprint.Marks.Select(mark => mark.Mark).ToHashSet();
        var seen = new HashSet<string>();
        foreach (var mark in _definition.Marks)
        {
            var path = JsonPath.Member("$.marks", mark.Name);
            if (!NameRules.IsName(mark.Name))
            {
                _problems.Add(path, $"\"{mark.Name}\"", $"a mark's name is made of {NameRules.Characters}");
                continue;
            }

            if (fromFamily.Contains(mark.Name) || !seen.Add(mark.Name))
            {
                _problems.Add(path, $"mark \"{mark.Name}\"", fromFamily.Contains(mark.Name) ? "the family brings this mark itself; choose another name" : "each mark is listed once");
                continue;
            }

            if (mark.Sites.IsEmpty)
            {
                _problems.Add(path, "no sites", "a mark sits on at least one site");
            }

            for (var i = 0; i < mark.Sites.Length; i++)
            {
                if (ResolveSite(mark.Sites[i], $"{path}[{i}]", names) is { } site)
                {
                    if (marks.Contains((mark.Name, site)))
                    {
                        _problems.Add($"{path}[{i}]", $"\"{mark.Sites[i]}\" a second time", "a site holds at most one token of a mark");
                    }
                    else
                    {
                        marks.Add((mark.Name, site));
                    }
                }
            }
        }

        return marks;
    }

    private List<int[]> ReadBlocks(NameTable names)
    {
        var blocks = new List<int[]>();
        var blockOf = new Dictionary<int, int>();
        for (var i = 0; i < _definition.Blocks.Length; i++)
        {
            var path = $"$.blocks[{i}]";
            var pieces = new SortedSet<int>();
            var entries = _definition.Blocks[i];
            for (var k = 0; k < entries.Length; k++)
            {
                var entryPath = $"{path}[{k}]";
                if (names.FindPiece(entries[k]) is not { } piece)
                {
                    _problems.Add(entryPath, $"\"{entries[k]}\"", "a block lists pieces, each by one of its sites or by its own name");
                }
                else if (blockOf.TryGetValue(piece, out var other) && other != i)
                {
                    _problems.Add(entryPath, $"piece \"{names.PieceNames[piece]}\", which is in block {other + 1} already", "a piece is in at most one block; join the two lists to fuse them");
                }
                else if (!pieces.Add(piece))
                {
                    _problems.Add(entryPath, $"piece \"{names.PieceNames[piece]}\" a second time", "a block lists each piece once");
                }
                else
                {
                    blockOf[piece] = i;
                }
            }

            if (entries.Length < 2)
            {
                _problems.Add(path, entries.IsEmpty ? "an empty block" : "a block of one piece", "a block fuses two or more pieces");
            }

            blocks.Add([.. pieces]);
        }

        return blocks;
    }

    private void CheckGoal(NameTable names, HashSet<string> marks)
    {
        var goal = _definition.Goal;
        if (goal.Kind is not (GoalKind.Marks or GoalKind.Sites))
        {
            return;
        }

        var path = goal.Kind == GoalKind.Marks ? "$.goal.marks" : "$.goal.sites";
        if (goal.Names.IsEmpty)
        {
            _problems.Add(path, "an empty list", goal.Kind == GoalKind.Marks ? "list at least one mark@site" : "list at least one site");
        }

        var seen = new HashSet<(string?, int)>();
        for (var i = 0; i < goal.Names.Length; i++)
        {
            var entry = $"{path}[{i}]";
            (string? Mark, int Site)? target = null;
            if (goal.Kind == GoalKind.Marks)
            {
                target = ResolveMark(goal.Names[i], entry, names, marks) is { } mark ? (mark.Mark, mark.Site) : null;
            }
            else if (ResolveSite(goal.Names[i], entry, names) is { } site)
            {
                target = (null, site);
            }

            if (target is { } found && !seen.Add(found))
            {
                _problems.Add(entry, $"\"{goal.Names[i]}\" a second time", "each entry of a goal is listed once");
            }
        }
    }

    private ImmutableArray<int> ReadColours(Blueprint blueprint, NameTable names)
    {
        var distinct = Enumerable.Range(0, blueprint.SiteNames.Length).ToArray();
        if (_definition.Colours.Kind == ColourSchemeKind.Faces)
        {
            if (blueprint.Faces is { } faces)
            {
                return faces;
            }

            _problems.Add("$.colours", "\"faces\"", "this mechanism has no faces; write \"distinct\" or lists of alike sites");
        }

        var seen = new HashSet<int>();
        for (var i = 0; i < _definition.Colours.AlikeSites.Length; i++)
        {
            var list = _definition.Colours.AlikeSites[i];
            int? first = null;
            for (var k = 0; k < list.Length; k++)
            {
                var path = $"$.colours[{i}][{k}]";
                if (ResolveSite(list[k], path, names) is { } site)
                {
                    if (!seen.Add(site))
                    {
                        _problems.Add(path, $"\"{list[k]}\" a second time", "a site is in at most one list of alike sites");
                    }

                    distinct[site] = first ??= site;
                }
            }
        }

        return [.. distinct];
    }

    private int? ResolveSite(string name, string path, NameTable names)
    {
        if (names.FindSite(name) is { } site)
        {
            return site;
        }

        _problems.Add(path, $"\"{name}\"", $"should be the name of a site: {Listing(names.SiteNames)}");
        return null;
    }

    private (string Mark, int Site)? ResolveMark(string text, string path, NameTable names, HashSet<string> marks)
    {
        var at = text.IndexOf('@', StringComparison.Ordinal);
        if (at < 0)
        {
            _problems.Add(path, $"\"{text}\"", "a mark at a site is written mark@site");
            return null;
        }

        if (!marks.Contains(text[..at]))
        {
            // Where "marks" could not be read, nothing is known about the marks it was to declare.
            if (marks.Count > 0 || !_problems.Concerns("$.marks"))
            {
                _problems.Add(path, $"mark \"{text[..at]}\"", marks.Count == 0 ? "no mark is declared; add it to \"marks\"" : $"should be a declared mark: {Listing(marks)}");
            }

            return null;
        }

        return ResolveSite(text[(at + 1)..], path, names) is { } site ? (text[..at], site) : null;
    }

    private static string Listing(IEnumerable<string> names)
    {
        // Names that stand in for bad ones are nobody's business.
        var list = names.Where(static name => NameRules.IsName(name)).Take(13).ToList();
        return list.Count <= 12 ? string.Join(", ", list) : string.Join(", ", list.Take(10)) + ", …";
    }
}
