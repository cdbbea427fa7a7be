using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// Makes certificates of order: a stabilizer chain of the group, built once more from random products of the generators whose words are kept, until its order is the one that is known.
/// </summary>
internal sealed class CertificateBuilder
{
    private const int Slots = 10;
    private const ulong Seed = 0xCE27;
    private readonly PermutationGroup _group;
    private readonly List<Node> _nodes = [];
    private readonly List<Node> _strong = [];
    private readonly List<Level> _levels = [];
    private readonly SeededRandom _random = new(Seed);

    public CertificateBuilder(PermutationGroup group)
    {
        _group = group;
        foreach (var generator in group.Generators)
        {
            _nodes.Add(new Node(generator, null, null, false));
        }

        foreach (var point in group.Chain.Base)
        {
            _levels.Add(new Level(point));
        }
    }

    public OrderCertificate Build(CancellationToken cancellation)
    {
        foreach (var generator in _nodes.ToList())
        {
            Sift(generator);
        }

        // Product replacement: slots filled with the generators, one multiplied by another or its inverse each time.
        var slots = Enumerable.Range(0, _nodes.Count == 0 ? 0 : Math.Max(Slots, _nodes.Count)).Select(i => _nodes[i % _nodes.Count]).ToArray();
        while (_levels.Aggregate(BigInteger.One, (product, level) => product * level.Orbit.Count) != _group.Order)
        {
            cancellation.ThrowIfCancellationRequested();
            var (i, j) = (_random.NextInt32(slots.Length), _random.NextInt32(slots.Length));
            if (i != j)
            {
                slots[i] = Multiply(slots[i], slots[j], invertRight: _random.NextInt32(2) == 0);
                Sift(slots[i]);
            }
        }

        return ToCertificate();
    }

    private static Node Multiply(Node left, Node right, bool invertRight) =>
        new(left.Value * (invertRight ? right.Value.Inverse() : right.Value), left, right, invertRight);

    // Sifts an element; what is left of it becomes a strong generator of the level where it fails and of those above.
    private void Sift(Node node)
    {
        for (var i = 0; i < _levels.Count; i++)
        {
            if (node.Value.IsIdentity)
            {
                return;
            }

            var level = _levels[i];
            var image = node.Value[level.Point];
            if (!level.Orbit.TryGetValue(image, out var representative))
            {
                _strong.Add(node);
                for (var above = 0; above <= i; above++)
                {
                    _levels[above].Rebuild(_strong.Where(strong => _levels.Take(above).All(earlier => strong.Value[earlier.Point] == earlier.Point)));
                }

                return;
            }

            if (representative is not null)
            {
                node = Multiply(node, representative, invertRight: true);
            }
        }
    }

    private OrderCertificate ToCertificate()
    {
        // Number the generators, then the products that strong generators are made of, each after its factors and equal ones once.
        var numberOf = new Dictionary<Node, int>(ReferenceEqualityComparer.Instance);
        var numberOfValue = new Dictionary<Permutation, int>();
        var elements = ImmutableArray.CreateBuilder<(int, int)>();
        var count = 0;
        foreach (var generator in _nodes)
        {
            Number(generator);
        }

        var todo = new Stack<Node>();
        foreach (var strong in _strong)
        {
            todo.Push(strong);
            while (todo.TryPeek(out var node))
            {
                if (numberOf.ContainsKey(node) || numberOfValue.TryGetValue(node.Value, out var known) && numberOf.TryAdd(node, known))
                {
                    todo.Pop();
                }
                else if (!numberOf.TryGetValue(node.Left!, out var left))
                {
                    todo.Push(node.Left!);
                }
                else if (!numberOf.TryGetValue(node.Right!, out var right))
                {
                    todo.Push(node.Right!);
                }
                else
                {
                    elements.Add((left, node.InvertRight ? numberOfValue[node.Right!.Value.Inverse()] : right));
                    Number(node);
                    todo.Pop();
                }
            }
        }

        return new OrderCertificate
        {
            Degree = _group.Degree,
            Generators = _group.Generators,
            Elements = elements.DrainToImmutable(),
            StrongGenerators = [.. _strong.Select(node => (numberOf[node], node.Value))],
            Levels = [.. _levels.Select((level, i) => level.ToCertificate(_strong, _levels.Take(i)))],
            Order = _group.Order,
        };

        // A value that has a number already, or whose inverse has, keeps it.
        void Number(Node node)
        {
            count++;
            numberOfValue.TryAdd(node.Value, count);
            numberOfValue.TryAdd(node.Value.Inverse(), -count);
            numberOf.TryAdd(node, numberOfValue[node.Value]);
        }
    }

    /// <summary>A group element with the product it was made by; a generator has no factors.</summary>
    private sealed record Node(Permutation Value, Node? Left, Node? Right, bool InvertRight);

    private sealed class Level(int point)
    {
        public int Point { get; } = point;

        /// <summary>For each point of the orbit a representative; null for the base point.</summary>
        public Dictionary<int, Node?> Orbit { get; private set; } = new() { [point] = null };

        public void Rebuild(IEnumerable<Node> generators)
        {
            var list = generators.ToList();
            Orbit = new() { [Point] = null };
            var points = new List<int> { Point };
            for (var i = 0; i < points.Count; i++)
            {
                foreach (var generator in list)
                {
                    var image = generator.Value[points[i]];
                    if (!Orbit.ContainsKey(image))
                    {
                        Orbit.Add(image, Orbit[points[i]] is { } before ? Multiply(before, generator, invertRight: false) : generator);
                        points.Add(image);
                    }
                }
            }
        }

        public CertificateLevel ToCertificate(List<Node> strong, IEnumerable<Level> earlier)
        {
            var before = earlier.Select(level => level.Point).ToList();
            var fixing = Enumerable.Range(0, strong.Count).Where(s => before.TrueForAll(point => strong[s].Value[point] == point)).ToList();
            var orbit = ImmutableArray.CreateBuilder<(int Point, int From, int Generator)>();
            orbit.Add((Point, -1, -1));
            var seen = new HashSet<int> { Point };
            for (var i = 0; i < orbit.Count; i++)
            {
                foreach (var s in fixing)
                {
                    var image = strong[s].Value[orbit[i].Point];
                    if (seen.Add(image))
                    {
                        orbit.Add((image, i, s));
                    }
                }
            }

            return new CertificateLevel(Point, orbit.DrainToImmutable());
        }
    }
}
