using System.Runtime.CompilerServices;

namespace Fusecraft.Mechanisms;

/// <summary>Access without bounds checks, for the innermost loops; whoever calls has made sure.</summary>
internal static class UncheckedAccess
{
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static ref T At<T>(this ref T start, ulong index)
        where T : unmanaged => ref Unsafe.Add(ref start, (nint)index);
}
