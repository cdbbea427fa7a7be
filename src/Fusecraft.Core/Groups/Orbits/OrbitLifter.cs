using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>Finds for a permutation of an orbit, its points renamed 0, 1, 2, … in ascending order, a member of the group that does it there.</summary>
internal sealed class OrbitLifter
{
    private readonly ImmutableArray<int> _orbit;

    // Null when the group moves the orbit only.
    private readonly StabilizerChain? _chain;

    public OrbitLifter(PermutationGroup group, ImmutableArray<int> orbit, CancellationToken cancellation)
    {
        _orbit = orbit;
        KernelGenerators = [];
        if (group.MovedOrbits.Length > 1)
        {
            _chain = group.ChainFrom([.. orbit], cancellation);
            KernelGenerators = _chain.GeneratorsOf(_chain.Base.TakeWhile(point => orbit.BinarySearch(point) >= 0).Count());
        }
    }

    /// <summary>Generators of the members that fix the orbit pointwise.</summary>
    public ImmutableArray<Permutation> KernelGenerators { get; }

    /// <summary>A member that acts on the orbit as the permutation does.</summary>
    public Permutation Lift(Permutation permutation)
    {
        if (permutation.IsIdentity)
        {
            return permutation;
        }

        if (_chain is not null)
        {
            return _chain.MemberTaking(_orbit.AsSpan(), [.. Enumerable.Range(0, _orbit.Length).Select(i => _orbit[permutation[i]])])!.Value;
        }

        int[] images = [.. Enumerable.Range(0, _orbit[^1] + 1)];
        for (var i = 0; i < _orbit.Length; i++)
        {
            images[_orbit[i]] = _orbit[permutation[i]];
        }

        return Permutation.FromImages(images);
    }
}
