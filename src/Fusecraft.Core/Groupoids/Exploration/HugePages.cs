using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Fusecraft.Groupoids;

/// <summary>Large arrays that the system is asked to back with huge pages, where it offers them: random access then costs fewer address translations. Elsewhere they are plain arrays.</summary>
internal static partial class HugePages
{
    private const int AdviseHugePage = 14;
    private const long PageBytes = 1 << 21;

    /// <summary>An array with undefined contents; it stays where it is.</summary>
    public static T[] Allocate<T>(int length)
        where T : unmanaged
    {
        var bytes = (long)length * Unsafe.SizeOf<T>();
        if (bytes < 2 * PageBytes)
        {
            return GC.AllocateUninitializedArray<T>(length);
        }

        var array = GC.AllocateUninitializedArray<T>(length, pinned: true);
        if (OperatingSystem.IsLinux())
        {
            Advise(array, bytes);
        }

        return array;
    }

    /// <summary>An array of zeros that stays where it is, whatever its length.</summary>
    public static T[] AllocatePinned<T>(int length)
        where T : unmanaged
    {
        if ((long)length * Unsafe.SizeOf<T>() >= 2 * PageBytes)
        {
            return AllocateZeroed<T>(length);
        }

        return GC.AllocateArray<T>(length, pinned: true);
    }

    /// <summary>An array of zeros.</summary>
    public static T[] AllocateZeroed<T>(int length)
        where T : unmanaged
    {
        var array = Allocate<T>(length);
        array.AsSpan().Clear();
        return array;
    }

    private static unsafe void Advise<T>(T[] array, long bytes)
        where T : unmanaged
    {
        try
        {
            var start = ((nint)Unsafe.AsPointer(ref MemoryMarshal.GetArrayDataReference(array)) + (nint)PageBytes - 1) & ~((nint)PageBytes - 1);
            _ = MemoryAdvise(start, (nuint)(bytes - PageBytes), AdviseHugePage);
        }
        catch (Exception problem) when (problem is DllNotFoundException or EntryPointNotFoundException)
        {
            // Only speed is at stake.
        }
    }

    [LibraryImport("libc", EntryPoint = "madvise")]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static partial int MemoryAdvise(nint start, nuint length, int advice);
}
