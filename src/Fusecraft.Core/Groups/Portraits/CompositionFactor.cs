using System.Collections.Immutable;

namespace Fusecraft.Groups;

/// <summary>
/// A composition factor of a group, with how often it occurs. Named only where it is proven which group it is; what could not be settled is kept whole and called unrecognised, and may then be made of several
/// simple groups.
/// </summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class CompositionFactor
{
    internal CompositionFactor(ImmutableArray<string> names, FactoredInteger order, int multiplicity, bool isSimple)
    {
        Names = names;
        Order = order;
        Multiplicity = multiplicity;
        IsSimple = isSimple;
    }

    /// <summary>All names of the group among those of the alternating groups, the classical groups, the smaller exceptional groups and the sporadic groups, alternating first: <c>Alt(5)</c>, <c>PSL(2,4)</c>, <c>PSL(2,5)</c>. None where it has no proven name.</summary>
    public ImmutableArray<string> Names { get; }

    /// <summary>The first of <see cref="Names"/>, such as <c>C2</c>, <c>Alt(5)</c>, <c>PSL(2,7)</c>, <c>M11</c>; null where there is none.</summary>
    public string? Name => Names.IsEmpty ? null : Names[0];

    /// <summary>The number of members of one such factor.</summary>
    public FactoredInteger Order { get; }

    /// <summary>How often it occurs, at least once.</summary>
    public int Multiplicity { get; }

    /// <summary>True when it is proven simple. Otherwise it is unrecognised: a perfect group that may have several factors.</summary>
    public bool IsSimple { get; }

    /// <summary>True when it is cyclic of prime order.</summary>
    public bool IsCyclic => Order.PrimePowers is [(_, 1)];

    /// <summary>The name, with the multiplicity as exponent where above one: <c>C2^12</c>. Without a name: <c>simple of order …</c> or <c>unrecognised of order …</c>.</summary>
    public override string ToString()
    {
        var name = Name ?? $"({(IsSimple ? "simple" : "unrecognised")} of order {Order})";
        return Multiplicity == 1 ? name : $"{name}^{Multiplicity}";
    }
}
