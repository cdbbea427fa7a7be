using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>How the loops at a base shape move some things (sites, pieces, blocks), with the names of those.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class LoopAction
{
    internal LoopAction(VertexGroup vertexGroup, GroupAction action, ImmutableArray<string> names)
    {
        VertexGroup = vertexGroup;
        Action = action;
        Names = names;
    }

    /// <summary>The group of the loops.</summary>
    public VertexGroup VertexGroup { get; }

    /// <summary>The action as a homomorphism of groups.</summary>
    public GroupAction Action { get; }

    /// <summary>What the points of the action are called, in their order.</summary>
    public ImmutableArray<string> Names { get; }

    /// <summary>What loops can do to the things, as permutations of 0 … Names.Length - 1.</summary>
    public PermutationGroup Image => Action.Image;

    /// <summary>The permutations of the loops that act trivially: each thing ends where it was.</summary>
    public PermutationGroup Kernel => Action.Kernel;

    /// <summary>What a loop does to the things; the identity where it acts trivially.</summary>
    /// <exception cref="ArgumentException">The path is no loop at the base shape.</exception>
    public Permutation Of(TurnPath loop)
    {
        ArgumentNullException.ThrowIfNull(loop);
        return loop.IsLoop && VertexGroup.Groupoid.IndexOf(loop.Source) == VertexGroup.BaseShape
            ? Action.Map(loop.Permutation)
            : throw new ArgumentException($"The path goes from {loop.Source} to {loop.Target}; it is no loop at the base shape.", nameof(loop));
    }
}
