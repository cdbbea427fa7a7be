using System.Buffers.Binary;
using System.Security.Cryptography;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

// Table files; the reference page is docs/table-file.md.
public sealed partial class DistanceTable
{
    /// <summary>How names of table files end.</summary>
    public const string FileExtension = ".fuse-depths";

    private const int Version = 1;
    private const int HeaderBytes = 80;
    private const int ChecksumBytes = 32;

    private static ReadOnlySpan<byte> Magic => "FUSEDPTH"u8;

    private int CellBits => _wide is null ? 2 : 8 * _wide.Width;

    private TableMemory Memory => _residues?.Memory ?? _wide!.Memory;

    /// <summary>Writes the table to a stream: its distances and, at the end, a checksum.</summary>
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
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(12), CellBits);
        TableFingerprint.Of(Numbering, Metric, Origin).CopyTo(header, 16);
        BinaryPrimitives.WriteInt64LittleEndian(header.AsSpan(48), Numbering.Count);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(56), _rows.RowStates);
        BinaryPrimitives.WriteInt32LittleEndian(header.AsSpan(60), Counts.Length);
        BinaryPrimitives.WriteInt64LittleEndian(header.AsSpan(64), Memory.Bytes);
        for (var distance = 0; distance < Counts.Length; distance++)
        {
            BinaryPrimitives.WriteInt64LittleEndian(header.AsSpan(HeaderBytes + (8 * distance)), Counts[distance]);
        }

        Put(header);
        for (var at = 0L; at < Memory.Bytes; at += ChunkBytes)
        {
            Put(Memory.Slice<byte>(at, (int)Math.Min(ChunkBytes, Memory.Bytes - at)));
        }

        stream.Write(hash.GetHashAndReset());

        void Put(ReadOnlySpan<byte> bytes)
        {
            hash.AppendData(bytes);
            stream.Write(bytes);
        }
    }

    /// <summary>Writes the table to a file. An older file of that name is replaced whole, or stays as it was where writing fails.</summary>
    /// <param name="path">The file's path, by custom with the extension <see cref="FileExtension"/>.</param>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    /// <exception cref="IOException">The file cannot be written.</exception>
    public void Save(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        AtomicFile.Write(path, Save);
    }

    /// <summary>Reads a table from a stream into memory.</summary>
    /// <param name="numbering">The states: of the mechanism that the table was made for, or of one with the same pieces, steps, guards, blocks and marks.</param>
    /// <param name="stream">Read from where it stands to the end of the table; left open.</param>
    /// <param name="options">The metric and the sense that the table was made with, and the memory allowed; null for the defaults.</param>
    /// <exception cref="InvalidDataException">The stream holds no table, a damaged or truncated one, or one of another mechanism, metric or sense. The checksum is verified before anything is used.</exception>
    /// <exception cref="InvalidOperationException">The table takes more memory than allowed.</exception>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    public static DistanceTable Load(StateNumbering numbering, Stream stream, DistanceOptions? options = null)
    {
        ArgumentNullException.ThrowIfNull(stream);
        options = Checked(numbering, options);
        var header = FileHeader.Read(numbering, stream, options);
        if (header.Bytes > options.MaxBytes)
        {
            throw new InvalidOperationException($"The table takes {header.Bytes} bytes; {options.MaxBytes} are allowed.");
        }

        var memory = TableMemory.Allocate(header.Bytes);
        header.Verify(stream, memory);
        return header.ToTable(numbering, options, memory);
    }

    /// <summary>Opens a table file, which stays on disk and is mapped into memory: only what is looked up is read. <see cref="Dispose"/> lets go of the file.</summary>
    /// <param name="numbering">The states: of the mechanism that the table was made for, or of one with the same pieces, steps, guards, blocks and marks.</param>
    /// <param name="path">The file's path.</param>
    /// <param name="options">The metric and the sense that the table was made with; null for the defaults.</param>
    /// <remarks>The whole file is read once to verify its checksum, at some hundred megabytes a second or more.</remarks>
    /// <exception cref="InvalidDataException">The file is no table, a damaged or truncated one, one with something behind its end, or one of another mechanism, metric or sense.</exception>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    public static DistanceTable Open(StateNumbering numbering, string path, DistanceOptions? options = null)
    {
        ArgumentNullException.ThrowIfNull(path);
        options = Checked(numbering, options);
        FileHeader header;
        using (var file = new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.Read, ChunkBytes, FileOptions.SequentialScan))
        {
            header = FileHeader.Read(numbering, file, options);
            header.Verify(file, null);
            if (file.ReadByte() >= 0)
            {
                throw new InvalidDataException("There is something behind the end of the table file.");
            }
        }

        return header.ToTable(numbering, options, TableMemory.Map(path, header.Offset, header.Bytes));
    }

    private const int ChunkBytes = 1 << 20;

    /// <summary>The part of a table file before the distances. Nothing that it says is believed before it is checked.</summary>
    private sealed class FileHeader
    {
        private const int MostDistances = 1 << 16;
        private readonly byte[] _bytes;

        private FileHeader(byte[] bytes) => _bytes = bytes;

        public long Offset => _bytes.Length;

        public long Bytes => BinaryPrimitives.ReadInt64LittleEndian(_bytes.AsSpan(64));

        private int CellBits => Int(_bytes, 12);

        public static FileHeader Read(StateNumbering numbering, Stream stream, DistanceOptions options)
        {
            var fingerprint = TableFingerprint.Of(numbering, options.Metric, options.Origin);
            var fixedPart = new byte[HeaderBytes];
            var read = stream.ReadAtLeast(fixedPart, HeaderBytes, throwOnEndOfStream: false);
            if (!fixedPart.AsSpan(0, Math.Min(read, Magic.Length)).SequenceEqual(Magic[..Math.Min(read, Magic.Length)]))
            {
                throw new InvalidDataException("This is no table file: it does not begin as one.");
            }

            if (read < HeaderBytes)
            {
                throw Truncated();
            }

            if (Int(fixedPart, 8) != Version)
            {
                throw new InvalidDataException($"This is a table file of version {Int(fixedPart, 8)}; only version {Version} can be read.");
            }

            if (!fixedPart.AsSpan(16, 32).SequenceEqual(fingerprint))
            {
                throw new InvalidDataException(
                    $"The table file belongs to another mechanism than {numbering.Mechanism.Name}, to another goal, metric or sense than asked for, or is damaged.");
            }

            if (Int(fixedPart, 60) is < 0 or > MostDistances)
            {
                throw Damaged();
            }

            var bytes = new byte[HeaderBytes + (8 * Int(fixedPart, 60))];
            fixedPart.CopyTo(bytes, 0);
            if (stream.ReadAtLeast(bytes.AsSpan(HeaderBytes), bytes.Length - HeaderBytes, throwOnEndOfStream: false) < bytes.Length - HeaderBytes)
            {
                throw Truncated();
            }

            var header = new FileHeader(bytes);
            header.RequireSense(numbering, options);
            return header;
        }

        /// <summary>Reads the distances, into the memory where one is given, and compares the checksum.</summary>
        public void Verify(Stream stream, TableMemory? memory)
        {
            using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
            hash.AppendData(_bytes);
            var buffer = memory is null ? new byte[ChunkBytes] : [];
            for (var at = 0L; at < Bytes; at += ChunkBytes)
            {
                var count = (int)Math.Min(ChunkBytes, Bytes - at);
                var chunk = memory is null ? buffer.AsSpan(0, count) : memory.Slice<byte>(at, count);
                if (stream.ReadAtLeast(chunk, count, throwOnEndOfStream: false) < count)
                {
                    throw Truncated();
                }

                hash.AppendData(chunk);
            }

            Span<byte> checksum = stackalloc byte[ChecksumBytes];
            if (stream.ReadAtLeast(checksum, ChecksumBytes, throwOnEndOfStream: false) < ChecksumBytes)
            {
                throw Truncated();
            }

            if (!checksum.SequenceEqual(hash.GetHashAndReset()))
            {
                throw new InvalidDataException("The table file is damaged: its checksum is wrong.");
            }
        }

        public DistanceTable ToTable(StateNumbering numbering, DistanceOptions options, TableMemory memory)
        {
            var (forward, descent) = Moves(numbering, options, default);
            var rows = numbering.Tabulate(descent, options.DegreeOfParallelism, default);
            var counts = Enumerable.Range(0, Int(_bytes, 60)).Select(i => BinaryPrimitives.ReadInt64LittleEndian(_bytes.AsSpan(HeaderBytes + (8 * i))));
            if (!ReferenceEquals(forward, descent))
            {
                return new DistanceTable(numbering, options, descent, rows, null, new WideTable(memory, CellBits / 8), counts, options.Origin == DistanceOrigin.FromBase);
            }

            if (rows.RowStates != Int(_bytes, 56))
            {
                throw new InvalidDataException("The table file orders its states in rows of another length; it must be made anew.");
            }

            return new DistanceTable(numbering, options, descent, rows, new ResidueTable(rows.RowCount, rows.RowStates, memory), null, counts, options.Origin == DistanceOrigin.FromBase);
        }

        private static InvalidDataException Damaged() => new("The table file is damaged: what it says cannot be.");

        private static InvalidDataException Truncated() => new("The table file is truncated: it ends too early.");

        private static int Int(byte[] bytes, int at) => BinaryPrimitives.ReadInt32LittleEndian(bytes.AsSpan(at));

        private void RequireSense(StateNumbering numbering, DistanceOptions options)
        {
            var states = numbering.Count;
            var rowStates = Int(_bytes, 56);
            if (BinaryPrimitives.ReadInt64LittleEndian(_bytes.AsSpan(48)) != states || rowStates < 1 || states % rowStates != 0)
            {
                throw Damaged();
            }

            var hasReverses = HasReverses(numbering.Mechanism, options.Metric);
            var bytes = hasReverses ? ResidueTable.BytesFor(states / rowStates, rowStates) : states * (CellBits / 8);
            if (hasReverses != (CellBits == 2) || CellBits is not (2 or 8 or 16) || Bytes != bytes)
            {
                throw Damaged();
            }
        }
    }
}
