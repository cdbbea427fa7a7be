using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// A stabilizer chain of a permutation group: base points b_0, b_1, … such that only the identity fixes them all; for each level the subgroup that fixes
/// the base points before, the orbit of the level's base point under it, and a representative for each orbit point. The order is the product of the orbit lengths.
/// </summary>
/// <remarks>
/// Conventions: permutations act on the right, <c>p * q</c> is first <c>p</c>; points are 0-based. Levels are numbered from 0 and only those with an orbit of two or more
/// points are kept. Every member is, in exactly one way, a product of one representative a level, deepest level first. Base points are taken in the order of the points (after a
/// prefix, where one was given), so base and orbit lengths depend on the group alone. Immutable, safe to share.
/// </remarks>
public sealed class StabilizerChain
{
    /// <summary>With fewer points a proof by Schreier generators is faster than a bound.</summary>
    private const int FewestPointsForBound = 64;

    private readonly ChainTables _tables;

    internal StabilizerChain(ChainTables tables, ChainProof proof, bool isLexicographic)
    {
        _tables = tables;
        Proof = proof;
        IsLexicographic = isLexicographic;
        Base = [.. Enumerable.Range(0, tables.Count).Select(tables.BasePoint)];
        OrbitLengths = [.. Enumerable.Range(0, tables.Count).Select(tables.OrbitLength)];
        Order = tables.Order;
    }

    /// <summary>The points that the group acts on are 0 … Degree-1.</summary>
    public int Degree => _tables.Degree;

    /// <summary>The base points, one a level.</summary>
    public ImmutableArray<int> Base { get; }

    /// <summary>The length of each base point's orbit under the subgroup that fixes the base points before it.</summary>
    public ImmutableArray<int> OrbitLengths { get; }

    /// <summary>The order of the group: the product of the orbit lengths.</summary>
    public BigInteger Order { get; }

    /// <summary>Whether the chain is proven complete, or only tested.</summary>
    public ChainProof Proof { get; }

    /// <summary>A strong generating set: for each level those that fix the base points before generate the whole subgroup that does. Without repetitions.</summary>
    public ImmutableArray<Permutation> StrongGenerators =>
        [.. Enumerable.Range(0, _tables.Count).SelectMany(_tables.OwnGenerators).Distinct()];

    internal ChainTables Tables => _tables;

    /// <summary>True when the base points ascend, so that the digits along the base count members in lexicographic order of image lists.</summary>
    internal bool IsLexicographic { get; }

    /// <summary>Builds a chain of a group: Schreier-Sims with random elements, then proven by a bound that the order meets, or by sifting every Schreier generator. Giants are recognised and need no search.</summary>
    /// <param name="group">Any group.</param>
    /// <param name="options">Default: base 0, 1, 2, … and proven.</param>
    /// <param name="cancellationToken">Ends the work early.</param>
    /// <remarks>Takes memory for one permutation an orbit point, and time about (number of orbit points) · (levels) · (degree). For the same group the same base, orbits and order each time.</remarks>
    /// <exception cref="ArgumentException">The base prefix repeats a point or leaves the degree, the order bound is exceeded, or the error bits are outside 1 … 1000.</exception>
    /// <exception cref="OperationCanceledException">The token asked for it.</exception>
    public static StabilizerChain Build(PermutationGroup group, ChainOptions? options = null, CancellationToken cancellationToken = default)
    {
        ArgumentNullException.ThrowIfNull(group);
        options ??= new ChainOptions();
        int[] prefix = [.. options.BasePrefix];
        RequirePrefix(prefix, group.Degree, nameof(options));
        if (options.ErrorBits is < 1 or > 1000)
        {
            throw new ArgumentException($"ErrorBits is {options.ErrorBits}; it must be in 1 … 1000.", nameof(options));
        }

        if (GiantRecognition.Recognise(group, prefix, cancellationToken) is { } giant)
        {
            var isAscending = Enumerable.Range(1, giant.Count == 0 ? 0 : giant.Count - 1).All(level => giant.BasePoint(level - 1) < giant.BasePoint(level));
            return new StabilizerChain(giant, ChainProof.Proven, isAscending);
        }

        return group.Degree <= 256
            ? Build<byte>(group, prefix, options, cancellationToken)
            : Build<ushort>(group, prefix, options, cancellationToken);
    }

    /// <summary>The orbit of a level's base point under the subgroup that fixes the base points before, in ascending order.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such level.</exception>
    public ImmutableArray<int> Orbit(int level)
    {
        RequireLevel(level);
        var orbit = new int[OrbitLengths[level]];
        for (var i = 0; i < orbit.Length; i++)
        {
            orbit[i] = _tables.OrbitPoint(level, i);
        }

        Array.Sort(orbit);
        return [.. orbit];
    }

    /// <summary>The representative of an orbit point: a member that fixes the base points before the level and takes the level's base point there.</summary>
    /// <exception cref="ArgumentOutOfRangeException">There is no such level, or the point is not in its orbit.</exception>
    public Permutation Representative(int level, int point)
    {
        RequireLevel(level);
        return _tables.OrbitIndex(level, point) < 0
            ? throw new ArgumentOutOfRangeException(nameof(point), point, $"The point is not in the orbit of base point {Base[level]} at level {level}.")
            : _tables.Representative(level, point);
    }

