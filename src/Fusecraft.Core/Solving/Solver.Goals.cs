using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

// Goals that leave some labels free.
public sealed partial class Solver
{
    /// <summary>More goal shapes than this are not searched back from.</summary>
    private const int MaxGoalShapes = 100_000;

    private SolveResult RouteMarks(State from, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (IsOffBoard(from, "starts", out var reason))
        {
            return SolveResult.Impossible(reason);
        }

        progress?.Report(new SolveProgress("exploring shapes", 0));
        if (GoalStates.MarkMask(Mechanism) is not { } mask)
        {
            return SolveResult.Impossible($"A mark of the goal ({string.Join(", ", Mechanism.Goal.Names)}) can never be there.");
        }

        // Shapes are numbered by distance, so the first one that fits is a nearest one.
        var groupoid = ShapeGroupoid.ExploreFrom(from.Shape!, new ExplorationOptions { MaxShapes = Options.MaxShapes }, null, cancellation);
        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            if (GoalStates.Covers(groupoid.Store.Key(shape), mask))
            {
                var path = groupoid.PathTo(shape);
                return path.Length > MaxSteps ? TooShort() : OfFewestSteps(Replayed(from, path.Steps, GoalStates.Contains));
            }
        }

        return groupoid.IsComplete
            ? SolveResult.Impossible($"None of the {groupoid.ShapeCount} shapes that can be reached has the marks of the goal.")
            : SolveResult.Unsettled($"The budget of {Options.MaxShapes} shapes ended the search.");
    }

    private SolveResult RouteColours(State from, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (IsOffBoard(from, "starts", out var reason))
        {
            return SolveResult.Impossible(reason);
        }

        progress?.Report(new SolveProgress("searching colours", 0));
        int[] ColoursOn(State state) => [.. LabelsOn(state).Select(label => Mechanism.ColourOfSite[label])];
        var wanted = ColoursOn(Mechanism.HomeState);
        var search = new StateSearch(Mechanism, cancellation);
        search.AddStart(from.Shape!, ColoursOn(from));
        search.AddGoal(Mechanism.Home, wanted);
        switch (search.Run(Options.MaxStates, MaxSteps))
        {
            case StateSearch.Outcome.Found:
                return OfFewestSteps(Replayed(from, search.Path, GoalStates.Contains));
            case StateSearch.Outcome.NoPath:
                return SolveResult.Impossible("A search has seen every colouring that can be reached; the home colouring is not among them.");
            case StateSearch.Outcome.NoneThatShort:
                return TooShort();
        }

        // Every label home is one way to have every colour home.
        var labelled = RouteStates(from, Mechanism.HomeState, progress, cancellation);
        return labelled.HasPath
            ? SolveResult.Found(labelled.Path, Options.Metric, $"Brings every label home, so every colour; a search proved that no path has fewer than {search.LowerBound} steps before its budget ended.")
            : SolveResult.Unsettled($"The budget of {Options.MaxStates} states ended the search, and the labels themselves cannot all be brought home or no path for that was found.");
    }

    private SolveResult RouteSites(State from, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (IsOffBoard(from, "starts", out var reason))
        {
            return SolveResult.Impossible(reason);
        }

        int[] sites = [.. Mechanism.Goal.Names.Select(name => Mechanism.FindSite(name)!.Value)];
        progress?.Report(new SolveProgress("exploring shapes", 0));
        var groupoid = ShapeGroupoid.ExploreFrom(from.Shape!, new ExplorationOptions { MaxShapes = Options.MaxShapes }, null, cancellation);
        if (!groupoid.IsComplete)
        {
            return SolveResult.Unsettled($"There are more than {Options.MaxShapes} shapes, too many to prove anything within the budget.");
        }

        if (groupoid.ShapeCount <= MaxGoalShapes)
        {
            // Only the wanted labels count; all others look alike.
            progress?.Report(new SolveProgress("searching", 0));
            var search = new StateSearch(Mechanism, cancellation);
            search.AddStart(from.Shape!, Tracked(from));
            for (var shape = 0; shape < groupoid.ShapeCount; shape++)
            {
                search.AddGoal(groupoid.ShapeAt(shape), Tracked(Mechanism.HomeState));
            }

            switch (search.Run(Options.MaxStates, MaxSteps))
            {
                case StateSearch.Outcome.Found:
                    return OfFewestSteps(Replayed(from, search.Path, GoalStates.Contains));
                case StateSearch.Outcome.NoPath:
                    return SolveResult.Impossible("A search has seen every arrangement of the wanted labels that can be reached; having them all home is not among them.");
                case StateSearch.Outcome.NoneThatShort:
                    return TooShort();
            }
        }

        return RouteSitesByGroup(from, sites, groupoid, progress, cancellation);

        // The wanted labels are numbered from 1, all others are 0.
        int[] Tracked(State state) => [.. LabelsOn(state).Select(label => Array.IndexOf(sites, label) + 1)];
    }

    // Looks, shape by shape, for a loop at the start that together with the tree path takes all wanted labels home.
    private SolveResult RouteSitesByGroup(State from, int[] sites, ShapeGroupoid groupoid, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        progress?.Report(new SolveProgress("asking the vertex group", 0));
        var vertexGroup = groupoid.VertexGroupAt(0, cancellation);
        int[] places = [.. sites.Select(site => from.Labels[site])];
        var chain = StabilizerChain.Build(vertexGroup.Group, new ChainOptions { BasePrefix = places, OrderBound = vertexGroup.Order }, cancellation);
        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            if (groupoid.RegionOf(shape) != 0)
            {
                continue;
            }

            var path = vertexGroup.TreePath(shape).Permutation;
            var back = path.Inverse();
            if (chain.MemberTaking(places, [.. sites.Select(site => back[site])]) is { } loop)
            {
                return RouteStates(from, Mechanism.StateOf(from.Labels * loop * path), progress, cancellation) is { HasPath: true } found
                    ? SolveResult.Found(found.Path, Options.Metric, "The vertex group gave one of the states where all wanted labels are home; a path leads there.")
                    : SolveResult.Unsettled("The vertex group proves that a path exists, but none was found within the budget.", Options.MaxLength is null ? true : null);
            }
        }

        return groupoid.Regions.Length == 1
            ? SolveResult.Impossible($"In none of the {groupoid.ShapeCount} shapes that can be reached does the vertex group allow all wanted labels to be home together.")
            : SolveResult.Unsettled("The wanted labels cannot be brought home within the region of the start; beyond its passages a search ended by its budget.");
    }
}
