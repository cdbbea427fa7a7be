using System.Numerics;

namespace Fusecraft.Groups;

/// <summary>How <see cref="StabilizerChain.Build"/> goes to work.</summary>
public sealed record ChainOptions
{
    /// <summary>Points, 0-based and distinct, to take as base points first, as far as they are not fixed by those before; then follow 0, 1, 2, …</summary>
    public IReadOnlyList<int> BasePrefix { get; init; } = [];

    /// <summary>
    /// The group's order, or a number that it is known not to exceed. A chain that reaches it is proven without further work; if it is not reached the
    /// chain is proven as usual. A bound that is too small is an error where the chain is seen to exceed it.
    /// </summary>
    public BigInteger? OrderBound { get; init; }

    /// <summary>True, the default: the chain is proven. False: it is only tested with random elements; see <see cref="ErrorBits"/>.</summary>
    public bool Verify { get; init; } = true;

    /// <summary>Where <see cref="Verify"/> is false: the chain is wrong with probability at most 2^-ErrorBits, taking the random elements as uniform. 1 … 1000.</summary>
    public int ErrorBits { get; init; } = 40;
}
