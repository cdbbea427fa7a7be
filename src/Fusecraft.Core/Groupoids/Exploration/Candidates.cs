namespace Fusecraft.Groupoids;

/// <summary>Successors of a few shapes in the order of their finding: those that may be new, each as a record with the shape and the step it was found by. Used again and again.</summary>
internal sealed class Candidates
{
    private ulong[] _records = [];

    /// <summary>The records one after the other.</summary>
    public ulong[] Records => _records;

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
        if (capacity > Origins.Length)
        {
            Origins = new uint[capacity];
            Hashes = new ulong[capacity];
        }

        if (capacity * words > _records.Length)
        {
            _records = new ulong[capacity * words];
        }
    }

    /// <summary>Counts a shape by its free steps.</summary>
    public void Note(int freeForwardSteps, int freeTurns)
    {
        FreeForwardSteps += freeForwardSteps;
        DeadEnds += freeTurns == 1 ? 1 : 0;
        StuckShapes += freeTurns == 0 ? 1 : 0;
    }
}
