using System.Buffers;

namespace Fusecraft.Permutations;

/// <summary>Rented memory that is given back when the scope ends, so that loops on permutations allocate nothing.</summary>
internal readonly ref struct Scratch<T>
{
    private readonly T[] _rented;

    public Scratch(int length)
    {
        _rented = ArrayPool<T>.Shared.Rent(length);
        Span = _rented.AsSpan(0, length);
    }

    public Span<T> Span { get; }

    public void Dispose() => ArrayPool<T>.Shared.Return(_rented);
}
