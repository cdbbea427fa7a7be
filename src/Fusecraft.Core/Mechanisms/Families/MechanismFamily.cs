namespace Fusecraft.Mechanisms;

/// <summary>A ready-made kind of mechanism, given by a few numbers, that supplies sites, pieces and turns.</summary>
public abstract class MechanismFamily
{
    private protected MechanismFamily()
    {
    }

    /// <summary>The family's name in files: <c>cube</c>, <c>board</c> or <c>graph-board</c>.</summary>
    public abstract string Kind { get; }

    /// <summary>Writes the family out as sites, pieces and turns; mistakes go to <paramref name="problems"/> under <c>$.family</c>, and null is returned.</summary>
    internal abstract Blueprint? Expand(ProblemList problems);
}
