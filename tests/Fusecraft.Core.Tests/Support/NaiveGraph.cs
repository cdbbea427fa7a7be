namespace Fusecraft.Tests.Support;

/// <summary>
/// A directed graph whose arrows carry the names of what they do and of what would undo that, read by trying everything: reaching by flooding, cutting by leaving out, loops by walking. Shares no code with the library.
/// </summary>
internal sealed class NaiveGraph
{
    private readonly HashSet<(int From, int To, string What, string Undo)> _arrows = [];
    private ILookup<int, (int From, int To, string What, string Undo)>? _from;

    public NaiveGraph(int vertices) => Vertices = vertices;

    public int Vertices { get; }

    public IEnumerable<(int From, int To, string What, string Undo)> Arrows => _arrows;

    /// <summary>The shapes of one region of a mechanism, in the order given, and the arrows between them; steps that do the same are one.</summary>
    public static NaiveGraph Of(NaiveMechanism mechanism, List<NaiveShape> region)
    {
        var graph = new NaiveGraph(region.Count);
        var number = Enumerable.Range(0, region.Count).ToDictionary(i => region[i]);
        for (var i = 0; i < region.Count; i++)
        {
            foreach (var step in mechanism.Steps.Where(step => step.IsFree(region[i])))
            {
                if (number.TryGetValue(step.After(region[i]), out var target))
                {
                    graph.Add(i, target, Name(mechanism, step), Name(mechanism, new NaiveStep(step.Turn, !step.IsForward)));
                }
            }
        }

        return graph;

        static string Name(NaiveMechanism mechanism, NaiveStep step) => string.Join(' ', mechanism.Sites.Select(step.Image));
    }

    public void Add(int from, int to, string what, string undo)
    {
        _arrows.Add((from, to, what, undo));
        _from = null;
    }

    /// <summary>Distances from a vertex, -1 where there is no way.</summary>
    public int[] DistancesFrom(int vertex, Func<int, bool>? mayPass = null)
    {
        var distances = Enumerable.Repeat(-1, Vertices).ToArray();
        distances[vertex] = 0;
        for (List<int> level = [vertex]; level.Count > 0;)
        {
            var next = new List<int>();
            foreach (var (from, to, _, _) in level.SelectMany(at => From(at)))
            {
                if (distances[to] < 0 && (mayPass is null || mayPass(to)))
                {
                    distances[to] = distances[from] + 1;
                    next.Add(to);
                }
            }

            level = next;
        }

        return distances;
    }

    /// <summary>True when all vertices but one (-1 to leave out none) can reach each other.</summary>
    public bool HoldsTogether(int without = -1)
    {
        var others = Enumerable.Range(0, Vertices).Where(vertex => vertex != without).ToList();
        return others.TrueForAll(from =>
        {
            var distances = DistancesFrom(from, to => to != without);
            return others.TrueForAll(to => distances[to] >= 0);
        });
    }

    public List<int> CutVertices() => [.. Enumerable.Range(0, Vertices).Where(vertex => Vertices > 1 && !HoldsTogether(vertex))];

    /// <summary>Pairs of an arrow and its undoing, or an arrow alone, as unordered pairs of ends with what they do, that hold the graph together.</summary>
    public HashSet<(int From, int To, string What)> Bridges()
    {
        var bridges = new HashSet<(int, int, string)>();
        foreach (var arrow in _arrows)
        {
            var undo = (arrow.To, arrow.From, arrow.Undo, arrow.What);
            var left = new NaiveGraph(Vertices);
            left._arrows.UnionWith(_arrows.Where(other => other != arrow && other != undo));
            if (!left.HoldsTogether())
            {
                bridges.Add(_arrows.Contains(undo) && arrow.To < arrow.From ? (arrow.To, arrow.From, arrow.Undo) : (arrow.From, arrow.To, arrow.What));
            }
        }

        return bridges;
    }

    /// <summary>The length of a shortest walk from a vertex back to it in which no arrow undoes the one before; -1 where there is none. Walks over arrows, not over vertices.</summary>
    public int ShortestReducedLoop(int vertex)
    {
        var level = From(vertex).ToHashSet();
        var seen = level.ToHashSet();
        for (var length = 1; level.Count > 0; length++)
        {
            if (level.Any(arrow => arrow.To == vertex))
            {
                return length;
            }

            level = [.. level.SelectMany(last => From(last.To).Where(next => (next.To != last.From || next.What != last.Undo))).Where(seen.Add)];
        }

        return -1;
    }

    private IEnumerable<(int From, int To, string What, string Undo)> From(int vertex) => (_from ??= _arrows.ToLookup(arrow => arrow.From))[vertex];
}
