namespace Fusecraft.Mechanisms;

/// <summary>A ready-made kind of mechanism, given by a few numbers, that supplies sites, pieces and turns.</summary>
public abstract class MechanismFamily
{
    private protected MechanismFamily()
    {
    }

    /// <summary>The family's name in files: <c>cube</c>, <c>board</c> or <c>graph-board</c>.</summary>
    public abstract string Kind { get; }
}
