using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// The members of a group of symmetries that keep the slots of the shape board, listed: what each does to slots and steps, their products and inverses. A symmetry that does not keep the slots never
/// takes one reachable shape to another, because the slots are those to which the tokens of any reachable shape can be brought. Member 0 is the identity.
/// </summary>
internal sealed class SymmetryTable
{
    /// <summary>Of a larger group only a subgroup of at most so many members is used.</summary>
    public const int MaxMembers = 384;

    private readonly int[][] _slots;
    private readonly ushort[] _products;
    private readonly ushort[] _inverses;
    private readonly int _words;

    public SymmetryTable(SymmetryGroup group)
    {
        var board = group.Mechanism.Board;
        _words = board.Words;
        var kept = Listed(group.Sites).Select(sites => (Sites: sites, Slots: board.SlotsMoved(sites))).Where(member => member.Slots is not null).ToList();
        Sites = [.. kept.Select(member => member.Sites)];
        _slots = [.. kept.Select(member => member.Slots!)];
        Steps = [.. Sites.Select(sites => group.Verified(sites).Steps)];
        var numberOf = new Dictionary<Permutation, ushort>();
        foreach (var sites in Sites)
        {
            numberOf.Add(sites, (ushort)numberOf.Count);
        }

        _products = new ushort[Count * Count];
        _inverses = new ushort[Count];
        for (var first = 0; first < Count; first++)
        {
            for (var second = 0; second < Count; second++)
            {
                var product = numberOf[Sites[first] * Sites[second]];
                _products[(first * Count) + second] = product;
                if (product == 0)
                {
                    _inverses[first] = (ushort)second;
                }
            }
        }
    }

    public ImmutableArray<Permutation> Sites { get; }

    public int Count => Sites.Length;

    /// <summary>For each member, the step that each step becomes.</summary>
    public ImmutableArray<int[]> Steps { get; }

    /// <summary>First one member, then another.</summary>
    public int Product(int first, int second) => _products[(first * Count) + second];

    public int Inverse(int member) => _inverses[member];

    /// <summary>Writes the least of all images of a shape, gives a member that takes the shape there, and says how many do.</summary>
    /// <param name="key">The shape.</param>
    /// <param name="least">Takes its least image; must not overlap the shape.</param>
    /// <param name="image">Scratch of the same length.</param>
    /// <param name="count">How many members take the shape there: the order of its stabilizer.</param>
    public int Canonicalize(ReadOnlySpan<ulong> key, Span<ulong> least, Span<ulong> image, out int count)
    {
        key.CopyTo(least);
        var best = 0;
        count = 1;
        for (var member = 1; member < _slots.Length; member++)
        {
            Move(member, key, image);
            var order = image.SequenceCompareTo(least);
            if (order < 0)
            {
                image.CopyTo(least);
                (best, count) = (member, 1);
            }
            else if (order == 0)
            {
                count++;
            }
        }

        return best;
    }

    /// <summary>The members that keep a shape.</summary>
    public IEnumerable<int> Stabilizer(ulong[] key)
    {
        var image = new ulong[_words];
        for (var member = 0; member < _slots.Length; member++)
        {
            Move(member, key, image);
            if (image.AsSpan().SequenceEqual(key))
            {
                yield return member;
            }
        }
    }

    public void Move(int member, ReadOnlySpan<ulong> key, Span<ulong> image)
    {
        var slots = _slots[member];
        image.Clear();
        for (var word = 0; word < key.Length; word++)
        {
            for (var tokens = key[word]; tokens != 0; tokens &= tokens - 1)
            {
                var target = slots[(word << 6) + BitOperations.TrailingZeroCount(tokens)];
                image[target >> 6] |= 1UL << target;
            }
        }
    }

    private static List<Permutation> Listed(PermutationGroup group)
    {
        while (true)
        {
            if (PermutationClosure.List(group.Generators, MaxMembers) is { } members)
            {
                return members;
            }

            group = group.PointwiseStabilizer(group.MovedOrbits[0][0]);
        }
    }
}
