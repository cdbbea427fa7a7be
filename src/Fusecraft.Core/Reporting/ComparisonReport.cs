using System.Text.Json;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Reporting;

/// <summary>A comparison of two mechanisms, as JSON.</summary>
public static class ComparisonReport
{
    /// <summary>The value of the member <c>format</c>: name and version of the object that <see cref="ToJson"/> gives.</summary>
    public const string Format = "fusecraft/comparison/1";

    /// <summary>
    /// One JSON object on one line: the names, the <c>verdict</c> (<c>samePuzzle</c>, <c>sameShapeGraph</c>, <c>different</c> or <c>undecided</c>) with its <c>reason</c>, the <c>homeMatch</c> (null where
    /// there is none), whether the shape graphs and the vertex groups are alike (null where not decided), the first difference and all figures.
    /// </summary>
    /// <param name="comparison">A comparison.</param>
    /// <remarks>Figures are strings, because they are exact and may be of any size.</remarks>
    public static string ToJson(MechanismComparison comparison)
    {
        ArgumentNullException.ThrowIfNull(comparison);
        return JsonLine.Write(comparison, static (json, comparison) => Write(json, comparison));
    }

    private static void Write(Utf8JsonWriter json, MechanismComparison comparison)
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.WriteString("first", comparison.First.Name);
        json.WriteString("second", comparison.Second.Name);
        json.WriteString("verdict", JsonNamingPolicy.CamelCase.ConvertName(comparison.Verdict.ToString()));
        json.WriteString("reason", comparison.Reason);
        json.WritePropertyName("homeMatch");
        WriteHomeMatch(json, comparison.First, comparison.HomeMatch);
        json.WriteStartObject("shapeGraphs");
        WriteAnswer(json, "alike", comparison.HaveSameShapeGraph);
        json.WritePropertyName("turns");
        WriteTurns(json, comparison.First, comparison.ShapeGraphMatch is { } match ? step => match.Steps[step.Index] : null);
        json.WriteEndObject();
        json.WriteStartObject("vertexGroups");
        WriteAnswer(json, "alike", comparison.VertexGroups.AreAlike);
        json.WriteString("reason", comparison.VertexGroups.Reason);
        json.WriteEndObject();
        json.WriteString("firstDifference", comparison.FirstDifference?.Name);
        json.WriteStartArray("figures");
        foreach (var figure in comparison.Figures)
        {
            json.WriteStartObject();
            json.WriteString("name", figure.Name);
            json.WriteString("first", figure.First);
            json.WriteString("second", figure.Second);
            json.WriteEndObject();
        }

        json.WriteEndArray();
        json.WriteEndObject();
    }

    private static void WriteHomeMatch(Utf8JsonWriter json, Mechanism first, HomeMatch? match)
    {
        if (match is null)
        {
            json.WriteNullValue();
            return;
        }

        json.WriteStartObject();
        json.WriteBoolean("repinned", match.IsRepinned);
        json.WriteStartObject("sites");
        for (var site = 0; site < first.SiteCount; site++)
        {
            json.WriteString(first.SiteNames[site], match.Path.Mechanism.SiteNames[match.Sites[site]]);
        }

        json.WriteEndObject();
        json.WritePropertyName("turns");
        WriteTurns(json, first, step => match.Steps[step.Index]);
        json.WriteString("path", match.Path.Word.ToString());
        json.WriteEndObject();
    }

    // For each turn the step of the other mechanism that its forward step becomes, as written; by the turn's name, because steps may share theirs.
    private static void WriteTurns(Utf8JsonWriter json, Mechanism first, Func<Step, Step?>? becomes)
    {
        if (becomes is null)
        {
            json.WriteNullValue();
            return;
        }

        json.WriteStartObject();
        foreach (var turn in first.Turns)
        {
            var image = becomes(turn.Forward);
            json.WriteString(turn.Name, image is null ? null : image.IsForward ? image.Turn.Name : image.Turn.Name + "'");
        }

        json.WriteEndObject();
    }

    private static void WriteAnswer(Utf8JsonWriter json, string name, bool? answer)
    {
        if (answer is { } known)
        {
            json.WriteBoolean(name, known);
        }
        else
        {
            json.WriteNull(name);
        }
    }
}
