using System.Collections.Immutable;
using System.Numerics;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The action of a group on one of its orbits, with the orbit's points renamed 0, 1, 2, … in ascending order.</summary>
internal sealed class OrbitAction
{
    private readonly PermutationGroup _group;

    public OrbitAction(PermutationGroup group, ImmutableArray<int> orbit)
    {
        _group = group;
        Orbit = orbit;
        var position = new int[group.Degree];
        for (var i = 0; i < orbit.Length; i++)
        {
            position[orbit[i]] = i;
        }

        Image = PermutationGroup.Generate(
            group.Generators.Select(generator => Permutation.FromImages([.. orbit.Select(point => position[generator[point]])])).Where(generator => !generator.IsIdentity).Distinct(), orbit.Length);
        var factorial = BigInteger.One;
        for (var i = 2; i <= orbit.Length; i++)
        {
            factorial *= i;
        }

        IsAlternating = Image.Order * 2 == factorial;
        IsGiant = IsAlternating || Image.Order == factorial;
    }

    public ImmutableArray<int> Orbit { get; }

    /// <summary>The permutations that the members do on the orbit.</summary>
    public PermutationGroup Image { get; }

    /// <summary>True when the image is the symmetric or the alternating group: it has their order.</summary>
    public bool IsGiant { get; }

    public bool IsAlternating { get; }

    /// <summary>The way back from the image to the group.</summary>
    public OrbitLifter Lifter(CancellationToken cancellation) => new(_group, Orbit, cancellation);
}
