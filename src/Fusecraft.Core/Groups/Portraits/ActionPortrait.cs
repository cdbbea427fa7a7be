using System.Collections.Immutable;
using System.Globalization;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>A transitive group of permutations of 0 … Degree-1 described: what a group does on one of its orbits, or on the parts of a block system.</summary>
/// <remarks>Every statement is proven. Immutable, safe to share; what takes longer is found when first asked for.</remarks>
public sealed class ActionPortrait
{
    private readonly Lazy<ImmutableArray<BlockSystemPortrait>> _systems;
    private readonly Lazy<bool?> _isAffine;
    private readonly Lazy<string?> _name;
    private readonly Lazy<ImmutableArray<CompositionFactor>> _factors;
    private readonly Lazy<BigInteger?> _exponent;

    // The composition factors where they are known.
    internal ActionPortrait(PermutationGroup group, ImmutableArray<CompositionFactor>? factors = null)
    {
        Group = group;
        Order = FactoredInteger.FromSmooth(group.Order, group.Degree);
        IsAlternating = Giants.Kind(group.Order, group.Degree) is true;
        IsSymmetric = Giants.Kind(group.Order, group.Degree) is false;
        _systems = new(() => IsGiant ? [] : [.. group.MinimalBlockSystems(0).Select(system => new BlockSystemPortrait(group, system))]);
        _isAffine = new(() => !IsPrimitive ? false : IsGiant ? group.Degree <= 4 : IsSolvable ? true : AffineSearch.IsAffine(group, CancellationToken.None));
        _factors = new(() => factors ?? CompositionWalk.FactorsOf(group, CancellationToken.None));
        _name = new(() => ActionNames.Find(this));
        _exponent = new(FindExponent);
        (Transitivity, IsSharplyTransitive) = FindTransitivity();
    }

    /// <summary>The group itself.</summary>
    public PermutationGroup Group { get; }

    /// <summary>The number of points.</summary>
    public int Degree => Group.Degree;

    /// <summary>The number of members.</summary>
    public FactoredInteger Order { get; }

    /// <summary>True for all permutations of the points.</summary>
    public bool IsSymmetric { get; }

    /// <summary>True for all even permutations of three or more points.</summary>
    public bool IsAlternating { get; }

    /// <summary>True when exactly one member takes a point to another.</summary>
    public bool IsRegular => Group.Order == Degree;

    /// <summary>True when there is no non-trivial block system.</summary>
    public bool IsPrimitive => MinimalBlockSystems.IsEmpty;

    /// <summary>
    /// True when the group is primitive and its points are the vectors of a space over a field of prime order such that it contains all translations and its members are affine maps: it has an elementary abelian regular normal
    /// subgroup. Null where that could not be settled.
    /// </summary>
    public bool? IsAffine => _isAffine.Value;

    /// <summary>The largest k such that lists of k distinct points are taken to all lists of k distinct points; at least 1.</summary>
    public int Transitivity { get; }

    /// <summary>True when exactly one member takes a list of <see cref="Transitivity"/> points to another.</summary>
    public bool IsSharplyTransitive { get; }

    /// <summary>The minimal block systems; empty for a primitive group.</summary>
    public ImmutableArray<BlockSystemPortrait> MinimalBlockSystems => _systems.Value;

    /// <summary>The composition factors of the action.</summary>
    public ImmutableArray<CompositionFactor> CompositionFactors => _factors.Value;

    /// <summary>
    /// A name, where one is proven: <c>Sym(8)</c>, <c>Alt(5)</c>, <c>C2 x C4</c>, <c>Dih(5)</c> (the regular pentagon's, order 10), <c>AGL(3,2)</c>, <c>C7:C3</c> (in AGL(1,7)), <c>PGL(2,5)</c>, <c>PSL(2,7)</c>, <c>M11</c>, <c>C2 wr Sym(5)</c>. It
    /// tells the group; the action is told by degree and transitivity.
    /// </summary>
    public string? Name => _name.Value;

    internal bool IsGiant => IsSymmetric || IsAlternating;

    internal bool IsSolvable => CompositionFactors.All(factor => factor.IsCyclic);

    // Null when it is not cheap to find.
    internal BigInteger? Exponent => _exponent.Value;

    /// <summary>One line: <c>Sym(8) on 8 points</c>, or order, degree and what is known.</summary>
    public override string ToString()
    {
        var text = string.Create(CultureInfo.InvariantCulture, $"{Name ?? $"order {Order}"} on {Degree} points");
        if (IsGiant)
        {
            return text;
        }

        var facts = new List<string>();
        if (IsRegular)
        {
            facts.Add("regular");
        }
        else if (Transitivity > 1)
        {
            facts.Add($"{(IsSharplyTransitive ? "sharply " : "")}{Transitivity}-transitive");
        }

        if (!IsRegular || IsPrimitive)
        {
            facts.Add(IsPrimitive ? "primitive" : "imprimitive");
        }

        if (IsAffine is true)
        {
            facts.Add("affine");
        }

        return $"{text}, {string.Join(", ", facts)}";
    }

    private (int Transitivity, bool IsSharp) FindTransitivity()
    {
        if (IsGiant)
        {
            return (Degree - (IsAlternating ? 2 : 0), true);
        }

        var transitivity = 0;
        var lists = BigInteger.One;
        var chain = Group.Chain;
        while (transitivity < chain.Base.Length && chain.Base[transitivity] == transitivity && chain.OrbitLengths[transitivity] == Degree - transitivity)
        {
            lists *= Degree - transitivity++;
        }

        return (transitivity, lists == Group.Order);
    }

    // Small groups are listed. For others, members drawn at random give a divisor of the exponent, and the structure a multiple; where they meet the exponent is proven.
    private BigInteger? FindExponent()
    {
        const int Draws = 1000;
        if (IsGiant)
        {
            return Giants.Exponent(Degree, IsAlternating);
        }

        var bound = ExponentBound();
        var random = new SeededRandom(0);
        var members = Group.Order <= Draws ? Group.Elements() : Enumerable.Range(0, Draws).Select(_ => Group.RandomElement(random));
        var divisor = BigInteger.One;
        foreach (var member in members)
        {
            divisor = LeastCommonMultiple(divisor, member.CycleType.Order);
            if (divisor == bound)
            {
                return divisor;
            }
        }

        if (Group.Order <= Draws)
        {
            return divisor;
        }

        const int MostListed = 100_000;
        return Group.Order > MostListed ? null : Group.CycleTypeCounts().Keys.Aggregate(divisor, (exponent, type) => LeastCommonMultiple(exponent, type.Order));
    }

    // A multiple of the exponent: prime powers that are cycle lengths and divide the order; and what the kernel and the image of the action on parts can have together.
    private BigInteger ExponentBound()
    {
        var bound = BigInteger.One;
        foreach (var (prime, most) in Order.PrimePowers)
        {
            for (var (power, exponent) = (prime, 1); power <= Degree && exponent <= most; power *= prime, exponent++)
            {
                bound *= prime;
            }
        }

        foreach (var system in MinimalBlockSystems.Take(1))
        {
            bound = BigInteger.GreatestCommonDivisor(bound, Known(system.ActionInPart) * Known(system.ActionOnParts));
        }

        return bound;

        static BigInteger Known(ActionPortrait action) => action.Exponent ?? action.ExponentBound();
    }

    private static BigInteger LeastCommonMultiple(BigInteger a, BigInteger b) => a / BigInteger.GreatestCommonDivisor(a, b) * b;
}
