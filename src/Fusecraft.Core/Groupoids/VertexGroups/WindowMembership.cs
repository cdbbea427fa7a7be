using System.Collections.Immutable;
using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>
/// Membership in a group whose order meets its <see cref="SubdirectBound"/>: such a group is all permutations that keep its orbits, their division into parts, the action within parts, the matches between equivalent
/// orbits, and the relations among signs and twist sums. These are held against a row by a few table look-ups, much faster than sifting.
/// </summary>
internal sealed partial class WindowMembership
{
    private const int Window = WindowRows.WindowSize;

    /// <summary>More combinations of signs and twists are not listed.</summary>
    private const int MostCodes = 1 << 20;

    private readonly WindowRows _rows;
    private readonly int _used;

    // For each byte the first of its orbit and the first of its part, the one that follows it round its part, all counted from the start of the window.
    private readonly byte[] _orbitOf;
    private readonly byte[] _first;
    private readonly byte[] _next;

    // For each window 32 bytes: all bits set for those of the window.
    private readonly byte[] _mask;

    private readonly List<Partners> _partners = [];
    private readonly List<Sign> _signs = [];
    private readonly List<Twist> _twists = [];
    private bool[]? _allowed;

    private WindowMembership(WindowRows rows)
    {
        _rows = rows;
        _used = rows.UsedBytes;
        _orbitOf = new byte[rows.Pitch];
        _mask = new byte[rows.Starts.Length * Window];
        _first = new byte[rows.Pitch];
        var startOf = rows.StartOfBytes();
        for (var at = 0; at < _used; at++)
        {
            _first[at] = (byte)(at - startOf[at]);
            _mask[(Window * rows.Starts.IndexOf(startOf[at])) + at - startOf[at]] = byte.MaxValue;
        }

        _next = [.. _first];
    }

    /// <summary>Null where the group does not meet its bound, or acts within parts in a way not provided for.</summary>
    /// <param name="rows">The layout of the rows.</param>
    /// <param name="generators">The rows of generators, one after the other.</param>
    /// <param name="order">The order of the group they make.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static WindowMembership? TryCreate(WindowRows rows, ReadOnlySpan<byte> generators, BigInteger order, CancellationToken cancellation)
    {
        // The group on the bytes themselves.
        var used = rows.UsedBytes;
        var startOf = rows.StartOfBytes();
        var permutations = new Permutation[generators.Length / rows.Pitch];
        for (var i = 0; i < permutations.Length; i++)
        {
            var images = new int[used];
            for (var at = 0; at < used; at++)
            {
                images[at] = startOf[at] + generators[(i * rows.Pitch) + at];
            }

            permutations[i] = Permutation.FromTrustedImages<int>(images);
        }

        var group = PermutationGroup.Generate(permutations, used);
        var bound = SubdirectBound.Analyse(group, [], cancellation);
        if (bound.Bound != order)
        {
            return null;
        }

        var membership = new WindowMembership(rows);
        return membership.TryFill(bound, startOf, permutations.Length) ? membership : null;
    }

    /// <summary>True when the row is of a member. For rows of permutations that the steps generate only.</summary>
    [MethodImpl(MethodImplOptions.AggressiveOptimization)]
    public bool Contains(ReadOnlySpan<byte> row)
    {
        ref var lanes = ref MemoryMarshal.GetReference(row);
        var difference = Vector256<byte>.Zero;
        var starts = _rows.Starts;
        for (var i = 0; i < starts.Length; i++)
        {
            var start = starts[i];

            // An orbit goes to itself, a part to a part, and what follows goes to what follows.
            var images = Vector256.LoadUnsafe(ref lanes, (nuint)start);
            var orbitOf = Load(_orbitOf, start);
            var first = Load(_first, start);
            var next = Load(_next, start);
            var firsts = Lanes.LookUp(first, images);
            difference |= ((Lanes.LookUp(orbitOf, images) ^ orbitOf) | (firsts ^ Lanes.LookUp(firsts, first)) | (Lanes.LookUp(next, images) ^ Lanes.LookUp(images, next))) & Load(_mask, Window * i);
        }

        foreach (var partners in _partners)
        {
            difference |= partners.Difference(ref lanes);
        }

        return difference == Vector256<byte>.Zero && (_allowed is null || _allowed[CodeOf(ref lanes)]);
    }

    private int CodeOf(ref byte lanes)
    {
        var code = 0;
        foreach (var sign in _signs)
        {
            code = (2 * code) + sign.Of(ref lanes);
        }

        foreach (var twist in _twists)
        {
            code = (twist.Modulus * code) + twist.Of(ref lanes);
        }

        return code;
    }

