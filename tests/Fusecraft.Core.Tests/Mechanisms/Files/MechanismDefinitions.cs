using System.Collections.Immutable;
using FsCheck;
using FsCheck.Fluent;
using Fusecraft.Mechanisms;

namespace Fusecraft.Core.Tests.Mechanisms.Files;

/// <summary>Random definitions that make mechanisms: every family and custom ones, with all optional members now and then.</summary>
public static class MechanismDefinitions
{
    private static readonly Gen<string> Texts = Gen.Elements("Weir gate", "ünïcödé – \"quoted\" \\ back", "line\nbreak\ttab", "🚪 e\u0301 \u0001", "<&>'+`");

    public static Arbitrary<MechanismDefinition> Definitions() => Arb.From(Gen.OneOf(Custom(), Cubes(), Boards(), GraphBoards()));

    private static Gen<MechanismDefinition> Custom() =>
        from named in Gen.Elements(true, false)
        from size in Gen.Choose(4, 9)
        let sites = Enumerable.Range(1, size).Select(i => named ? $"s{i}:{i % 3}.x_" : $"{i}").ToImmutableArray()
        from turnCount in Gen.Choose(0, 4)
        from turns in Turn(sites).ArrayOf(turnCount)
        from marked in Some(sites)
        from block in Some(sites)
        from goal in Gen.Elements(Goal.Home, Goal.Shape, Goal.Colours, Goal.SitesHome(sites[0], sites[2]), Goal.MarksAt($"gap@{sites[1]}"))
        from colours in Gen.Elements(ColourScheme.Distinct, ColourScheme.Alike([sites[0], sites[3]], [sites[1]]))
        from name in Texts
        from about in OrNull(Texts)
        from schema in OrNull(Gen.Constant("mechanism-1.schema.json"))
        select new MechanismDefinition
        {
            Schema = schema,
            Name = name,
            About = about,
            Sites = sites,
            Turns = [.. turns.Select((turn, i) => turn(i))],
            Blocks = block.Length < 2 ? [] : [block],
            Marks = [new MarkDefinition("gap", [sites[0], .. marked.Where(site => site != sites[0])]), new MarkDefinition("pin", [sites[^1]])],
            Goal = goal,
            Colours = colours,
        };

    private static Gen<Func<int, TurnDefinition>> Turn(ImmutableArray<string> sites) =>
        from mixed in Gen.Shuffle(sites.AsEnumerable())
        from carries in Some(sites)
        from guard in Guard(sites, 2)
        from back in OrNull(Guard(sites, 1))
        from oneWay in Gen.Elements(true, false, false)
        from forward in OrNull(Gen.Elements("go", "2nd", "w'"))
        from backward in OrNull(Gen.Elements("come", "x"))
        select (Func<int, TurnDefinition>)(number => new TurnDefinition
        {
            Name = $"T{number}",
            Moves = $"({mixed[0]} {mixed[1]})({mixed[2]} {mixed[3]})",
            Carries = carries,
            Guard = guard,
            IsOneWay = oneWay,
            Back = oneWay ? null : back,
            As = forward,
            BackAs = oneWay ? null : backward,
        });

    private static Gen<GuardDefinition> Guard(ImmutableArray<string> sites, int depth) =>
        from needs in Some(sites)
        from barredBy in Some(sites)
        from count in depth == 0 ? Gen.Constant(0) : Gen.Choose(0, 2)
        from anyOf in Guard(sites, Math.Max(0, depth - 1)).ArrayOf(count)
        select new GuardDefinition
        {
            Needs = [.. needs.Select(site => $"gap@{site}")],
            BarredBy = [.. barredBy.Select(site => $"pin@{site}")],
            AnyOf = [.. anyOf],
        };

    private static Gen<MechanismDefinition> Cubes() =>
        from size in Gen.Choose(2, 4)
        from twist in Gen.Elements(true, false)
        from use in Gen.Elements<string[]>([], ["U"], ["U", "R2", "F"])
        from blocks in Gen.Elements<string[][]>([], [["1,1,1", "1,1,2"]], [["1,1,1", "1,2,1"], ["2,1,1", "2,1,2"]])
        from goal in Gen.Elements(Goal.Home, Goal.Shape, Goal.Colours)
        from colours in Gen.Elements(ColourScheme.Distinct, ColourScheme.Faces)
        from name in Texts
        select new MechanismDefinition
        {
            Name = name,
            Family = new CubeFamily(size, twist && size % 2 == 1),
            Use = [.. use],
            Blocks = size == 4 ? [] : [.. blocks.Select(block => block.ToImmutableArray())],
            Goal = goal,
            Colours = colours,
        };

    private static Gen<MechanismDefinition> Boards() =>
        from columns in Gen.Choose(1, 5)
        from rows in Gen.Choose(1, 5)
        from gaps in Gen.Elements<string[]>([], ["1"])
        from name in Texts
        select new MechanismDefinition { Name = name, Family = new BoardFamily(columns, rows, [.. gaps]) };

    private static Gen<MechanismDefinition> GraphBoards() =>
        from named in Gen.Elements(true, false)
        from size in Gen.Choose(2, 12)
        let vertices = Enumerable.Range(1, size).Select(i => named ? $"lock{i}" : $"{i}").ToImmutableArray()
        from gap in Gen.Elements(vertices.AsEnumerable())
        from given in Gen.Elements(true, false)
        select new MechanismDefinition
        {
            Name = "Ring",
            Family = new GraphBoardFamily(vertices, [.. vertices.Skip(1).Select((vertex, i) => (vertices[i], vertex))], given ? [gap] : []),
        };

    private static Gen<ImmutableArray<string>> Some(ImmutableArray<string> names) => Gen.SubListOf(names.AsEnumerable()).Select(some => some.Take(3).ToImmutableArray());

    private static Gen<T?> OrNull<T>(Gen<T> values)
        where T : class => Gen.OneOf(Gen.Constant((T?)null), values.Select(value => (T?)value));
}
