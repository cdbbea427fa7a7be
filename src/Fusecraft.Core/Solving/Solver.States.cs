using Fusecraft.Groupoids;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

// Paths between two states, every label counting.
public sealed partial class Solver
{
    private SolveResult RouteStates(State from, State to, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        if (from == to)
        {
            return SolveResult.Shortest(TurnPath.At(from.Shape ?? Mechanism.Home), Options.Metric);
        }

        if (IsOffBoard(from, "starts", out var reason) || IsOffBoard(to, "ends", out reason))
        {
            return SolveResult.Impossible(reason);
        }

        var search = new StateSearch(Mechanism, cancellation);
        search.AddStart(from.Shape!, LabelsOn(from));
        search.AddGoal(to.Shape!, LabelsOn(to));
        progress?.Report(new SolveProgress("searching nearby", 0));
        var countsSteps = Options.Metric.Kind == MetricKind.Step;
        if (countsSteps && Search(Math.Min(FirstLook, Options.MaxStates)) is { } near)
        {
            return near;
        }

        progress?.Report(new SolveProgress("exploring shapes", 0));
        var proof = Prove(from, to, cancellation);
        if (proof.Impossible is not null)
        {
            return SolveResult.Impossible(proof.Impossible);
        }

        progress?.Report(new SolveProgress("searching", search.StateCount));
        if (countsSteps && Search(Options.MaxStates) is { } far)
        {
            return far;
        }

        if (proof.Context is not null && ByTable(from, to, proof.Context, progress, cancellation) is { } exact)
        {
            return exact;
        }

        // A word made of known ones is at hand at once; where it is short enough, nothing more was asked for.
        if (countsSteps && Made("") is { } made)
        {
            return made;
        }

        var unsettled = "";
        if (Options.MaxLength is not null || !countsSteps)
        {
            var bounded = _bounded.Value.Find(from, to, Options.MaxLength ?? int.MaxValue, progress, cancellation);
            if (bounded.Outcome != BoundedOutcome.BudgetEnded)
            {
                return bounded.HasPath ? SolveResult.Shortest(bounded.Path, Options.Metric)
                    : bounded.Outcome == BoundedOutcome.NoneAtAll ? SolveResult.Impossible("A search has tried every word that could lead there.")
                    : TooShort();
            }

            var ended = Options.TimeLimit is null || bounded.NodeCount == Options.MaxNodes
                ? $"The budget of {Options.MaxNodes} nodes ended a bounded search"
                : $"The time limit ended a bounded search, as a budget of {bounded.NodeCount} nodes does on any machine";
            unsettled = $"{ended}; no path is shorter than {bounded.LowerBound}, counted by {Options.Metric}.";
            if (Options.MaxLength is not null)
            {
                return (countsSteps ? null : Made(unsettled)) ?? SolveResult.Unsettled(unsettled);
            }
        }

        if (proof.Context is null)
        {
            return SolveResult.Unsettled($"{proof.Unsettled} A search found no path of fewer than {search.LowerBound} steps before its budget of {Options.MaxStates} states ended.");
        }

        progress?.Report(new SolveProgress("making words", 0));
        return Long(from, to, proof.Context, search.LowerBound, unsettled, cancellation);

        // Where a greatest length is asked for and a word made of known ones keeps it.
        SolveResult? Made(string reason) =>
            Options.MaxLength is { } most && proof.Context is not null && Long(from, to, proof.Context, search.LowerBound, reason, cancellation) is { HasPath: true } word && Options.Metric.LengthOf(word.Path) <= most
                ? word
                : null;

        SolveResult? Search(int maxStates) => search.Run(maxStates, Options.MaxLength) switch
        {
            StateSearch.Outcome.Found => SolveResult.Shortest(Replayed(from, search.Path, end => end == to), Metric.Step),
            StateSearch.Outcome.NoPath => SolveResult.Impossible(
                Prove(from, to, cancellation).Impossible ?? "A search has seen every state that can be reached; the wanted one is not among them."),
            StateSearch.Outcome.NoneThatShort => TooShort(),
            _ => null,
        };
    }

