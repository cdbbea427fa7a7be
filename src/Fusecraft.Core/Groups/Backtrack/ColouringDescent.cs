using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// The members of a group that carry one colouring of the points to another: found one orbit after the other, each time in the action on that orbit alone, which is then lifted back with the members that fix
/// the orbit pointwise. Where the action is the symmetric or alternating group, generators and order of the colouring's stabilizer are known without search; other actions are searched by <see cref="PartitionBacktrack"/>.
/// </summary>
/// <remarks>
/// Exact: g keeps the colouring of an orbit exactly when its action there does, so the stabilizer's order is that of the action's stabilizer times that of the kernel. For puzzles with many alike pieces on a few orbits
/// this takes one chain an orbit, however many arrangements there are.
/// </remarks>
internal sealed class ColouringDescent
{
    private readonly int[] _source;
    private readonly int[] _target;
    private readonly CancellationToken _cancellation;

    private ColouringDescent(PermutationGroup group, int[] source, int[] target, CancellationToken cancellation)
    {
        Stabilizer = group;
        _source = source;
        _target = target;
        _cancellation = cancellation;
    }

    /// <summary>The members that keep the target on the orbits dealt with so far; at the end its stabilizer.</summary>
    public PermutationGroup Stabilizer { get; private set; }

    /// <summary>A member that takes the source to the target.</summary>
    public Permutation Carrier { get; private set; }

    /// <summary>Carries the source to the target, or gives null where no member does.</summary>
    public static ColouringDescent? Run(PermutationGroup group, int[] source, int[] target, CancellationToken cancellation)
    {
        var descent = new ColouringDescent(group, source, target, cancellation);
        while (true)
        {
            cancellation.ThrowIfCancellationRequested();
            var carried = descent.Carried();
            var orbits = descent.Stabilizer.Orbits;
            if (orbits.Any(orbit => !SameColours(orbit, carried, target)))
            {
                return null;
            }

            ImmutableArray<int>[] mixed = [.. orbits.Where(orbit => orbit.Any(point => target[point] != target[orbit[0]]))];
            if (mixed.Length == 0)
            {
                return descent;
            }

            if (!descent.TryReduce(descent.Easiest(mixed), carried))
            {
                return null;
            }
        }
    }

    private int[] Carried()
    {
        var carried = new int[_source.Length];
        for (var point = 0; point < carried.Length; point++)
        {
            carried[Carrier[point]] = _source[point];
        }

        return carried;
    }

    private static bool SameColours(ImmutableArray<int> orbit, int[] carried, int[] target)
    {
        int[] a = [.. orbit.Select(point => carried[point])];
        int[] b = [.. orbit.Select(point => target[point])];
        Array.Sort(a);
        Array.Sort(b);
        return a.AsSpan().SequenceEqual(b);
    }

    // Orbits on which everything is known come first, as they make the group smaller; then those with the smallest action.
    private OrbitAction Easiest(ImmutableArray<int>[] orbits)
    {
        OrbitAction? best = null;
        foreach (var orbit in orbits)
        {
            _cancellation.ThrowIfCancellationRequested();
            var action = new OrbitAction(Stabilizer, orbit);
            if (action.IsGiant)
            {
                return action;
            }

            best = best is null || action.Image.Order < best.Image.Order ? action : best;
        }

        return best!;
    }

    private bool TryReduce(OrbitAction action, int[] carried)
    {
        int[] from = [.. action.Orbit.Select(point => carried[point])];
        int[] to = [.. action.Orbit.Select(point => _target[point])];
        PermutationGroup stabilizer;
        Permutation? step = Permutation.Identity;
        if (action.IsGiant)
        {
            var young = new YoungSubgroup(to, action.IsAlternating);
            stabilizer = young.Group;
            step = young.Carrying(from);
        }
        else
        {
            var search = new PartitionBacktrack([action.Image], new PointStructure(to), _cancellation);
            stabilizer = search.Stabilizer();
            if (!from.AsSpan().SequenceEqual(to))
            {
                step = search.FindCarryingTo(new PointStructure(from))?.Inverse();
            }
        }

        if (step is null)
        {
            return false;
        }

        // Fixes the order on the way: the chain of the group at hand is never needed again.
        var lift = action.Lifter(_cancellation);
        Carrier *= lift.Lift(step.Value);
        Stabilizer = PermutationGroup.FromOrder(
            [.. stabilizer.Generators.Select(lift.Lift), .. lift.KernelGenerators], Stabilizer.Degree, stabilizer.Order * (Stabilizer.Order / action.Image.Order));
        return true;
    }
}
