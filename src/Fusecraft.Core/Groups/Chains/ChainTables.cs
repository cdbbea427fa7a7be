using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The levels of a stabilizer chain, whatever the width of their lanes.</summary>
internal abstract class ChainTables
{
    /// <summary>Points are 0 … Degree-1.</summary>
    public abstract int Degree { get; }

    public abstract int Count { get; }

    public abstract int BasePoint(int level);

    public abstract int OrbitLength(int level);

    public abstract int OrbitPoint(int level, int index);

    public abstract int OrbitIndex(int level, int point);

    /// <summary>The stored representative that takes the base point to an orbit point, which must be one.</summary>
    public abstract Permutation Representative(int level, int point);

    /// <summary>True when a level's own generators need not generate its group, but do so with those of the levels below.</summary>
    public bool SharesGenerators { get; set; }

    /// <summary>The generators found for a level.</summary>
    public abstract IEnumerable<Permutation> OwnGenerators(int level);

    /// <summary>Generators of the group of a level.</summary>
    public IEnumerable<Permutation> Generators(int level) =>
        SharesGenerators ? Enumerable.Range(level, Count - level).SelectMany(OwnGenerators) : OwnGenerators(level);

    /// <summary>True when the permutation is a product of representatives. Without allocation.</summary>
    public abstract bool Contains(Permutation permutation);

    /// <summary>Strips representatives off until a base point leaves its orbit, at the level given back; the number of levels when none does.</summary>
    public abstract int Sift(Permutation permutation, out Permutation residue);

    /// <summary>The place of the image of each base point among the possible ones in ascending order, given the earlier images. False when the permutation is no member.</summary>
    public abstract bool TryGetDigits(Permutation permutation, Span<int> digits);

    /// <summary>Writes the images of the points under the member with the given digits; see <see cref="TryGetDigits"/>. Without allocation for up to 1,024 points.</summary>
    public abstract void WriteMember(ReadOnlySpan<int> digits, Span<int> images);

    /// <summary>The chain of the stabilizer of the first base points; it shares the levels.</summary>
    public abstract ChainTables Below(int level);

    /// <summary>The member with the given digits; see <see cref="TryGetDigits"/>.</summary>
    public Permutation FromDigits(ReadOnlySpan<int> digits)
    {
        using var images = new Scratch<int>(Degree);
        WriteMember(digits, images.Span);
        return Permutation.FromTrustedImages<int>(images.Span);
    }

    /// <summary>The natural logarithm of the order, nearly.</summary>
    public double LogOrder
    {
        get
        {
            var sum = 0.0;
            for (var level = 0; level < Count; level++)
            {
                sum += Math.Log(OrbitLength(level));
            }

            return sum;
        }
    }

    public BigInteger Order
    {
        get
        {
            var order = BigInteger.One;
            for (var level = 0; level < Count; level++)
            {
                order *= OrbitLength(level);
            }

            return order;
        }
    }
}
