using System.Collections.Immutable;

namespace Fusecraft.Groupoids;

/// <summary>
/// A few short loops that generate a vertex group: what a solver by hand should learn, and what a designer should know. None can be left out.
/// </summary>
/// <remarks>
/// Loops are tried by length, all of one length before any longer one; one that brings nothing new is passed over, and what later ones made superfluous is dropped, the longest first. There may be
/// a basis of fewer loops. Immutable, safe to share.
/// </remarks>
public sealed class LoopBasis
{
    internal LoopBasis(VertexGroup group, ImmutableArray<BasisLoop> loops, ImmutableArray<LoopFamily> families, int provenLength)
    {
        VertexGroup = group;
        Loops = loops;
        Families = families;
        ProvenLength = provenLength;
    }

    /// <summary>The group that the loops generate.</summary>
    public VertexGroup VertexGroup { get; }

    /// <summary>The loops, shortest first.</summary>
    public ImmutableArray<BasisLoop> Loops { get; }

    /// <summary>The loops, with the copies that symmetries of the base shape make of one loop taken together; in the order of their first loops.</summary>
    public ImmutableArray<LoopFamily> Families { get; }

    /// <summary>The number of steps of the longest loop; 0 where there is none.</summary>
    public int LongestLength => Loops.IsEmpty ? 0 : Loops[^1].Length;

    /// <summary>However loops are chosen to generate the group, one of them has at least so many steps; 0 for the trivial group.</summary>
    public int ProvenLength { get; }

    /// <summary>True when no loops generate the group that are all shorter than the longest one here.</summary>
    public bool IsShortest => LongestLength == ProvenLength;

    /// <summary>Finds a loop basis.</summary>
    /// <param name="group">The vertex group to generate.</param>
    /// <param name="options">How far to look; null for the usual.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <exception cref="ArgumentOutOfRangeException">The budget is below 1.</exception>
    /// <exception cref="ArgumentException">The symmetries are those of another mechanism.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    /// <remarks>
    /// Writes out the arrows of the region (see <see cref="ShapeGroupoid.GraphOf"/>) and searches states from the base shape both ways: every loop is a path out and a path back of at most half its length.
    /// </remarks>
    public static LoopBasis Of(VertexGroup group, LoopBasisOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(group);
        options ??= LoopBasisOptions.Default;
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxStates, 1, nameof(options));
        var mechanism = group.Groupoid.Mechanism;
        if (options.Symmetries is { } given && !ReferenceEquals(given.Mechanism, mechanism))
        {
            throw new ArgumentException($"The symmetries are those of another mechanism than {mechanism.Name}.", nameof(options));
        }

        var symmetries = (options.Symmetries ?? SymmetryGroup.Of(mechanism, cancellationToken)).Fixing(group.Groupoid.ShapeAt(group.BaseShape), cancellationToken);
        return mechanism.SiteCount <= 256
            ? new LoopBasisSearch<byte>(group, symmetries, options.MaxStates, cancellationToken).Run()
            : new LoopBasisSearch<ushort>(group, symmetries, options.MaxStates, cancellationToken).Run();
    }
}
