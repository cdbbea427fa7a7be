using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Mechanisms;
using Fusecraft.Permutations;

namespace Fusecraft.Solving;

/// <summary>A loop that moves little: a tool for solving by hand, with what it does to pieces and blocks.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class UsefulLoop
{
    private UsefulLoop(TurnPath path, Metric metric, LoopBodies bodies)
    {
        Path = path;
        Metric = metric;
        Length = metric.LengthOf(path);
        Effect = new LoopEffect(bodies, path.Permutation);
    }

    /// <summary>The loop: its steps, its word and its permutation. Every step was found free when it was made.</summary>
    public TurnPath Path { get; }

    /// <summary>How its length is counted.</summary>
    public Metric Metric { get; }

    /// <summary>Its length in <see cref="Metric"/>.</summary>
    public long Length { get; }

    /// <summary>Where the loop takes the label on each site.</summary>
    public Permutation Permutation => Path.Permutation;

    /// <summary>What it does to the blocks and the single pieces of its shape.</summary>
    public LoopEffect Effect { get; }

    /// <summary>Looks at a loop.</summary>
    /// <param name="path">A path that ends where it starts.</param>
    /// <param name="metric">How to count its length; null for steps.</param>
    /// <exception cref="ArgumentException">The path is no loop, or the metric weighs turns that its mechanism does not have.</exception>
    public static UsefulLoop Of(TurnPath path, Metric? metric = null)
    {
        ArgumentNullException.ThrowIfNull(path);
        metric ??= Metric.Step;
        metric.RequireTurnsOf(path.Mechanism, nameof(metric));
        return path.IsLoop
            ? new UsefulLoop(path, metric, new LoopBodies(path.Source))
            : throw new ArgumentException($"The path goes from {path.Source} to {path.Target}; it is no loop.", nameof(path));
    }

    internal static UsefulLoop Of(TurnPath path, Metric metric, LoopBodies bodies) => new(path, metric, bodies);

    /// <summary>The same elsewhere: a setup, this loop, and the setup undone, as one loop where the setup starts. It does to other pieces what this loop does to those that the setup brings into place.</summary>
    /// <param name="setup">A path that ends at the shape of this loop; itself a loop there, or from another shape.</param>
    /// <remarks>Steps that undo each other where the parts meet are left out.</remarks>
    /// <exception cref="ArgumentException">The setup ends at another shape.</exception>
    /// <exception cref="InvalidOperationException">There is no way back from the setup, or none of reasonable length (see <see cref="TurnPath.Inverse"/>).</exception>
    public UsefulLoop ConjugateBy(TurnPath setup)
    {
        ArgumentNullException.ThrowIfNull(setup);
        if (setup.Target != Path.Source)
        {
            throw new ArgumentException($"The setup ends at {setup.Target}, the loop starts at {Path.Source}.", nameof(setup));
        }

        var whole = setup.Then(Path).Then(setup.Inverse());
        return Of(TurnPath.Follow(setup.Source, PathShortening.Shorten(whole.Steps)), Metric);
    }

    /// <summary>How many loops, told apart by their permutations, come from this one by setups that are loops at its shape: the size of its class of conjugates in the vertex group.</summary>
    /// <param name="group">The vertex group at the shape of this loop.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>The order of the group divided by that of the loop's centralizer in it.</remarks>
    /// <exception cref="ArgumentException">The group is at another shape.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public BigInteger ConjugateCount(VertexGroup group, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(group);
        return group.Groupoid.IndexOf(Path.Source) == group.BaseShape
            ? group.Order / group.Group.Centralizer(Permutation, cancellationToken).Order
            : throw new ArgumentException($"The group is at another shape than {Path.Source}.", nameof(group));
    }

    /// <summary>The word, and what it does.</summary>
    public override string ToString() => $"{Path.Word.ToFoldedString()}: {Effect}";
}
