using System.Collections.Immutable;
using Fusecraft.Groups;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

// The same group seen from other shapes of its region.
public sealed partial class VertexGroup
{
    /// <summary>The vertex group at another shape of the region: <c>p⁻¹ * g * p</c> for each member <c>g</c> of this one, where <c>p</c> is the permutation of <see cref="TreePath"/> to that shape.</summary>
    /// <param name="shape">The number of the new base shape.</param>
    /// <returns>The group with its generators conjugated one by one, so in the order of this one's; this very object where the shape is its base already.</returns>
    /// <remarks>Looks at no arc again: takes a composition a generator, and no memory that grows with the region. The chain is built when first asked for, and proven by the known order.</remarks>
    /// <exception cref="ArgumentException">The shape lies in another region.</exception>
    public VertexGroup MovedTo(int shape)
    {
        if (shape == BaseShape)
        {
            return this;
        }

        var path = Label(BaseShape).Inverse() * Label(shape);
        var group = PermutationGroup.FromOrder([.. Group.Generators.Select(generator => generator.ConjugateBy(path))], Group.Degree, Order);
        return new VertexGroup(Groupoid, _tree, group, _arcs, shape);
    }

    /// <summary>The permutation of the tree path from the root to a shape of the region.</summary>
    internal Permutation Label(int shape)
    {
        var label = Permutation.Identity;
        foreach (var step in StepsTo(shape))
        {
            label *= step.Permutation;
        }

        return label;
    }

    // Up the tree from one shape to where the branches part, then down to the other.
    private TurnPath PathBetween(int from, int to)
    {
        var (up, down) = (StepsTo(from), StepsTo(to));
        var shared = up.AsSpan().CommonPrefixLength(down.AsSpan());
        var parting = Groupoid.ShapeAt(_tree.Root);
        for (var i = 0; i < shared; i++)
        {
            parting = parting.After(up[i])!;
        }

        return TurnPath.Follow(parting, up.Skip(shared)).Inverse().Then(TurnPath.Follow(parting, down.Skip(shared)));
    }

    private ImmutableArray<Step> StepsTo(int shape) => _tree.PathTo(shape)
        ?? throw new ArgumentException($"Shape {shape} is not in the region of the base shape {BaseShape}.", nameof(shape));
}
