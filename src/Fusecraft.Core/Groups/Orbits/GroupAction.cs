using System.Collections.Immutable;
using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>The action of a group on other things than its points (an orbit by itself, the parts of a block system): a homomorphism to permutations of those, with image and kernel.</summary>
/// <remarks>Immutable, safe to share.</remarks>
public sealed class GroupAction
{
    private readonly Func<Permutation, Permutation> _map;
    private readonly Lazy<PermutationGroup> _image;
    private readonly Lazy<PermutationGroup> _kernel;

    internal GroupAction(PermutationGroup group, int degree, Func<Permutation, Permutation> map)
    {
        Group = group;
        Degree = degree;
        _map = map;
        _image = new Lazy<PermutationGroup>(() => PermutationGroup.Generate(Group.Generators.Select(_map), Degree));
        _kernel = new Lazy<PermutationGroup>(FindKernel);
    }

    /// <summary>The group that acts.</summary>
    public PermutationGroup Group { get; }

    /// <summary>The number of things acted on.</summary>
    public int Degree { get; }

    /// <summary>How the group acts: a group of permutations of 0 … Degree-1.</summary>
    public PermutationGroup Image => _image.Value;

    /// <summary>The members that leave everything where it is.</summary>
    public PermutationGroup Kernel => _kernel.Value;

    /// <summary>How a member acts.</summary>
    /// <exception cref="ArgumentException">The permutation is no member of the group.</exception>
    public Permutation Map(Permutation member) =>
        Group.Contains(member) ? _map(member) : throw new ArgumentException($"{member} is not a member of the group.", nameof(member));

    // The group acting on its points and on the things at once, with the things first in the base: what fixes them all is the kernel.
    private PermutationGroup FindKernel()
    {
        var both = PermutationGroup.Generate(Group.Generators.Select(Both), Degree + Group.Degree);
        var chain = StabilizerChain.Build(both, new ChainOptions { BasePrefix = [.. Enumerable.Range(0, Degree)], OrderBound = Group.Order });
        var level = chain.Base.TakeWhile(point => point < Degree).Count();
        return PermutationGroup.Generate(chain.GeneratorsOf(level).Select(Own), Group.Degree);
    }

    private Permutation Both(Permutation member)
    {
        var mapped = _map(member);
        var images = new int[Degree + Group.Degree];
        for (var i = 0; i < images.Length; i++)
        {
            images[i] = i < Degree ? mapped[i] : Degree + member[i - Degree];
        }

        return Permutation.FromTrustedImages<int>(images);
    }

    private Permutation Own(Permutation both)
    {
        var images = new int[Group.Degree];
        for (var i = 0; i < images.Length; i++)
        {
            images[i] = both[Degree + i] - Degree;
        }

        return Permutation.FromTrustedImages<int>(images);
    }
}
