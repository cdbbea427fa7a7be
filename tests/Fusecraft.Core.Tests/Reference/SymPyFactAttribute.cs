namespace Fusecraft.Tests.Reference;

/// <summary>A fact that needs SymPy; reported as skipped, with the reason, where it is missing.</summary>
[AttributeUsage(AttributeTargets.Method)]
public sealed class SymPyFactAttribute : FactAttribute
{
    public SymPyFactAttribute() => Skip = SymPy.WhyMissing;
}
