using System.Text.Json.Serialization;

namespace Fusecraft.Groups;

/// <summary>The JSON text of an <see cref="OrderCertificate"/>, member by member; numbers count from 1.</summary>
internal sealed class CertificateFile
{
    public required string Format { get; init; }

    public required int Degree { get; init; }

    public required string[] Generators { get; init; }

    public required int[][] Elements { get; init; }

    public required Strong[] StrongGenerators { get; init; }

    public required Level[] Levels { get; init; }

    public required string Order { get; init; }

    internal sealed class Strong
    {
        public required int Element { get; init; }

        public required string Cycles { get; init; }
    }

    internal sealed class Level
    {
        public required int BasePoint { get; init; }

        public required int[][] Orbit { get; init; }
    }
}

/// <summary>Serialization without reflection, strict about members.</summary>
[JsonSourceGenerationOptions(
    PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase,
    UnmappedMemberHandling = JsonUnmappedMemberHandling.Disallow,
    RespectNullableAnnotations = true,
    RespectRequiredConstructorParameters = true,
    AllowDuplicateProperties = false)]
[JsonSerializable(typeof(CertificateFile))]
internal sealed partial class CertificateContext : JsonSerializerContext;
