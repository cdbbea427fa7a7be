using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>
/// What the goal of a mechanism tells apart: the shape, and on each site the label as far as it matters. States alike in that are equally far from the goal, by equally many words. Packed as the shape's key and the
/// colours on the sites.
/// </summary>
internal sealed class GoalView
{
    private readonly Mechanism _mechanism;
    private readonly int[] _colours;
    private readonly SiteMover _mover;
    private readonly int _boardWords;

    public GoalView(Mechanism mechanism)
    {
        _mechanism = mechanism;
        _mover = mechanism.SiteMover;
        _boardWords = mechanism.Board.Words;
        _colours = new int[mechanism.SiteCount];
        switch (mechanism.Goal.Kind)
        {
            case GoalKind.Home:
                _colours = [.. Enumerable.Range(0, mechanism.SiteCount)];
                break;
            case GoalKind.Colours:
                _colours = [.. mechanism.ColourOfSite];
                break;
            case GoalKind.Sites:
                // Labels that are not wanted look like the first of them.
                var wanted = mechanism.Goal.Names.Select(name => mechanism.FindSite(name)!.Value).ToHashSet();
                var other = Enumerable.Range(0, mechanism.SiteCount).FirstOrDefault(site => !wanted.Contains(site));
                _colours = [.. Enumerable.Range(0, mechanism.SiteCount).Select(site => wanted.Contains(site) ? site : other)];
                break;
        }
    }

    public int Words => _boardWords + _mover.Words;

    /// <summary>What the goal sees of a state that has a shape.</summary>
    public ulong[] Node(State state)
    {
        var labels = state.Labels.Inverse();
        return Node(state.Shape!, [.. Enumerable.Range(0, _colours.Length).Select(site => _colours[labels[site]])]);
    }

    /// <summary>All that fulfils the goal and might be reached from a shape; null where there are more shapes than allowed.</summary>
    public List<ulong[]>? Goals(Shape from, int maxShapes, CancellationToken cancellation)
    {
        var goal = _mechanism.Goal.Kind;
        if (goal is not (GoalKind.Marks or GoalKind.Sites))
        {
            return [Node(_mechanism.Home, _colours)];
        }

        var mask = goal == GoalKind.Marks ? GoalStates.MarkMask(_mechanism) : [];
        if (mask is null)
        {
            return [];
        }

        var groupoid = ShapeGroupoid.ExploreFrom(from, new ExplorationOptions { MaxShapes = maxShapes }, null, cancellation);
        if (!groupoid.IsComplete)
        {
            return null;
        }

        var goals = new List<ulong[]>();
        for (var shape = 0; shape < groupoid.ShapeCount; shape++)
        {
            if (GoalStates.Covers(groupoid.Store.Key(shape), mask))
            {
                goals.Add(Node(groupoid.ShapeAt(shape), _colours));
            }
        }

        return goals;
    }

    /// <summary>What was before a step; false where the step was barred there.</summary>
    public bool TryBack(int step, ReadOnlySpan<ulong> node, Span<ulong> before)
    {
        var moves = _mechanism.Board.Moves[step];
        moves.MoveBack(node[.._boardWords], before[.._boardWords]);
        if (!moves.IsFree(before[.._boardWords]))
        {
            return false;
        }

        _mover.MoveBack(step, node[_boardWords..], before[_boardWords..]);
        return true;
    }

    private ulong[] Node(Shape shape, ReadOnlySpan<int> colourOn)
    {
        var node = new ulong[Words];
        shape.Key.CopyTo(node);
        _mover.Load(colourOn, node.AsSpan(_boardWords));
        return node;
    }
}
