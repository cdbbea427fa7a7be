namespace Fusecraft.Groupoids;

/// <summary>How much work finding a diameter may take.</summary>
public sealed class DiameterOptions
{
    /// <summary>Some seconds' work.</summary>
    public static DiameterOptions Default { get; } = new();

    /// <summary>
    /// No further search is begun once the searches have looked at so many arrows; then the bounds may stay apart. One search through the region always takes place, so 0 gives bounds at
    /// the least price.
    /// </summary>
    public long MaxArrowsSeen { get; init; } = 1L << 30;
}
