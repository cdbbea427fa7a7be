using System.Runtime.CompilerServices;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>
/// The shapes found, each once, numbered in the order of their finding, with the shape and step each was found by. How they are held and looked up is up to the kind; a record is what is held of
/// a shape.
/// </summary>
internal abstract class ExploredShapes
{
    protected ExploredShapes(Mechanism mechanism, Column<int> parents, Column<ushort> steps)
    {
        Mechanism = mechanism;
        Parents = parents;
        Steps = steps;
    }

    public Mechanism Mechanism { get; }

    /// <summary>The number of shapes.</summary>
    public int Count { get; protected set; }

    /// <summary>The number of words of a shape's key.</summary>
    public int Words => Mechanism.Board.Words;

    protected Column<int> Parents { get; }

    protected Column<ushort> Steps { get; }

    /// <summary>The shape it was found from; -1 for the first.</summary>
    public int Parent(int shape) => Parents.At(shape);

    /// <summary>The number of the step it was found by.</summary>
    public int ParentStep(int shape) => Steps.At(shape);

    /// <summary>The bytes that so many shapes take, the most that growing takes included.</summary>
    public abstract long BytesFor(long count);

    /// <summary>The bytes that so many shapes would take as numbers of a product.</summary>
    public long BytesFor(ShapeProduct product, long count) =>
        product.Size <= uint.MaxValue ? ProductShapes<uint>.BytesFor(Mechanism, product, count) : ProductShapes<ulong>.BytesFor(Mechanism, product, count);

    /// <summary>The same shapes held as numbers of a product, the columns handed over; null where one of them is not of the product.</summary>
    public abstract ExploredShapes? In(ShapeProduct product);

    /// <summary>The key of a shape; perhaps a copy, so that hot loops better use <see cref="CopyKey"/>.</summary>
    public abstract ReadOnlySpan<ulong> Key(int shape);

    /// <summary>Writes the key of a shape.</summary>
    public abstract void CopyKey(int shape, Span<ulong> key);

    /// <summary>The number of a shape, or -1.</summary>
    public abstract int Find(ReadOnlySpan<ulong> key);

    /// <summary>True when the shape is there.</summary>
    public abstract bool Contains(ReadOnlySpan<ulong> key);

    /// <summary>The number of the shape after a step; -1 where the step is barred or the shape is not there.</summary>
    public abstract int Target(int shape, int step);

    /// <summary>For each of some shapes, and for each of some steps, the same as <see cref="Target"/>. May run on several threads.</summary>
    public virtual void Targets(ReadOnlySpan<int> shapes, ReadOnlySpan<int> steps, Span<int> targets)
    {
        var at = 0;
        foreach (var shape in shapes)
        {
            foreach (var step in steps)
            {
                targets[at++] = Target(shape, step);
            }
        }
    }

    /// <summary>Writes the successors of some shapes that may be new. May run on several threads while nothing is added.</summary>
    public abstract void Generate(int first, int end, Candidates candidates);

    /// <summary>Adds those candidates that are new, in their order, as long as there are no more than <paramref name="limit"/> shapes. Returns how many candidates were dealt with.</summary>
    public abstract int Add(Candidates candidates, int limit);

    /// <summary>Adds the shape after a step that is free and leads to a shape not seen before; false where either is not so.</summary>
    public abstract bool TryAddAfter(int parent, int step);

    /// <summary>Makes ready for look-ups when no more shapes are to come.</summary>
    public abstract void Finish(int threads);

    /// <summary>The least number of shapes more than which do not fit so many bytes.</summary>
    public int CountWithin(long bytes)
    {
        var (least, most) = (1L, int.MaxValue - 1L);
        while (least < most)
        {
            var middle = (least + most + 1) / 2;
            (least, most) = BytesFor(middle) <= bytes ? (middle, most) : (least, middle - 1);
        }

        return (int)least;
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    protected void SetOrigin(int shape, int parent, int step)
    {
        Parents.At(shape) = parent;
        Steps.At(shape) = (ushort)step;
    }
}
