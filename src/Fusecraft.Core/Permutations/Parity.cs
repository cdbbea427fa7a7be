namespace Fusecraft.Permutations;

/// <summary>Whether a permutation is a product of an even or of an odd number of transpositions.</summary>
public enum Parity
{
    /// <summary>A product of an even number of transpositions; the identity is even.</summary>
    Even,

    /// <summary>A product of an odd number of transpositions.</summary>
    Odd,
}
