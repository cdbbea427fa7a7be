using System.Buffers.Binary;
using System.Security.Cryptography;

namespace Fusecraft.Groupoids;

/// <summary>Writes graph files; see <c>docs/graph-file.md</c>.</summary>
internal static class GraphFileWriter
{
    /// <summary>What every graph file begins with.</summary>
    public static ReadOnlySpan<byte> Magic => "FUSEGRPH"u8;

    public const int Version = 1;

    /// <summary>The bytes before the key of the first shape.</summary>
    public const int HeaderBytes = 80;

    public static void Write(ShapeGroupoid groupoid, Stream stream)
    {
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        var shapes = groupoid.Store;
        var header = new byte[HeaderBytes + (8 * shapes.Words)];
        Magic.CopyTo(header);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(8), Version);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(12), groupoid.IsComplete ? 1 : 0);
        groupoid.Mechanism.Board.Fingerprint().CopyTo(header, 16);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(48), groupoid.Mechanism.Steps.Length);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(52), shapes.Words);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(56), shapes.Count);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(60), groupoid.DeadEndCount);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(64), groupoid.StuckShapeCount);
        BinaryPrimitives.WriteInt64LittleEndian(header.AsSpan(72), groupoid.FreeTurnCount);
        for (var i = 0; i < shapes.Words; i++)
        {
            BinaryPrimitives.WriteUInt64LittleEndian(header.AsSpan(HeaderBytes + (8 * i)), shapes.Key(0)[i]);
        }

        Put(header);

        // Shapes found from the same shape stand beside each other, in the order of the steps.
        var width = groupoid.Mechanism.Steps.Length < 256 ? 1 : 2;
        var buffer = new byte[1 << 16];
        var used = 0;
        var child = 1;
        for (var parent = 0; parent < shapes.Count; parent++)
        {
            var end = child;
            while (end < shapes.Count && shapes.Parent(end) == parent)
            {
                end++;
            }

            Append(end - child);
            for (; child < end; child++)
            {
                Append(shapes.ParentStep(child));
            }
        }

        Put(buffer.AsSpan(0, used));
        stream.Write(hash.GetHashAndReset());

        void Append(int number)
        {
            if (used + 2 > buffer.Length)
            {
                Put(buffer.AsSpan(0, used));
                used = 0;
            }

            buffer[used++] = (byte)number;
            if (width == 2)
            {
                buffer[used++] = (byte)(number >> 8);
            }
        }

        void Put(ReadOnlySpan<byte> bytes)
        {
            hash.AppendData(bytes);
            stream.Write(bytes);
        }
    }
}
