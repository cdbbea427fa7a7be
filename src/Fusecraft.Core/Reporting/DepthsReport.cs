using System.Globalization;
using Fusecraft.Solving;

namespace Fusecraft.Reporting;

/// <summary>How many states are at each distance, as JSON.</summary>
public static class DepthsReport
{
    /// <summary>What the object calls its format.</summary>
    public const string Format = "fusecraft/depths/1";

    /// <summary>
    /// One JSON object on one line: <c>format</c>, <c>metric</c> (<c>step</c>, <c>run</c> or <c>weights</c>), <c>origin</c> (<c>home</c> or <c>goal</c>), <c>states</c> and <c>counts</c> from distance 0 on as decimal
    /// strings, for they may be large, <c>greatest</c> and <c>mean</c>.
    /// </summary>
    /// <param name="table">The distances.</param>
    public static string ToJson(DistanceTable table)
    {
        ArgumentNullException.ThrowIfNull(table);
        return JsonLine.Write(table, static (json, table) =>
        {
            json.WriteStartObject();
            json.WriteString("format", Format);
            json.WriteString("metric", table.Metric.ToString());
            json.WriteString("origin", table.Origin == DistanceOrigin.ToGoal ? "goal" : "home");
            json.WriteString("states", table.StateCount.ToString(CultureInfo.InvariantCulture));
            json.WriteStartArray("counts");
            foreach (var count in table.Counts)
            {
                json.WriteStringValue(count.ToString(CultureInfo.InvariantCulture));
            }

            json.WriteEndArray();
            json.WriteNumber("greatest", table.Greatest);
            if (double.IsNaN(table.Mean))
            {
                json.WriteNull("mean");
            }
            else
            {
                json.WriteNumber("mean", table.Mean);
            }

            json.WriteEndObject();
        });
    }
}
