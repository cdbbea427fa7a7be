using System.Buffers.Binary;
using System.Collections.Immutable;
using System.Runtime.InteropServices;
using System.Security.Cryptography;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

// Files of pruning tables: a header, the SHA-256 of what the table is of, the counts, the entries, and a SHA-256 of all that.
public sealed partial class PruningTable
{
    /// <summary>How names of files of pruning tables end.</summary>
    public const string FileExtension = ".fuse-bounds";

    private const int Version = 1;
    private const int HashBytes = 32;
    private const int HeaderBytes = 8 + 4 + 4 + HashBytes + 4 + 4 + 8;

    private static ReadOnlySpan<byte> Magic => "FUSEBNDS"u8;

    /// <summary>Writes the table to a file. An older file of that name is replaced whole, or stays as it was where writing fails.</summary>
    /// <param name="path">The file's path, by custom with the extension <see cref="FileExtension"/>.</param>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    /// <exception cref="IOException">The file cannot be written.</exception>
    public void Save(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        AtomicFile.Write(path, Save);
    }

    /// <summary>Writes the table to a stream.</summary>
    /// <param name="stream">Written to from where it stands; left open.</param>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    /// <exception cref="IOException">The stream cannot be written.</exception>
    public void Save(Stream stream)
    {
        ArgumentNullException.ThrowIfNull(stream);
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        var header = new byte[HeaderBytes + (8 * Counts.Length)];
        Magic.CopyTo(header);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(8), Version);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(12), (_bytes is null ? 4 : 8) | (IsCut ? 256 : 0));
        Fingerprint(First, Second, Metric).CopyTo(header, 16);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(16 + HashBytes), _unit);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(20 + HashBytes), Counts.Length);
        BinaryPrimitives.WriteInt64LittleEndian(header.AsSpan(24 + HashBytes), EntryCount);
        for (var i = 0; i < Counts.Length; i++)
        {
            BinaryPrimitives.WriteInt64LittleEndian(header.AsSpan(HeaderBytes + (8 * i)), Counts[i]);
        }

        Put(header);
        if (_bytes is not null)
        {
            Put(_bytes);
        }
        else
        {
            // Sixteen entries a word, the first in the lowest bits, words in little-endian order.
            var buffer = new byte[1 << 16];
            for (var at = 0; at < _nibbles!.Length; at += buffer.Length / 8)
            {
                var words = _nibbles.AsSpan(at, Math.Min(buffer.Length / 8, _nibbles.Length - at));
                for (var i = 0; i < words.Length; i++)
                {
                    BinaryPrimitives.WriteUInt64LittleEndian(buffer.AsSpan(8 * i), words[i]);
                }

                Put(buffer.AsSpan(0, 8 * words.Length));
            }
        }

        stream.Write(hash.GetHashAndReset());

        void Put(ReadOnlySpan<byte> bytes)
        {
            hash.AppendData(bytes);
            stream.Write(bytes);
        }
    }

    /// <summary>Reads a table from a file. See <see cref="Load(CosetCoordinates, CosetCoordinates, Metric, Stream)"/>.</summary>
    /// <param name="first">The first coordinate that the table was built of, or an equal one.</param>
    /// <param name="second">The second, or null.</param>
    /// <param name="metric">The metric.</param>
    /// <param name="path">The file's path.</param>
    /// <exception cref="InvalidDataException">The file holds no table, a damaged or truncated one, one of other coordinates, or something behind it.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    public static PruningTable Load(CosetCoordinates first, CosetCoordinates? second, Metric metric, string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        using var file = new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.Read, 1 << 16);
        var table = Load(first, second, metric, file);
        return file.ReadByte() < 0 ? table : throw new InvalidDataException("There is something behind the end of the file of a pruning table.");
    }

    /// <summary>Reads a table from a stream. It is read whole and its checksum compared before anything of it is believed.</summary>
    /// <param name="first">The first coordinate that the table was built of, or an equal one.</param>
    /// <param name="second">The second, or null.</param>
    /// <param name="metric">The metric.</param>
    /// <param name="stream">Read from where it stands to the end of the table; left open.</param>
    /// <exception cref="InvalidDataException">The stream holds no table, a damaged or truncated one, or one of other coordinates.</exception>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    public static PruningTable Load(CosetCoordinates first, CosetCoordinates? second, Metric metric, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(first);
        ArgumentNullException.ThrowIfNull(metric);
        ArgumentNullException.ThrowIfNull(stream);
        RequireFit(first, second, metric);
        var (outer, inner) = Ordered(first, second);
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        var header = new byte[HeaderBytes];
        var read = stream.ReadAtLeast(header, header.Length, throwOnEndOfStream: false);
        if (!header.AsSpan(0, Math.Min(read, 8)).SequenceEqual(Magic[..Math.Min(read, 8)]))
        {
            throw new InvalidDataException("This is no file of a pruning table: it does not begin as one.");
        }

        if (read < header.Length)
        {
            throw Truncated();
        }

        if (Int(8) != Version)
        {
            throw new InvalidDataException($"This is a pruning table of version {Int(8)}; only version {Version} can be read.");
        }

        if (!header.AsSpan(16, HashBytes).SequenceEqual(Fingerprint(outer, inner, metric)))
        {
            throw new InvalidDataException("The file holds a pruning table of another mechanism, metric or colouring, or is damaged.");
        }

        var entries = BinaryPrimitives.ReadInt64LittleEndian(header.AsSpan(24 + HashBytes));
        var (flags, unit, levels) = (Int(12), Int(16 + HashBytes), Int(20 + HashBytes));
        if ((flags & ~256) is not (4 or 8) || entries != (long)outer.Count * (inner?.Count ?? 1) || unit < 1 || levels is < 1 or > 256)
        {
            throw new InvalidDataException("The file of a pruning table is damaged: what it says cannot be.");
        }

        hash.AppendData(header);
        var counts = new byte[8 * levels];
        Read(counts);
        var isNarrow = (flags & ~256) == 4;
        var (bytes, nibbles) = (isNarrow ? null : new byte[entries], isNarrow ? new ulong[(entries + 15) / 16] : null);
        Read(isNarrow ? MemoryMarshal.AsBytes(nibbles.AsSpan()) : bytes);
        var checksum = new byte[HashBytes];
        if (stream.ReadAtLeast(checksum, HashBytes, throwOnEndOfStream: false) < HashBytes)
        {
            throw Truncated();
        }

        if (!checksum.AsSpan().SequenceEqual(hash.GetHashAndReset()))
        {
            throw new InvalidDataException("The file of a pruning table is damaged: its checksum is wrong.");
        }

        if (isNarrow && !BitConverter.IsLittleEndian)
        {
            BinaryPrimitives.ReverseEndianness(nibbles, nibbles);
        }

        var list = Enumerable.Range(0, levels).Select(i => BinaryPrimitives.ReadInt64LittleEndian(counts.AsSpan(8 * i))).ToImmutableArray();
        return new PruningTable(outer, inner, metric, unit, bytes, nibbles, (flags & 256) != 0, list);

        int Int(int at) => BinaryPrimitives.ReadInt32LittleEndian(header.AsSpan(at));

        void Read(Span<byte> bytes)
        {
            if (stream.ReadAtLeast(bytes, bytes.Length, throwOnEndOfStream: false) < bytes.Length)
            {
                throw Truncated();
            }

            hash.AppendData(bytes);
        }
    }

    /// <summary>A SHA-256 of all that a table depends on: shapes and guards, what each step moves, the metric's costs, the colourings and the base.</summary>
    internal static byte[] Fingerprint(CosetCoordinates first, CosetCoordinates? second, Metric metric)
    {
        var (outer, inner) = Ordered(first, second);
        var mechanism = outer.Mechanism;
        using var text = new MemoryStream();
        using var writer = new BinaryWriter(text);
        writer.Write(mechanism.Board.Fingerprint());
        writer.Write(mechanism.SiteCount);
        foreach (var piece in mechanism.PieceOfSite)
        {
            writer.Write(piece);
        }

        var classes = metric.Kind == MetricKind.Run ? Metric.RunClasses(mechanism) : null;
        foreach (var step in mechanism.Steps)
        {
            for (var site = 0; site < mechanism.SiteCount; site++)
            {
                writer.Write(step.Permutation[site]);
            }

            writer.Write(step.Opposite?.Index ?? -1);
            writer.Write(classes?[step.Index] ?? -1);
            writer.Write(metric.WeightOf(step));
        }

        foreach (var word in outer.BaseShape.Key)
        {
            writer.Write(word);
        }

        foreach (var coordinates in (CosetCoordinates?[])[outer, inner])
        {
            writer.Write(coordinates?.Count ?? 0);
            writer.Write(coordinates?.TowardsBase ?? false);
            writer.Write(coordinates?.IgnoresShapes ?? false);
            foreach (var colour in coordinates?.ColourOfLabel ?? [])
            {
                writer.Write(colour);
            }
        }

        writer.Flush();
        return SHA256.HashData(text.ToArray());
    }

    // The inner coordinate is the smaller one: its rows stay in the processor's caches.
    private static (CosetCoordinates Outer, CosetCoordinates? Inner) Ordered(CosetCoordinates first, CosetCoordinates? second) =>
        second is not null && second.Count > first.Count ? (second, first) : (first, second);

    private static InvalidDataException Truncated() => new("The file of a pruning table is truncated: it ends too early.");
}
