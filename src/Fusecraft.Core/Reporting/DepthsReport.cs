using System.Globalization;
using System.Numerics;
using Fusecraft.Solving;

namespace Fusecraft.Reporting;

/// <summary>How many states are at each distance, as JSON.</summary>
public static class DepthsReport
{
    /// <summary>What the object calls its format.</summary>
    public const string Format = "fusecraft/depths/1";

    /// <summary>
    /// One JSON object on one line: <c>format</c>, <c>metric</c> (<c>step</c>, <c>run</c> or <c>weights</c>), <c>origin</c> (<c>home</c> or <c>goal</c>), <c>isComplete</c> (here true), <c>states</c> and <c>counts</c> from distance
    /// 0 on as decimal strings, for they may be large, <c>greatest</c> and <c>mean</c>.
    /// </summary>
    /// <param name="table">The distances.</param>
    public static string ToJson(DistanceTable table)
    {
        ArgumentNullException.ThrowIfNull(table);
        return Write(new Figures(table.Metric, table.Origin == DistanceOrigin.ToGoal ? "goal" : "home", table.StateCount, table.Counts.Select(count => (BigInteger)count), table.Greatest, table.Mean));
    }

    /// <summary>The same of a census from home, which may be incomplete: then <c>isComplete</c> is false, <c>counts</c> end with the last distance that is counted whole, and <c>states</c>, <c>greatest</c> and <c>mean</c> are null.</summary>
    /// <param name="census">The counts; distances that are no multiples of its unit are written as 0 states.</param>
    public static string ToJson(DepthCensus census)
    {
        ArgumentNullException.ThrowIfNull(census);
        var counts = new BigInteger[census.Counts.Length == 0 ? 0 : ((census.Counts.Length - 1) * census.Unit) + 1];
        for (var i = 0; i < census.Counts.Length; i++)
        {
            counts[i * census.Unit] = census.Counts[i];
        }

        return Write(new Figures(census.Metric, "home", census.StateCount, counts, counts.Length - 1, census.Mean));
    }

    private static string Write(Figures figures) => JsonLine.Write(figures, static (json, figures) =>
    {
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.WriteString("metric", figures.Metric.ToString());
        json.WriteString("origin", figures.Origin);
        json.WriteBoolean("isComplete", figures.States is not null);
        json.WriteString("states", figures.States?.ToString(CultureInfo.InvariantCulture));
        json.WriteStartArray("counts");
        foreach (var count in figures.Counts)
        {
            json.WriteStringValue(count.ToString(CultureInfo.InvariantCulture));
        }

        json.WriteEndArray();
        if (figures.States is null)
        {
            json.WriteNull("greatest");
        }
        else
        {
            json.WriteNumber("greatest", figures.Greatest);
        }

        if (double.IsNaN(figures.Mean))
        {
            json.WriteNull("mean");
        }
        else
        {
            json.WriteNumber("mean", figures.Mean);
        }

        json.WriteEndObject();
    });

    private sealed record Figures(Metric Metric, string Origin, BigInteger? States, IEnumerable<BigInteger> Counts, int Greatest, double Mean);
}
