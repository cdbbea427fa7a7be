namespace Fusecraft.Groupoids;

/// <summary>Shapes that can all reach each other.</summary>
/// <param name="Index">The region's number in its groupoid.</param>
/// <param name="FirstShape">The least number of its shapes.</param>
/// <param name="ShapeCount">How many shapes it has.</param>
/// <param name="Eccentricity">The largest number of steps from the groupoid's first shape to a shape of the region.</param>
/// <param name="PassageCount">The number of pairs (shape of the region, free step) that lead out of it; there is no way back.</param>
public sealed record Region(int Index, int FirstShape, int ShapeCount, int Eccentricity, long PassageCount)
{
    /// <summary>True for a region other than the home region that no passage leads out of: who gets there cannot come home.</summary>
    public bool IsTrap => Index != 0 && PassageCount == 0;
}
