using System.Text.Json;
using Fusecraft.Solving;

namespace Fusecraft.Reporting;

/// <summary>How far from uniform random turns are, as JSON.</summary>
public static class MixingReport
{
    /// <summary>The value of the member <c>format</c>: name and version of the object that <see cref="ToJson"/> gives.</summary>
    public const string Format = "fusecraft/mixing/1";

    /// <summary>
    /// One JSON object on one line. <c>distances</c> has an entry for each number of turns looked at: the distance from uniform, from the stationary distribution, and from the limit along the numbers of turns alike modulo
    /// the period. <c>turnsTo</c> has the least numbers of turns that bring the last of these to 1/4 and to 1/100, null where those looked at do not suffice. <c>spectrum</c> is null where it was not computed.
    /// </summary>
    /// <param name="distances">The distances of a walk.</param>
    /// <param name="spectrum">Its eigenvalues; null where they are not known.</param>
    public static string ToJson(WalkDistances distances, WalkSpectrum? spectrum)
    {
        ArgumentNullException.ThrowIfNull(distances);
        return JsonLine.Write((distances, spectrum), static (json, found) => Write(json, found.distances, found.spectrum));
    }

    private static void Write(Utf8JsonWriter json, WalkDistances distances, WalkSpectrum? spectrum)
    {
        var walk = distances.Walk;
        json.WriteStartObject();
        json.WriteString("format", Format);
        json.WriteString("mechanism", walk.Mechanism.Name);
        json.WriteString("choice", walk.Options.Choice == WalkChoice.FreeSteps ? "free" : "all");
        json.WriteNumber("holding", walk.Options.Holding);
        json.WriteNumber("states", walk.StateCount);
        json.WriteNumber("shapes", walk.ShapeCount);
        WriteWatched(json, walk);
        json.WriteNumber("period", walk.Period);
        json.WriteBoolean("isReversible", walk.IsReversible);
        json.WriteBoolean("isUniform", walk.IsUniform);
        json.WriteNumber("stationaryFromUniform", walk.StationaryFromUniform);
        json.WriteNumber("leastFromUniform", walk.LeastFromUniform);
        json.WriteStartObject("turnsTo");
        WriteTurns(json, "1/4", distances.TurnsTo(0.25));
        WriteTurns(json, "1/100", distances.TurnsTo(0.01));
        json.WriteEndObject();
        json.WriteStartArray("distances");
        foreach (var entry in distances.ByTurns)
        {
            json.WriteStartObject();
            json.WriteNumber("turns", entry.Turns);
            json.WriteNumber("fromUniform", entry.FromUniform);
            json.WriteNumber("fromStationary", entry.FromStationary);
            json.WriteNumber("fromLimit", entry.FromLimit);
            json.WriteEndObject();
        }

        json.WriteEndArray();
        json.WriteNumber("errorBound", distances.ErrorBound);
        WriteSpectrum(json, spectrum);
        json.WriteEndObject();
    }

    private static void WriteWatched(Utf8JsonWriter json, RandomWalk walk)
    {
        if (!walk.IsWatched)
        {
            json.WriteNull("watched");
            return;
        }

        json.WriteStartArray("watched");
        foreach (var site in walk.WatchedSites)
        {
            json.WriteStringValue(walk.Mechanism.SiteNames[site]);
        }

        json.WriteEndArray();
    }

    private static void WriteSpectrum(Utf8JsonWriter json, WalkSpectrum? spectrum)
    {
        if (spectrum is null || double.IsNaN(spectrum.Second))
        {
            json.WriteNull("spectrum");
            return;
        }

        json.WriteStartObject("spectrum");
        json.WriteNumber("second", spectrum.Second);
        json.WriteNumber("least", spectrum.Least);
        json.WriteNumber("gap", spectrum.Gap);
        json.WriteNumber("rate", spectrum.Rate);
        json.WriteNumber("errorBound", spectrum.ErrorBound);
        WriteTurns(json, "turnsSufficient", spectrum.TurnsSufficient(0.01));
        WriteTurns(json, "turnsNecessary", spectrum.TurnsNecessary(0.01));
        json.WriteEndObject();
    }

    private static void WriteTurns(Utf8JsonWriter json, string name, int? turns)
    {
        if (turns is { } known)
        {
            json.WriteNumber(name, known);
        }
        else
        {
            json.WriteNull(name);
        }
    }
}
