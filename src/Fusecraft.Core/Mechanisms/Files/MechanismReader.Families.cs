using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

internal sealed partial class MechanismReader
{
    private MechanismFamily? Family(LocatedJson json)
    {
        const string kinds = "should be \"cube\", \"board\" or \"graph-board\"";
        if (!IsObjectOrAbsent(json, "should be an object: { \"kind\": \"cube\", \"size\": 3 }") || Required(json, "kind", kinds) is not { } kind)
        {
            return null;
        }

        switch (kind.IsString ? kind.Text : "")
        {
            case "cube":
                RequireKnown(json, "kind", "size", "centreTwist");
                var centreTwist = Boolean(json.Member("centreTwist"));
                return Integer(json, "size", "a whole number of layers") is { } size ? new CubeFamily(size, centreTwist) : null;
            case "board":
                RequireKnown(json, "kind", "columns", "rows", "gaps");
                var (columns, rows) = (Integer(json, "columns", "a whole number of cells"), Integer(json, "rows", "a whole number of cells"));
                var holes = Gaps(json, "cell");
                return columns is null || rows is null ? null : new BoardFamily(columns.Value, rows.Value, holes);
            case "graph-board":
                RequireKnown(json, "kind", "vertices", "edges", "gaps");
                var vertices = Required(json, "vertices", "should be a count or a list of names");
                var names = CountOrNames(vertices, "vertex");
                var edges = Edges(Required(json, "edges", "should be a list of pairs of vertices: [[\"1\", \"2\"], … ]"));
                var gaps = Gaps(json, "vertex");
                return vertices is null ? null : new GraphBoardFamily(names, edges, gaps);
            default:
                _problems.Add(kind.Path, kind.Found, kinds);
                return null;
        }
    }

    private ImmutableArray<string> Gaps(LocatedJson family, string what)
    {
        var gaps = family.Member("gaps");
        if (gaps is not null)
        {
            RequireItems(gaps, $"should name at least one {what}; leave it out for the last one");
        }

        return Names(gaps, what);
    }

    private ImmutableArray<(string From, string To)> Edges(LocatedJson? json)
    {
        const string pair = "should be a pair of vertices, such as [\"1\", \"2\"]";
        if (!IsListOrAbsent(json, "should be a list of pairs of vertices: [[\"1\", \"2\"], … ]"))
        {
            return [];
        }

        return [.. json.Children.Select(Edge)];

        (string From, string To) Edge(LocatedJson edge)
        {
            if (edge is not { IsList: true, Children: [var from, var to] })
            {
                _problems.Add(edge.Path, edge.IsList ? $"a list of {edge.Children.Count}" : edge.Found, pair);
                _problems.Silence(JsonPath.Index(edge.Path, 0));
                _problems.Silence(JsonPath.Index(edge.Path, 1));
                return ("", "");
            }

            return (NameOf(from, "vertex"), NameOf(to, "vertex"));
        }
    }
}
