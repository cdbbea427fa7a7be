using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Permutations;

namespace Fusecraft.Mechanisms;

/// <summary>Rows of padded lanes, one a site.</summary>
internal sealed class PlainRows<T>(Mechanism mechanism) : SiteRows(mechanism)
    where T : unmanaged, IBinaryInteger<T>
{
    public override int Pitch { get; } = Lanes.PaddedLength(mechanism.SiteCount) * Unsafe.SizeOf<T>();

    public override void Compose(ReadOnlySpan<byte> first, ReadOnlySpan<byte> second, Span<byte> result) =>
        Lanes.ComposePadded(MemoryMarshal.Cast<byte, T>(first), MemoryMarshal.Cast<byte, T>(second), MemoryMarshal.Cast<byte, T>(result));

    public override void Invert(ReadOnlySpan<byte> row, Span<byte> result) => Lanes.InvertPadded(MemoryMarshal.Cast<byte, T>(row), MemoryMarshal.Cast<byte, T>(result));

    public override void Load(Permutation permutation, Span<byte> row) => permutation.CopyLanes(MemoryMarshal.Cast<byte, T>(row));

    public override void CopyImages(ReadOnlySpan<byte> row, Span<int> images)
    {
        var lanes = MemoryMarshal.Cast<byte, T>(row);
        for (var site = 0; site < images.Length; site++)
        {
            images[site] = int.CreateTruncating(lanes[site]);
        }
    }
}
