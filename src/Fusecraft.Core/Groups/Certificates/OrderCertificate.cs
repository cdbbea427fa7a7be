using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// A proof of a group's order that can be kept, sent, and checked without trusting who made it: a base, strong generators as words in the group's generators, and for each level the orbit
/// of its base point with a Schreier tree. <see cref="CertificateChecker"/> accepts it or names the step that fails.
/// </summary>
/// <remarks>
/// Conventions: points are 0-based here and 1-based in JSON, where permutations are cycles. Words are a straight-line program, because written out they could be exponentially long: the
/// generators are numbered 1 … m, the elements m+1, m+2, …; element <c>[a, b]</c> is the product of what <c>a</c> and <c>b</c> name, <c>-a</c> naming the inverse. Immutable, safe to share.
/// </remarks>
public sealed partial class OrderCertificate
{
    /// <summary>The points acted on are 0 … Degree-1.</summary>
    public required int Degree { get; init; }

    /// <summary>The generators of the group.</summary>
    public required ImmutableArray<Permutation> Generators { get; init; }

    /// <summary>The elements of the straight-line program, each the product of two numbers that stand before it.</summary>
    public required ImmutableArray<(int Left, int Right)> Elements { get; init; }

    /// <summary>The strong generators: the number of each in the program, and its permutation once more.</summary>
    public required ImmutableArray<(int Number, Permutation Permutation)> StrongGenerators { get; init; }

    /// <summary>The levels of the stabilizer chain.</summary>
    public required ImmutableArray<CertificateLevel> Levels { get; init; }

    /// <summary>The order claimed.</summary>
    public required BigInteger Order { get; init; }
}
