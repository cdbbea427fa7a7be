using Fusecraft.Mechanisms;
using Fusecraft.Reporting;

namespace Fusecraft.Cli;

/// <summary>An examination to be read: sections that say in a sentence what their figures are about.</summary>
internal static class ExaminationText
{
    private const int MostOrbits = 12;
    private const int MostSites = 10;
    private const int LabelWidth = 28;
    private const int ValueWidth = 8;

    public static string Size(Mechanism mechanism) =>
        $"{Wording.Count(mechanism.SiteCount, "site")} in {Wording.Count(mechanism.PieceCount, "piece")}, {Wording.Count(mechanism.Turns.Length, "turn")}, "
        + $"{Wording.Count(mechanism.HomeBlocks.Length, "block")} and {Wording.Count(mechanism.HomeMarks.Length, "mark")} at home";

    public static void Write(TextWriter output, Examination examination)
    {
        output.WriteLine(examination.Mechanism.Name);
        output.WriteLine($"{Size(examination.Mechanism)}.");
        Section(output, "A shape is where the blocks and marks are, labels ignored.");
        if (examination.HomeRegion is not { } home)
        {
            Row(output, "shapes found so far", Wording.Number(examination.ShapeCount), "there are more");
            Row(output, "free turns found so far", Wording.Number(examination.FreeTurnCount), "pairs of a shape and a turn whose forward step is free");
            return;
        }

        Row(output, "shapes", Wording.Number(examination.ShapeCount), "reachable from home");
        Row(output, "free turns", Wording.Number(examination.FreeTurnCount), "pairs of a shape and a turn whose forward step is free");
        Row(output, "dead ends", Wording.Number(examination.DeadEndCount!.Value), "shapes where exactly one turn has a free step, in either sense");
        Row(output, "stuck shapes", Wording.Number(examination.StuckShapeCount!.Value), "shapes where no step is free");

        Section(output, "A region is made of shapes that can all reach each other.");
        Row(output, "regions", Wording.Number(examination.RegionCount!.Value), examination.RegionCount == 1 ? "every shape leads back home" : "");
        Row(output, "passages", Wording.Number(examination.PassageCount!.Value), "free steps that leave their region: no way back");
        Row(output, "traps", Wording.Number(examination.TrapCount!.Value), "regions without passages, other than the home region");

        Section(output, "The home region holds the home shape.");
        Row(output, "shapes", Wording.Number(home.ShapeCount), "");
        Row(output, "farthest shape", Wording.Number(home.Eccentricity), "single steps from home");
        WriteGroup(output, home.VertexGroup);

        Section(output, "A state is where all the labels are.");
        Row(output, "states of the home region", $"{Wording.Number(home.StateCount)}, as many as its shapes times the order", "");
        Row(output, "states reachable in all", examination.ReachableStateCount is { } states ? Wording.Number(states) : "not known: over several regions it would take too long to count them", "");
    }

    private static void WriteGroup(TextWriter output, VertexGroupFigures group)
    {
        Section(output, "The vertex group is all that turn paths from the home shape back to it can do to the labels.");
        var order = Wording.Number(group.Order);
        var factors = group.FactoredOrder.ToString();
        Row(output, "order", (order == factors ? order : $"{order} = {factors}") + $", {group.Proof}", "");
        Row(output, "moved sites", Wording.Number(group.MovedSiteCount), group.Orbits.IsEmpty ? "no label ever moves" : $"in {Wording.Count(group.Orbits.Length, "orbit")}, where labels can trade places");
        foreach (var orbit in group.Orbits.Take(MostOrbits))
        {
            var more = orbit.Length > MostSites + 1 ? $" and {orbit.Length - MostSites} more" : "";
            output.WriteLine($"    {Wording.Count(orbit.Length, "site")}: {string.Join(' ', more.Length > 0 ? orbit.Take(MostSites) : orbit)}{more}");
        }

        if (group.Orbits.Length > MostOrbits)
        {
            output.WriteLine($"    and {Wording.Count(group.Orbits.Length - MostOrbits, "more orbit")}; --json lists them all");
        }
    }

    private static void Section(TextWriter output, string sentence)
    {
        output.WriteLine();
        output.WriteLine(sentence);
    }

    private static void Row(TextWriter output, string label, string value, string note) =>
        output.WriteLine($"  {label.PadRight(LabelWidth)}{(note.Length > 0 ? $"{value.PadRight(ValueWidth)} {note}" : value)}");
}
