using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using System.Text;

namespace Fusecraft.Groups;

/// <summary>A group described: its order, its series, its composition factors, and what it does on each orbit. Made by <see cref="PermutationGroup.Portrait"/>.</summary>
/// <remarks>Every statement is proven, some with the classification of finite simple groups; what is not settled is left open and says so. Depends on the group alone. Immutable, safe to share.</remarks>
public sealed class GroupPortrait
{
    internal GroupPortrait(PermutationGroup group, CancellationToken cancellation)
    {
        Group = group;
        Order = FactoredInteger.FromSmooth(group.Order, Math.Max(1, group.Degree));
        CompositionFactors = CompositionWalk.FactorsOf(group, cancellation);
        Orbits = DescribeOrbits(cancellation);
        MovedPoints = Orbits.Sum(orbit => orbit.Points.Length);
        IsAbelian = group.IsAbelian;
        (DerivedLength, PerfectResidualOrder, AbelianInvariants) = DescribeSeries(cancellation);
        IsNilpotent = IsAbelian || (IsSolvable && (Order.PrimePowers.Length == 1 || group.IsNilpotent));
        Exponent = BigInteger.One;
        foreach (var action in Orbits.Select(orbit => orbit.Action))
        {
            cancellation.ThrowIfCancellationRequested();

            // A power of a member is the identity exactly when it is on every orbit.
            Exponent = Exponent is { } exponent && action.Exponent is { } next ? exponent / BigInteger.GreatestCommonDivisor(exponent, next) * next : null;
        }
    }

    /// <summary>The group described.</summary>
    public PermutationGroup Group { get; }

    /// <summary>The number of members.</summary>
    public FactoredInteger Order { get; }

    /// <summary>The number of points that some member moves.</summary>
    public int MovedPoints { get; }

    /// <summary>The orbits of two or more points, by their least points.</summary>
    public ImmutableArray<OrbitPortrait> Orbits { get; }

    /// <summary>True when all members commute.</summary>
    public bool IsAbelian { get; }

    /// <summary>True when the lower central series ends in the trivial group.</summary>
    public bool IsNilpotent { get; }

    /// <summary>True when the derived series ends in the trivial group; then all composition factors are cyclic.</summary>
    public bool IsSolvable => CompositionFactors.All(factor => factor.IsCyclic);

    /// <summary>True when the group is its own derived subgroup; so is the trivial group.</summary>
    public bool IsPerfect => AbelianInvariants.IsEmpty;

    /// <summary>True when the group has exactly one composition factor, which is proven.</summary>
    public bool IsSimple => CompositionFactors is [{ IsSimple: true, Multiplicity: 1 }];

    /// <summary>The number of steps in which the derived series of a solvable group gets to the trivial group; null when the group is not solvable.</summary>
    public int? DerivedLength { get; }

    /// <summary>The order of the perfect residual, where the derived series ends: 1 exactly for solvable groups.</summary>
    public FactoredInteger PerfectResidualOrder { get; }

    /// <summary>The prime powers, ascending, whose cyclic groups multiply to the quotient by the derived subgroup.</summary>
    public ImmutableArray<int> AbelianInvariants { get; }

    /// <summary>The least common multiple of the orders of all members; null where it is not cheap to prove, which may be where the group acts on some orbit with more than 100,000 members, neither as the symmetric nor as the alternating group.</summary>
    public BigInteger? Exponent { get; }

    /// <summary>
    /// The composition factors with multiplicities, which multiply to the order: named where proven. Non-abelian ones first, by falling order, then cyclic ones, then what is unrecognised.
    /// </summary>
    public ImmutableArray<CompositionFactor> CompositionFactors { get; }

    /// <summary>A few lines of plain text, joined by line feeds, points and orbits numbered from 1.</summary>
    public override string ToString()
    {
        var text = new StringBuilder();
        text.Append(CultureInfo.InvariantCulture, $"order {OrderText()}, {MovedPoints} points moved, {(Orbits.Length == 1 ? "1 orbit" : $"{Orbits.Length} orbits")}\n");
        text.Append(CultureInfo.InvariantCulture, $"{Kind()}{(Exponent is { } exponent ? $", exponent {exponent}" : "")}\n");
        text.Append(CultureInfo.InvariantCulture, $"composition factors: {(CompositionFactors.IsEmpty ? "none" : string.Join(", ", CompositionFactors))}");
        for (var i = 0; i < Orbits.Length; i++)
        {
            text.Append(CultureInfo.InvariantCulture, $"\norbit {i + 1} {Orbits[i]}");
        }

        return text.ToString();
    }

    // In decimals while they fit on a line, and as prime powers.
    private string OrderText()
    {
        const int MostBits = 260;
        return Group.Order.GetBitLength() > MostBits ? $"{Order}" : Order.PrimePowers is [] or [(_, 1)] ? $"{Group.Order}" : $"{Group.Order} = {Order}";
    }

    private string Kind()
    {
        if (Group.IsTrivial)
        {
            return "trivial";
        }

        var kinds = new List<string>();
        if (IsSimple)
        {
            kinds.Add("simple");
        }

        kinds.Add(IsAbelian ? "abelian" : IsNilpotent ? "nilpotent" : IsSolvable ? $"solvable of derived length {DerivedLength}" : IsPerfect ? "perfect" : $"not solvable, perfect residual of order {PerfectResidualOrder}");
        if (!IsPerfect)
        {
            kinds.Add($"abelian invariants {string.Join(' ', AbelianInvariants)}");
        }

        return string.Join(", ", kinds);
    }

    private ImmutableArray<OrbitPortrait> DescribeOrbits(CancellationToken cancellation)
    {
        var orbits = ImmutableArray.CreateBuilder<OrbitPortrait>();
        foreach (var points in Group.MovedOrbits)
        {
            cancellation.ThrowIfCancellationRequested();
            var earlier = Enumerable.Range(0, orbits.Count).Where(i => orbits[i].EquivalentTo is null && EquivalentOrbits.Match(Group, orbits[i].Points, points) is not null).Cast<int?>().FirstOrDefault();
            var action = earlier is { } index ? orbits[index].Action : Describe(points);
            orbits.Add(new OrbitPortrait(points, action, Group.Order / action.Group.Order, earlier));
        }

        return orbits.DrainToImmutable();
    }

    private ActionPortrait Describe(ImmutableArray<int> points) =>
        points.Length == Group.Degree ? new ActionPortrait(Group, CompositionFactors)
        : Group.MovedOrbits.Length == 1 ? new ActionPortrait(OrbitImage.Of(Group, points, Group.Order), CompositionFactors)
        : new ActionPortrait(OrbitImage.Of(Group, points));

    private (int? DerivedLength, FactoredInteger Residual, ImmutableArray<int> Invariants) DescribeSeries(CancellationToken cancellation)
    {
        // The giants' series are known, and their chains are long.
        if (Orbits is [{ KernelOrder.IsOne: true, Action: { IsGiant: true, Degree: > 4 } giant }])
        {
            return giant.IsAlternating ? (null, Order, []) : (null, FactoredInteger.FromSmooth(Group.Order / 2, Group.Degree), [2]);
        }

        var series = Group.DerivedSeries();
        cancellation.ThrowIfCancellationRequested();
        var residual = FactoredInteger.FromSmooth(series[^1].Order, Math.Max(1, Group.Degree));
        return (series[^1].IsTrivial ? series.Length - 1 : null, residual, series.Length == 1 ? [] : Group.AbelianInvariants());
    }
}
