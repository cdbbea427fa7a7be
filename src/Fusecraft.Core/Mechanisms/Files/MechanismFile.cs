using System.Text;
using System.Text.Unicode;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Reads and writes mechanism files: JSON (RFC 8259) in UTF-8 with the extension <c>.fuse.json</c>. The reference page is <c>docs/file-format.md</c>.
/// </summary>
/// <remarks>
/// Reading checks everything and reports all problems of a file at once. Writing and reading are inverse to each other: what was written reads as the same definition, and
/// writing that gives the same text again. A byte order mark is skipped when reading and never written.
/// </remarks>
public static class MechanismFile
{
    /// <summary>The value of a file's member <c>format</c>: name and version of the format read and written here.</summary>
    public const string Format = "fusecraft/mechanism/1";

    /// <summary>How names of mechanism files end.</summary>
    public const string Extension = ".fuse.json";

    private static readonly Lazy<string> SchemaText = new(ReadSchema);

    /// <summary>The JSON Schema (draft 2020-12) of mechanism files. It knows their form; names and what they mean are checked by reading.</summary>
    public static string Schema => SchemaText.Value;

    /// <summary>Reads a mechanism from the text of a mechanism file.</summary>
    /// <param name="json">The whole text.</param>
    /// <exception cref="MechanismFormatException">The text has mistakes; the exception lists all of them with line, column and JSON path.</exception>
    public static Mechanism Parse(string json)
    {
        ArgumentNullException.ThrowIfNull(json);
        var utf8 = new byte[Encoding.UTF8.GetMaxByteCount(json.Length)];
        if (Utf8.FromUtf16(json, utf8, out var read, out var written, replaceInvalidSequences: false) != System.Buffers.OperationStatus.Done)
        {
            var place = TextPosition.Start.After(utf8.AsSpan(0, written));
            throw new MechanismFormatException([new MechanismProblem(
                JsonPath.Root, place.Line, place.Column, $"half of a surrogate pair, U+{(int)json[read]:X4}", "should be well-formed Unicode text")]);
        }

        return Parse(utf8.AsSpan(0, written));
    }

    /// <summary>Reads a mechanism from the bytes of a mechanism file.</summary>
    /// <param name="utf8">The whole text in UTF-8.</param>
    /// <exception cref="MechanismFormatException">The text has mistakes; the exception lists all of them with line, column and JSON path.</exception>
    public static Mechanism Parse(ReadOnlySpan<byte> utf8)
    {
        var root = LocatedJsonParser.Parse(utf8);
        var problems = new ProblemList(root.Locate);
        var definition = MechanismReader.Read(root, problems);
        var mechanism = definition is null ? null : MechanismCompiler.Compile(definition, problems);
        return problems.IsEmpty && mechanism is not null ? mechanism : throw problems.ToException();
    }

    /// <summary>Reads a mechanism file.</summary>
    /// <param name="path">The file's path.</param>
    /// <exception cref="MechanismFormatException">The file has mistakes; the exception lists all of them with line, column and JSON path.</exception>
    /// <exception cref="IOException">The file cannot be read.</exception>
    public static Mechanism Load(string path) => Parse(File.ReadAllBytes(path));

    /// <summary>The text of a mechanism file: indented by two spaces, lines ended by a line feed, short lists on one line, defaults left out.</summary>
    /// <param name="definition">A definition; written as it is, right or wrong.</param>
    /// <exception cref="NotSupportedException">A turn has a guard written in code.</exception>
    public static string Write(MechanismDefinition definition)
    {
        ArgumentNullException.ThrowIfNull(definition);
        return MechanismWriter.Write(definition);
    }

    /// <inheritdoc cref="Write(MechanismDefinition)"/>
    /// <param name="mechanism">The mechanism whose definition is written.</param>
    public static string Write(Mechanism mechanism)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        return Write(mechanism.Definition);
    }

    /// <summary>Writes a mechanism file. An older file of that name is replaced whole, or stays as it was where writing fails.</summary>
    /// <param name="mechanism">The mechanism whose definition is written.</param>
    /// <param name="path">The file's path, by custom with the extension <see cref="Extension"/>.</param>
    /// <exception cref="NotSupportedException">A turn has a guard written in code.</exception>
    /// <exception cref="IOException">The file cannot be written.</exception>
    public static void Save(Mechanism mechanism, string path)
    {
        ArgumentNullException.ThrowIfNull(path);
        var utf8 = Encoding.UTF8.GetBytes(Write(mechanism));
        AtomicFile.Write(path, stream => stream.Write(utf8));
    }

    private static string ReadSchema()
    {
        using var stream = typeof(MechanismFile).Assembly.GetManifestResourceStream("mechanism-1.schema.json")!;
        using var reader = new StreamReader(stream);
        return reader.ReadToEnd();
    }
}
