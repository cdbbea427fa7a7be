using System.Numerics;

namespace Fusecraft.Permutations;

public readonly partial struct Permutation : IMultiplyOperators<Permutation, Permutation, Permutation>, IMultiplicativeIdentity<Permutation, Permutation>,
    IEqualityOperators<Permutation, Permutation, bool>
{
    /// <inheritdoc/>
    static Permutation IMultiplicativeIdentity<Permutation, Permutation>.MultiplicativeIdentity => default;

    /// <summary>First <paramref name="left"/>, then <paramref name="right"/>: <c>(left * right)[i] == right[left[i]]</c>.</summary>
    public static Permutation operator *(Permutation left, Permutation right) => Multiply(left, right);

    /// <summary>True when both move every point alike; trailing fixed points do not matter.</summary>
    public static bool operator ==(Permutation left, Permutation right) => left.Equals(right);

    /// <summary>True when some point has two different images.</summary>
    public static bool operator !=(Permutation left, Permutation right) => !left.Equals(right);

    /// <summary>The product <c>left * right</c>: first <paramref name="left"/>, then <paramref name="right"/>.</summary>
    public static Permutation Multiply(Permutation left, Permutation right)
    {
        if (left._lanes is null)
        {
            return right;
        }

        if (right._lanes is null)
        {
            return left;
        }

        var degree = Math.Max(left.SupportEnd, right.SupportEnd);
        return degree <= NarrowDegree ? Multiply<byte>(left, right, degree) : Multiply<ushort>(left, right, degree);
    }

    /// <summary>This permutation followed by another: the same as <c>this * next</c>.</summary>
    public Permutation Then(Permutation next) => Multiply(this, next);

    /// <summary>The permutation that undoes this one.</summary>
    public Permutation Inverse() => SupportEnd switch
    {
        0 => default,
        <= NarrowDegree and var degree => Invert<byte>(degree),
        var degree => Invert<ushort>(degree),
    };

    /// <summary>This permutation done <paramref name="exponent"/> times; negative exponents undo it, 0 gives the identity.</summary>
    /// <remarks>Linear in <see cref="SupportEnd"/> whatever the exponent, apart from dividing it by cycle lengths.</remarks>
    /// <param name="exponent">Any integer, of any size.</param>
    public Permutation Power(BigInteger exponent)
    {
        using var scratch = new Scratch<int>(SupportEnd);
        var images = scratch.Span;
        Lanes.Identity(images);
        var (length, shift) = (1, 0);
        foreach (var cycle in new CycleWalk(this))
        {
            if (cycle.Length != length)
            {
                length = cycle.Length;
                shift = (int)BigInteger.Remainder(exponent, length);
                shift += shift < 0 ? length : 0;
            }

            for (var i = 0; i < length; i++)
            {
                images[cycle[i]] = cycle[i + shift < length ? i + shift : i + shift - length];
            }
        }

        return FromTrustedImages<int>(images);
    }

    /// <summary>The conjugate <c>by⁻¹ * this * by</c>: the same permutation with every point <c>i</c> renamed <c>by[i]</c>.</summary>
    public Permutation ConjugateBy(Permutation by) => Math.Max(SupportEnd, by.SupportEnd) switch
    {
        <= NarrowDegree and var degree => Conjugate<byte>(by, degree),
        var degree => Conjugate<ushort>(by, degree),
    };

    /// <summary>The commutator <c>first * second * first⁻¹ * second⁻¹</c>, in the order in which turn words are read; the identity exactly when the two commute.</summary>
    public static Permutation Commutator(Permutation first, Permutation second) => first * second * (second * first).Inverse();

    private static Permutation Multiply<T>(Permutation left, Permutation right, int degree)
        where T : unmanaged, IBinaryInteger<T>
    {
        var length = Lanes.PaddedLength(degree);
        using var scratch = new Scratch<T>(2 * length);
        var p = scratch.Span[..length];
        var q = scratch.Span[length..];
        left.CopyLanes(p);
        right.CopyLanes(q);
        Lanes.ComposePadded<T>(p, q, p);
        return FromTrustedImages<T>(p);
    }

    private Permutation Invert<T>(int degree)
        where T : unmanaged, IBinaryInteger<T>
    {
        var images = new T[degree];
        Lanes.Invert(LanesFor<T>(degree, default), images.AsSpan());
        return FromOwnedImages(images);
    }

    private Permutation Conjugate<T>(Permutation by, int degree)
        where T : unmanaged, IBinaryInteger<T>
    {
        // One buffer is enough: of the two the longer one has as many lanes as the result already.
        using var buffer = new Scratch<T>(SupportEnd == by.SupportEnd ? 0 : degree);
        var images = new T[degree];
        var p = LanesFor(degree, buffer.Span);
        var q = by.LanesFor(degree, buffer.Span);
        for (var i = 0; i < degree; i++)
        {
            images[int.CreateTruncating(q[i])] = q[int.CreateTruncating(p[i])];
        }

        return FromOwnedImages(images);
    }
}
