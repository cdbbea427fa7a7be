using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>Looks for the home of one mechanism, moved by whatever takes its turns to those of another, among the shapes of the other's home region.</summary>
internal sealed class HomeMatching
{
    private const int Rotations = 24;
    private readonly Mechanism _first;
    private readonly ShapeGroupoid _second;
    private readonly long _maxTries;
    private readonly CancellationToken _cancellation;

    public HomeMatching(Mechanism first, ShapeGroupoid second, long maxTries, CancellationToken cancellation)
    {
        _first = first;
        _second = second;
        _maxTries = maxTries;
        _cancellation = cancellation;
    }

    /// <summary>False when a budget ended the search, so that there may be a match all the same.</summary>
    public bool IsDecided { get; private set; } = true;

    /// <summary>True when no bijection of the sites that was allowed takes turns to turns.</summary>
    public bool TurnsDiffer { get; private set; }

    /// <summary>True for cubes of one size, which only rotations and reflections of the solid may move; else any bijection of the sites will do.</summary>
    public bool IsOfSolids => _first.Definition.Family is CubeFamily one && _second.Mechanism.Definition.Family is CubeFamily other && one.Size == other.Size && one.CentreTwist == other.CentreTwist;

    public HomeMatch? Find()
    {
        IsDecided = _second.IsComplete;
        return IsOfSolids ? FindAmongHoldings(isEven: ((CubeFamily)_first.Definition.Family!).Size % 2 == 0) : FindAmongImages();
    }

    // A cube can be moved by the symmetries of the solid. Those that move the corner by which an even one is held change turns by rotations of the whole.
    private HomeMatch? FindAmongHoldings(bool isEven)
    {
        var symmetries = _second.Mechanism.BuiltSymmetries;
        var plain = new StepMatcher(_first, _second.Mechanism, keepsAdjacency: true);
        var held = isEven ? new StepMatcher(_first, _second.Mechanism, keepsAdjacency: true, symmetries.Take(Rotations)) : null;
        var home = PlacedShape.Of(_first.Home);
        TurnsDiffer = true;
        foreach (var isRepinned in (bool[])[false, true])
        {
            var matcher = isRepinned ? held : plain;
            foreach (var sites in symmetries)
            {
                _cancellation.ThrowIfCancellationRequested();
                if (matcher?.Match(sites, out var pieces) is not { } steps)
                {
                    continue;
                }

                TurnsDiffer = false;
                if (InHomeRegion(home.Moved(sites, pieces)) is { } shape)
                {
                    return Matched(sites, steps, isRepinned, shape);
                }
            }
        }

        return null;
    }

    private HomeMatch? FindAmongImages()
    {
        var matcher = new StepMatcher(_first, _second.Mechanism, keepsAdjacency: false);
        if (FirstBijection(matcher) is not { } bijection)
        {
            TurnsDiffer = IsDecided;
            return null;
        }

        matcher.Match(bijection, out var pieces);
        var start = PlacedShape.Of(_first.Home).Moved(bijection, pieces);
        var generators = SymmetryGroup.Of(_second.Mechanism, _cancellation).Generators;
        var reached = new Dictionary<PlacedShape, Permutation> { [start] = bijection };
        var queue = new Queue<PlacedShape>([start]);
        while (queue.TryDequeue(out var image))
        {
            _cancellation.ThrowIfCancellationRequested();
            if (InHomeRegion(image) is { } shape)
            {
                var sites = reached[image];
                return Matched(sites, matcher.Match(sites)!, isRepinned: false, shape);
            }

            if (reached.Count > _maxTries)
            {
                IsDecided = false;
                return null;
            }

            foreach (var generator in generators)
            {
                var next = image.Moved(generator.Sites, generator.Pieces);
                if (reached.TryAdd(next, reached[image] * generator.Sites))
                {
                    queue.Enqueue(next);
                }
            }
        }

        return null;
    }

    // Sites of the same names correspond if they can; else the steps say which do.
    private Permutation? FirstBijection(StepMatcher matcher)
    {
        if (_first.SiteCount != _second.Mechanism.SiteCount || _first.Turns.Length != _second.Mechanism.Turns.Length)
        {
            return null;
        }

        var named = new int[_first.SiteCount];
        var hit = new HashSet<int>();
        for (var site = 0; site < named.Length && _second.Mechanism.FindSite(_first.SiteNames[site]) is { } same; site++)
        {
            named[site] = same;
            hit.Add(same);
        }

        if (hit.Count == named.Length && Permutation.FromImages(named) is var byName && matcher.Match(byName) is not null)
        {
            return byName;
        }

        if (GuardForm.IsCoded(_first) || GuardForm.IsCoded(_second.Mechanism))
        {
            // Whether two conditions in code say the same cannot be known.
            IsDecided = false;
            return null;
        }

        var matching = new SiteMatching(_first, _second.Mechanism, matcher, _cancellation, _maxTries / 100);
        var found = matching.First();
        IsDecided &= !matching.EndedByBudget;
        return found;
    }

    private int? InHomeRegion(PlacedShape image)
    {
        if (image.In(_second.Mechanism) is not { } shape || _second.IndexOf(shape) is var number && number < 0)
        {
            return null;
        }

        // Where every step can be undone, all is one region, whether it is known or not.
        return _second.Mechanism.IsReversible || (_second.IsComplete && _second.RegionOf(number) == 0) ? number : null;
    }

    private HomeMatch Matched(Permutation sites, int[] steps, bool isRepinned, int shape)
    {
        IsDecided = true;
        return new HomeMatch(sites, [.. steps.Select(step => _second.Mechanism.Steps[step])], isRepinned, shape, _second.PathTo(shape));
    }
}
