using System.Collections.Immutable;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Support;

/// <summary>The symmetries of a small custom mechanism by trying every permutation of its sites and every pairing of turns, guards compared on all sets of marks. Shares no code with the library's search.</summary>
internal sealed class BruteSymmetries
{
    private readonly NaiveMechanism _mechanism;
    private readonly ImmutableArray<string> _sites;
    private readonly List<string> _tokens;
    private readonly Dictionary<NaiveStep, bool[]> _truth = [];

    public BruteSymmetries(MechanismDefinition definition)
    {
        _mechanism = new NaiveMechanism(definition);
        _sites = definition.Sites;
        _tokens = [.. definition.Marks.SelectMany(mark => _sites.Select(site => $"{mark.Name}@{site}"))];
        foreach (var step in _mechanism.Steps)
        {
            // Without blocks nothing is torn, so what bars the step is its guard alone.
            _truth[step] = [.. Enumerable.Range(0, 1 << _tokens.Count).Select(set => step.IsFree(new NaiveShape([.. Tokens(set)], [])))];
        }
    }

    /// <summary>True when no turn carries the site's piece, no mark that may be there makes a difference to any step, and it holds nothing at home.</summary>
    public bool IsIdle(int site) => !_mechanism.PieceOf(_sites[site]).Any(name =>
        _mechanism.Turns.Exists(turn => turn.Carried.Contains(name)) || _mechanism.Home.Blocks.Exists(block => block.Contains(name)) || _mechanism.Home.Marks.Any(mark => mark.EndsWith($"@{name}", StringComparison.Ordinal))
        || Enumerable.Range(0, _tokens.Count).Any(i => _tokens[i].EndsWith($"@{name}", StringComparison.Ordinal) && _truth.Values.Any(truth => Enumerable.Range(0, truth.Length).Any(set => truth[set] != truth[set ^ (1 << i)]))));

    public HashSet<Permutation> All() => [.. Orders(_sites.Length).Where(IsSymmetry).Select(images => Permutation.FromImages(images))];

    private static IEnumerable<int[]> Orders(int count) => count == 0
        ? [[]]
        : Orders(count - 1).SelectMany(order => Enumerable.Range(0, count).Select(at => (int[])[.. order[..at], count - 1, .. order[at..]]));

    private IEnumerable<string> Tokens(int set) => _tokens.Where((_, i) => (set >> i & 1) != 0);

    private bool IsSymmetry(int[] images)
    {
        var image = _sites.Select((site, i) => (site, i)).ToDictionary(pair => pair.site, pair => _sites[images[pair.i]]);
        var pieces = _sites.Select(_mechanism.PieceOf).ToList();
        if (pieces.Exists(piece => !_mechanism.PieceOf(image[piece.First()]).SetEquals(piece.Select(site => image[site]))))
        {
            return false;
        }

        var tokenImages = _tokens.Select(token => token.Split('@')).Select(parts => _tokens.IndexOf($"{parts[0]}@{image[parts[1]]}")).ToArray();
        var sets = Enumerable.Range(0, 1 << _tokens.Count).Select(set => tokenImages.Select((target, i) => (set >> i & 1) << target).Sum()).ToArray();
        return Pairs(_mechanism.Turns.ToImmutableList(), _mechanism.Turns.ToImmutableList());

        bool Pairs(ImmutableList<NaiveTurn> left, ImmutableList<NaiveTurn> free) =>
            left.IsEmpty || free.Any(target => Becomes(left[0], target) && Pairs(left.RemoveAt(0), free.Remove(target)));

        bool Becomes(NaiveTurn turn, NaiveTurn target)
        {
            var from = _mechanism.Steps.FindAll(step => step.Turn == turn);
            var to = _mechanism.Steps.FindAll(step => step.Turn == target);
            return from.Count == to.Count && turn.Carried.Select(site => image[site]).ToHashSet().SetEquals(target.Carried)
                && (Matches(from, to) || Matches(from, [.. Enumerable.Reverse(to)]));
        }

        bool Matches(List<NaiveStep> from, List<NaiveStep> to) => from.Zip(to).All(pair =>
            _sites.All(site => image[pair.First.Image(site)] == pair.Second.Image(image[site]))
            && Enumerable.Range(0, sets.Length).All(set => _truth[pair.First][set] == _truth[pair.Second][sets[set]]));
    }
}
