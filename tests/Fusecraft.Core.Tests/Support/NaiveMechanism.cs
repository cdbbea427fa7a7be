using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Tests.Support;

/// <summary>
/// A custom mechanism read literally from its definition, sharing no code with the library: dictionaries and sets of names, no bitsets, no groups. Slow, and meant to be obviously right.
/// </summary>
internal sealed class NaiveMechanism
{
    private readonly Dictionary<string, ImmutableHashSet<string>> _pieceOf = [];

    public NaiveMechanism(MechanismDefinition definition)
    {
        foreach (var site in definition.Sites)
        {
            _pieceOf[site] = [site];
        }

        foreach (var piece in definition.Pieces)
        {
            foreach (var site in piece)
            {
                _pieceOf[site] = [.. piece];
            }
        }

        Sites = definition.Sites;
        Turns = [.. definition.Turns.Select(turn => new NaiveTurn(turn, this))];
        Home = new NaiveShape(
            [.. definition.Marks.SelectMany(mark => mark.Sites.Select(site => $"{mark.Name}@{site}"))],
            [.. definition.Blocks.Select(block => block.SelectMany(piece => _pieceOf[piece]).ToHashSet())]);
        Steps = [.. Turns.SelectMany(turn => turn.IsOneWay ? (NaiveStep[])[new(turn, true)] : [new(turn, true), new(turn, false)])];
    }

    public ImmutableArray<string> Sites { get; }

    public List<NaiveTurn> Turns { get; }

    /// <summary>All steps in the library's order: turn by turn, forward before backward.</summary>
    public List<NaiveStep> Steps { get; }

    public NaiveShape Home { get; }

    public ImmutableHashSet<string> PieceOf(string site) => _pieceOf[site];

    /// <summary>All shapes reachable from home, nearest first, each with its distance and the shapes that its free steps lead to.</summary>
    public Dictionary<NaiveShape, (int Distance, List<(NaiveStep Step, NaiveShape Target)> Arrows)> Shapes()
    {
        var shapes = new Dictionary<NaiveShape, (int Distance, List<(NaiveStep Step, NaiveShape Target)> Arrows)> { [Home] = (0, ArrowsFrom(Home)) };
        var queue = new Queue<NaiveShape>([Home]);
        while (queue.TryDequeue(out var shape))
        {
            foreach (var (_, target) in shapes[shape].Arrows)
            {
                if (!shapes.ContainsKey(target))
                {
                    shapes.Add(target, (shapes[shape].Distance + 1, ArrowsFrom(target)));
                    queue.Enqueue(target);
                }
            }
        }

        return shapes;
    }

    /// <summary>Regions by definition: shapes that can reach each other. Home's region comes first.</summary>
    public List<HashSet<NaiveShape>> Regions()
    {
        var shapes = Shapes();
        var there = shapes.ToDictionary(pair => pair.Key, pair => pair.Value.Arrows.ConvertAll(arrow => arrow.Target));
        var back = shapes.Keys.ToDictionary(shape => shape, _ => new List<NaiveShape>());
        foreach (var (shape, targets) in there)
        {
            targets.ForEach(target => back[target].Add(shape));
        }

        var regions = new List<HashSet<NaiveShape>>();
        foreach (var shape in shapes.Keys)
        {
            if (!regions.Exists(region => region.Contains(shape)))
            {
                var region = Reach(shape, there);
                region.IntersectWith(Reach(shape, back));
                regions.Add(region);
            }
        }

        return regions;

        static HashSet<NaiveShape> Reach(NaiveShape from, Dictionary<NaiveShape, List<NaiveShape>> along)
        {
            var reached = new HashSet<NaiveShape> { from };
            var queue = new Queue<NaiveShape>([from]);
            while (queue.TryDequeue(out var shape))
            {
                along[shape].FindAll(reached.Add).ForEach(queue.Enqueue);
            }

            return reached;
        }
    }

    /// <summary>The arrangements of labels, site by site, that can be reached from home without leaving a set of shapes, by trying everything.</summary>
    public HashSet<string> Arrangements(HashSet<NaiveShape> within)
    {
        var home = (Labels: Sites.ToDictionary(site => site), Shape: Home);
        var seen = new HashSet<string> { Key(home.Labels) };
        var arrows = new Dictionary<NaiveShape, List<(NaiveStep Step, NaiveShape Shape)>>();
        var queue = new Queue<(Dictionary<string, string> Labels, NaiveShape Shape)>([home]);
        while (queue.TryDequeue(out var state))
        {
            if (!arrows.TryGetValue(state.Shape, out var fromHere))
            {
                arrows.Add(state.Shape, fromHere = ArrowsFrom(state.Shape));
            }

            foreach (var (step, shape) in fromHere)
            {
                if (!within.Contains(shape))
                {
                    continue;
                }

                var labels = state.Labels.ToDictionary(pair => step.Image(pair.Key), pair => pair.Value);
                if (seen.Add(Key(labels)))
                {
                    queue.Enqueue((labels, shape));
                }
            }
        }

        return seen;
    }

