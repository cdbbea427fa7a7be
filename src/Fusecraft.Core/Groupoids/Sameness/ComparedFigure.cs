namespace Fusecraft.Groupoids;

/// <summary>One figure of two mechanisms side by side.</summary>
/// <param name="Name">What is counted, such as <c>shapes</c>.</param>
/// <param name="First">The figure of the first, in digits; null where it is not known.</param>
/// <param name="Second">The figure of the second, in digits; null where it is not known.</param>
public sealed record ComparedFigure(string Name, string? First, string? Second)
{
    /// <summary>True when both are known and differ.</summary>
    public bool Differs => First is not null && Second is not null && First != Second;
}
