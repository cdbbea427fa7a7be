using System.Text.Json;
using Fusecraft.Mechanisms;
using Json.Schema;

namespace Fusecraft.Core.Tests.Mechanisms.Files;

/// <summary>Checks texts with the JSON Schema of mechanism files.</summary>
internal static class SchemaCheck
{
    private static readonly JsonSchema Schema = JsonSchema.FromText(MechanismFile.Schema);

    public static bool Passes(string json) => Schema.Evaluate(JsonDocument.Parse(json).RootElement).IsValid;
}