    private List<(NaiveStep Step, NaiveShape Target)> ArrowsFrom(NaiveShape shape) => Steps.FindAll(step => step.IsFree(shape)).ConvertAll(step => (step, step.After(shape)));

    private string Key(Dictionary<string, string> labels) => string.Join(' ', Sites.Select(site => labels[site]));
}

/// <summary>Marks as <c>mark@site</c>, and blocks as sets of sites.</summary>
internal sealed class NaiveShape(ImmutableHashSet<string> marks, List<HashSet<string>> blocks) : IEquatable<NaiveShape>
{
    private readonly string _key = string.Join(' ', marks.Order(StringComparer.Ordinal)) + "|" +
        string.Join('|', blocks.Select(block => string.Join(' ', block.Order(StringComparer.Ordinal))).Order(StringComparer.Ordinal));

    public ImmutableHashSet<string> Marks { get; } = marks;

    public List<HashSet<string>> Blocks { get; } = blocks;

    public bool Equals(NaiveShape? other) => other is not null && _key == other._key;

    public override bool Equals(object? obj) => Equals(obj as NaiveShape);

    public override int GetHashCode() => _key.GetHashCode(StringComparison.Ordinal);

    public override string ToString() => _key;
}

internal sealed class NaiveTurn
{
    public NaiveTurn(TurnDefinition definition, NaiveMechanism mechanism)
    {
        Definition = definition;
        foreach (var cycle in definition.Moves.Split('(', StringSplitOptions.RemoveEmptyEntries))
        {
            var sites = cycle.TrimEnd(' ', ')').Split(' ', StringSplitOptions.RemoveEmptyEntries);
            for (var i = 0; i < sites.Length; i++)
            {
                Moves[sites[i]] = sites[(i + 1) % sites.Length];
            }
        }

        foreach (var site in Moves.Keys.Concat(definition.Carries))
        {
            Carried.UnionWith(mechanism.PieceOf(site));
        }
    }

    public TurnDefinition Definition { get; }

    public bool IsOneWay => Definition.IsOneWay;

    /// <summary>Where the forward step takes the sites that it moves.</summary>
    public Dictionary<string, string> Moves { get; } = [];

    /// <summary>The sites of the pieces carried.</summary>
    public HashSet<string> Carried { get; } = [];

    public bool Tears(NaiveShape shape) => shape.Blocks.Exists(block => block.Any(Carried.Contains) && !block.All(Carried.Contains));

    public static bool Holds(GuardDefinition guard, NaiveShape shape) =>
        guard.Needs.All(shape.Marks.Contains) && !guard.BarredBy.Any(shape.Marks.Contains) && (guard.AnyOf.IsEmpty || guard.AnyOf.Any(alternative => Holds(alternative, shape)));
}

internal sealed class NaiveStep(NaiveTurn turn, bool isForward)
{
    private readonly Dictionary<string, string> _images = isForward ? turn.Moves : turn.Moves.ToDictionary(pair => pair.Value, pair => pair.Key);

    public NaiveTurn Turn { get; } = turn;

    public bool IsForward { get; } = isForward;

    public string Image(string site) => _images.GetValueOrDefault(site, site);

    /// <summary>Nothing is torn, and: forward, the guard holds; backward, the turn's own back guard holds, or the step exactly undoes a free forward step.</summary>
    public bool IsFree(NaiveShape shape)
    {
        if (Turn.Tears(shape))
        {
            return false;
        }

        if (IsForward)
        {
            return NaiveTurn.Holds(Turn.Definition.Guard, shape);
        }

        if (Turn.Definition.Back is { } back)
        {
            return NaiveTurn.Holds(back, shape);
        }

        var before = After(shape);
        var forward = new NaiveStep(Turn, true);
        return forward.IsFree(before) && forward.After(before).Equals(shape);
    }

    public NaiveShape After(NaiveShape shape) => new(
        [.. shape.Marks.Select(mark => mark.Split('@')).Select(parts => $"{parts[0]}@{Image(parts[1])}")],
        shape.Blocks.ConvertAll(block => block.Select(Image).ToHashSet()));
}
