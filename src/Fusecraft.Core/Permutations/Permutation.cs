using System.Diagnostics;
using System.Diagnostics.CodeAnalysis;
using System.Numerics;
using System.Runtime.InteropServices;

namespace Fusecraft.Permutations;

/// <summary>
/// A permutation of the points 0, 1, 2, … that moves finitely many of them.
/// </summary>
/// <remarks>
/// <para>Conventions: permutations act on the right. <c>p * q</c> is first <c>p</c>, then <c>q</c>; the image of point <c>i</c> is <c>p[i]</c>,
/// so <c>(p * q)[i] == q[p[i]]</c>. Points are 0-based in code and 1-based in cycle notation.</para>
/// <para>Range: the largest moved point is below <see cref="MaxDegree"/>. Degrees never clash: a permutation is extended by fixed points as
/// far as needed. Equality ignores trailing fixed points. The default value is the identity. Immutable, safe to share.</para>
/// </remarks>
public readonly partial struct Permutation : IEquatable<Permutation>
{
    /// <summary>Points must be smaller than this: 65,536.</summary>
    public const int MaxDegree = 65_536;

    /// <summary>Up to this support end lanes are bytes, above it they are 16 bits wide.</summary>
    internal const int NarrowDegree = 256;

    // Null (identity), byte[] (support end up to NarrowDegree) or ushort[]; trimmed, so equal permutations have equal lanes.
    private readonly Array? _lanes;

    private Permutation(Array? lanes) => _lanes = lanes;

    /// <summary>The permutation that moves nothing; equal to <c>default</c>.</summary>
    public static Permutation Identity => default;

    /// <summary>True when no point is moved.</summary>
    public bool IsIdentity => _lanes is null;

    /// <summary>One more than the largest point moved; 0 for the identity. Groups and mechanisms keep the degree they act on themselves.</summary>
    public int SupportEnd => _lanes?.Length ?? 0;

    /// <summary>The image of a point.</summary>
    /// <param name="point">A point, 0-based, of any size.</param>
    /// <exception cref="ArgumentOutOfRangeException">The point is negative.</exception>
    public int this[int point]
    {
        get
        {
            ArgumentOutOfRangeException.ThrowIfNegative(point);
            return Image(point);
        }
    }

    /// <summary>Makes a permutation from where each point goes: <c>images[i]</c> is the image of point <c>i</c>.</summary>
    /// <param name="images">Each of 0 … n-1 once, in the order of the points they are images of.</param>
    /// <exception cref="ArgumentException">The list is not a permutation of 0 … n-1, or n is above <see cref="MaxDegree"/>.</exception>
    /// <seealso cref="FromSources"/>
    public static Permutation FromImages(params ReadOnlySpan<int> images)
    {
        RequirePermutation(images, nameof(images));
        return FromTrustedImages(images);
    }

    /// <summary>Makes a permutation from what comes to each place: <c>sources[i]</c> is the point whose image is <c>i</c>. The inverse of <see cref="FromImages"/>.</summary>
    /// <param name="sources">Each of 0 … n-1 once, in the order of the places they come to.</param>
    /// <exception cref="ArgumentException">The list is not a permutation of 0 … n-1, or n is above <see cref="MaxDegree"/>.</exception>
    public static Permutation FromSources(params ReadOnlySpan<int> sources)
    {
        RequirePermutation(sources, nameof(sources));
        using var images = new Scratch<int>(sources.Length);
        Lanes.Invert(sources, images.Span);
        return FromTrustedImages<int>(images.Span);
    }

    /// <summary>Makes one cycle: each point goes to the next one, the last to the first.</summary>
    /// <param name="points">Distinct points below <see cref="MaxDegree"/>, 0-based; none or one gives the identity.</param>
    /// <exception cref="ArgumentException">A point is negative, too large, or repeated.</exception>
    public static Permutation FromCycle(params ReadOnlySpan<int> points)
    {
        var degree = 0;
        foreach (var point in points)
        {
            if (point is < 0 or >= MaxDegree)
            {
                throw new ArgumentException($"Point {point} is outside 0 … {MaxDegree - 1}.", nameof(points));
            }

            degree = Math.Max(degree, point + 1);
        }

        using var scratch = new Scratch<int>(degree);
        using var met = new Scratch<bool>(degree);
        var images = scratch.Span;
        Lanes.Identity(images);
        met.Span.Clear();
        for (var i = 0; i < points.Length; i++)
        {
            if (met.Span[points[i]])
            {
                throw new ArgumentException($"Point {points[i]} stands twice in the cycle; its points must be distinct.", nameof(points));
            }

            met.Span[points[i]] = true;
            images[points[i]] = i + 1 < points.Length ? points[i + 1] : points[0];
        }

        return FromTrustedImages<int>(images);
    }

    /// <summary>Copies the images of the points 0 … <c>images.Length - 1</c>.</summary>
    /// <param name="images">Filled completely; where it is shorter than <see cref="SupportEnd"/>, the rest is left out.</param>
    public void CopyImages(Span<int> images)
    {
        for (var i = 0; i < images.Length; i++)
        {
            images[i] = Image(i);
        }
    }

    /// <inheritdoc/>
    public bool Equals(Permutation other) => (_lanes, other._lanes) switch
    {
        (byte[] a, byte[] b) => a.AsSpan().SequenceEqual(b),
        (ushort[] a, ushort[] b) => a.AsSpan().SequenceEqual(b),
        (null, null) => true,
        _ => false,
    };

    /// <inheritdoc/>
    public override bool Equals([NotNullWhen(true)] object? obj) => obj is Permutation other && Equals(other);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        switch (_lanes)
        {
            case byte[] narrow: hash.AddBytes(narrow); break;
            case ushort[] wide: hash.AddBytes(MemoryMarshal.AsBytes(wide.AsSpan())); break;
        }

        return hash.ToHashCode();
    }

    /// <summary>Makes a permutation from images known to be a permutation.</summary>
    internal static Permutation FromTrustedImages<T>(ReadOnlySpan<T> images)
        where T : unmanaged, IBinaryInteger<T>
    {
        var end = Lanes.SupportEnd(images);
        AssertPermutation(images[..end]);
        return end switch
        {
            0 => default,
            <= NarrowDegree => new Permutation(Convert<T, byte>(images[..end])),
            _ => new Permutation(Convert<T, ushort>(images[..end])),
        };
    }

    /// <summary>As <see cref="FromTrustedImages{T}(ReadOnlySpan{T})"/>, but keeps the array itself where it needs no trimming; nobody else may write to it any more.</summary>
    private static Permutation FromOwnedImages<T>(T[] images)
        where T : unmanaged, IBinaryInteger<T>
    {
        if (Lanes.SupportEnd<T>(images) != images.Length || images.Length == 0 || typeof(T) != (images.Length <= NarrowDegree ? typeof(byte) : typeof(ushort)))
        {
            return FromTrustedImages<T>(images);
        }

        AssertPermutation<T>(images);
        return new Permutation(images);
    }

    /// <summary>Writes the images of the points 0 … n-1 as lanes, extended by fixed points. The permutation moves nothing beyond n-1.</summary>
    internal void CopyLanes<T>(Span<T> images)
        where T : unmanaged, IBinaryInteger<T>
    {
        Debug.Assert(SupportEnd <= images.Length, "The permutation moves points beyond the degree.");
        switch (_lanes)
        {
            case byte[] narrow: Copy<byte, T>(narrow, images); break;
            case ushort[] wide: Copy<ushort, T>(wide, images); break;
        }

        for (var i = SupportEnd; i < images.Length; i++)
        {
            images[i] = T.CreateTruncating(i);
        }
    }

    /// <summary>The lanes for a degree: the permutation's own where they are that many, else a copy in the buffer, extended by fixed points.</summary>
    private ReadOnlySpan<T> LanesFor<T>(int degree, Span<T> buffer)
        where T : unmanaged, IBinaryInteger<T>
    {
        if (SupportEnd == degree && _lanes is T[] own)
        {
            return own;
        }

        CopyLanes(buffer[..degree]);
        return buffer[..degree];
    }

    // The length alone decides the width, which spares a failing (slow) type test.
    private int Image(int point)
    {
        var end = SupportEnd;
        if ((uint)point >= (uint)end)
        {
            return point;
        }

        return end <= NarrowDegree ? ((byte[])_lanes!)[point] : ((ushort[])_lanes!)[point];
    }

    private static TTo[] Convert<TFrom, TTo>(ReadOnlySpan<TFrom> from)
        where TFrom : unmanaged, IBinaryInteger<TFrom>
        where TTo : unmanaged, IBinaryInteger<TTo>
    {
        var to = new TTo[from.Length];
        Copy(from, to.AsSpan());
        return to;
    }

    private static void Copy<TFrom, TTo>(ReadOnlySpan<TFrom> from, Span<TTo> to)
        where TFrom : unmanaged, IBinaryInteger<TFrom>
        where TTo : unmanaged, IBinaryInteger<TTo>
    {
        if (typeof(TFrom) == typeof(TTo))
        {
            MemoryMarshal.Cast<TFrom, TTo>(from).CopyTo(to);
            return;
        }

        for (var i = 0; i < from.Length; i++)
        {
            to[i] = TTo.CreateTruncating(from[i]);
        }
    }

    private static void RequirePermutation(ReadOnlySpan<int> images, string parameter)
    {
        if (images.Length > MaxDegree)
        {
            throw new ArgumentException($"{images.Length} points were given; at most {MaxDegree} are supported.", parameter);
        }

        using var scratch = new Scratch<bool>(images.Length);
        var met = scratch.Span;
        met.Clear();
        for (var i = 0; i < images.Length; i++)
        {
            var image = images[i];
            if ((uint)image >= (uint)images.Length)
            {
                throw new ArgumentException($"Entry {i} is {image}; every entry must be in 0 … {images.Length - 1}.", parameter);
            }

            if (met[image])
            {
                throw new ArgumentException($"Entry {i} is {image}, which stands in the list already; every point must occur once.", parameter);
            }

            met[image] = true;
        }
    }

    [Conditional("DEBUG")]
    private static void AssertPermutation<T>(ReadOnlySpan<T> images)
        where T : unmanaged, IBinaryInteger<T>
    {
        Debug.Assert(images.Length <= MaxDegree, "Too many points.");
        using var scratch = new Scratch<bool>(images.Length);
        var met = scratch.Span;
        met.Clear();
        foreach (var lane in images)
        {
            var image = int.CreateTruncating(lane);
            Debug.Assert((uint)image < (uint)met.Length && !met[image], "The images are no permutation.");
            met[image] = true;
        }
    }
}
