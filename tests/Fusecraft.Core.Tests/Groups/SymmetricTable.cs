using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>
/// The symmetric group of a small degree as a product table over plain image lists, and its subgroups as sets of row numbers. An oracle: nothing here uses the library but the permutations and groups
/// handed out.
/// </summary>
internal sealed class SymmetricTable
{
    private readonly int[][] _images;
    private readonly Dictionary<int, int> _indexOf = [];
    private readonly int[,] _product;
    private readonly UInt128[] _keys;
    private readonly Lazy<(List<(int[] Members, int[] Generators)> Classes, int SubgroupCount)> _classes;

    public SymmetricTable(int degree)
    {
        Degree = degree;
        _images = [.. Lists([])];
        for (var i = 0; i < _images.Length; i++)
        {
            _indexOf.Add(Code(_images[i]), i);
        }

        _product = new int[Count, Count];
        Inverse = new int[Count];
        for (var a = 0; a < Count; a++)
        {
            for (var b = 0; b < Count; b++)
            {
                var code = 0;
                foreach (var point in _images[a])
                {
                    code = (code * 8) + _images[b][point];
                }

                _product[a, b] = _indexOf[code];
                if (_product[a, b] == 0)
                {
                    Inverse[a] = b;
                }
            }
        }

        Permutations = [.. _images.Select(images => Permutation.FromImages(images))];
        var random = new SeededRandom(1);
        _keys = [.. _images.Select(_ => new UInt128(random.NextUInt64(), random.NextUInt64()))];
        _classes = new(FindClasses);
    }

    public int Degree { get; }

    /// <summary>How many permutations there are; number 0 is the identity, and the order is lexicographic.</summary>
    public int Count => _images.Length;

    public int[] Inverse { get; }

    public Permutation[] Permutations { get; }

    public int Image(int permutation, int point) => _images[permutation][point];

    /// <summary>First one, then the other.</summary>
    public int Product(int first, int second) => _product[first, second];

    /// <summary>b⁻¹ a b.</summary>
    public int Conjugate(int a, int b) => Product(Product(Inverse[b], a), b);

    public int Commutator(int a, int b) => Product(Product(Inverse[a], Inverse[b]), Product(a, b));

    /// <summary>Cycle lengths, fixed points included, in descending order.</summary>
    public string CycleLengths(int permutation)
    {
        var lengths = new List<int>();
        var seen = new bool[Degree];
        for (var start = 0; start < Degree; start++)
        {
            var length = 0;
            for (var point = start; !seen[point]; point = Image(permutation, point))
            {
                seen[point] = true;
                length++;
            }

            if (length > 0)
            {
                lengths.Add(length);
            }
        }

        return string.Join(' ', lengths.OrderDescending());
    }

    /// <summary>How often a permutation has to be repeated to give the identity.</summary>
    public int OrderOf(int permutation)
    {
        var order = 1;
        for (var power = permutation; power != 0; power = Product(power, permutation))
        {
            order++;
        }

        return order;
    }

    /// <summary>All products of some permutations, ascending.</summary>
    public int[] Closure(params IEnumerable<int> generators)
    {
        int[] list = [.. generators.Distinct()];
        var met = new bool[Count];
        var members = new List<int> { 0 };
        met[0] = true;
        for (var i = 0; i < members.Count; i++)
        {
            foreach (var generator in list)
            {
                var next = Product(members[i], generator);
                if (!met[next])
                {
                    met[next] = true;
                    members.Add(next);
                }
            }
        }

        members.Sort();
        return [.. members];
    }

    /// <summary>All subgroups, one of each class of subgroups conjugate in the symmetric group.</summary>
    public IReadOnlyList<(int[] Members, int[] Generators)> SubgroupClasses => _classes.Value.Classes;

    /// <summary>How many subgroups there are, conjugate ones counted apart.</summary>
    public int SubgroupCount => _classes.Value.SubgroupCount;

    /// <summary>All subgroups, each once.</summary>
    public List<(int[] Members, int[] Generators)> Subgroups()
    {
        var met = new HashSet<UInt128>();
        var all = new List<(int[] Members, int[] Generators)>();
        foreach (var (members, generators) in SubgroupClasses)
        {
            for (var by = 0; by < Count; by++)
            {
                int[] conjugates = [.. members.Select(member => Conjugate(member, by)).Order()];
                if (met.Add(Key(conjugates)))
                {
                    all.Add((conjugates, [.. generators.Select(generator => Conjugate(generator, by))]));
                }
            }
        }

        return all;
    }

    public PermutationGroup ToGroup(int[] generators) => PermutationGroup.Generate(generators.Select(generator => Permutations[generator]), Degree);

    /// <summary>The row number of a permutation of these points.</summary>
    public int IndexOf(Permutation permutation) => _indexOf[Code([.. Enumerable.Range(0, Degree).Select(point => permutation[point])])];

    /// <summary>The members of a group, by closure of its generators.</summary>
    public int[] MembersOf(PermutationGroup group) => Closure(group.Generators.Select(IndexOf));

    // Those known, with one more generator, until nothing new comes. Members of one coset all add the same.
    private (List<(int[] Members, int[] Generators)> Classes, int SubgroupCount) FindClasses()
    {
        var met = new HashSet<UInt128> { Key([0]) };
        var classes = new List<(int[] Members, int[] Generators)> { ([0], []) };
        for (var i = 0; i < classes.Count; i++)
        {
            var tried = new bool[Count];
            for (var added = 0; added < Count; added++)
            {
                if (tried[added])
                {
                    continue;
                }

                foreach (var member in classes[i].Members)
                {
                    tried[Product(member, added)] = true;
                }

                int[] generators = [.. classes[i].Generators, added];
                var members = Closure(generators);
                if (!met.Contains(Key(members)))
                {
                    met.UnionWith(Enumerable.Range(0, Count).Select(by => Key(members.Select(member => Conjugate(member, by)))));
                    classes.Add((members, generators));
                }
            }
        }

        return (classes, met.Count);
    }

    private static int Code(int[] images) => images.Aggregate(0, (code, image) => (code * 8) + image);

    // Equal for equal sets of rows, and different for different ones but by a chance of one in 2^128.
    private UInt128 Key(IEnumerable<int> members)
    {
        UInt128 key = 0;
        foreach (var member in members)
        {
            key ^= _keys[member];
        }

        return key;
    }

    private IEnumerable<int[]> Lists(int[] begun) => begun.Length == Degree
        ? [begun]
        : Enumerable.Range(0, Degree).Where(point => !begun.Contains(point)).SelectMany(point => Lists([.. begun, point]));
}
