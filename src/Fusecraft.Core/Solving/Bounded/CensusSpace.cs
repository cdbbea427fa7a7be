using System.Numerics;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>What a census counts: keys of so many words, and what one move makes of one. Not safe to share.</summary>
internal abstract class CensusSpace
{
    private readonly List<int> _costs = [];
    private ulong[] _found = [];

    /// <summary>The words of a key.</summary>
    public abstract int Words { get; }

    /// <summary>True where every move costs one unit.</summary>
    public abstract bool IsUniform { get; }

    /// <summary>The greatest cost of a move.</summary>
    public abstract int GreatestCost { get; }

    /// <summary>How many shapes are held besides the keys.</summary>
    public virtual int HeldShapes => 0;

    /// <summary>The number of keys that the last <see cref="Expand"/> found.</summary>
    public int Count => _costs.Count;

    /// <summary>A key found by the last <see cref="Expand"/>.</summary>
    public ReadOnlySpan<ulong> this[int found] => _found.AsSpan(found * Words, Words);

    /// <summary>What the move to a key found costs.</summary>
    public int CostOf(int found) => _costs[found];

    /// <summary>The key of a shape with no label displaced.</summary>
    public abstract void Start(Shape shape, Span<ulong> key);

    /// <summary>How many states a key stands for.</summary>
    public virtual BigInteger SizeOf(ReadOnlySpan<ulong> key) => BigInteger.One;

    /// <summary>Finds what one move makes of a key; some may be found twice.</summary>
    public void Expand(ReadOnlySpan<ulong> key)
    {
        _costs.Clear();
        FindAll(key);
    }

    protected abstract void FindAll(ReadOnlySpan<ulong> key);

    /// <summary>Room for one more key, to be written and then kept by <see cref="Keep"/>.</summary>
    protected Span<ulong> Next()
    {
        var start = _costs.Count * Words;
        if (start + Words > _found.Length)
        {
            Array.Resize(ref _found, Math.Max(16 * Words, 2 * _found.Length));
        }

        return _found.AsSpan(start, Words);
    }

    protected void Keep(int cost) => _costs.Add(cost);
}
