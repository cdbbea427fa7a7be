using System.IO.MemoryMappedFiles;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;
using Fusecraft.Groupoids;

namespace Fusecraft.Solving;

/// <summary>The bytes of a table: an array that stays in place, or a part of a file that is mapped for reading.</summary>
internal sealed unsafe class TableMemory : IDisposable
{
    private const int Unit = sizeof(ulong);
    private readonly byte* _start;
    private readonly ulong[]? _array;
    private readonly MemoryMappedViewAccessor? _view;

    private TableMemory(ulong[] array, long bytes)
    {
        _array = array;
        _start = (byte*)Unsafe.AsPointer(ref MemoryMarshal.GetArrayDataReference(array));
        Bytes = bytes;
    }

    private TableMemory(MemoryMappedViewAccessor view, long bytes)
    {
        _view = view;
        byte* start = null;
        view.SafeMemoryMappedViewHandle.AcquirePointer(ref start);
        _start = start + view.PointerOffset;
        Bytes = bytes;
    }

    /// <summary>The number of bytes.</summary>
    public long Bytes { get; }

    /// <summary>The memory taken besides what is mapped.</summary>
    public long HeldBytes => _array is null ? 0 : Bytes;

    /// <summary>Zeros.</summary>
    public static TableMemory Allocate(long bytes) => new(HugePages.AllocatePinned<ulong>(checked((int)((bytes + Unit - 1) / Unit))), bytes);

    /// <summary>A part of a file, read as it is asked for.</summary>
    public static TableMemory Map(string path, long offset, long bytes)
    {
        using var file = MemoryMappedFile.CreateFromFile(path, FileMode.Open, null, 0, MemoryMappedFileAccess.Read);
        return new TableMemory(file.CreateViewAccessor(offset, bytes, MemoryMappedFileAccess.Read), bytes);
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public ref T At<T>(long index)
        where T : unmanaged => ref Unsafe.AsRef<T>(_start + (index * sizeof(T)));

    public Span<T> Slice<T>(long index, int count)
        where T : unmanaged => new(_start + (index * sizeof(T)), count);

    public void Dispose()
    {
        if (_view is not null)
        {
            _view.SafeMemoryMappedViewHandle.ReleasePointer();
            _view.Dispose();
        }
    }
}