    /// <summary>Generators of the subgroup that fixes the base points before a level.</summary>
    /// <param name="level">0 … number of levels; the last gives none, for the trivial subgroup.</param>
    /// <exception cref="ArgumentOutOfRangeException">There is no such level.</exception>
    public ImmutableArray<Permutation> GeneratorsOf(int level)
    {
        if (level == Base.Length)
        {
            return [];
        }

        RequireLevel(level);
        return [.. _tables.Generators(level)];
    }

    /// <summary>True when the permutation is a member. Takes one composition a level and allocates nothing.</summary>
    public bool Contains(Permutation permutation) => _tables.Contains(permutation);

    /// <summary>
    /// Strips representatives off a permutation: gives a residue <c>permutation * w</c>, with <c>w</c> in the group, that fixes the base points before <paramref name="level"/>.
    /// </summary>
    /// <param name="permutation">Any permutation; one that moves points beyond the degree is left as it is, at level 0.</param>
    /// <param name="level">The first level whose base point the residue takes out of its orbit; the number of levels when there is none.</param>
    /// <returns>The residue; the permutation is a member exactly when it is the identity.</returns>
    public Permutation Sift(Permutation permutation, out int level)
    {
        level = 0;
        if (permutation.SupportEnd > Degree)
        {
            return permutation;
        }

        level = _tables.Sift(permutation, out var residue);
        return residue;
    }

    /// <summary>
    /// A member that takes each of some points to a given one, or null where there is none. The base must begin with those of the points that are not fixed by the ones before.
    /// </summary>
    /// <param name="points">The points that were given as base prefix.</param>
    /// <param name="images">Where each of them is to go.</param>
    internal Permutation? MemberTaking(ReadOnlySpan<int> points, ReadOnlySpan<int> images)
    {
        // member = (deeper representatives) * representative, so what is left to reach is the image before the representative.
        var member = Permutation.Identity;
        var level = 0;
        for (var i = 0; i < points.Length; i++)
        {
            var image = member.Inverse()[images[i]];
            if (level < Base.Length && Base[level] == points[i])
            {
                if (_tables.OrbitIndex(level, image) < 0)
                {
                    return null;
                }

                member = _tables.Representative(level, image) * member;
                level++;
            }
            else if (image != points[i])
            {
                return null;
            }
        }

        return member;
    }

    /// <summary>The chain of the subgroup that fixes the base points before a level. It shares this chain's tables.</summary>
    /// <param name="level">0 … number of levels; the last gives the trivial group's chain.</param>
    /// <param name="isLexicographic">Whether the base points from that level on ascend and come first among the points that they leave.</param>
    internal StabilizerChain Below(int level, bool isLexicographic) => new(_tables.Below(level), Proof, isLexicographic);

    internal static void RequirePrefix(ReadOnlySpan<int> points, int degree, string parameter)
    {
        var seen = new HashSet<int>();
        foreach (var point in points)
        {
            if ((uint)point >= (uint)degree)
            {
                throw new ArgumentException($"Point {point} is outside 0 … {degree - 1}.", parameter);
            }

            if (!seen.Add(point))
            {
                throw new ArgumentException($"Point {point} is given twice.", parameter);
            }
        }
    }

    private static StabilizerChain Build<T>(PermutationGroup group, int[] prefix, ChainOptions options, CancellationToken cancellation)
        where T : unmanaged, IBinaryInteger<T>
    {
        if (BuildToBound<T>(group, prefix, options, cancellation) is { } proven)
        {
            return proven;
        }

        var builder = new ChainBuilder<T>(group.Degree, prefix, options.OrderBound);
        var lanes = new T[builder.Stride];
        for (var i = 0; i < group.Generators.Length; i++)
        {
            group.Generators[i].CopyLanes<T>(lanes);

            // The first few generators go in together; from many, most are redundant, and the settled chain tells.
            if (i < 16)
            {
                builder.AddUnsettled(lanes);
            }
            else
            {
                builder.Add(lanes, cancellation);
            }
        }

        if (options.Verify)
        {
            builder.Complete(cancellation);
        }
        else
        {
            builder.SettleForError(options.ErrorBits, cancellation);
        }

        return builder.ToChain(options.ErrorBits);
    }

    // The chain as soon as it meets the bound given, or the one of its orbits; null where it meets neither.
    private static StabilizerChain? BuildToBound<T>(PermutationGroup group, int[] prefix, ChainOptions options, CancellationToken cancellation)
        where T : unmanaged, IBinaryInteger<T>
    {
        var findsBound = options.Verify && group.Degree >= FewestPointsForBound;
        if (options.OrderBound is null && !findsBound)
        {
            return null;
        }

        var builder = new ChainBuilder<T>(group.Degree, prefix);
        var lanes = new T[builder.Stride];
        foreach (var generator in group.Generators)
        {
            generator.CopyLanes<T>(lanes);
            builder.AddUnsettled(lanes);
        }

        if (options.OrderBound is { } given && builder.TryReachBound(given, cancellation))
        {
            return builder.ToChain();
        }

        return findsBound && builder.TryReachBound(SubdirectBound.Of(group, builder.SecondLevelGenerators(), cancellation), cancellation) ? builder.ToChain() : null;
    }

    private void RequireLevel(int level)
    {
        if ((uint)level >= (uint)Base.Length)
        {
            throw new ArgumentOutOfRangeException(nameof(level), level, $"The chain has {Base.Length} levels, numbered from 0.");
        }
    }
}
