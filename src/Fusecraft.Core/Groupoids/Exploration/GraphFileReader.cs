using System.Buffers.Binary;
using System.Security.Cryptography;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

/// <summary>Reads graph files; see <c>docs/graph-file.md</c>. Nothing that a file says is believed before it is checked, so that a damaged file can neither mislead nor take much memory.</summary>
internal sealed class GraphFileReader : IDisposable
{
    private const int ChecksumBytes = 32;
    private readonly Stream _stream;
    private readonly IncrementalHash _hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
    private readonly int _steps;
    private readonly byte[] _buffer = new byte[1 << 16];
    private int _next;
    private int _filled;

    // The bytes between header and checksum that are not in the buffer yet.
    private long _left;

    /// <summary>Reads the header.</summary>
    /// <exception cref="InvalidDataException">It is none, or of another mechanism.</exception>
    public GraphFileReader(Mechanism mechanism, Stream stream)
    {
        _stream = stream;
        var board = mechanism.Board;
        var fingerprint = board.Fingerprint();
        var header = new byte[GraphFileWriter.HeaderBytes + (8 * board.Words)];
        var read = stream.ReadAtLeast(header, header.Length, throwOnEndOfStream: false);
        if (!header.AsSpan(0, Math.Min(read, 8)).SequenceEqual(GraphFileWriter.Magic[..Math.Min(read, 8)]))
        {
            throw new InvalidDataException("This is no graph file: it does not begin as one.");
        }

        if (read < header.Length)
        {
            throw Truncated();
        }

        if (Int(8) != GraphFileWriter.Version)
        {
            throw new InvalidDataException($"This is a graph file of version {Int(8)}; only version {GraphFileWriter.Version} can be read.");
        }

        if (!header.AsSpan(16, 32).SequenceEqual(fingerprint))
        {
            throw new InvalidDataException($"The graph file belongs to another mechanism than {mechanism.Name}, or is damaged.");
        }

        _hash.AppendData(header);
        _steps = Int(48);
        ShapeCount = Int(56);
        DeadEnds = Int(60);
        StuckShapes = Int(64);
        FreeTurns = BinaryPrimitives.ReadInt64LittleEndian(header.AsSpan(72));
        IsComplete = Int(12) == 1;
        First = new ulong[board.Words];
        for (var i = 0; i < First.Length; i++)
        {
            First[i] = BinaryPrimitives.ReadUInt64LittleEndian(header.AsSpan(GraphFileWriter.HeaderBytes + (8 * i)));
        }

        if (_steps != mechanism.Steps.Length || Int(52) != board.Words || Int(12) is not (0 or 1) || ShapeCount < 1 || !board.HasOnlySlots(First))
        {
            throw Damaged();
        }

        _left = ((2L * ShapeCount) - 1) * (_steps < 256 ? 1 : 2);

        int Int(int at) => BinaryPrimitives.ReadInt32LittleEndian(header.AsSpan(at));
    }

    public ulong[] First { get; }

    public bool IsComplete { get; }

    public int ShapeCount { get; }

    public int DeadEnds { get; }

    public int StuckShapes { get; }

    public long FreeTurns { get; }

    public static InvalidDataException Damaged() => new("The graph file is damaged: what it says cannot be.");

    public static InvalidDataException Truncated() => new("The graph file is truncated: it ends too early.");

    /// <summary>Adds the shapes that were found from one: each step must be free and lead to a shape not seen before.</summary>
    public void AddShapesFoundFrom(int parent, ExploredShapes shapes)
    {
        var last = -1;
        for (var count = Number(); count > 0; count--)
        {
            var step = Number();
            if (step <= last || step >= _steps || shapes.Count >= ShapeCount || !shapes.TryAddAfter(parent, step))
            {
                throw Damaged();
            }

            last = step;
        }
    }

    /// <summary>Compares the checksum.</summary>
    public void End(int shapeCount)
    {
        _hash.AppendData(_buffer, 0, _filled);
        Span<byte> checksum = stackalloc byte[ChecksumBytes];
        if (_stream.ReadAtLeast(checksum, ChecksumBytes, throwOnEndOfStream: false) < ChecksumBytes)
        {
            throw Truncated();
        }

        if (shapeCount != ShapeCount || _left > 0 || _next < _filled || !checksum.SequenceEqual(_hash.GetHashAndReset()))
        {
            throw new InvalidDataException("The graph file is damaged: its checksum is wrong.");
        }
    }

    public void Dispose() => _hash.Dispose();

    private int Number() => _steps < 256 ? Byte() : Byte() | (Byte() << 8);

    private int Byte()
    {
        if (_next == _filled)
        {
            Fill();
        }

        return _buffer[_next++];
    }

    private void Fill()
    {
        _hash.AppendData(_buffer, 0, _filled);
        _filled = (int)Math.Min(_left, _buffer.Length);
        _left -= _filled;
        _next = 0;
        if (_filled == 0)
        {
            throw Damaged();
        }

        if (_stream.ReadAtLeast(_buffer.AsSpan(0, _filled), _filled, throwOnEndOfStream: false) < _filled)
        {
            throw Truncated();
        }
    }
}
