using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// Finds all loops up to a length that move few bodies. A way out a and a way back b make such a loop when a and b⁻¹ agree on all bodies but few; with the bodies in one more group than may move, they agree on at least
/// one group whole, by which they are looked up.
/// </summary>
internal sealed class LoopHarvest<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly Shape _shape;
    private readonly LoopCatalogueOptions _options;
    private readonly CancellationToken _cancellation;
    private readonly LoopBodies _bodies;
    private readonly int[][] _bodySites;
    private readonly int[][] _groups;
    private readonly LoopWays<T> _out;
    private readonly LoopWays<T> _back;
    private readonly HashSet<Permutation> _seen = [Permutation.Identity];
    private readonly List<UsefulLoop> _loops = [];
    private long _pairs;

    public LoopHarvest(Shape shape, LoopCatalogueOptions options, CancellationToken cancellation)
    {
        _shape = shape;
        _options = options;
        _cancellation = cancellation;
        _bodies = new LoopBodies(shape);
        var isMoved = new bool[shape.Mechanism.SiteCount];
        foreach (var turn in shape.Mechanism.Turns)
        {
            for (var site = 0; site < turn.Permutation.SupportEnd; site++)
            {
                isMoved[site] |= turn.Permutation[site] != site;
            }
        }

        _bodySites = [.. Enumerable.Range(0, _bodies.Count).Select(body => Array.FindAll(_bodies.Sites(body), site => isMoved[site])).Where(sites => sites.Length > 0)];
        _groups = _bodySites.Length <= options.MaxMoved
            ? [[]]
            : [.. Enumerable.Range(0, options.MaxMoved + 1).Select(group => _bodySites.Where((_, body) => body % (options.MaxMoved + 1) == group).SelectMany(sites => sites).ToArray())];
        var shapes = new ShapeStore(shape.Mechanism.Board.Words);
        _out = new LoopWays<T>(shape, options.Metric, shapes, isBack: false);
        _back = new LoopWays<T>(shape, options.Metric, shapes, isBack: true);
    }

    public LoopCatalogue Run()
    {
        int? complete = -1;
        for (var length = 0; complete is not null; length++)
        {
            if (length > _options.MaxLength || !TryLength(length))
            {
                break;
            }

            complete = _out.IsExhausted && length >= _out.LevelCount - 1 ? null : length;
        }

        // Of the length at which a budget ended the search some may be there; they are as short as they say, but others are missing.
        return new LoopCatalogue(_shape, _options, [.. _loops.OrderBy(loop => loop.Length).ThenBy(loop => loop.Effect.MovedCount).ThenBy(loop => loop.Effect.Signature, StringComparer.Ordinal).ThenBy(loop => loop.Path.ToString(), StringComparer.Ordinal)], complete);
    }

    // The prefix of a shortest loop is a cheapest way, and so is the rest. The longest prefix of at most half the length costs more than that less the weight of a step.
    private bool TryLength(int length)
    {
        var half = (length + 1) / 2;
        var least = Math.Max(0, half - _out.GreatestWeight + 1);
        if (!TryGrow(_out, half) || !TryGrow(_back, length - least))
        {
            return false;
        }

        for (var cost = half; cost >= least; cost--)
        {
            foreach (var group in _groups)
            {
                if (!TryMatch(_out.Level(cost), _back.Level(length - cost), group))
                {
                    return false;
                }
            }
        }

        return true;
    }

    private bool TryGrow(LoopWays<T> ways, int cost)
    {
        while (ways.LevelCount <= cost && !ways.IsExhausted)
        {
            if (!ways.TryGrow(_options.MaxStates, _cancellation))
            {
                return false;
            }
        }

        return true;
    }

    private bool TryMatch(List<int> there, List<int> back, int[] group)
    {
        var byGroup = new Dictionary<ulong, List<int>>(back.Count);
        foreach (var way in back)
        {
            var key = Key(_back, way, group);
            if (!byGroup.TryGetValue(key, out var list))
            {
                byGroup.Add(key, list = []);
            }

            list.Add(way);
        }

        foreach (var way in there)
        {
            _cancellation.ThrowIfCancellationRequested();
            if (!byGroup.TryGetValue(Key(_out, way, group), out var candidates))
            {
                continue;
            }

            foreach (var candidate in candidates)
            {
                if (++_pairs > _options.MaxPairs)
                {
                    return false;
                }

                if (_out.Shape(way) == _back.Shape(candidate) && MovesFew(_out[way], _back[candidate]) && !TryKeep(way, candidate))
                {
                    return false;
                }
            }
        }

        return true;
    }

    private static ulong Key(LoopWays<T> ways, int way, int[] group)
    {
        var row = ways[way];
        var hash = (ulong)ways.Shape(way);
        foreach (var site in group)
        {
            hash = (hash ^ ulong.CreateTruncating(row[site])) * 0x9E37_79B9_7F4A_7C15;
            hash ^= hash >> 29;
        }

        return hash;
    }

    private bool MovesFew(ReadOnlySpan<T> there, ReadOnlySpan<T> back)
    {
        var moved = 0;
        foreach (var sites in _bodySites)
        {
            foreach (var site in sites)
            {
                if (there[site] != back[site])
                {
                    if (++moved > _options.MaxMoved)
                    {
                        return false;
                    }

                    break;
                }
            }
        }

        return moved > 0;
    }

    private bool TryKeep(int way, int back)
    {
        var permutation = Permutation.FromTrustedImages<T>(_out[way][.._shape.Mechanism.SiteCount]) * Permutation.FromTrustedImages<T>(_back[back][.._shape.Mechanism.SiteCount]).Inverse();
        if (!_seen.Add(permutation))
        {
            return true;
        }

        if (_loops.Count == _options.MaxLoops)
        {
            return false;
        }

        var path = TurnPath.Follow(_shape, [.. _out.Steps(way), .. _back.Steps(back)]);
        if (!path.IsLoop || path.Permutation != permutation)
        {
            throw new InvalidOperationException($"The word {path} does not do what was found.");
        }

        _loops.Add(UsefulLoop.Of(path, _options.Metric, _bodies));
        return true;
    }
}
