using System.Globalization;
using Fusecraft.Solving;
using Spectre.Console;

namespace Fusecraft.Cli;

/// <summary>The distances of a random walk to be read: a table of turns, then what it means.</summary>
internal static class MixingText
{
    private static readonly int[] Steps = [1, 2, 5];

    public static void Write(Terminal terminal, WalkDistances distances, WalkSpectrum? spectrum, int? asked)
    {
        var (output, walk) = (terminal.Out, distances.Walk);
        output.WriteLine(walk.Mechanism.Name);
        output.WriteLine($"{Wording.Count(walk.StateCount, "state")} in {Wording.Count(walk.ShapeCount, "shape")}{(walk.IsWatched ? $"; watching {Wording.Count(walk.WatchedSites.Length, "label")}, so every distance is a lower bound" : "")}");
        output.WriteLine(walk.Options.Choice == WalkChoice.FreeSteps ? "Each turn does one of the free steps, all equally likely." : "Each turn chooses one of all steps, all equally likely; one that is barred does nothing.");
        output.WriteLine();
        output.WriteLine("A distance of d: whoever bets on how the puzzle stands wins up to d more often than after a fair scramble.");
        WriteTable(terminal, distances);
        output.WriteLine();
        if (asked is { } turns)
        {
            WriteVerdict(output, distances, turns);
        }

        output.WriteLine($"within 1/4    {Needed(distances, 0.25)}");
        output.WriteLine($"within 1/100  {Needed(distances, 0.01)}");
        WriteLimits(output, walk);
        WriteSpectrum(output, walk, spectrum);
    }

    private static void WriteTable(Terminal terminal, WalkDistances distances)
    {
        var walk = distances.Walk;
        var table = new Table().Border(TableBorder.None);
        foreach (var heading in Headings(walk))
        {
            table.AddColumn(new TableColumn(heading).RightAligned().PadRight(2));
        }

        foreach (var turns in Shown(distances))
        {
            var entry = distances.ByTurns[turns];
            double[] cells = [entry.FromUniform, .. walk.IsUniform ? (double[])[] : [entry.FromStationary], .. walk.Period == 1 ? (double[])[] : [entry.FromLimit]];
            table.AddRow([new Text(Wording.Number(turns)), .. cells.Select(cell => new Text(Decimal(cell)))]);
        }

        PlainTable.Write(terminal, table);
    }

    private static string[] Headings(RandomWalk walk) =>
        ["turns", "from uniform", .. walk.IsUniform ? (string[])[] : ["from its own limit"], .. walk.Period == 1 ? (string[])[] : [Drawn(walk)]];

    private static string Drawn(RandomWalk walk) => walk.Period == 2 ? "one turn more by toss" : $"up to {walk.Period - 1} turns more by lot";

    // 1, 2, 5, 10, 20, 50, …, the numbers that the answers name, and the last.
    private static SortedSet<int> Shown(WalkDistances distances)
    {
        var last = distances.ByTurns.Length - 1;
        var shown = new SortedSet<int> { 0, last };
        for (long power = 1; power <= last; power *= 10)
        {
            shown.UnionWith(Steps.Select(step => (int)Math.Min(last, step * power)));
        }

        foreach (var distance in (double[])[0.25, 0.01])
        {
            if (distances.TurnsTo(distance) is { } turns)
            {
                shown.Add(turns);
            }
        }

        return shown;
    }

    private static void WriteVerdict(TextWriter output, WalkDistances distances, int turns)
    {
        // The walk may have come all the way before.
        var distance = distances.ByTurns[Math.Min(turns, distances.ByTurns.Length - 1)].FromLimit;
        var words = Wording.Count(turns, "random turn") + (distances.Walk.Period > 1 ? $" ({Drawn(distances.Walk)})" : "");
        output.WriteLine(distance > 0.25 ? $"{words}: not enough, {Decimal(distance)} is left."
            : distance > 0.01 ? $"{words}: better than 1/4, but {Decimal(distance)} is left."
            : $"{words}: enough, {Decimal(distance)} is left.");
    }

    private static string Needed(WalkDistances distances, double distance) => distances.TurnsTo(distance) is { } turns
        ? Wording.Count(turns, "turn") + (distances.Walk.Period > 1 ? $", {Drawn(distances.Walk)}" : "")
        : $"more than {Wording.Count(distances.ByTurns.Length - 1, "turn")}";

    private static void WriteLimits(TextWriter output, RandomWalk walk)
    {
        if (walk.Period > 1)
        {
            output.WriteLine($"The walk has period {walk.Period}: no fixed number of turns, however large, tends to less than {Decimal(walk.LeastFromUniform)} from uniform. Draw the number of turns, as the last column does.");
        }

        if (!walk.IsUniform)
        {
            output.WriteLine($"What it tends to is itself {Decimal(walk.StationaryFromUniform)} from uniform, because some shapes have more free steps than others.");
        }
    }

    private static void WriteSpectrum(TextWriter output, RandomWalk walk, WalkSpectrum? spectrum)
    {
        if (spectrum is null)
        {
            output.WriteLine("Some steps cannot be undone, so there is no bound from a spectral gap.");
        }
        else if (!double.IsNaN(spectrum.Second))
        {
            output.WriteLine($"Spectral gap {spectrum.Gap.ToString("0.000000", CultureInfo.InvariantCulture)}; in the long run a turn leaves {Decimal(spectrum.Rate)} of the distance from the limit.");
            if (spectrum.TurnsSufficient(0.01) is { } turns && !walk.IsWatched)
            {
                output.WriteLine($"From the gap alone: {Wording.Count(turns, "turn")} suffice for 1/100.");
            }
        }
    }

    private static string Decimal(double number) => number.ToString("0.0000", CultureInfo.InvariantCulture);
}
