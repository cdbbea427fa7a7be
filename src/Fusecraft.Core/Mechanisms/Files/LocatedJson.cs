using System.Globalization;
using System.Text.Json;

namespace Fusecraft.Mechanisms;

/// <summary>A JSON value that knows where it stands in its text.</summary>
internal sealed class LocatedJson
{
    private Dictionary<string, LocatedJson>? _byPath;

    public required JsonValueKind Kind { get; init; }

    public required string Path { get; init; }

    /// <summary>Where the value begins.</summary>
    public required TextPosition Position { get; init; }

    /// <summary>The member's name, when the value is a member of an object.</summary>
    public string? Name { get; init; }

    /// <summary>Where the member's name begins; the value's own place when it has none.</summary>
    public required TextPosition NamePosition { get; init; }

    /// <summary>The text of a string, the digits of a number, else empty.</summary>
    public string Text { get; init; } = "";

    /// <summary>The items of a list or the members of an object, in the order of the file.</summary>
    public IReadOnlyList<LocatedJson> Children { get; init; } = [];

    /// <summary>Members whose name an earlier member of the same object has already.</summary>
    public IReadOnlyList<LocatedJson> Repeated { get; init; } = [];

    public bool IsList => Kind == JsonValueKind.Array;

    public bool IsObject => Kind == JsonValueKind.Object;

    public bool IsString => Kind == JsonValueKind.String;

    /// <summary>True for numbers written with digits only, a minus before them allowed.</summary>
    public bool IsInteger => Kind == JsonValueKind.Number && Text.AsSpan(Text[0] == '-' ? 1 : 0).IndexOfAnyExceptInRange('0', '9') < 0;

    /// <summary>What a complaint says was found.</summary>
    public string Found => Kind switch
    {
        JsonValueKind.Object => "an object",
        JsonValueKind.Array => Children.Count == 0 ? "an empty list" : "a list",
        JsonValueKind.String => Quote(Text),
        JsonValueKind.Number => Text,
        _ => Kind.ToString().ToLowerInvariant(),
    };

    public LocatedJson? Member(string name) => Children.FirstOrDefault(child => child.Name == name);

    /// <summary>This value and everything in it, in the order of the file.</summary>
    public IEnumerable<LocatedJson> All() => Children.Concat(Repeated).SelectMany(child => child.All()).Prepend(this);

    /// <summary>
    /// The place of the member with the given path, or of the nearest one around it that is in the file. A list or object as a whole is pointed at by its name, if it has one.
    /// </summary>
    public (int Line, int Column)? Locate(string path)
    {
        _byPath ??= All().DistinctBy(json => json.Path).ToDictionary(json => json.Path);
        LocatedJson? json;
        while (!_byPath.TryGetValue(path, out json))
        {
            var end = path.AsSpan().LastIndexOfAny('.', '[');
            if (end < 0)
            {
                return null;
            }

            path = path[..end];
        }

        var place = json.IsList || json.IsObject ? json.NamePosition : json.Position;
        return (place.Line, place.Column);
    }

    /// <summary>Text in quotes, shortened where it is long, without characters that would upset a terminal.</summary>
    internal static string Quote(string text)
    {
        const int longest = 60;
        var shown = text.Length > longest ? string.Concat(text.AsSpan(0, longest), "…") : text;
        return $"\"{string.Concat(shown.Select(c => char.IsControl(c) ? string.Create(CultureInfo.InvariantCulture, $"\\u{(int)c:x4}") : c.ToString()))}\"";
    }
}
