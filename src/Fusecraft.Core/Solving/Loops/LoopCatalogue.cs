using System.Collections.Immutable;
using Fusecraft.Mechanisms;

namespace Fusecraft.Solving;

/// <summary>The short loops at a shape that move little, each permutation once with a shortest word: three-cycles, double swaps, twists and what else there is.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class LoopCatalogue
{
    internal LoopCatalogue(Shape shape, LoopCatalogueOptions options, ImmutableArray<UsefulLoop> loops, int? completeLength)
    {
        Shape = shape;
        Options = options;
        Loops = loops;
        CompleteLength = completeLength;
    }

    /// <summary>The shape where the loops start and end.</summary>
    public Shape Shape { get; }

    /// <summary>What was looked for.</summary>
    public LoopCatalogueOptions Options { get; }

    /// <summary>The loops, shortest first; of equal length by how many blocks and pieces they move, then by effect and word.</summary>
    public ImmutableArray<UsefulLoop> Loops { get; }

    /// <summary>
    /// Every loop of at most this length that moves at most <see cref="LoopCatalogueOptions.MaxMoved"/> blocks and pieces has its permutation in <see cref="Loops"/>, with a word as short; a budget or the greatest length
    /// ended the search there. Null where the search came to the end of all states, so that nothing at all is left out.
    /// </summary>
    public int? CompleteLength { get; }

    /// <summary>Lists the loops.</summary>
    /// <param name="shape">The shape where they start and end.</param>
    /// <param name="options">How far to look; null for the defaults.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>
    /// Every loop is a way out and a way back of at most half its length; both are searched breadth-first, so lengths and completeness are proven. Of two ways that make up a loop that moves k bodies (blocks or single
    /// pieces), at least one of k + 1 groups of bodies is treated alike, so pairs are looked up by groups instead of being tried one by one. Every loop is replayed.
    /// </remarks>
    /// <exception cref="ArgumentOutOfRangeException">A budget is below 1, or the greatest length negative.</exception>
    /// <exception cref="ArgumentException">The metric weighs turns that the mechanism does not have.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static LoopCatalogue Of(Shape shape, LoopCatalogueOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(shape);
        options ??= LoopCatalogueOptions.Default;
        ArgumentOutOfRangeException.ThrowIfNegative(options.MaxLength ?? 0, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxMoved, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxStates, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxPairs, 1, nameof(options));
        ArgumentOutOfRangeException.ThrowIfLessThan(options.MaxLoops, 1, nameof(options));
        options.Metric.RequireTurnsOf(shape.Mechanism, nameof(options));
        return shape.Mechanism.SiteCount <= 256 ? new LoopHarvest<byte>(shape, options, cancellationToken).Run() : new LoopHarvest<ushort>(shape, options, cancellationToken).Run();
    }
}