    private static Vector256<byte> Load(byte[] bytes, int start) => Vector256.LoadUnsafe(ref MemoryMarshal.GetArrayDataReference(bytes), (nuint)start);

    private bool TryFill(SubdirectBound bound, int[] startOf, int generators)
    {
        // Within a window, orbits are told apart by their first bytes.
        foreach (var orbit in bound.Group.Orbits)
        {
            foreach (var at in orbit)
            {
                _orbitOf[at] = (byte)(orbit[0] - startOf[at]);
            }
        }

        foreach (var (kept, match) in bound.LeftOut)
        {
            _partners.Add(new Partners(bound.Kept[kept].Orbit, match, startOf));
        }

        foreach (var (orbit, parts) in bound.Kept)
        {
            var frames = parts.Frames;
            if (frames.Length > 1)
            {
                _signs.Add(new Sign(orbit, frames, startOf));
            }

            if (parts.PartAction is { } local && !TryFillParts(orbit, parts, local, startOf))
            {
                return false;
            }
        }

        return TryFillCodes(bound, generators);
    }

    private bool TryFillParts(ImmutableArray<int> orbit, OrbitParts parts, PermutationGroup local, int[] startOf)
    {
        var size = local.Degree;
        foreach (var frame in parts.Frames)
        {
            foreach (var place in frame)
            {
                _first[orbit[place]] = (byte)(orbit[frame[0]] - startOf[orbit[place]]);
            }
        }

        if (!local.IsAbelian)
        {
            return local.Order == KnownGroups.Symmetric(size).Order;
        }

        // A cyclic group is told by commuting with a cycle through the whole part.
        var cycle = local.Elements().FirstOrDefault(member => member.Order == size);
        if (cycle.IsIdentity)
        {
            return false;
        }

        foreach (var frame in parts.Frames)
        {
            for (var place = 0; place < size && size > 2; place++)
            {
                _next[orbit[frame[place]]] = (byte)(orbit[frame[cycle[place]]] - startOf[orbit[frame[place]]]);
            }
        }

        _twists.Add(new Twist(orbit, parts, cycle, startOf));
        return true;
    }

    // Lists the combinations that products of generators have; what is free in any case is left out of the codes.
    private bool TryFillCodes(SubdirectBound bound, int generators)
    {
        var moduli = _signs.Select(_ => 2).Concat(_twists.Select(twist => twist.Modulus)).ToArray();
        if (moduli.Aggregate(1L, (product, modulus) => Math.Min(MostCodes + 1, product * modulus)) > MostCodes)
        {
            return false;
        }

        var count = moduli.Aggregate(1, (product, modulus) => product * modulus);
        var steps = new int[generators][];
        for (var generator = 0; generator < generators; generator++)
        {
            var signs = bound.Kept.Where(kept => kept.Parts.Frames.Length > 1).Select(kept => kept.Parts.IsOddExchange(generator) ? 1 : 0);
            steps[generator] = [.. signs, .. _twists.Select(twist => twist.Of(generator))];
        }

        var allowed = new bool[count];
        allowed[0] = true;
        var open = new Stack<int>([0]);
        while (open.TryPop(out var code))
        {
            foreach (var step in steps)
            {
                var next = Sum(code, step, moduli);
                if (!allowed[next])
                {
                    allowed[next] = true;
                    open.Push(next);
                }
            }
        }

        // Without relations nothing is to be checked; else the coordinates that do not matter are dropped, last first.
        for (var i = moduli.Length - 1; i >= 0; i--)
        {
            var unit = moduli.Skip(i + 1).Aggregate(1, (product, modulus) => product * modulus);
            var isFree = Enumerable.Range(0, allowed.Length).All(code => allowed[code] == allowed[code - (code / unit % moduli[i] * unit)]);
            if (isFree)
            {
                allowed = [.. Enumerable.Range(0, allowed.Length).Where(code => code / unit % moduli[i] == 0).Select(code => allowed[code])];
                moduli = [.. moduli[..i], .. moduli[(i + 1)..]];
                if (i < _signs.Count)
                {
                    _signs.RemoveAt(i);
                }
                else
                {
                    _twists.RemoveAt(i - _signs.Count);
                }
            }
        }

        _allowed = allowed.Length == 1 ? null : allowed;
        return true;
    }

    private static int Sum(int code, int[] step, int[] moduli)
    {
        var (sum, unit) = (0, 1);
        for (var i = moduli.Length - 1; i >= 0; i--)
        {
            sum += ((code / unit) + step[i]) % moduli[i] * unit;
            unit *= moduli[i];
        }

        return sum;
    }
}
