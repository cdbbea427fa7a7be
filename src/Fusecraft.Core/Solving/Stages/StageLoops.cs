using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>Short loops at the base shape that leave some labels where they are: two short words that take those labels to the same places, the first one followed by the other one undone.</summary>
internal sealed class StageLoops
{
    /// <summary>The number of words that loops are made from.</summary>
    private const int BallSize = 300_000;

    /// <summary>At least so many loops are wanted, and no more than so many are taken of one cost beyond those that lead to something new.</summary>
    private const int FewLoops = 200;
    private const int MoreLoops = 400;

    /// <summary>So many of one cost are tried while something is missing.</summary>
    private const int TriedLoops = 20_000;

    /// <summary>Commutators are made from so many of the loops where the loops themselves do not suffice.</summary>
    private const int Commuted = 60;

    /// <summary>So many of the loops are conjugated by all others.</summary>
    private const int Conjugated = 20;

    private readonly Mechanism _mechanism;
    private readonly ShortBall _ball;
    private readonly CancellationToken _cancellation;

    public StageLoops(Mechanism mechanism, StageFrame whole, CancellationToken cancellation)
    {
        _mechanism = mechanism;
        _ball = new ShortBall(whole, 0, BallSize);
        _cancellation = cancellation;
    }

    /// <summary>Loops that generate a stabilizer, cheapest first; null where the words known do not suffice.</summary>
    /// <param name="labels">The labels that stay.</param>
    /// <param name="stabilizer">All loops that leave them.</param>
    /// <param name="signs">Labels beyond the sites are signs; the loops are given with them.</param>
    public List<StageMove>? Loops(IReadOnlyList<int> labels, PermutationGroup stabilizer, OrbitSigns signs)
    {
        var loops = new List<StageMove>();
        var seen = new HashSet<Permutation> { Permutation.Identity };
        var buckets = Buckets([.. labels.Where(label => label < _mechanism.SiteCount)]);
        var made = new Made(stabilizer);
        var greatest = 2 * _ball.Cost(_ball.Count - 1);
        for (var cost = 1; cost <= greatest && !(made.IsAll && loops.Count >= FewLoops); cost++)
        {
            var found = new List<StageMove>();
            foreach (var bucket in buckets)
            {
                _cancellation.ThrowIfCancellationRequested();
                Take(bucket, cost, labels, signs, found, seen, found.Count + 2 + ((made.IsAll ? MoreLoops : TriedLoops) / buckets.Count));
            }

            // Of many alike those that lead to something new, and the ones that move the fewest sites.
            var ordered = found.OrderBy(loop => loop.Permutation.Support.Length).ToList();
            loops.AddRange(ordered.Where((loop, i) => made.Add(loop.Permutation) || (i < MoreLoops && loops.Count < FewLoops)));
        }

        if (!made.IsAll)
        {
            loops.AddRange(Commutators(loops, seen).Where(loop => made.Add(loop.Permutation)).ToList());
            loops.AddRange(Conjugates(loops, seen).Where(loop => made.Add(loop.Permutation)).ToList());
        }

        return made.IsAll ? loops : null;
    }

    // Words that take the labels to the same places at the same shape, cheapest first.
    private List<List<int>> Buckets(IReadOnlyList<int> labels)
    {
        var buckets = new Dictionary<ulong, List<int>>();
        for (var entry = 0; entry < _ball.Count; entry++)
        {
            var hash = (ulong)_ball.Shape(entry) + 1;
            foreach (var label in labels)
            {
                hash = (hash ^ (ulong)_ball[entry][label]) * 0x9E3779B97F4A7C15;
                hash ^= hash >> 29;
            }

            if (!buckets.TryGetValue(hash, out var bucket))
            {
                buckets.Add(hash, bucket = []);
            }

            bucket.Add(entry);
        }

        return [.. buckets.Values.Where(bucket => bucket.Count > 1)];
    }

    private void Take(List<int> bucket, int cost, IReadOnlyList<int> labels, OrbitSigns signs, List<StageMove> loops, HashSet<Permutation> seen, int most)
    {
        foreach (var first in bucket)
        {
            if (_ball.Cost(first) > cost)
            {
                return;
            }

            foreach (var second in bucket)
            {
                var both = _ball.Cost(first) + _ball.Cost(second);
                if (both > cost || loops.Count >= most)
                {
                    break;
                }

                if (both < cost || (_ball.LastClass(first) >= 0 && _ball.LastClass(first) == _ball.LastClass(second)) || _ball.Shape(first) != _ball.Shape(second))
                {
                    continue;
                }

                var loop = signs.Signed(_ball[first] * _ball[second].Inverse());
                if (labels.All(label => loop[label] == label) && seen.Add(loop))
                {
                    loops.Add(new StageMove([.. _ball.Word(first), .. Undone(_ball.Word(second))], loop, cost, -1));
                }
            }
        }
    }

    // The fewer sites one moves, the further it gets.
    private IEnumerable<StageMove> Commutators(List<StageMove> loops, HashSet<Permutation> seen)
    {
        var commutators = new List<StageMove>();
        List<StageMove> small = [.. loops.OrderBy(loop => loop.Permutation.Support.Length).Take(Commuted)];
        foreach (var one in small)
        {
            _cancellation.ThrowIfCancellationRequested();
            foreach (var other in small)
            {
                var commutator = Permutation.Commutator(one.Permutation, other.Permutation);
                if (seen.Add(commutator))
                {
                    commutators.Add(new StageMove([.. one.Steps, .. other.Steps, .. Undone(one.Steps), .. Undone(other.Steps)], commutator, 2 * (one.Cost + other.Cost), -1));
                }
            }
        }

        return commutators.OrderBy(move => move.Permutation.Support.Length).ThenBy(move => move.Cost);
    }

    // The same somewhere else: of the loops that move the fewest sites.
    private IEnumerable<StageMove> Conjugates(List<StageMove> loops, HashSet<Permutation> seen)
    {
        List<StageMove> small = [.. loops.OrderBy(loop => loop.Permutation.Support.Length).Take(Conjugated)];
        foreach (var by in loops.ToList())
        {
            _cancellation.ThrowIfCancellationRequested();
            foreach (var loop in small)
            {
                var conjugate = loop.Permutation.ConjugateBy(by.Permutation);
                if (seen.Add(conjugate))
                {
                    yield return new StageMove([.. Undone(by.Steps), .. loop.Steps, .. by.Steps], conjugate, loop.Cost + (2 * by.Cost), -1);
                }
            }
        }
    }

    private IEnumerable<int> Undone(int[] steps) => steps.Reverse().Select(step => _mechanism.Steps[step].Opposite!.Index);

    /// <summary>What the loops so far generate.</summary>
    private sealed class Made(PermutationGroup wanted)
    {
        private readonly List<Permutation> _generators = [];
        private PermutationGroup _group = PermutationGroup.Generate([], wanted.Degree);

        public bool IsAll => _group.Order == wanted.Order;

        /// <summary>Adds a loop; true where it was not generated before.</summary>
        public bool Add(Permutation loop)
        {
            if (IsAll || _group.Contains(loop))
            {
                return false;
            }

            _generators.Add(loop);
            _group = PermutationGroup.Generate(_generators, wanted.Degree);
            return true;
        }
    }
}
