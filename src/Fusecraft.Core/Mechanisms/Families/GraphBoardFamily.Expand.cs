using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

public sealed partial class GraphBoardFamily
{
    /// <inheritdoc/>
    internal override Blueprint? Expand(ProblemList problems)
    {
        if (NameRules.CheckSites(Vertices, "$.family.vertices", problems) is not { } vertices)
        {
            return null;
        }

        var numberOf = Enumerable.Range(0, vertices.Length).ToDictionary(i => vertices[i]);
        var edges = new List<SlidingEdge>();
        var seen = new HashSet<(int, int)>();
        for (var i = 0; i < Edges.Length; i++)
        {
            var path = $"$.family.edges[{i}]";
            var (from, to) = Edges[i];
            var known = true;
            foreach (var (name, end) in ((string, int)[])[(from, 0), (to, 1)])
            {
                if (!numberOf.ContainsKey(name))
                {
                    problems.Add($"{path}[{end}]", $"\"{name}\"", "an edge joins two vertices of \"vertices\"");
                    known = false;
                }
            }

            if (!known)
            {
                continue;
            }

            var (a, b) = (numberOf[from], numberOf[to]);
            if (a == b)
            {
                problems.Add(path, $"an edge from \"{from}\" to itself", "an edge joins two different vertices");
            }
            else if (!seen.Add((Math.Min(a, b), Math.Max(a, b))))
            {
                problems.Add(path, $"the edge between \"{from}\" and \"{to}\" a second time", "each edge is listed once");
            }
            else
            {
                edges.Add(new SlidingEdge(a, b, $"e{i + 1}", $"e{i + 1}", $"e{i + 1}'"));
            }
        }

        return SlidingEdge.ToBlueprint(vertices, edges, Gaps, problems);
    }
}
