using System.Numerics;
using Fusecraft.Groups;

namespace Fusecraft.Solving;

/// <summary>
/// Splits the goal of a stage into colourings with few arrangements each: a member that keeps all of them keeps the goal's. Orbit by orbit, leaving out what follows from the orbits before; where one orbit
/// has too many arrangements, colours are run together, or labels taken a few at a time.
/// </summary>
internal static class StageColourings
{
    /// <summary>With more colours than this in an orbit they are taken a few at a time.</summary>
    private const int MaxPartitioned = 5;

    /// <summary>The colourings; null where one would have more arrangements than the limit.</summary>
    /// <param name="group">The loops at the base shape.</param>
    /// <param name="goal">For each label its colour in the goal.</param>
    /// <param name="limit">The greatest number of arrangements of one colouring.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static List<int[]>? Split(PermutationGroup group, int[] goal, BigInteger limit, CancellationToken cancellation)
    {
        var colourings = new List<int[]>();
        var left = group;
        foreach (var orbit in group.MovedOrbits)
        {
            cancellation.ThrowIfCancellationRequested();
            var colours = Joined(goal.Length, orbit.GroupBy(label => goal[label]));
            if (Keeps(left, colours))
            {
                continue;
            }

            if (group.OrbitSizeOfColouring(colours, cancellation) <= limit)
            {
                colourings.Add(colours);
            }
            else
            {
                int[][] classes = [.. orbit.GroupBy(label => goal[label]).Select(labels => labels.ToArray())];
                if ((classes.Length <= MaxPartitioned ? ByPartitions(group, classes, goal.Length, limit) : ByTurns(group, left, classes, goal.Length, limit)) is not { } parts)
                {
                    return null;
                }

                colourings.AddRange(parts);
            }

            left = left.ColouringStabilizer(colours, cancellation);
        }

        return colourings;
    }

    /// <summary>True when every member keeps the colour of every label.</summary>
    public static bool Keeps(PermutationGroup group, int[] colours)
    {
        foreach (var generator in group.Generators)
        {
            for (var point = 0; point < colours.Length; point++)
            {
                if (colours[point] != colours[generator[point]])
                {
                    return false;
                }
            }
        }

        return true;
    }

    // The first class, the second class, … get the colours 1, 2, …; all other labels 0.
    private static int[] Joined(int count, IEnumerable<IEnumerable<int>> classes)
    {
        var colours = new int[count];
        var colour = 0;
        foreach (var labels in classes)
        {
            colour++;
            foreach (var label in labels)
            {
                colours[label] = colour;
            }
        }

        return colours;
    }

    // Two or three ways to run classes together that tell all classes apart between them, with the least product of their sizes.
    private static List<int[]>? ByPartitions(PermutationGroup group, int[][] classes, int count, BigInteger limit)
    {
        var ways = new List<(int[] Part, int[] Colours, BigInteger Size)>();
        foreach (var part in Partitions(classes.Length))
        {
            var colours = Joined(count, classes.Select((labels, i) => (labels, part[i])).GroupBy(pair => pair.Item2, pair => pair.labels).Select(group => group.SelectMany(labels => labels)));
            var size = group.OrbitSizeOfColouring(colours);
            if (size > 1 && size <= limit)
            {
                ways.Add((part, colours, size));
            }
        }

        List<int[]>? best = null;
        var least = BigInteger.Zero;
        for (var i = 0; i < ways.Count; i++)
        {
            for (var j = i + 1; j < ways.Count; j++)
            {
                for (var k = j; k < ways.Count; k++)
                {
                    var product = ways[i].Size * ways[j].Size * (k == j ? 1 : ways[k].Size);
                    if ((best is null || product < least) && Enumerable.Range(0, classes.Length).Select(at => (ways[i].Part[at], ways[j].Part[at], ways[k].Part[at])).Distinct().Count() == classes.Length)
                    {
                        (best, least) = (k == j ? [ways[i].Colours, ways[j].Colours] : [ways[i].Colours, ways[j].Colours, ways[k].Colours], product);
                    }
                }
            }
        }

        return best;
    }

    // All partitions of 0 … count-1 as restricted growth strings.
    private static List<int[]> Partitions(int count)
    {
        var partitions = new List<int[]> { Array.Empty<int>() };
        for (var i = 0; i < count; i++)
        {
            partitions = [.. partitions.SelectMany(part => Enumerable.Range(0, part.Append(-1).Max() + 2).Select(next => part.Append(next).ToArray()))];
        }

        return partitions;
    }

    private static List<int[]>? ByTurns(PermutationGroup group, PermutationGroup left, int[][] classes, int count, BigInteger limit)
    {
        var colourings = new List<int[]>();
        var chosen = new List<int[]>();
        var kept = group;
        foreach (var labels in classes)
        {
            int[] alone = Joined(count, [labels]);
            if (Keeps(left, alone) || Keeps(kept, alone))
            {
                continue;
            }

            var next = kept.ColouringStabilizer(alone);
            if (group.Order / next.Order > limit && chosen.Count > 0)
            {
                left = Finish();
                next = group.ColouringStabilizer(alone);
                if (Keeps(left, alone))
                {
                    continue;
                }
            }

            if (group.Order / next.Order > limit)
            {
                return null;
            }

            chosen.Add(labels);
            kept = next;
        }

        if (chosen.Count > 0)
        {
            Finish();
        }

        return colourings;

        PermutationGroup Finish()
        {
            var colours = Joined(count, chosen);
            colourings.Add(colours);
            chosen.Clear();
            kept = group;
            return left.ColouringStabilizer(colours);
        }
    }
}
