using System.Globalization;
using System.Text;
using System.Text.Json;

namespace Fusecraft.Mechanisms;

/// <summary>Says in plain words what is wrong where a text stops being JSON.</summary>
internal static class JsonComplaint
{
    /// <param name="utf8">The whole text, valid UTF-8.</param>
    /// <param name="offset">The byte at which reading stopped; the length of the text where it ends too early.</param>
    /// <param name="tokenStart">Where the broken token begins; <paramref name="offset"/> itself when nothing of it was read.</param>
    /// <param name="lastEnd">Where the last whole token ends.</param>
    /// <param name="last">The last whole token.</param>
    /// <param name="container">What reading stopped inside of: an object, a list, or neither.</param>
    internal static (string Found, string Expected) About(
        ReadOnlySpan<byte> utf8, int offset, int tokenStart, int lastEnd, JsonTokenType last, JsonValueKind container)
    {
        var start = tokenStart < utf8.Length ? utf8[tokenStart] : (byte)0;
        if (tokenStart < offset && start == '"')
        {
            return AboutString(utf8, offset);
        }

        if (offset == utf8.Length && tokenStart == offset)
        {
            return last == JsonTokenType.None
                ? ("an empty file", "should be an object: { \"format\": … }")
                : ("the end of the file", container == JsonValueKind.Array ? "a ']' is missing" : "a '}' is missing");
        }

        if (tokenStart < offset && (start == '-' || char.IsAsciiDigit((char)start)))
        {
            return ($"the number '{Word(utf8, tokenStart)}'", "numbers are written like 12 or -3, without leading zeros");
        }

        var found = $"'{Word(utf8, tokenStart)}'";
        if (start is (byte)'/' or (byte)'#')
        {
            return ("a comment", "JSON has none; remarks go into the member \"about\"");
        }

        // Since the last whole token: nothing, a comma, or a member name that is not followed by a colon.
        var gap = Encoding.UTF8.GetString(utf8[lastEnd..tokenStart]).Trim(' ', '\t', '\r', '\n');
        if (gap.EndsWith('"'))
        {
            return (found, $"a colon is missing after the member name {gap.TrimStart(',', ' ', '\t', '\r', '\n')}");
        }

        if (gap == "," && start is (byte)'}' or (byte)']')
        {
            return ($"a comma before {found}", "remove the comma");
        }

        return (found, (last, gap) switch
        {
            (JsonTokenType.None, _) => "should be an object: { \"format\": … }",
            (JsonTokenType.StartObject, "") => "should be a member name in double quotes, or '}'",
            (JsonTokenType.StartArray, "") => "should be a value, or ']'; text stands in double quotes",
            (JsonTokenType.PropertyName, _) => "should be a value; text stands in double quotes",
            (_, ",") => container == JsonValueKind.Object ? "should be a member name in double quotes" : "should be a value; text stands in double quotes",
            _ => container switch
            {
                JsonValueKind.Object => "should be ',' or '}'",
                JsonValueKind.Array => "should be ',' or ']'",
                _ => "nothing may follow the end of the object",
            },
        });
    }

    private static (string Found, string Expected) AboutString(ReadOnlySpan<byte> utf8, int offset)
    {
        if (offset == utf8.Length)
        {
            return ("the end of the file inside a string", "close the string with '\"'");
        }

        return utf8[offset] switch
        {
            (byte)'\n' or (byte)'\r' => ("the end of the line inside a string", "close the string with '\"'; a line break in a text is written \\n"),
            (byte)'\t' => ("a tab inside a string", "it is written \\t"),
            < 0x20 => (string.Create(CultureInfo.InvariantCulture, $"the control character U+{utf8[offset]:X4} inside a string"), string.Create(CultureInfo.InvariantCulture, $"it is written \\u{utf8[offset]:x4}")),
            _ => ("an unknown escape inside a string", "there are \\\" \\\\ \\/ \\b \\f \\n \\r \\t and \\u with four hexadecimal digits"),
        };
    }

    /// <summary>The character at the offset, with the letters and digits that follow it if it is one itself.</summary>
    private static string Word(ReadOnlySpan<byte> utf8, int offset)
    {
        var length = 0;
        while (offset + length < utf8.Length && length < 20 && (char.IsAsciiLetterOrDigit((char)utf8[offset + length]) || utf8[offset + length] is (byte)'.' or (byte)'-' or (byte)'+'))
        {
            length++;
        }

        if (length == 0)
        {
            Rune.DecodeFromUtf8(utf8[offset..], out _, out length);
        }

        return Encoding.UTF8.GetString(utf8.Slice(offset, length));
    }
}