    // Where all states of the region fit a table, it knows every shortest path to the end: labels renamed, the end is the table's base state.
    private SolveResult? ByTable(State from, State to, RegionContext context, IProgress<SolveProgress>? progress, CancellationToken cancellation)
    {
        var key = (context.Group, context.Groupoid.IndexOf(to.Shape!));
        if (!_tables.TryGetValue(key, out var table))
        {
            var options = new DistanceOptions { Metric = Options.Metric, MaxBytes = Math.Max(1, Options.MaxTableBytes), DegreeOfParallelism = context.Groupoid.DegreeOfParallelism };
            var numbering = context.Group.StateCount / 8 > options.MaxBytes ? null : StateNumbering.Of(context.Group.MovedTo(key.Item2));
            progress?.Report(new SolveProgress("making a table of all states", 0));
            table = numbering is null || DistanceTable.BytesFor(numbering, options) > options.MaxBytes ? null : DistanceTable.BuildToBase(numbering, options, cancellation);
            _tables.Add(key, table);
        }

        if (table?.PathToBase(from, to.Labels.Inverse() * from.Labels) is not { } path)
        {
            return null;
        }

        return Options.Metric.LengthOf(path) <= (Options.MaxLength ?? long.MaxValue)
            ? SolveResult.Shortest(Replayed(from, path.Steps, end => end == to), Options.Metric)
            : TooShort();
    }

    // Whether a path exists, by shapes and vertex group. The context is of the region of both states where a path is proven to exist.
    private (string? Impossible, RegionContext? Context, string? Unsettled) Prove(State from, State to, CancellationToken cancellation)
    {
        _fromHome ??= ShapeGroupoid.Explore(Mechanism, new ExplorationOptions { MaxShapes = Options.MaxShapes }, null, cancellation);
        var groupoid = _fromHome;
        var start = groupoid.IndexOf(from.Shape!);
        if (start < 0 || (groupoid.IsComplete && !InOneRegion(groupoid, start, groupoid.IndexOf(to.Shape!))))
        {
            groupoid = ShapeGroupoid.ExploreFrom(from.Shape!, new ExplorationOptions { MaxShapes = Options.MaxShapes }, null, cancellation);
            start = 0;
        }

        if (!groupoid.IsComplete)
        {
            return (null, null, $"There are more than {Options.MaxShapes} shapes, too many to prove anything within the budget.");
        }

        var end = groupoid.IndexOf(to.Shape!);
        if (end < 0)
        {
            return ($"The shapes differ for good: no turn path leads from the shape {from.Shape} to the shape {to.Shape}.", null, null);
        }

        var wanted = from.Labels.Inverse() * to.Labels;
        if (InOneRegion(groupoid, start, end))
        {
            var context = Context(groupoid, start, cancellation);
            var loop = LoopFor(context, wanted, start, end).Loop;
            var evidence = context.Group.Group.Explain(loop);
            return evidence.IsMember ? (null, context, null) : (Explain(evidence, context), null, null);
        }

        // Passages lie between. Whatever path there is, it makes with the tree a loop on the graph of all shapes, walked in either sense.
        var tree = RegionTree.OfAll(groupoid);
        var all = VertexGroupExtraction.Run(groupoid, tree, groupoid.DegreeOfParallelism, cancellation);
        var across = all.Group.Explain(wanted * TurnPath.Follow(groupoid.ShapeAt(0), tree.PathTo(end)!.Value).Permutation.Inverse());
        return across.IsMember
            ? (null, null, "A passage that cannot be walked back lies between the two shapes, so membership in a vertex group does not settle it.")
            : ("Even if every step could be taken back, no turn path would bring the labels there. " + Describe(across), null, null);
    }

    private static bool InOneRegion(ShapeGroupoid groupoid, int one, int other) => other >= 0 && groupoid.RegionOf(one) == groupoid.RegionOf(other);

    private RegionContext Context(ShapeGroupoid groupoid, int shape, CancellationToken cancellation)
    {
        if (!ReferenceEquals(groupoid, _fromHome))
        {
            return new RegionContext(groupoid.VertexGroupAt(shape, cancellation), Options.Seed);
        }

        var region = groupoid.Regions[groupoid.RegionOf(shape)];
        if (!_contexts.TryGetValue(region.Index, out var context))
        {
            context = new RegionContext(groupoid.VertexGroupAt(region.FirstShape, cancellation), Options.Seed);
            _contexts.Add(region.Index, context);
        }

        return context;
    }

    // Splits the wanted permutation into a path to the base shape, a loop there, and a tree path to the end.
    private static (TurnPath There, Permutation Loop, TurnPath Out) LoopFor(RegionContext context, Permutation wanted, int start, int end)
    {
        var there = context.Groupoid.FindPath(start, context.Group.BaseShape)!;
        var outward = context.Group.TreePath(end);
        return (there, there.Permutation.Inverse() * wanted * outward.Permutation.Inverse(), outward);
    }

