using System.Collections.Immutable;
using System.Diagnostics.CodeAnalysis;
using System.Globalization;
using System.Text.Json;

namespace Fusecraft.Mechanisms;

internal sealed partial class MechanismReader
{
    private LocatedJson? Required(LocatedJson parent, string name, string expected)
    {
        var member = parent.Member(name);
        if (member is null)
        {
            _problems.Add(JsonPath.Member(parent.Path, name), $"no member \"{name}\"", expected);
        }

        return member;
    }

    private void RequireKnown(LocatedJson json, params ReadOnlySpan<string> known)
    {
        foreach (var member in json.Children)
        {
            if (!known.Contains(member.Name))
            {
                var near = NearMiss.Of(member.Name!, known);
                var expected = $"{(near is null ? "" : $"did you mean \"{near}\"? ")}known here: {string.Join(", ", known!)}";
                _problems.AddAt(member.NamePosition, member.Path, $"the unknown member {LocatedJson.Quote(member.Name!)}", expected);
            }
        }
    }

    private bool IsObjectOrAbsent([NotNullWhen(true)] LocatedJson? json, string expected) => Is(json, json is null or { IsObject: true }, expected);

    private bool IsListOrAbsent([NotNullWhen(true)] LocatedJson? json, string expected) => Is(json, json is null or { IsList: true }, expected);

    /// <summary>True where there is a value of the right form; complains where there is one of another.</summary>
    private bool Is([NotNullWhen(true)] LocatedJson? json, bool isRight, string expected)
    {
        if (!isRight)
        {
            _problems.Add(json!.Path, json.Found, expected);
        }

        return json is not null && isRight;
    }

    private string? String(LocatedJson? json) => Is(json, json is null or { IsString: true }, "should be a text in double quotes") ? json.Text : null;

    private bool Boolean(LocatedJson? json) =>
        Is(json, json is null or { Kind: JsonValueKind.True or JsonValueKind.False }, "should be true or false") && json.Kind == JsonValueKind.True;

    private int? Integer(LocatedJson parent, string name, string what)
    {
        var json = Required(parent, name, $"should be {what}");
        if (json is { IsInteger: true } && int.TryParse(json.Text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out var number))
        {
            return number;
        }

        Is(json, json is null, $"should be {what}");
        return null;
    }

    private ImmutableArray<string> Strings(LocatedJson? json, string what)
    {
        if (!IsListOrAbsent(json, $"should be a list, each item {what}"))
        {
            return [];
        }

        return [.. json.Children.Select(item => Is(item, item.IsString, $"should be {what}") ? item.Text : "")];
    }

    private ImmutableArray<string> Names(LocatedJson? json, string what)
    {
        if (!IsListOrAbsent(json, $"should be a list, each item the name of a {what}"))
        {
            return [];
        }

        return [.. json.Children.Select(item => NameOf(item, what))];
    }

    private ImmutableArray<ImmutableArray<string>> ListsOfNames(LocatedJson? json, string what)
    {
        if (!IsListOrAbsent(json, $"should be a list of lists, each item of those the name of a {what}"))
        {
            return [];
        }

        return [.. json.Children.Select(list => Names(list, what))];
    }

    /// <summary>A name, or the digits of a whole number that stands for one.</summary>
    private string NameOf(LocatedJson json, string what) =>
        Is(json, json.IsString || (json.IsInteger && json.Text[0] != '-'), $"should be the name of a {what}: a string or a whole number") ? json.Text : "";
}
