using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>A group of permutations of the points 0 … Degree-1, given by generators.</summary>
/// <remarks>
/// Conventions: permutations act on the right, <c>p * q</c> is first <c>p</c>; points are 0-based. Whether two groups are equal is a computation, so there is no
/// value equality. The stabilizer chain behind order and membership is built when first asked for; then it is shared. Immutable, safe to share between threads.
/// </remarks>
public sealed partial class PermutationGroup
{
    private readonly Lazy<StabilizerChain> _chain;
    private readonly Lazy<StabilizerChain> _ascendingChain;
    private readonly Lazy<OrbitPartition> _orbits;

    private readonly BigInteger? _knownOrder;

    private PermutationGroup(ImmutableArray<Permutation> generators, int degree, StabilizerChain? chain, BigInteger? knownOrder = null)
    {
        _knownOrder = knownOrder;
        Generators = generators;
        Degree = degree;
        _chain = new Lazy<StabilizerChain>(() => chain ?? StabilizerChain.Build(this, new ChainOptions { OrderBound = knownOrder }));
        _ascendingChain = new Lazy<StabilizerChain>(() => Chain.IsLexicographic ? Chain : StabilizerChain.Build(this, new ChainOptions { OrderBound = Chain.Order }));
        _orbits = new Lazy<OrbitPartition>(() => new OrbitPartition(Generators, Degree));
    }

    /// <summary>The points acted on are 0 … Degree-1; some may be fixed.</summary>
    public int Degree { get; }

    /// <summary>The generators as they were given.</summary>
    public ImmutableArray<Permutation> Generators { get; }

    /// <summary>The proven stabilizer chain with base points in ascending order; built on first use. For other bases and for cancellation see <see cref="StabilizerChain.Build"/>.</summary>
    public StabilizerChain Chain => _chain.Value;

    /// <summary>The number of members.</summary>
    public BigInteger Order => _knownOrder ?? Chain.Order;

    /// <summary>The number of members as prime powers.</summary>
    public FactoredInteger FactoredOrder => FactoredInteger.FromFactors(Chain.OrbitLengths.AsSpan());

    /// <summary>All orbits on 0 … Degree-1, fixed points included: each ascending, ordered by their least points.</summary>
    public ImmutableArray<ImmutableArray<int>> Orbits => _orbits.Value.Orbits;

    /// <summary>The orbits of two or more points, in the order of <see cref="Orbits"/>.</summary>
    public ImmutableArray<ImmutableArray<int>> MovedOrbits => [.. Orbits.Where(orbit => orbit.Length > 1)];

    /// <summary>True when all points 0 … Degree-1 are in one orbit; so it is when there is no point at all.</summary>
    public bool IsTransitive => Orbits.Length <= 1;

    /// <summary>True when the only member is the identity.</summary>
    public bool IsTrivial => Generators.All(generator => generator.IsIdentity);

    /// <summary>The group made by some permutations; its degree is one more than the largest point that they move. None make the trivial group of degree 0.</summary>
    public static PermutationGroup Generate(params ReadOnlySpan<Permutation> generators)
    {
        var degree = 0;
        foreach (var generator in generators)
        {
            degree = Math.Max(degree, generator.SupportEnd);
        }

        return new PermutationGroup([.. generators], degree, null);
    }

    /// <summary>The group made by some permutations, acting on the points 0 … <paramref name="degree"/>-1.</summary>
    /// <exception cref="ArgumentException">A generator moves a point that is not below the degree.</exception>
    /// <exception cref="ArgumentOutOfRangeException">The degree is negative or above <see cref="Permutation.MaxDegree"/>.</exception>
    public static PermutationGroup Generate(IEnumerable<Permutation> generators, int degree)
    {
        ArgumentNullException.ThrowIfNull(generators);
        ArgumentOutOfRangeException.ThrowIfNegative(degree);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(degree, Permutation.MaxDegree);
        ImmutableArray<Permutation> list = [.. generators];
        for (var i = 0; i < list.Length; i++)
        {
            if (list[i].SupportEnd > degree)
            {
                throw new ArgumentException($"Generator {i} moves point {list[i].SupportEnd - 1}; the degree is {degree}.", nameof(generators));
            }
        }

        return new PermutationGroup(list, degree, null);
    }

    /// <summary>The orbit of a point, in ascending order.</summary>
    /// <exception cref="ArgumentOutOfRangeException">The point is not in 0 … Degree-1.</exception>
    public ImmutableArray<int> OrbitOf(int point)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(point);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(point, Degree);
        return Orbits[_orbits.Value.IndexOf(point)];
    }

    /// <summary>The members that fix each of the given points, as a group of the same degree with its chain known.</summary>
    /// <param name="points">Points in 0 … Degree-1, distinct; none gives the whole group.</param>
    /// <exception cref="ArgumentException">A point is outside 0 … Degree-1 or given twice.</exception>
    public PermutationGroup PointwiseStabilizer(params ReadOnlySpan<int> points)
    {
        StabilizerChain.RequirePrefix(points, Degree, nameof(points));
        int[] prefix = [.. points];
        var chain = ChainFrom(prefix);
        var level = chain.Base.TakeWhile(prefix.Contains).Count();
        return FromChain(chain.GeneratorsOf(level), chain.Below(level, isLexicographic: true));
    }

    /// <summary>The proven chain whose base begins with the given points, as far as they are not fixed by those before; then follow 0, 1, 2, … Built anew each time.</summary>
    /// <param name="points">Points in 0 … Degree-1, distinct.</param>
    /// <exception cref="ArgumentException">A point is outside 0 … Degree-1 or given twice.</exception>
    public StabilizerChain ChainWithBase(params ReadOnlySpan<int> points)
    {
        StabilizerChain.RequirePrefix(points, Degree, nameof(points));
        return ChainFrom([.. points]);
    }

    internal StabilizerChain ChainFrom(int[] prefix, CancellationToken cancellationToken = default) => StabilizerChain.Build(
        this, new ChainOptions { BasePrefix = prefix, OrderBound = _knownOrder ?? (_chain.IsValueCreated ? Order : null) }, cancellationToken);

    /// <summary>A group whose order is proven; its chain is built when asked for, with no further proof.</summary>
    internal static PermutationGroup FromOrder(ImmutableArray<Permutation> generators, int degree, BigInteger order) => new(generators, degree, null, order);

    /// <summary>A group whose proven chain is at hand.</summary>
    internal static PermutationGroup FromChain(ImmutableArray<Permutation> generators, StabilizerChain chain) => new(generators, chain.Degree, chain);
}
