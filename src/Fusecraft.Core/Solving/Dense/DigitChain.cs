using System.Diagnostics;
using System.Numerics;
using System.Runtime.CompilerServices;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>
/// A stabilizer chain as a number system: a member is a product of one representative a level, deepest first, and its digit at a level is the place of the image of the base point in its ascending orbit.
/// Level 0 counts most.
/// </summary>
internal sealed class DigitChain<T>
    where T : unmanaged, IBinaryInteger<T>
{
    private readonly int[] _base;
    private readonly int[] _orbitLengths;

    // For each level and point the digit, or -1; for each level and digit the representative and its inverse.
    private readonly int[][] _digits;
    private readonly T[][] _representatives;
    private readonly T[][] _inverses;

    public DigitChain(StabilizerChain chain, int pointCount)
    {
        Stride = Lanes.PaddedLength(pointCount);
        _base = [.. chain.Base];
        _orbitLengths = [.. chain.OrbitLengths];
        _digits = new int[Count][];
        _representatives = new T[Count][];
        _inverses = new T[Count][];
        for (var level = 0; level < Count; level++)
        {
            var orbit = chain.Orbit(level);
            _digits[level] = new int[Stride];
            Array.Fill(_digits[level], -1);
            _representatives[level] = new T[orbit.Length * Stride];
            _inverses[level] = new T[orbit.Length * Stride];
            for (var digit = 0; digit < orbit.Length; digit++)
            {
                _digits[level][orbit[digit]] = digit;
                var to = Representative(level, digit);
                chain.Representative(level, orbit[digit]).CopyLanes(to);
                Lanes.InvertPadded<T>(to, _inverses[level].AsSpan(digit * Stride, Stride));
            }
        }
    }

    /// <summary>Lanes of one permutation.</summary>
    public int Stride { get; }

    /// <summary>The number of levels.</summary>
    public int Count => _base.Length;

    public int OrbitLength(int level) => _orbitLengths[level];

    public Span<T> Representative(int level, int digit) => _representatives[level].AsSpan(digit * Stride, Stride);

    /// <summary>The number of members of the group of a level modulo that of a deeper one.</summary>
    public BigInteger Size(int from, int to)
    {
        var size = BigInteger.One;
        for (var level = from; level < to; level++)
        {
            size *= _orbitLengths[level];
        }

        return size;
    }

    /// <summary>
    /// Strips the representatives of some levels off and gives their digits as one number; the permutation given, a member of the group of level <paramref name="from"/>, becomes a member of that of level
    /// <paramref name="to"/>. Gives -1 where it is no member.
    /// </summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public long Strip(Span<T> member, int from, int to)
    {
        var number = 0L;
        for (var level = from; level < to; level++)
        {
            var digit = _digits[level][int.CreateTruncating(member[_base[level]])];
            if (digit < 0)
            {
                return -1;
            }

            number = (number * _orbitLengths[level]) + digit;
            Lanes.ComposePadded<T>(member, _inverses[level].AsSpan(digit * Stride, Stride), member);
        }

        return number;
    }

    /// <summary>Writes the product of representatives that <see cref="Strip"/> gives this number for.</summary>
    public void Write(long number, int from, int to, Span<T> member, Span<T> scratch)
    {
        Lanes.Identity(member);
        for (var level = to - 1; level >= from; level--)
        {
            number = Math.DivRem(number, _orbitLengths[level], out var digit);
            Lanes.ComposePadded<T>(member, Representative(level, (int)digit), scratch);
            scratch.CopyTo(member);
        }

        Debug.Assert(number == 0, "The number is larger than the levels can hold.");
    }
}
