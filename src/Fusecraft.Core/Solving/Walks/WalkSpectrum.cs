using System.Collections.Immutable;

namespace Fusecraft.Solving;

/// <summary>Eigenvalues of the transition matrix of a random walk, and what they say about the turns that are needed.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class WalkSpectrum
{
    private readonly double _start;

    internal WalkSpectrum(RandomWalk walk, bool isComplete, ImmutableArray<Eigenvalue> eigenvalues, double errorBound, double start)
    {
        Walk = walk;
        IsComplete = isComplete;
        Eigenvalues = eigenvalues;
        ErrorBound = errorBound;
        _start = start;

        // The first is 1, with multiplicity 1.
        var others = eigenvalues.Skip(1).ToList();
        Second = others.Count == 0 ? double.NaN : others.Max(eigenvalue => eigenvalue.Value.Real);
        Least = others.Count == 0 ? double.NaN : others.Min(eigenvalue => eigenvalue.Value.Real);

        // As many eigenvalues of modulus 1 as the period is, each once.
        Rate = others.OrderByDescending(eigenvalue => eigenvalue.Value.Magnitude).Skip(walk.Period - 1).Select(eigenvalue => eigenvalue.Value.Magnitude).FirstOrDefault();
    }

    /// <summary>The walk.</summary>
    public RandomWalk Walk { get; }

    /// <summary>True when all eigenvalues are there with their multiplicities; else only the extreme ones of a reversible walk are.</summary>
    public bool IsComplete { get; }

    /// <summary>The eigenvalues from the largest real part to the least, those that differ by less than 1e-8 taken as one; the first is 1.</summary>
    public ImmutableArray<Eigenvalue> Eigenvalues { get; }

    /// <summary>The largest real part of an eigenvalue other than the first. Not a number where there is one state only.</summary>
    public double Second { get; }

    /// <summary>The least real part of an eigenvalue. Not a number where there is one state only.</summary>
    public double Least { get; }

    /// <summary>The spectral gap: 1 minus <see cref="Second"/>.</summary>
    public double Gap => 1 - Second;

    /// <summary>The largest modulus of an eigenvalue, leaving out those of modulus 1 (as many as the period): in the long run each turn shrinks the distance from the limit by this factor.</summary>
    public double Rate { get; }

    /// <summary>
    /// How far a value given can be from an eigenvalue. For extreme ones of a reversible walk this is the residual of their vectors, a proven bound; that no larger eigenvalue hides rests on a start vector drawn with a
    /// fixed seed, and can only make the true gap smaller than the one given. For complete spectra it is a cautious estimate of what dense methods reach.
    /// </summary>
    public double ErrorBound { get; }

    /// <summary>A number of turns that suffices for <see cref="WalkDistance.FromLimit"/> to be at most this, from the base state; null where the walk is not reversible.</summary>
    /// <remarks>
    /// From 2·distance ≤ rate^t · √((1 - q)/q), with q the limit's probability of the base state (Diaconis and Stroock, Geometric bounds for eigenvalues of Markov chains, Ann. Appl. Probab. 1, 1991; source not opened, from
    /// memory). Never worse than log(1/(2·distance·√q)) / -log(rate).
    /// </remarks>
    /// <exception cref="ArgumentOutOfRangeException">The distance is not above 0 and at most 1.</exception>
    public int? TurnsSufficient(double distance)
    {
        Require(distance);
        return Walk.IsReversible ? Turns(2 * distance / Math.Sqrt((1 - _start) / _start), Rate + ErrorBound) : null;
    }

    /// <summary>A number of turns that is needed, from the worst state to start in, for <see cref="WalkDistance.FromLimit"/> to be at most this; null where the walk is not reversible.</summary>
    /// <remarks>
    /// From 2·distance ≥ rate^t (Levin, Peres, Wilmer, Markov Chains and Mixing Times, section 12.2; source not opened, from memory). With one shape every state is as bad as another, so the base state is the worst.
    /// </remarks>
    /// <exception cref="ArgumentOutOfRangeException">The distance is not above 0 and at most 1.</exception>
    public int? TurnsNecessary(double distance)
    {
        Require(distance);
        return Walk.IsReversible ? Turns(2 * distance * (1 + 1e-12), Rate - ErrorBound) : null;
    }

    // The least number of turns that shrink 1 to this.
    private static int? Turns(double to, double rate)
    {
        var turns = to >= 1 ? 0 : rate <= 0 ? 1 : Math.Ceiling(Math.Log(to) / Math.Log(rate));
        return turns is >= 0 and <= int.MaxValue ? (int)turns : null;
    }

    private static void Require(double distance)
    {
        if (!(distance is > 0 and <= 1))
        {
            throw new ArgumentOutOfRangeException(nameof(distance), distance, $"A distance to reach is above 0 and at most 1; this one is {distance}.");
        }
    }
}
