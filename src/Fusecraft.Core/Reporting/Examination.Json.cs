using System.Numerics;
using System.Text.Json;

namespace Fusecraft.Reporting;

// The examination as one JSON object.
public sealed partial class Examination
{
    /// <summary>The value of the member <c>format</c>: name and version of the object that <see cref="ToJson"/> gives.</summary>
    public const string Format = "fusecraft/examination/1";

    /// <summary>The examination as one JSON object on one line.</summary>
    /// <remarks>Counts of states and the order of the group are strings, because they are exact and may be of any size. What is not known is null.</remarks>
    public string ToJson() => JsonLine.Write(this, static (json, examination) => examination.Write(json));

    private void Write(Utf8JsonWriter json)
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        WriteMechanism(json);
        json.WriteBoolean("isComplete", IsComplete);
        json.WriteNumber("shapes", ShapeCount);
        json.WriteNumber("freeTurns", FreeTurnCount);
        WriteCount(json, "deadEnds", DeadEndCount);
        WriteCount(json, "stuckShapes", StuckShapeCount);
        WriteCount(json, "regions", RegionCount);
        WriteCount(json, "passages", PassageCount);
        WriteCount(json, "traps", TrapCount);
        json.WritePropertyName("homeRegion");
        WriteHomeRegion(json);
        WriteExact(json, "reachableStates", ReachableStateCount);
        json.WriteEndObject();
    }

    private void WriteMechanism(Utf8JsonWriter json)
    {
        json.WriteStartObject("mechanism");
        json.WriteString("name", Mechanism.Name);
        json.WriteNumber("sites", Mechanism.SiteCount);
        json.WriteNumber("pieces", Mechanism.PieceCount);
        json.WriteNumber("turns", Mechanism.Turns.Length);
        json.WriteNumber("blocks", Mechanism.HomeBlocks.Length);
        json.WriteEndObject();
    }

    private void WriteHomeRegion(Utf8JsonWriter json)
    {
        if (HomeRegion is null)
        {
            json.WriteNullValue();
            return;
        }

        json.WriteStartObject();
        json.WriteNumber("shapes", HomeRegion.ShapeCount);
        json.WriteNumber("eccentricity", HomeRegion.Eccentricity);
        WriteExact(json, "states", HomeRegion.StateCount);
        var group = HomeRegion.VertexGroup;
        json.WriteStartObject("vertexGroup");
        WriteExact(json, "order", group.Order);
        json.WriteString("factors", group.FactoredOrder.ToString());
        json.WriteString("proof", group.Proof.ToString());
        json.WriteNumber("degree", group.MovedSiteCount);
        json.WriteStartArray("orbits");
        foreach (var orbit in group.Orbits)
        {
            json.WriteStartArray();
            foreach (var site in orbit)
            {
                json.WriteStringValue(site);
            }

            json.WriteEndArray();
        }

        json.WriteEndArray();
        json.WriteEndObject();
        json.WriteEndObject();
    }

    private static void WriteCount(Utf8JsonWriter json, string name, long? count)
    {
        if (count is { } known)
        {
            json.WriteNumber(name, known);
        }
        else
        {
            json.WriteNull(name);
        }
    }

    private static void WriteExact(Utf8JsonWriter json, string name, BigInteger? count) => json.WriteString(name, count?.ToString());
}
