using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>Finds the shortest loops at a shape, one for each permutation, by breadth-first search over states.</summary>
internal sealed class LoopSearch
{
    private readonly Shape _base;
    private readonly CancellationToken _cancellation;

    public LoopSearch(Shape @base, CancellationToken cancellation)
    {
        _base = @base;
        _cancellation = cancellation;
    }

    /// <summary>Loops other than the empty one, shortest first, until one of the two budgets ends the search.</summary>
    public List<TurnPath> ShortLoops(int maxStates, int maxLoops)
    {
        var mechanism = _base.Mechanism;
        var states = new List<(Permutation Labels, Shape Shape)>();
        var parents = new List<(int Parent, Step? Step)>();
        var seen = new HashSet<Permutation> { Permutation.Identity };
        var loops = new List<TurnPath>();
        states.Add((Permutation.Identity, _base));
        parents.Add((-1, null));
        for (var i = 0; i < states.Count && states.Count < maxStates && loops.Count < maxLoops; i++)
        {
            if (i % 1024 == 0)
            {
                _cancellation.ThrowIfCancellationRequested();
            }

            foreach (var step in mechanism.Steps)
            {
                var labels = states[i].Labels * step.Permutation;
                if (!states[i].Shape.IsFree(step) || !seen.Add(labels))
                {
                    continue;
                }

                states.Add((labels, states[i].Shape.After(step)!));
                parents.Add((i, step));
                if (states[^1].Shape == _base)
                {
                    loops.Add(PathTo(states.Count - 1, parents));
                }
            }
        }

        return loops;
    }

    private TurnPath PathTo(int state, List<(int Parent, Step? Step)> parents)
    {
        var steps = new List<Step>();
        for (; parents[state].Step is { } step; state = parents[state].Parent)
        {
            steps.Add(step);
        }

        steps.Reverse();
        return TurnPath.Follow(_base, steps);
    }
}
