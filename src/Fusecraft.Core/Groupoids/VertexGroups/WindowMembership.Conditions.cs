using System.Collections.Immutable;
using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

// What is held against a row beyond orbits and parts.
internal sealed partial class WindowMembership
{
    /// <summary>A match between two orbits: partners go to partners.</summary>
    private sealed class Partners
    {
        private readonly int _start;
        private readonly int _partnerStart;
        private readonly byte[] _partnerOf = new byte[Window];
        private readonly byte[] _mask = new byte[Window];

        public Partners(ImmutableArray<int> orbit, int[] match, int[] startOf)
        {
            (_start, _partnerStart) = (startOf[orbit[0]], startOf[match[0]]);
            for (var i = 0; i < orbit.Length; i++)
            {
                _partnerOf[orbit[i] - _start] = (byte)(match[i] - _partnerStart);
                _mask[orbit[i] - _start] = byte.MaxValue;
            }
        }

        [MethodImpl(MethodImplOptions.AggressiveInlining)]
        public Vector256<byte> Difference(ref byte lanes)
        {
            var partnerOf = Load(_partnerOf, 0);
            var there = Lanes.LookUp(partnerOf, Vector256.LoadUnsafe(ref lanes, (nuint)_start));
            var here = Lanes.LookUp(Vector256.LoadUnsafe(ref lanes, (nuint)_partnerStart), partnerOf);
            return (there ^ here) & Load(_mask, 0);
        }
    }

    /// <summary>Whether the parts of an orbit are exchanged by an odd permutation.</summary>
    private sealed class Sign
    {
        private readonly int _start;
        private readonly int _parts;
        private readonly byte[] _firsts = new byte[Window];
        private readonly byte[] _partOf = new byte[Window];
        private readonly byte[] _beyond = new byte[Window];

        public Sign(ImmutableArray<int> orbit, ReadOnlySpan<int[]> frames, int[] startOf)
        {
            _start = startOf[orbit[0]];
            _parts = frames.Length;
            _beyond.AsSpan(_parts).Fill((byte)sbyte.MaxValue);
            for (var part = 0; part < frames.Length; part++)
            {
                _firsts[part] = (byte)(orbit[frames[part][0]] - _start);
                foreach (var place in frames[part])
                {
                    _partOf[orbit[place] - _start] = (byte)part;
                }
            }
        }

        // Odd when an odd number of pairs are out of order: each part is held against the one so many places on.
        [MethodImpl(MethodImplOptions.AggressiveOptimization)]
        public int Of(ref byte lanes)
        {
            Span<byte> list = stackalloc byte[2 * Window];
            ref var places = ref MemoryMarshal.GetReference(list);
            var images = Lanes.LookUp(Load(_partOf, 0), Lanes.LookUp(Vector256.LoadUnsafe(ref lanes, (nuint)_start), Load(_firsts, 0))) | Load(_beyond, 0);
            images.StoreUnsafe(ref places);
            Vector256.Create((byte)sbyte.MaxValue).StoreUnsafe(ref places, Window);
            var odd = Vector256<sbyte>.Zero;
            for (var ahead = 1; ahead < _parts; ahead++)
            {
                odd ^= Vector256.GreaterThan(images.AsSByte(), Vector256.LoadUnsafe(ref places, (nuint)ahead).AsSByte());
            }

            return BitOperations.PopCount(odd.ExtractMostSignificantBits()) & 1;
        }
    }

    /// <summary>The sum of the twists of an orbit's parts.</summary>
    private sealed class Twist
    {
        private readonly int[] _firsts;
        private readonly byte[] _powerOf = new byte[Window];
        private readonly OrbitParts _parts;
        private readonly byte[] _powerAt;

        public Twist(ImmutableArray<int> orbit, OrbitParts parts, Permutation cycle, int[] startOf)
        {
            _parts = parts;
            Modulus = parts.PartAction!.Degree;
            _powerAt = new byte[Modulus];
            var place = 0;
            for (var power = 0; power < Modulus; power++)
            {
                _powerAt[place] = (byte)power;
                place = cycle[place];
            }

            _firsts = new int[parts.Frames.Length];
            for (var part = 0; part < _firsts.Length; part++)
            {
                var frame = parts.Frames[part];
                _firsts[part] = orbit[frame[0]];
                for (var i = 0; i < frame.Length; i++)
                {
                    _powerOf[orbit[frame[i]] - startOf[orbit[frame[i]]]] = _powerAt[i];
                }
            }
        }

        public int Modulus { get; }

        public int Of(ref byte lanes)
        {
            var sum = 0;
            foreach (var first in _firsts)
            {
                sum += _powerOf[Unsafe.Add(ref lanes, first)];
            }

            return sum % Modulus;
        }

        public int Of(int generator) => _powerAt[_parts.TwistSum(generator)[0]];
    }
}
