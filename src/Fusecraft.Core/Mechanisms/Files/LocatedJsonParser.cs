using System.Collections.Immutable;
using System.Text;
using System.Text.Json;
using System.Text.Unicode;

namespace Fusecraft.Mechanisms;

/// <summary>
/// Reads a JSON text (RFC 8259, UTF-8) into a tree of values that know their places. A byte order mark at the start is skipped. A text that is not JSON has one
/// problem, the first; repeated members are kept apart, so that the reader of the tree can complain about them and go on.
/// </summary>
internal ref struct LocatedJsonParser
{
    /// <summary>Lists and objects may stand inside one another this deep.</summary>
    internal const int MaxNesting = 64;

    private readonly ReadOnlySpan<byte> _utf8;
    private Utf8JsonReader _reader;
    private int _placedOffset;
    private TextPosition _placed = TextPosition.Start;
    private string _path = JsonPath.Root;
    private JsonValueKind _container = JsonValueKind.Undefined;

    private LocatedJsonParser(ReadOnlySpan<byte> utf8)
    {
        _utf8 = utf8;

        // Our own limit comes first; it has a message of its own.
        _reader = new Utf8JsonReader(utf8, new JsonReaderOptions { MaxDepth = MaxNesting + 1 });
    }

    /// <summary>Reads a text.</summary>
    /// <exception cref="MechanismFormatException">The text is not UTF-8 or not JSON.</exception>
    internal static LocatedJson Parse(ReadOnlySpan<byte> utf8)
    {
        var mark = "\uFEFF"u8;
        utf8 = utf8.StartsWith(mark) ? utf8[mark.Length..] : utf8;
        var parser = new LocatedJsonParser(utf8);
        if (!Utf8.IsValid(utf8))
        {
            var offset = FirstInvalid(utf8);
            throw parser.Problem(offset, $"the byte 0x{utf8[offset]:X2}, which is no UTF-8 here", "save the file in the encoding UTF-8");
        }

        parser.Read();
        var root = parser.Value(null, default, JsonPath.Root);
        parser.Read();
        return root;
    }

    private static int FirstInvalid(ReadOnlySpan<byte> utf8)
    {
        var offset = 0;
        while (Rune.DecodeFromUtf8(utf8[offset..], out _, out var length) == System.Buffers.OperationStatus.Done)
        {
            offset += length;
        }

        return offset;
    }

    private LocatedJson Value(string? name, TextPosition namePosition, string path)
    {
        _path = path;
        var position = Place((int)_reader.TokenStartIndex);
        var kind = _reader.TokenType switch
        {
            JsonTokenType.StartObject => JsonValueKind.Object,
            JsonTokenType.StartArray => JsonValueKind.Array,
            JsonTokenType.String => JsonValueKind.String,
            JsonTokenType.Number => JsonValueKind.Number,
            JsonTokenType.True => JsonValueKind.True,
            JsonTokenType.False => JsonValueKind.False,
            _ => JsonValueKind.Null,
        };
        if (kind is JsonValueKind.Object or JsonValueKind.Array && _reader.CurrentDepth >= MaxNesting)
        {
            throw Problem((int)_reader.TokenStartIndex, $"more than {MaxNesting} lists and objects inside one another", $"no mechanism needs more than {MaxNesting}");
        }

        var repeated = ImmutableArray.CreateBuilder<LocatedJson>();
        return new LocatedJson
        {
            Kind = kind,
            Path = path,
            Position = position,
            Name = name,
            NamePosition = name is null ? position : namePosition,
            Text = kind switch
            {
                JsonValueKind.String => Text(),
                JsonValueKind.Number => Encoding.ASCII.GetString(_reader.ValueSpan),
                _ => "",
            },
            Children = kind switch
            {
                JsonValueKind.Object => Members(path, repeated),
                JsonValueKind.Array => Items(path),
                _ => [],
            },
            Repeated = repeated.ToImmutable(),
        };
    }

    private ImmutableArray<LocatedJson> Items(string path)
    {
        var items = ImmutableArray.CreateBuilder<LocatedJson>();
        var outer = Enter(path, JsonValueKind.Array);
        for (Read(); _reader.TokenType != JsonTokenType.EndArray; Read())
        {
            items.Add(Value(null, default, JsonPath.Index(path, items.Count)));
            Enter(path, JsonValueKind.Array);
        }

        _container = outer;
        return items.ToImmutable();
    }

    private ImmutableArray<LocatedJson> Members(string path, ImmutableArray<LocatedJson>.Builder repeated)
    {
        var members = ImmutableArray.CreateBuilder<LocatedJson>();
        var names = new HashSet<string>();
        var outer = Enter(path, JsonValueKind.Object);
        for (Read(); _reader.TokenType != JsonTokenType.EndObject; Read())
        {
            var position = Place((int)_reader.TokenStartIndex);
            var name = Text();
            var memberPath = JsonPath.Member(path, name);
            _path = memberPath;
            Read();
            (names.Add(name) ? members : repeated).Add(Value(name, position, memberPath));
            Enter(path, JsonValueKind.Object);
        }

        _container = outer;
        return members.ToImmutable();
    }

    private JsonValueKind Enter(string path, JsonValueKind container)
    {
        var outer = _container;
        (_path, _container) = (path, container);
        return outer;
    }

    private string Text()
    {
        try
        {
            return _reader.GetString()!;
        }
        catch (InvalidOperationException)
        {
            throw Problem((int)_reader.TokenStartIndex, "a string with half of a surrogate pair", "\\uD800 to \\uDFFF are written in pairs, a high one before a low one");
        }
    }

    private void Read()
    {
        var (last, consumed) = (_reader.TokenType, (int)_reader.BytesConsumed);
        try
        {
            _reader.Read();
        }
        catch (JsonException exception)
        {
            var offset = LineStart((int)exception.LineNumber!) + (int)exception.BytePositionInLine!;
            var (found, expected) = JsonComplaint.About(_utf8, offset, (int)_reader.BytesConsumed, consumed, last, _container);
            throw Problem(offset, found, expected);
        }
    }

    private readonly int LineStart(int line)
    {
        var offset = 0;
        for (; line > 0; line--)
        {
            offset += _utf8[offset..].IndexOf((byte)'\n') + 1;
        }

        return offset;
    }

    // Tokens are asked for in the order of the text, so that each byte is counted once.
    private TextPosition Place(int offset)
    {
        _placed = _placed.After(_utf8[_placedOffset..offset]);
        _placedOffset = offset;
        return _placed;
    }

    private readonly MechanismFormatException Problem(int offset, string found, string expected)
    {
        var place = TextPosition.Start.After(_utf8[..offset]);
        return new MechanismFormatException([new MechanismProblem(_path, place.Line, place.Column, found, expected)]);
    }
}
