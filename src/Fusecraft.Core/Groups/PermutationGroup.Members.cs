using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>True when the permutation is a member. Allocates nothing once the chain is built.</summary>
    public bool Contains(Permutation permutation) => Chain.Contains(permutation);

    /// <summary>Says whether a permutation is a member and, where it is not, shows why: a point that leaves its orbit, a base point that does so at a level of the chain, or what is left beyond the last level.</summary>
    public MembershipEvidence Explain(Permutation permutation)
    {
        for (var point = 0; point < permutation.SupportEnd; point++)
        {
            var image = permutation[point];
            if (image == point)
            {
                continue;
            }

            if (point >= Degree)
            {
                return MembershipEvidence.LeavesOrbit(point, image, [point]);
            }

            if (image >= Degree || _orbits.Value.IndexOf(image) != _orbits.Value.IndexOf(point))
            {
                return MembershipEvidence.LeavesOrbit(point, image, OrbitOf(point));
            }
        }

        var residue = Chain.Sift(permutation, out var level);
        if (residue.IsIdentity)
        {
            return MembershipEvidence.Member;
        }

        return level == Chain.Base.Length
            ? MembershipEvidence.LeavesResidue(level, residue)
            : MembershipEvidence.LeavesLevel(level, Chain.Base[level], residue, Chain.Orbit(level));
    }

    /// <summary>A member drawn at random, each equally likely. The same numbers drawn give the same member, however the chain was built.</summary>
    public Permutation RandomElement(SeededRandom random)
    {
        using var images = new Scratch<int>(Degree);
        RandomElement(random, images.Span);
        return Permutation.FromTrustedImages<int>(images.Span);
    }

    /// <summary>As <see cref="RandomElement(SeededRandom)"/>, written as image list; the same numbers drawn give the same member. Allocates nothing for up to 1,024 points.</summary>
    /// <param name="random">Where the numbers come from.</param>
    /// <param name="images">At least as many places as the degree; those beyond are left alone. Place i takes the image of point i.</param>
    /// <exception cref="ArgumentException">There are fewer places than points.</exception>
    public void RandomElement(SeededRandom random, Span<int> images)
    {
        ArgumentNullException.ThrowIfNull(random);
        if (images.Length < Degree)
        {
            throw new ArgumentException($"There are {images.Length} places for the images of {Degree} points.", nameof(images));
        }

        var chain = _ascendingChain.Value;
        var lengths = chain.OrbitLengths.AsSpan();
        using var scratch = new Scratch<int>(lengths.Length);
        var digits = scratch.Span;
        for (var i = 0; i < digits.Length; i++)
        {
            digits[i] = random.NextInt32(lengths[i]);
        }

        chain.Tables.WriteMember(digits, images);
    }

    /// <summary>The position, from 0, of a member among all members in lexicographic order of image lists (the image of point 0 first). The inverse of <see cref="Unrank"/>.</summary>
    /// <exception cref="ArgumentException">The permutation is not a member.</exception>
    public BigInteger Rank(Permutation permutation)
    {
        var chain = _ascendingChain.Value;
        using var digits = new Scratch<int>(chain.Base.Length);
        if (!chain.Tables.TryGetDigits(permutation, digits.Span))
        {
            throw new ArgumentException($"{permutation} is not a member of the group.", nameof(permutation));
        }

        var rank = BigInteger.Zero;
        for (var i = 0; i < chain.Base.Length; i++)
        {
            rank = (rank * chain.OrbitLengths[i]) + digits.Span[i];
        }

        return rank;
    }

    /// <summary>The member at a position, from 0, in lexicographic order of image lists. The inverse of <see cref="Rank"/>.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The position is negative or not below <see cref="Order"/>.</exception>
    public Permutation Unrank(BigInteger rank)
    {
        var chain = _ascendingChain.Value;
        if (rank.Sign < 0 || rank >= chain.Order)
        {
            throw new ArgumentOutOfRangeException(nameof(rank), rank, $"Positions are 0 … {chain.Order - 1}.");
        }

        using var digits = new Scratch<int>(chain.Base.Length);
        for (var i = chain.Base.Length - 1; i >= 0; i--)
        {
            rank = BigInteger.DivRem(rank, chain.OrbitLengths[i], out var digit);
            digits.Span[i] = (int)digit;
        }

        return chain.Tables.FromDigits(digits.Span);
    }
}
