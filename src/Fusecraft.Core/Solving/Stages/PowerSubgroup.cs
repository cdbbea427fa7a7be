using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;

namespace Fusecraft.Solving;

/// <summary>What some of the moves generate: the shapes they reach, the group of their loops at the base shape, and the labels coloured by its orbits.</summary>
internal sealed class PowerSubgroup
{
    /// <summary>Among more than this many choices only those with the fewest turns left out and the fewest replaced are looked at.</summary>
    private const int MaxChoices = 260;

    private bool? _isClosed;

    private PowerSubgroup(bool[] takes, StageFrame frame, PermutationGroup group)
    {
        Takes = takes;
        Frame = frame;
        Group = group;
        Colours = new int[frame.SiteCount];
        for (var orbit = 0; orbit < group.Orbits.Length; orbit++)
        {
            foreach (var site in group.Orbits[orbit])
            {
                Colours[site] = orbit;
            }
        }
    }

    /// <summary>For each of all moves, whether it is one of those.</summary>
    public bool[] Takes { get; }

    public StageFrame Frame { get; }

    public PermutationGroup Group { get; }

    public int[] Colours { get; }

    /// <summary>The number of states that the moves reach.</summary>
    public BigInteger StateCount => Group.Order * Frame.ShapeCount;

    /// <summary>True when the moves are some of the other's, but make less.</summary>
    public bool LiesIn(PowerSubgroup other)
    {
        for (var move = 0; move < Takes.Length; move++)
        {
            if (Takes[move] && !other.Takes[move])
            {
                return false;
            }
        }

        return Group.Order < other.Group.Order;
    }

    /// <summary>True when every loop that keeps the colours is one of the subgroup, so that the colours tell its cosets apart.</summary>
    public bool IsClosedIn(PermutationGroup all) => _isClosed ??= all.ColouringStabilizer(Colours).Order == Group.Order;

    /// <summary>The whole region with all moves; null where there are too many arcs.</summary>
    public static PowerSubgroup? Whole(VertexGroup vertexGroup, StageMove[] moves, long maxArcs, CancellationToken cancellation)
    {
        var maxShapes = maxArcs / Math.Max(1, moves.Length);
        return vertexGroup.Region.ShapeCount <= maxShapes && StageFrame.Explore(vertexGroup.Groupoid, vertexGroup.BaseShape, moves, (int)maxShapes, cancellation) is { } frame
            ? new PowerSubgroup([.. moves.Select(_ => true)], frame, vertexGroup.Group)
            : null;
    }

    /// <summary>What is generated when turns are replaced by powers or left out. None where steps cannot be undone.</summary>
    /// <param name="vertexGroup">The loops of the region at the base shape.</param>
    /// <param name="whole">The whole region.</param>
    /// <param name="maxArcs">The search ends when it has looked at this many arcs.</param>
    /// <param name="cancellation">Ends the work early.</param>
    public static List<PowerSubgroup> Find(VertexGroup vertexGroup, PowerSubgroup whole, long maxArcs, CancellationToken cancellation)
    {
        var subgroups = new List<PowerSubgroup>();
        if (!vertexGroup.Groupoid.Mechanism.IsReversible)
        {
            return subgroups;
        }

        var moves = whole.Frame.Moves;
        foreach (var takes in Choices(moves))
        {
            StageMove[] taken = [.. moves.Where((_, move) => takes[move])];
            var frame = StageFrame.Explore(vertexGroup.Groupoid, vertexGroup.BaseShape, taken, whole.Frame.ShapeCount, cancellation)!;
            maxArcs -= (long)frame.ShapeCount * taken.Length;
            if (maxArcs < 0)
            {
                break;
            }

            var group = frame.LoopGroup(cancellation);
            if (group.Order < vertexGroup.Order)
            {
                subgroups.Add(new PowerSubgroup(takes, frame, group));
            }
        }

        return subgroups;
    }

    // Every class of moves whole, or only its powers of some exponent, or left out; first those that leave out and replace the fewest.
    private static List<bool[]> Choices(StageMove[] moves)
    {
        var choices = new List<(bool[] Takes, int LeftOut, int Replaced)> { (new bool[moves.Length], 0, 0) };
        foreach (var runClass in moves.Select(move => move.Class).Distinct())
        {
            var next = new List<(bool[], int, int)>();
            foreach (var powers in PowersOf(moves, runClass))
            {
                var taken = powers.Count(take => take);
                var whole = taken == moves.Count(move => move.Class == runClass);
                foreach (var (takes, leftOut, replaced) in choices)
                {
                    next.Add(([.. takes.Zip(powers, (one, other) => one || other)], leftOut + (taken == 0 ? 1 : 0), replaced + (whole ? 0 : 1)));
                }
            }

            // One more than is kept, for the first of all is everything.
            choices = [.. next.OrderBy(choice => choice.Item2).ThenBy(choice => choice.Item3).Take(MaxChoices + 1)];
        }

        return [.. choices.Skip(1).Where(choice => choice.Takes.Contains(true)).Select(choice => choice.Takes)];
    }

    private static List<bool[]> PowersOf(StageMove[] moves, int runClass)
    {
        var first = moves.First(move => move.Class == runClass).Permutation;
        var order = (int)first.Order;
        var powers = new List<bool[]>();
        for (var exponent = 1; exponent <= order; exponent++)
        {
            if (order % exponent == 0)
            {
                var all = Enumerable.Range(1, order / exponent).Select(i => first.Power(exponent * i)).ToHashSet();
                bool[] takes = [.. moves.Select(move => move.Class == runClass && (exponent == 1 || all.Contains(move.Permutation)))];
                if (exponent == order)
                {
                    Array.Clear(takes);
                }

                if (!powers.Exists(known => known.AsSpan().SequenceEqual(takes)))
                {
                    powers.Add(takes);
                }
            }
        }

        return powers;
    }
}
