using System.IO.MemoryMappedFiles;
using Fusecraft.Mechanisms;

namespace Fusecraft.Groupoids;

// Graph files: an explored groupoid kept for later. The reference page is docs/graph-file.md.
public sealed partial class ShapeGroupoid
{
    /// <summary>How names of graph files end.</summary>
    public const string FileExtension = ".fuse-graph";

    /// <summary>Writes what was explored to a stream: about two bytes a shape.</summary>
    /// <param name="stream">Written to from where it stands; left open.</param>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    /// <exception cref="IOException">The stream cannot be written.</exception>
    public void Save(Stream stream)
    {
        ArgumentNullException.ThrowIfNull(stream);
        GraphFileWriter.Write(this, stream);
    }

    /// <summary>Writes what was explored to a file. An older file of that name is replaced whole, or stays as it was where writing fails.</summary>
    /// <param name="path">The file's path, by custom with the extension <see cref="FileExtension"/>.</param>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    /// <exception cref="IOException">The file cannot be written.</exception>
    public void Save(string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        AtomicFile.Write(path, Save);
    }

    /// <summary>Reads what was explored from a stream. The shapes are worked out anew along the paths on which they were found, and every step on them is checked.</summary>
    /// <param name="mechanism">The mechanism that was explored, or one with the same pieces, steps, guards, blocks and marks.</param>
    /// <param name="stream">Read from where it stands to the end of the graph; left open.</param>
    /// <exception cref="InvalidDataException">The stream holds no graph file, a damaged or truncated one, or one of another mechanism.</exception>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    public static ShapeGroupoid Load(Mechanism mechanism, Stream stream)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(stream);
        using var reader = new GraphFileReader(mechanism, stream);
        var explorer = new ShapeExplorer(mechanism, ExplorationOptions.Default, null, default);
        explorer.Run(reader);
        return new ShapeGroupoid(mechanism, explorer);
    }

    /// <summary>Reads what was explored from a file, which is mapped into memory meanwhile. See <see cref="Load(Mechanism, Stream)"/>.</summary>
    /// <param name="mechanism">The mechanism that was explored, or one with the same pieces, steps, guards, blocks and marks.</param>
    /// <param name="path">The file's path.</param>
    /// <exception cref="InvalidDataException">The file is no graph file, a damaged or truncated one, one with something behind its end, or one of another mechanism.</exception>
    /// <exception cref="NotSupportedException">A turn has a guard written in code, to which no file can be bound.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    public static ShapeGroupoid Load(Mechanism mechanism, string path)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        ArgumentNullException.ThrowIfNull(path);
        using var file = new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.Read);
        if (file.Length == 0)
        {
            throw GraphFileReader.Truncated();
        }

        using var mapping = MemoryMappedFile.CreateFromFile(file, null, 0, MemoryMappedFileAccess.Read, HandleInheritability.None, leaveOpen: true);
        using var view = mapping.CreateViewStream(0, file.Length, MemoryMappedFileAccess.Read);
        var groupoid = Load(mechanism, view);
        return view.ReadByte() < 0 ? groupoid : throw new InvalidDataException("There is something behind the end of the graph file.");
    }
}
