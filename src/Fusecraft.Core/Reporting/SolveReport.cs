using Fusecraft.Solving;

namespace Fusecraft.Reporting;

/// <summary>What a solver found, as JSON.</summary>
public static class SolveReport
{
    /// <summary>
    /// One JSON object on one line: <c>solvable</c> (true, false, or null where a budget ended the work), <c>word</c> and <c>length</c> (null where there is no path),
    /// where length is not counted by steps <c>metric</c> and <c>lengthByMetric</c>, then <c>provenShortest</c> and <c>reason</c>.
    /// </summary>
    /// <param name="result">What a solver found.</param>
    public static string ToJson(SolveResult result)
    {
        ArgumentNullException.ThrowIfNull(result);
        return JsonLine.Write(result, static (json, result) =>
        {
            json.WriteStartObject();
            if (result.IsSolvable is { } solvable)
            {
                json.WriteBoolean("solvable", solvable);
            }
            else
            {
                json.WriteNull("solvable");
            }

            json.WriteString("word", result.Path?.Word.ToString());
            if (result.HasPath)
            {
                json.WriteNumber("length", result.Path.Length);
            }
            else
            {
                json.WriteNull("length");
            }

            if (result.HasPath && result.Metric.Kind != MetricKind.Step)
            {
                json.WriteString("metric", result.Metric.ToString());
                json.WriteNumber("lengthByMetric", result.Metric.LengthOf(result.Path));
            }

            json.WriteBoolean("provenShortest", result.IsProvenShortest);
            json.WriteString("reason", result.Reason);
            json.WriteEndObject();
        });
    }
}
