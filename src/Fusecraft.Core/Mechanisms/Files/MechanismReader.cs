using System.Collections.Immutable;
using System.Globalization;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Makes a definition from the JSON of a mechanism file. Every member of the wrong form is a problem and is read as if it were empty, so that one reading finds the
/// problems of the whole file; items of lists keep their numbers.
/// </summary>
internal sealed partial class MechanismReader
{
    private readonly ProblemList _problems;

    private MechanismReader(ProblemList problems) => _problems = problems;

    /// <summary>Reads a definition.</summary>
    /// <returns>What could be read, or null where there is nothing to go on with: another format, or no sites and turns.</returns>
    internal static MechanismDefinition? Read(LocatedJson root, ProblemList problems)
    {
        foreach (var repeated in root.All().SelectMany(json => json.Repeated))
        {
            problems.AddAt(repeated.NamePosition, repeated.Path, $"a second member {LocatedJson.Quote(repeated.Name!)}", "remove one of them");
        }

        return new MechanismReader(problems).Definition(root);
    }

    private MechanismDefinition? Definition(LocatedJson root)
    {
        if (!root.IsObject)
        {
            _problems.Add(root.Path, root.Found, "should be an object: { \"format\": … }");
            return null;
        }

        var format = Required(root, "format", $"should be {LocatedJson.Quote(MechanismFile.Format)}");
        if (format is not null && !(format.IsString && format.Text == MechanismFile.Format))
        {
            _problems.Add(format.Path, format.Found, $"should be {LocatedJson.Quote(MechanismFile.Format)}, the only format known here");
            return null;
        }

        RequireKnown(root, "$schema", "format", "name", "about", "family", "use", "sites", "pieces", "turns", "blocks", "marks", "goal", "colours");
        var family = root.Member("family");
        RequireOneSource(root, family);
        var custom = family is null ? root : null;
        var definition = new MechanismDefinition
        {
            Schema = String(root.Member("$schema")),
            Name = Name(root),
            About = String(root.Member("about")),
            Family = family is null ? null : Family(family),
            Use = family is null ? [] : Use(root.Member("use")),
            Sites = CountOrNames(custom?.Member("sites"), "site"),
            Pieces = ListsOfNames(custom?.Member("pieces"), "site"),
            Turns = Turns(custom?.Member("turns")),
            Blocks = ListsOfNames(root.Member("blocks"), "piece"),
            Marks = Marks(root.Member("marks")),
            Goal = GoalOf(root.Member("goal")),
            Colours = ColoursOf(root.Member("colours")),
        };

        var hasSource = family is null ? root.Member("sites") is not null && root.Member("turns") is not null : definition.Family is not null;
        return hasSource ? definition : null;
    }

    /// <summary>A mechanism gets its sites and turns from a family or states them, not both.</summary>
    private void RequireOneSource(LocatedJson root, LocatedJson? family)
    {
        if (family is not null)
        {
            foreach (var extra in root.Children.Where(member => member.Name is "sites" or "pieces" or "turns"))
            {
                _problems.AddAt(extra.NamePosition, extra.Path, $"the member \"{extra.Name}\" beside \"family\"", "the family supplies sites, pieces and turns; remove one of the two");
            }

            return;
        }

        if (root.Member("use") is { } use)
        {
            _problems.AddAt(use.NamePosition, use.Path, "the member \"use\" without \"family\"", "it picks turns of a family; remove it, or the turns that are not wanted");
        }

        if (root.Member("sites") is null && root.Member("turns") is null)
        {
            _problems.Add(root.Path, "neither \"family\" nor \"sites\" and \"turns\"", "one of the two is needed: a family, or sites and turns");
        }
        else
        {
            Required(root, "sites", "a mechanism without a family needs its sites: a count or a list of names");
            Required(root, "turns", "a mechanism without a family needs its turns: { \"A\": { \"moves\": \"(1 2 3)\" }, … }");
        }
    }

    private string Name(LocatedJson root)
    {
        const string expected = "every mechanism has a name";
        var name = String(Required(root, "name", expected));
        if (name is not null && string.IsNullOrWhiteSpace(name))
        {
            _problems.Add(JsonPath.Member(root.Path, "name"), "an empty name", expected);
        }

        return name ?? "";
    }

    private ImmutableArray<string> Use(LocatedJson? json)
    {
        if (json is { IsList: true, Children.Count: 0 })
        {
            _problems.Add(json.Path, json.Found, "should name the turns that are kept, at least one; leave it out to keep all");
        }

        return Strings(json, "the name of a turn, such as \"U\", or \"F2\" for the half turn alone");
    }

    private ImmutableArray<MarkDefinition> Marks(LocatedJson? json)
    {
        if (!IsObjectOrAbsent(json, "should be an object of marks: { \"gap\": [\"1\"] }"))
        {
            return [];
        }

        return [.. json.Children.Select(mark => new MarkDefinition(mark.Name!, Names(mark, "site")))];
    }

    private Goal GoalOf(LocatedJson? json)
    {
        const string expected = "should be \"home\", \"shape\", \"colours\", { \"marks\": [ … ] } or { \"sites\": [ … ] }";
        switch (json)
        {
            case null or { IsString: true, Text: "home" }:
                return Goal.Home;
            case { IsString: true, Text: "shape" }:
                return Goal.Shape;
            case { IsString: true, Text: "colours" }:
                return Goal.Colours;
            case { IsObject: true, Children: [{ Name: "marks" } marks] }:
                RequireItems(marks, "should name at least one mark and its site, such as \"gap@4\"");
                return Goal.MarksAt(Strings(marks, MarkAtSite));
            case { IsObject: true, Children: [{ Name: "sites" } sites] }:
                RequireItems(sites, "should name at least one site");
                return Goal.SitesHome(Names(sites, "site"));
            case { IsObject: true, Children: [_] }:
                RequireKnown(json, "marks", "sites");
                return Goal.Home;
            default:
                _problems.Add(json.Path, json.Found, expected);
                return Goal.Home;
        }
    }

    private ColourScheme ColoursOf(LocatedJson? json)
    {
        switch (json)
        {
            case null or { IsString: true, Text: "distinct" }:
                return ColourScheme.Distinct;
            case { IsString: true, Text: "faces" }:
                return ColourScheme.Faces;
            case { IsList: true }:
                return ColourScheme.Alike(ListsOfNames(json, "site"));
            default:
                _problems.Add(json.Path, json.Found, "should be \"distinct\", \"faces\", or lists of sites that look alike");
                return ColourScheme.Distinct;
        }
    }

    private void RequireItems(LocatedJson list, string expected)
    {
        if (list is { IsList: true, Children.Count: 0 })
        {
            _problems.Add(list.Path, list.Found, expected);
        }
    }

    /// <summary>The names of sites or vertices: a count stands for <c>1</c> … <c>n</c>.</summary>
    private ImmutableArray<string> CountOrNames(LocatedJson? json, string what)
    {
        if (json is null || json.IsList)
        {
            return Names(json, what);
        }

        var expected = $"should be a count from 1 to {Permutation.MaxDegree}, or a list of names";
        if (!json.IsInteger || !int.TryParse(json.Text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out var count) || count is < 1 or > Permutation.MaxDegree)
        {
            _problems.Add(json.Path, json.Found, expected);
            return [];
        }

        return Blueprint.NumberedNames(count);
    }
}
