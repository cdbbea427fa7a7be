using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>The members that keep the colour of every point: those that take each point to one of the same colour.</summary>
    /// <param name="colours">A number for each point 0 … Degree-1; points with equal numbers are alike.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>
    /// Found orbit by orbit. Where the group acts on an orbit as the symmetric or alternating group there is nothing to search; other actions are searched by partition backtrack, which is
    /// fast as a rule and exponential in the worst case. The order is proven.
    /// </remarks>
    /// <exception cref="ArgumentException">There are more or fewer colours than points.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public PermutationGroup ColouringStabilizer(ReadOnlySpan<int> colours, CancellationToken cancellationToken = default)
    {
        RequireColouring(colours, nameof(colours));
        int[] list = [.. colours];
        return ColouringDescent.Run(this, list, list, cancellationToken)!.Stabilizer;
    }

    /// <summary>The members that carry a set of points to itself. See <see cref="ColouringStabilizer"/>.</summary>
    /// <param name="points">Points in 0 … Degree-1, distinct.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentException">A point is outside 0 … Degree-1 or given twice.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public PermutationGroup SetwiseStabilizer(ReadOnlySpan<int> points, CancellationToken cancellationToken = default) =>
        ColouringStabilizer(Marked(points), cancellationToken);

    /// <summary>
    /// A member that carries one colouring to another: <c>target[g[i]] == source[i]</c> for every point <c>i</c>. Null where there is none, which is then proven.
    /// </summary>
    /// <param name="source">A colour for each point 0 … Degree-1.</param>
    /// <param name="target">A colour for each point 0 … Degree-1.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>All such members: the one found, followed by the members of the target's <see cref="ColouringStabilizer"/>.</remarks>
    /// <exception cref="ArgumentException">There are more or fewer colours than points.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public Permutation? FindMemberTaking(ReadOnlySpan<int> source, ReadOnlySpan<int> target, CancellationToken cancellationToken = default)
    {
        RequireColouring(source, nameof(source));
        RequireColouring(target, nameof(target));
        return ColouringDescent.Run(this, [.. source], [.. target], cancellationToken)?.Carrier;
    }

    /// <summary>In how many ways the members arrange a colouring: the number of distinct colourings they carry it to, |group| / |stabilizer|. For a puzzle whose pieces are alike where coloured alike: its visible positions.</summary>
    /// <inheritdoc cref="ColouringStabilizer"/>
    public BigInteger OrbitSizeOfColouring(ReadOnlySpan<int> colours, CancellationToken cancellationToken = default) =>
        Order / ColouringStabilizer(colours, cancellationToken).Order;

    private int[] Marked(ReadOnlySpan<int> points)
    {
        StabilizerChain.RequirePrefix(points, Degree, nameof(points));
        var marks = new int[Degree];
        foreach (var point in points)
        {
            marks[point] = 1;
        }

        return marks;
    }

    private void RequireColouring(ReadOnlySpan<int> colours, string parameter)
    {
        if (colours.Length != Degree)
        {
            throw new ArgumentException($"{colours.Length} colours were given for {Degree} points.", parameter);
        }
    }
}