    private SolveResult Long(State from, State to, RegionContext context, int lowerBound, string unsettled, CancellationToken cancellation)
    {
        if (LongWord(from, to, context, Options.MaxStagedMoves > 0, cancellation) is not { } word)
        {
            return SolveResult.Unsettled("The vertex group proves that a path exists, but no word of reasonable length was found for it.", true);
        }

        return SolveResult.Found(
            Replayed(from, word.Steps, end => end == to),
            Options.Metric,
            $"{word.How}. {(unsettled.Length > 0 ? unsettled : $"A search proved that no path has fewer than {lowerBound} steps before its budget ended.")}");
    }

    // By stages where they fit, else by the shape tree and a stabilizer chain with words; both end at the base shape, from where the tree leads on.
    private (List<Step> Steps, string How, long Nodes)? LongWord(State from, State to, RegionContext context, bool byStages, CancellationToken cancellation)
    {
        var start = context.Groupoid.IndexOf(from.Shape!);
        var (there, loop, outward) = LoopFor(context, from.Labels.Inverse() * to.Labels, start, context.Groupoid.IndexOf(to.Shape!));
        var staged = byStages ? context.Staged(_staged, cancellation) : null;
        if (staged?.Find(start, outward.Permutation * to.Labels.Inverse() * from.Labels, cancellation) is var (word, nodes))
        {
            return (staged.Shorten(start, [.. word, .. outward.Steps], cancellation), "Made by stages", nodes);
        }

        if (context.Undo(loop.Inverse(), cancellation) is not { } undoing)
        {
            return null;
        }

        List<Step> steps = [.. there.Steps, .. undoing, .. outward.Steps];
        return (staged?.Shorten(start, steps, cancellation) ?? PathShortening.Shorten(steps), "Made from the shape tree and a stabilizer chain with words", 1);
    }

    /// <summary>A short word by stages, without a search for a shortest one. See <see cref="StagedSolver"/>.</summary>
    internal StagedResult RouteByStages(State from, State to, CancellationToken cancellation)
    {
        RequireOwn(from);
        RequireOwn(to);
        lock (_lock)
        {
            if (from == to)
            {
                return new StagedResult(true, TurnPath.At(from.Shape ?? Mechanism.Home), 0, 1, "Nothing needs to be done.");
            }

            if (IsOffBoard(from, "starts", out var reason) || IsOffBoard(to, "ends", out reason))
            {
                return new StagedResult(false, null, 0, 1, reason);
            }

            var proof = Prove(from, to, cancellation);
            if (proof.Context is null)
            {
                return new StagedResult(proof.Impossible is null ? null : false, null, 0, 1, proof.Impossible ?? proof.Unsettled!);
            }

            if (LongWord(from, to, proof.Context, byStages: true, cancellation) is not { } word)
            {
                return new StagedResult(true, null, 0, 1, "The vertex group proves that a path exists, but no word of reasonable length was found for it.");
            }

            var path = Replayed(from, word.Steps, end => end == to);
            return new StagedResult(true, path, _staged.Metric.LengthOf(path), word.Nodes, word.How + ".");
        }
    }

    private string Explain(MembershipEvidence evidence, RegionContext context)
    {
        var shape = context.Groupoid.ShapeAt(context.Group.BaseShape);
        return $"The shape can be reached, but the vertex group at {(shape == Mechanism.Home ? "home" : $"the shape {shape}")} (order {context.Group.Order}) does not hold the permutation. " + Describe(evidence);
    }

    private string Describe(MembershipEvidence evidence)
    {
        string Name(int? site) => Mechanism.SiteNames[site!.Value];
        return evidence.Kind switch
        {
            MembershipEvidenceKind.LeavesOrbit => $"The label on {Name(evidence.Point)} would have to go to {Name(evidence.Image)}, outside its orbit.",
            MembershipEvidenceKind.LeavesLevel => $"At level {evidence.Level + 1} of its stabilizer chain the label on {Name(evidence.Point)} would have to go to {Name(evidence.Image)} with the base points before it in place, which no member does.",
            _ => $"With all base points of its stabilizer chain in place, {Mechanism.Notation.Format(evidence.Residue)} is left over.",
        };
    }
}
