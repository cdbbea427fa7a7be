using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>An orbit divided into the parts of a block system: what the group does to the parts, and within them. Points are the places in the orbit.</summary>
internal sealed class OrbitParts
{
    private readonly int[][] _generators;
    private readonly int _partSize;

    // For each part, where a product of generators that takes the first part there takes the points of the first part; and for each point its part and its place in that list.
    private readonly int[][] _frames;
    private readonly int[] _partOf;
    private readonly int[] _placeOf;
    private readonly bool _hasTwist;
    private readonly PermutationGroup? _local;

    /// <param name="generators">The image lists of the generators.</param>
    /// <param name="partOf">For each point the number of its part, in the order of their first points.</param>
    /// <param name="parts">The number of parts.</param>
    public OrbitParts(int[][] generators, int[] partOf, int parts)
    {
        _generators = generators;
        _partOf = partOf;
        _partSize = partOf.Length / parts;
        _placeOf = new int[partOf.Length];
        _frames = new int[parts][];
        FindFrames();
        var order = BigInteger.One;
        if (_partSize > 1)
        {
            // By Schreier's lemma the local actions of the generators make the action of the first part's stabilizer on it.
            var locals = new HashSet<Permutation>();
            for (var generator = 0; generator < generators.Length; generator++)
            {
                for (var part = 0; part < parts; part++)
                {
                    locals.Add(Local(generator, part));
                }
            }

            _local = PermutationGroup.Generate(locals, _partSize);
            order = _local.Order;
            _hasTwist = _local.IsAbelian;
        }

        WreathOrder = BigInteger.Pow(order, parts);
        for (var i = 2; i <= parts; i++)
        {
            WreathOrder *= i;
        }

        // With one part there is no sign.
        TargetOrder = (parts > 1 ? 2 : 1) * (_hasTwist ? order : 1);
    }

    /// <summary>|A|^k k!</summary>
    public BigInteger WreathOrder { get; }

    /// <summary>The order of what signs and twist sums could be.</summary>
    public BigInteger TargetOrder { get; }

    /// <summary>The action of a part's stabilizer on the part, on the places of the first part; null where parts are single points.</summary>
    public PermutationGroup? PartAction => _local;

    /// <summary>For each part its points, in the order to which products of generators bring those of the first part.</summary>
    public ReadOnlySpan<int[]> Frames => _frames;

    /// <summary>Parts of one point: all that is known of an orbit without block systems.</summary>
    public static OrbitParts Points(int[][] generators, int size)
    {
        var partOf = new int[size];
        for (var point = 0; point < size; point++)
        {
            partOf[point] = point;
        }

        return new OrbitParts(generators, partOf, size);
    }

    /// <summary>Appends what a generator does to the target: the sign of the exchange of parts, on two points, and the product of the local actions, on the points of a part.</summary>
    public void AppendTarget(int generator, List<int> images)
    {
        var flip = IsOddExchange(generator) ? 1 : 0;
        images.Add(images.Count + flip);
        images.Add(images.Count - flip);
        if (!_hasTwist)
        {
            return;
        }

        var sum = TwistSum(generator);
        var first = images.Count;
        for (var place = 0; place < _partSize; place++)
        {
            images.Add(first + sum[place]);
        }
    }

    /// <summary>The product of a generator's local actions, which commute.</summary>
    public Permutation TwistSum(int generator)
    {
        var sum = Permutation.Identity;
        for (var part = 0; part < _frames.Length; part++)
        {
            sum *= Local(generator, part);
        }

        return sum;
    }

    /// <summary>True when a generator exchanges the parts by an odd permutation.</summary>
    public bool IsOddExchange(int generator)
    {
        return Lanes.IsOdd(Array.ConvertAll(_frames, frame => _partOf[_generators[generator][frame[0]]]));
    }

    // From the first part by its frame to a part, by the generator to the next part, and back by that one's frame.
    private Permutation Local(int generator, int part)
    {
        var images = new int[_partSize];
        for (var place = 0; place < images.Length; place++)
        {
            images[place] = _placeOf[_generators[generator][_frames[part][place]]];
        }

        return Permutation.FromTrustedImages<int>(images);
    }

    private void FindFrames()
    {
        var first = new List<int>(_partSize);
        for (var point = 0; point < _partOf.Length; point++)
        {
            if (_partOf[point] == 0)
            {
                _placeOf[point] = first.Count;
                first.Add(point);
            }
        }

        _frames[0] = [.. first];
        var reached = new List<int>(_frames.Length) { 0 };
        for (var i = 0; i < reached.Count; i++)
        {
            foreach (var generator in _generators)
            {
                var from = _frames[reached[i]];
                var part = _partOf[generator[from[0]]];
                if (_frames[part] is not null)
                {
                    continue;
                }

                var image = new int[from.Length];
                for (var place = 0; place < image.Length; place++)
                {
                    image[place] = generator[from[place]];
                    _placeOf[image[place]] = place;
                }

                _frames[part] = image;
                reached.Add(part);
            }
        }
    }
}
