using System.Buffers;
using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;

namespace Fusecraft.Reporting;

/// <summary>Writes one JSON value on one line, in plain Unicode.</summary>
internal static class JsonLine
{
    // Only what JSON itself demands is escaped, so that 2^3·3 reads as it is written; the text is not meant to stand inside HTML.
    private static readonly JsonWriterOptions Options = new() { Encoder = JavaScriptEncoder.UnsafeRelaxedJsonEscaping };

    public static string Write<T>(T value, Action<Utf8JsonWriter, T> write)
    {
        var buffer = new ArrayBufferWriter<byte>();
        using (var json = new Utf8JsonWriter(buffer, Options))
        {
            write(json, value);
        }

        return Encoding.UTF8.GetString(buffer.WrittenSpan);
    }
}
