using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Decides, where it can, whether two permutation groups are one up to a relabelling of points: invariants that must agree first, then groups that are all they can be on each orbit, then, for small
/// ones, images of the generators by trial.
/// </summary>
internal sealed class GroupRelabelling
{
    private const int LargestListed = 5_000;
    private readonly PermutationGroup _first;
    private readonly PermutationGroup _second;
    private readonly CancellationToken _cancellation;
    private long _triesLeft;

    public GroupRelabelling(PermutationGroup first, PermutationGroup second, long maxTries, CancellationToken cancellation)
    {
        _first = first;
        _second = second;
        _triesLeft = maxTries / 100;
        _cancellation = cancellation;
    }

    /// <param name="guess">A relabelling that may do, perhaps; it is checked.</param>
    public VertexGroupComparison Decide(Permutation? guess)
    {
        if (_first.Order != _second.Order)
        {
            return Unlike($"their orders are {_first.Order} and {_second.Order}");
        }

        if (guess is { } known && TakesFirstToSecond(known))
        {
            return new VertexGroupComparison(true, known, "the symmetry and the path between the homes take one to the other");
        }

        var (orbits, otherOrbits) = (OrbitsOf(_first), OrbitsOf(_second));
        if (!Lengths(orbits).SequenceEqual(Lengths(otherOrbits)))
        {
            return Unlike("their orbits have other lengths");
        }

        if (!orbits.Select(orbit => (orbit.Orbit.Length, orbit.Image.Order)).Order().SequenceEqual(otherOrbits.Select(orbit => (orbit.Orbit.Length, orbit.Image.Order)).Order()))
        {
            return Unlike("they act on their orbits with other orders");
        }

        if (orbits.Select(orbit => orbit.Image.Order).Aggregate(BigInteger.One, BigInteger.Multiply) == _first.Order
            && orbits.Concat(otherOrbits).All(orbit => orbit.IsGiant || orbit.Orbit.Length <= 2))
        {
            return new VertexGroupComparison(true, AlongOrbits(orbits, otherOrbits), "each is the product of symmetric or alternating groups on its orbits, of the same degrees");
        }

        if (_first.Order > LargestListed)
        {
            return new VertexGroupComparison(null, null, "they have the same order and orbit lengths and are too large to be tried through");
        }

        var types = _first.CycleTypeCounts(_cancellation);
        var otherTypes = _second.CycleTypeCounts(_cancellation);
        return types.Count == otherTypes.Count && types.All(pair => otherTypes.GetValueOrDefault(pair.Key) == pair.Value)
            ? ByTrial()
            : Unlike("they have other numbers of members of some cycle type");
    }

    private static VertexGroupComparison Unlike(string reason) => new(false, null, reason);

    private static List<OrbitAction> OrbitsOf(PermutationGroup group) => [.. group.MovedOrbits.Select(orbit => new OrbitAction(group, orbit))];

    private static IEnumerable<int> Lengths(List<OrbitAction> orbits) => orbits.Select(orbit => orbit.Orbit.Length).Order();

    private bool TakesFirstToSecond(Permutation relabelling)
    {
        foreach (var generator in _first.Generators)
        {
            if (!_second.Contains(generator.ConjugateBy(relabelling)))
            {
                return false;
            }
        }

        return true;
    }

    private Permutation? AlongOrbits(List<OrbitAction> orbits, List<OrbitAction> otherOrbits)
    {
        var pairs = orbits.OrderBy(Sorting).Zip(otherOrbits.OrderBy(Sorting)).SelectMany(pair => pair.First.Orbit.Zip(pair.Second.Orbit));
        return Completed(pairs);

        static (int, BigInteger) Sorting(OrbitAction orbit) => (orbit.Orbit.Length, orbit.Image.Order);
    }

    // A permutation that takes the first of each pair to the second; the other points in any order.
    private Permutation Completed(IEnumerable<(int From, int To)> pairs)
    {
        var images = new int[Math.Max(_first.Degree, _second.Degree)];
        Array.Fill(images, -1);
        foreach (var (from, to) in pairs)
        {
            images[from] = to;
        }

        var free = new Queue<int>(Enumerable.Range(0, images.Length).Except(images));
        return Permutation.FromImages([.. images.Select(image => image >= 0 ? image : free.Dequeue())]);
    }

    private VertexGroupComparison ByTrial()
    {
        var generators = Thinned();
        var members = _second.Elements().ToList();
        var images = new List<Permutation>();
        var relabelling = generators.Count == 0 ? Permutation.Identity : Try(generators, members, images);
        return relabelling is { } found
            ? new VertexGroupComparison(true, found, "a relabelling was found by trial")
            : _triesLeft < 0
                ? new VertexGroupComparison(null, null, "the trial of relabellings was given up")
                : Unlike("no images of the generators do the same up to relabelling; all were tried");
    }

    private List<Permutation> Thinned()
    {
        var kept = new List<Permutation>();
        var group = PermutationGroup.Generate(kept, _first.Degree);

        // Members of large order generate much together.
        foreach (var member in _first.Elements().OrderByDescending(member => member.Order).ThenByDescending(member => member.CycleType.MovedPoints))
        {
            if (group.Order == _first.Order)
            {
                break;
            }

            if (!group.Contains(member))
            {
                kept.Add(member);
                group = PermutationGroup.Generate(kept, _first.Degree);
            }
        }

        return kept;
    }

    private Permutation? Try(List<Permutation> generators, List<Permutation> members, List<Permutation> images)
    {
        var depth = images.Count;
        var pattern = TuplePattern.Of([.. generators.Take(depth + 1)], _first);
        foreach (var member in depth == 0 ? ClassRepresentatives(members, generators[0].CycleType) : members.Where(member => member.CycleType == generators[depth].CycleType))
        {
            _cancellation.ThrowIfCancellationRequested();
            if (--_triesLeft < 0)
            {
                return null;
            }

            images.Add(member);
            if (TuplePattern.Of([.. images], _second) is var other && other.SameAs(pattern))
            {
                var found = depth + 1 == generators.Count ? Completed(pattern.Points.Zip(other.Points)) : Try(generators, members, images);
                if (found is not null || _triesLeft < 0)
                {
                    return found;
                }
            }

            images.RemoveAt(depth);
        }

        return null;
    }

    // One member of each conjugacy class; what does for it does for all of them.
    private IEnumerable<Permutation> ClassRepresentatives(List<Permutation> members, CycleType type)
    {
        var seen = new HashSet<Permutation>();
        foreach (var member in members.Where(member => member.CycleType == type))
        {
            if (!seen.Add(member))
            {
                continue;
            }

            var queue = new Queue<Permutation>([member]);
            while (queue.TryDequeue(out var next))
            {
                foreach (var generator in _second.Generators)
                {
                    var conjugate = next.ConjugateBy(generator);
                    if (seen.Add(conjugate))
                    {
                        queue.Enqueue(conjugate);
                    }
                }
            }

            yield return member;
        }
    }
}
