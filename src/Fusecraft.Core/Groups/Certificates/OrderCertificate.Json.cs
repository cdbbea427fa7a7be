using System.Collections.Immutable;
using System.Numerics;
using System.Text.Json;
using System.Text.Json.Serialization;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

public sealed partial class OrderCertificate
{
    /// <summary>What the member <c>format</c> of the JSON text says.</summary>
    public const string Format = "fusecraft/order-certificate/1";

    /// <summary>The certificate as JSON text.</summary>
    public string ToJson() => JsonSerializer.Serialize(
        new CertificateFile
        {
            Format = Format,
            Degree = Degree,
            Generators = [.. Generators.Select(generator => generator.ToString())],
            Elements = [.. Elements.Select(element => new[] { element.Left, element.Right })],
            StrongGenerators = [.. StrongGenerators.Select(generator => new CertificateFile.Strong { Element = generator.Number, Cycles = generator.Permutation.ToString() })],
            Levels = [.. Levels.Select(level => new CertificateFile.Level
            {
                BasePoint = level.BasePoint + 1,
                Orbit = [.. level.Orbit.Select(entry => new[] { entry.Point + 1, entry.From + 1, entry.Generator + 1 })],
            })],
            Order = Order.ToString(),
        },
        CertificateContext.Default.CertificateFile);

    /// <summary>Reads a certificate from JSON text. Says nothing about whether it is right: ask <see cref="CertificateChecker"/>.</summary>
    /// <exception cref="FormatException">The text is no certificate; the message says where and what was found.</exception>
    public static OrderCertificate Parse(string json)
    {
        ArgumentNullException.ThrowIfNull(json);
        try
        {
            var file = JsonSerializer.Deserialize(json, CertificateContext.Default.CertificateFile) ?? throw new FormatException("$: found null; a certificate is an object");
            if (file.Format != Format)
            {
                throw new FormatException($"$.format: found \"{file.Format}\"; this version reads \"{Format}\"");
            }

            return new OrderCertificate
            {
                Degree = file.Degree,
                Generators = [.. file.Generators.Select((text, i) => ReadCycles(text, $"$.generators[{i}]"))],
                Elements = [.. file.Elements.Select((pair, i) => pair is [var left, var right] ? (left, right) : throw new FormatException($"$.elements[{i}]: found {pair?.Length ?? 0} numbers; an element has two"))],
                StrongGenerators = [.. file.StrongGenerators.Select((generator, i) => (generator.Element, ReadCycles(generator.Cycles, $"$.strongGenerators[{i}].cycles")))],
                Levels = [.. file.Levels.Select((level, i) => new CertificateLevel(
                    level.BasePoint - 1,
                    [.. level.Orbit.Select((entry, k) => entry is [var point, var from, var generator]
                        ? (point - 1, from - 1, generator - 1)
                        : throw new FormatException($"$.levels[{i}].orbit[{k}]: found {entry?.Length ?? 0} numbers; an orbit point has three"))]))],
                Order = BigInteger.TryParse(file.Order, out var order) ? order : throw new FormatException($"$.order: found \"{file.Order}\"; the order is a whole number"),
            };
        }
        catch (JsonException exception)
        {
            throw new FormatException($"line {exception.LineNumber + 1}, {exception.Path}: {exception.Message}", exception);
        }
    }

    private static Permutation ReadCycles(string text, string path) =>
        CycleNotation.Numbers.TryParse(text, out var permutation, out var problem) ? permutation : throw new FormatException($"{path}: {problem}");
}
