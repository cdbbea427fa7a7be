using System.Text;
using System.Text.Encodings.Web;
using System.Text.Json;

namespace Fusecraft.Mechanisms;

/// <summary>
/// A JSON value to be laid out for people: what fits on one line stands on one line, anything longer has a line for each item, except that lists of plain values fill
/// their lines.
/// </summary>
internal sealed class JsonLayout
{
    private const int Width = 100;

    private readonly char _open;
    private readonly List<(string Prefix, JsonLayout Value)> _children = [];
    private readonly string? _plain;

    private JsonLayout(char open) => _open = open;

    private JsonLayout(string plain) => _plain = plain;

    internal static JsonLayout Object() => new('{');

    internal static JsonLayout List(IEnumerable<JsonLayout> items)
    {
        var list = new JsonLayout('[');
        list._children.AddRange(items.Select(item => ("", item)));
        return list;
    }

    internal static JsonLayout Strings(IEnumerable<string> items) => List(items.Select(String));

    internal static JsonLayout String(string text) => new(Quote(text));

    internal static JsonLayout Number(int number) => new(number.ToString(System.Globalization.CultureInfo.InvariantCulture));

    internal static JsonLayout True { get; } = new("true");

    /// <summary>Adds a member to an object.</summary>
    internal JsonLayout With(string name, JsonLayout value)
    {
        _children.Add(($"{Quote(name)}: ", value));
        return this;
    }

    /// <summary>The text, an object or list spread over lines at the outermost level; ends with a line feed.</summary>
    internal string ToText()
    {
        var text = new StringBuilder();
        Spread(text, 0);
        return text.Append('\n').ToString();
    }

    // Letters of all languages stay as they are; the file is UTF-8.
    private static string Quote(string text) => $"\"{JsonEncodedText.Encode(text, JavaScriptEncoder.UnsafeRelaxedJsonEscaping)}\"";

    private void Append(StringBuilder text, int indent, int column)
    {
        // One more for the comma that may follow.
        if (_plain is not null || column + OneLineLength() + 1 <= Width)
        {
            AppendOneLine(text);
        }
        else if (_open == '[' && _children.TrueForAll(child => child.Value._plain is not null))
        {
            Fill(text, indent);
        }
        else
        {
            Spread(text, indent);
        }
    }

    private int OneLineLength() => _plain?.Length ?? (_children.Sum(child => child.Prefix.Length + child.Value.OneLineLength() + 2) + (_open == '{' ? 2 : 0));

    private void AppendOneLine(StringBuilder text)
    {
        if (_plain is not null)
        {
            text.Append(_plain);
            return;
        }

        var space = _open == '{' && _children.Count > 0 ? " " : "";
        text.Append(_open).Append(space);
        for (var i = 0; i < _children.Count; i++)
        {
            text.Append(i == 0 ? "" : ", ").Append(_children[i].Prefix);
            _children[i].Value.AppendOneLine(text);
        }

        text.Append(space).Append(Close);
    }

    private void Spread(StringBuilder text, int indent)
    {
        text.Append(_open);
        for (var i = 0; i < _children.Count; i++)
        {
            var (prefix, value) = _children[i];
            NewLine(text.Append(i == 0 ? "" : ","), indent + 2).Append(prefix);
            value.Append(text, indent + 2, indent + 2 + prefix.Length);
        }

        NewLine(text, indent).Append(Close);
    }

    private void Fill(StringBuilder text, int indent)
    {
        text.Append(_open);
        var column = Width;
        for (var i = 0; i < _children.Count; i++)
        {
            var item = _children[i].Value._plain!;
            text.Append(i == 0 ? "" : ",");
            if (column + item.Length + 2 > Width)
            {
                NewLine(text, indent + 2);
                column = indent + 2;
            }
            else
            {
                text.Append(' ');
                column++;
            }

            text.Append(item);
            column += item.Length + 1;
        }

        NewLine(text, indent).Append(Close);
    }

    private char Close => _open == '{' ? '}' : ']';

    private static StringBuilder NewLine(StringBuilder text, int indent) => text.Append('\n').Append(' ', indent);
}
