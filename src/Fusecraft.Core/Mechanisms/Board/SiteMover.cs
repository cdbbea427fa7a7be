using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Moves what lies on the sites, labels or their colours, by the steps of a mechanism. What lies on each site is held in padded lanes of one or two bytes, packed into words so that it can
/// stand beside a shape's key.
/// </summary>
internal abstract class SiteMover
{
    /// <summary>The number of 64-bit words that hold all lanes.</summary>
    public abstract int Words { get; }

    public static SiteMover Of(Mechanism mechanism) => mechanism.SiteCount <= 256 ? new Typed<byte>(mechanism) : new Typed<ushort>(mechanism);

    /// <summary>Packs numbers below 65,536 (below 256 where there are no more sites than that), one a site.</summary>
    public abstract void Load(ReadOnlySpan<int> numberOn, Span<ulong> packed);

    /// <summary>The number on a site.</summary>
    public abstract int NumberOn(int site, ReadOnlySpan<ulong> packed);

    /// <summary>Writes what lies on the sites after a step.</summary>
    public abstract void Move(int step, ReadOnlySpan<ulong> packed, Span<ulong> next);

    /// <summary>Writes what lay on the sites before a step.</summary>
    public abstract void MoveBack(int step, ReadOnlySpan<ulong> packed, Span<ulong> previous);

    private sealed class Typed<T> : SiteMover
        where T : unmanaged, IBinaryInteger<T>
    {
        private readonly PackedPermutations<T> _steps;
        private readonly PackedPermutations<T> _inverses;

        public Typed(Mechanism mechanism)
        {
            var stride = Lanes.PaddedLength(mechanism.SiteCount);
            Words = stride * Unsafe.SizeOf<T>() / sizeof(ulong);
            _steps = new PackedPermutations<T>(stride, Math.Max(1, mechanism.Steps.Length));
            _inverses = new PackedPermutations<T>(stride, Math.Max(1, mechanism.Steps.Length));
            foreach (var step in mechanism.Steps)
            {
                step.Permutation.CopyLanes(_steps.AddRow());
                step.Permutation.Inverse().CopyLanes(_inverses.AddRow());
            }
        }

        public override int Words { get; }

        public override void Load(ReadOnlySpan<int> numberOn, Span<ulong> packed)
        {
            var lanes = MemoryMarshal.Cast<ulong, T>(packed);
            for (var site = 0; site < numberOn.Length; site++)
            {
                lanes[site] = T.CreateTruncating(numberOn[site]);
            }
        }

        public override int NumberOn(int site, ReadOnlySpan<ulong> packed) => int.CreateTruncating(MemoryMarshal.Cast<ulong, T>(packed)[site]);

        // What comes to a site lay where the inverse takes that site.
        public override void Move(int step, ReadOnlySpan<ulong> packed, Span<ulong> next) =>
            Lanes.ComposePadded<T>(_inverses[step], MemoryMarshal.Cast<ulong, T>(packed), MemoryMarshal.Cast<ulong, T>(next));

        public override void MoveBack(int step, ReadOnlySpan<ulong> packed, Span<ulong> previous) =>
            Lanes.ComposePadded<T>(_steps[step], MemoryMarshal.Cast<ulong, T>(packed), MemoryMarshal.Cast<ulong, T>(previous));
    }
}
