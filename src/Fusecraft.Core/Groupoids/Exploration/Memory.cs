using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics.X86;

namespace Fusecraft.Groupoids;

/// <summary>Tells the processor what will be read soon, so that the reads wait side by side instead of one after the other.</summary>
internal static class Memory
{
    private const int Line = 64;

    /// <summary>Announces an entry.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static unsafe void Announce<T>(ref T entry)
        where T : unmanaged
    {
        if (Sse.IsSupported)
        {
            Sse.Prefetch0(Unsafe.AsPointer(ref entry));
        }
    }

    /// <summary>Announces some bytes.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static void Announce(ref byte start, int length)
    {
        for (var at = 0; at < length; at += Line)
        {
            Announce(ref Unsafe.Add(ref start, at));
        }
    }
}
