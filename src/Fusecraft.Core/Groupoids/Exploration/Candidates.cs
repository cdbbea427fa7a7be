using System.Buffers;

namespace Fusecraft.Groupoids;

/// <summary>Successors of a few shapes in the order of their finding: those that may be new, each as a record with the shape and the step it was found by. Used again and again; the arrays are borrowed.</summary>
internal sealed class Candidates
{
    /// <summary>The records one after the other.</summary>
    public ulong[] Records { get; private set; } = [];

    /// <summary>For each candidate the shape, counted from the first of these, and the step in the lower 16 bits.</summary>
    public uint[] Origins { get; private set; } = [];

    /// <summary>For each candidate the hash of its record, where there is a hash table.</summary>
    public ulong[] Hashes { get; private set; } = [];

    /// <summary>The first of the shapes.</summary>
    public int First { get; set; }

    /// <summary>The number of candidates.</summary>
    public int Count { get; set; }

    public long FreeForwardSteps { get; set; }

    public int DeadEnds { get; set; }

    public int StuckShapes { get; set; }

    /// <summary>The first of the shapes where two steps written alike are free; -1 for none.</summary>
    public int Clash { get; set; }

    /// <summary>Empties this and makes room.</summary>
    public void Reset(int first, int capacity, int words)
    {
        (First, Count, FreeForwardSteps, DeadEnds, StuckShapes, Clash) = (first, 0, 0, 0, 0, -1);
        Origins = Large(Origins, capacity);
        Hashes = Large(Hashes, capacity);
        Records = Large(Records, capacity * words);
    }

    /// <summary>Gives the arrays back.</summary>
    public void Release()
    {
        Return(Origins);
        Return(Hashes);
        Return(Records);
        (Origins, Hashes, Records) = ([], [], []);
    }

    /// <summary>Counts a shape by its free steps.</summary>
    public void Note(int freeForwardSteps, int freeTurns)
    {
        FreeForwardSteps += freeForwardSteps;
        DeadEnds += freeTurns == 1 ? 1 : 0;
        StuckShapes += freeTurns == 0 ? 1 : 0;
    }

    private static T[] Large<T>(T[] array, int length)
    {
        if (length <= array.Length)
        {
            return array;
        }

        Return(array);
        return ArrayPool<T>.Shared.Rent(length);
    }

    private static void Return<T>(T[] array)
    {
        if (array.Length > 0)
        {
            ArrayPool<T>.Shared.Return(array);
        }
    }
}
