using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Groupoids;
using Fusecraft.Groups;

namespace Fusecraft.Reporting;

/// <summary>A vertex group in figures: what loops at the home shape can do to the labels.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class VertexGroupFigures
{
    internal VertexGroupFigures(VertexGroup group)
    {
        var names = group.Groupoid.Mechanism.SiteNames;
        Order = group.Order;
        FactoredOrder = group.Group.FactoredOrder;
        Proof = group.Group.Chain.Proof;
        Orbits = [.. group.Group.MovedOrbits.Select(orbit => orbit.Select(site => names[site]).ToImmutableArray())];
    }

    /// <summary>The exact number of permutations that loops bring about.</summary>
    public BigInteger Order { get; }

    /// <summary>The same number as prime powers.</summary>
    public FactoredInteger FactoredOrder { get; }

    /// <summary>What the order rests on.</summary>
    public ChainProof Proof { get; }

    /// <summary>The number of sites that some loop moves.</summary>
    public int MovedSiteCount => Orbits.Sum(orbit => orbit.Length);

    /// <summary>The orbits of two or more sites, by name: each in the order of the sites, ordered by their first sites.</summary>
    public ImmutableArray<ImmutableArray<string>> Orbits { get; }
}
