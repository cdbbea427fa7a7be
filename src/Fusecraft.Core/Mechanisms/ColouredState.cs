using System.Collections.Immutable;

namespace Fusecraft.Mechanisms;

/// <summary>Which colour each site shows: all that can be seen of a state whose labels are partly alike. Made by <see cref="Mechanism.ColoursOf"/>, <see cref="Mechanism.ParseColours"/> or <see cref="Of"/>.</summary>
/// <remarks>Need not be the colours of any state. Marks and blocks are not seen. Value equality within one mechanism. Immutable, safe to share.</remarks>
public sealed class ColouredState : IEquatable<ColouredState>
{
    internal ColouredState(Mechanism mechanism, ImmutableArray<int> colourOn)
    {
        Mechanism = mechanism;
        ColourOn = colourOn;
    }

    /// <summary>The mechanism.</summary>
    public Mechanism Mechanism { get; }

    /// <summary>For each site the number of the colour it shows, as in <see cref="Mechanism.ColourOfSite"/>.</summary>
    public ImmutableArray<int> ColourOn { get; }

    /// <summary>True when both show the same colours on the same sites of the same mechanism.</summary>
    public static bool operator ==(ColouredState? left, ColouredState? right) => left is null ? right is null : left.Equals(right);

    /// <summary>True when the two differ.</summary>
    public static bool operator !=(ColouredState? left, ColouredState? right) => !(left == right);

    /// <summary>The state in which the sites show the given colours.</summary>
    /// <param name="mechanism">The mechanism.</param>
    /// <param name="colourOn">For each site a number that is somewhere in <see cref="Mechanism.ColourOfSite"/>.</param>
    /// <exception cref="ArgumentException">There are more or fewer numbers than sites, or one is no colour of the mechanism.</exception>
    public static ColouredState Of(Mechanism mechanism, params ReadOnlySpan<int> colourOn)
    {
        ArgumentNullException.ThrowIfNull(mechanism);
        if (colourOn.Length != mechanism.SiteCount)
        {
            throw new ArgumentException($"{colourOn.Length} colours were given for {mechanism.SiteCount} sites.", nameof(colourOn));
        }

        var known = mechanism.ColourOfSite.ToHashSet();
        foreach (var colour in colourOn)
        {
            if (!known.Contains(colour))
            {
                throw new ArgumentException($"{colour} is no colour of the mechanism {mechanism.Name}.", nameof(colourOn));
            }
        }

        return new ColouredState(mechanism, [.. colourOn]);
    }

    /// <inheritdoc/>
    public bool Equals(ColouredState? other) => other is not null && ReferenceEquals(Mechanism, other.Mechanism) && ColourOn.AsSpan().SequenceEqual(other.ColourOn.AsSpan());

    /// <inheritdoc/>
    public override bool Equals(object? obj) => Equals(obj as ColouredState);

    /// <inheritdoc/>
    public override int GetHashCode()
    {
        var hash = default(HashCode);
        foreach (var colour in ColourOn)
        {
            hash.Add(colour);
        }

        return hash.ToHashCode();
    }

    /// <summary>The sites that differ from home, each as <c>site=colour</c>; <c>home</c> where none does. <see cref="Mechanism.ParseColours"/> reads it.</summary>
    public override string ToString()
    {
        var differing = Enumerable.Range(0, ColourOn.Length).Where(site => ColourOn[site] != Mechanism.ColourOfSite[site]);
        var text = string.Join(' ', differing.Select(site => $"{Mechanism.SiteNames[site]}={Mechanism.ColourName(ColourOn[site])}"));
        return text.Length == 0 ? "home" : text;
    }
}
