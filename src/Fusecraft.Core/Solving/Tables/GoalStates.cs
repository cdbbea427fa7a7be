using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>The numbers of the states that fulfil the goal of a mechanism.</summary>
internal static class GoalStates
{
    /// <summary>Each once, in no particular order.</summary>
    public static IEnumerable<long> Of(StateNumbering numbering)
    {
        var mechanism = numbering.Mechanism;
        var order = (long)numbering.Group.Order;
        switch (mechanism.Goal.Kind)
        {
            case GoalKind.Shape:
                return InShapes(numbering, order, place => IsHome(numbering, place));
            case GoalKind.Marks:
                return MarkMask(mechanism) is { } mask
                    ? InShapes(numbering, order, place => Covers(numbering.Group.Groupoid.Store.Key(numbering.Region.ShapeAt(place)), mask))
                    : [];
            case GoalKind.Colours:
                return Coloured(numbering, mechanism.ColourOfSite, place => IsHome(numbering, place));
            case GoalKind.Sites:
                // Wanted labels are told apart, all others are alike.
                var colours = new int[mechanism.SiteCount];
                for (var i = 0; i < mechanism.Goal.Names.Length; i++)
                {
                    colours[mechanism.FindSite(mechanism.Goal.Names[i])!.Value] = i + 1;
                }

                return Coloured(numbering, colours, static _ => true);
            default:
                return numbering.Rank(mechanism.HomeState) is >= 0 and var home ? [home] : [];
        }
    }

    /// <summary>True when a state fulfils the goal of its mechanism.</summary>
    public static bool Contains(State state)
    {
        var mechanism = state.Mechanism;
        switch (mechanism.Goal.Kind)
        {
            case GoalKind.Shape:
                return state.Shape == mechanism.Home;
            case GoalKind.Marks:
                return state.Shape is not null && MarkMask(mechanism) is { } mask && Covers(state.Shape.Key, mask);
            case GoalKind.Colours:
                return state.Shape == mechanism.Home && Enumerable.Range(0, mechanism.SiteCount).All(site => mechanism.ColourOfSite[state.Labels[site]] == mechanism.ColourOfSite[site]);
            case GoalKind.Sites:
                return mechanism.Goal.Names.All(name => mechanism.FindSite(name)!.Value is var site && state.Labels[site] == site);
            default:
                return state.Labels.IsIdentity;
        }
    }

    /// <summary>The slots of the marks that the goal asks for; null where one can never be there.</summary>
    public static ulong[]? MarkMask(Mechanism mechanism) => mechanism.Board.MaskOf(
        mechanism.Goal.Names.Select(name => (name[..name.IndexOf('@', StringComparison.Ordinal)], mechanism.FindSite(name[(name.IndexOf('@', StringComparison.Ordinal) + 1)..])!.Value)));

    private static bool IsHome(StateNumbering numbering, int place) => numbering.Group.Groupoid.ShapeAt(numbering.Region.ShapeAt(place)) == numbering.Mechanism.Home;

    private static IEnumerable<long> InShapes(StateNumbering numbering, long order, Func<int, bool> isWanted)
    {
        for (var place = 0; place < numbering.ShapeCount; place++)
        {
            if (isWanted(place))
            {
                for (var state = place * order; state < (place + 1) * order; state++)
                {
                    yield return state;
                }
            }
        }
    }

    /// <summary>True when a shape has all slots of a mask.</summary>
    public static bool Covers(ReadOnlySpan<ulong> key, ulong[] mask)
    {
        for (var i = 0; i < mask.Length; i++)
        {
            if ((mask[i] & ~key[i]) != 0)
            {
                return false;
            }
        }

        return true;
    }

    // The labels are b·g·τ, and each must lie on a site of its own colour: the colour of τ[g[i]] is that of the label on i in the base state.
    private static IEnumerable<long> Coloured(StateNumbering numbering, IReadOnlyList<int> colours, Func<int, bool> isWanted)
    {
        var sites = numbering.Mechanism.SiteCount;
        var group = numbering.Group.Group;
        var back = numbering.BaseLabels.Inverse();
        int[] shown = [.. Enumerable.Range(0, sites).Select(site => colours[back[site]])];
        for (var place = 0; place < numbering.ShapeCount; place++)
        {
            if (!isWanted(place))
            {
                continue;
            }

            var path = numbering.PathTo(place);
            int[] wanted = [.. Enumerable.Range(0, sites).Select(site => colours[path[site]])];
            if (group.FindMemberTaking(shown, wanted) is not { } member)
            {
                continue;
            }

            foreach (var keeper in group.ColouringStabilizer(wanted).Elements())
            {
                yield return numbering.Number(place, member * keeper * path);
            }
        }
    }
}
