using System.Numerics;

namespace Fusecraft.Groups;

public sealed partial class PermutationGroup
{
    /// <summary>True when every member of this group is a member of the other. Degrees do not matter. Builds the other group's chain only.</summary>
    public bool IsSubgroupOf(PermutationGroup group)
    {
        ArgumentNullException.ThrowIfNull(group);
        foreach (var generator in Generators)
        {
            if (!group.Contains(generator))
            {
                return false;
            }
        }

        return true;
    }

    /// <summary>True when both have the same members. Degrees do not matter, nor do fixed points beyond the last point moved.</summary>
    public bool SameGroupAs(PermutationGroup group)
    {
        ArgumentNullException.ThrowIfNull(group);
        return ReferenceEquals(this, group) || (IsSubgroupOf(group) && group.IsSubgroupOf(this));
    }

    /// <summary>True when every member of the other group carries this group to itself by conjugation. Asks for no more: the subgroup test is <see cref="IsSubgroupOf"/>.</summary>
    /// <remarks>Conjugates each generator by each of the other's: finite groups need no inverses.</remarks>
    public bool IsNormalizedBy(PermutationGroup group)
    {
        ArgumentNullException.ThrowIfNull(group);
        foreach (var generator in Generators)
        {
            foreach (var by in group.Generators)
            {
                if (!Contains(generator.ConjugateBy(by)))
                {
                    return false;
                }
            }
        }

        return true;
    }

    /// <summary>True when this is a normal subgroup of the other group.</summary>
    public bool IsNormalIn(PermutationGroup group) => IsSubgroupOf(group) && IsNormalizedBy(group);

    /// <summary>The number of cosets of a subgroup in this group: the quotient of the orders.</summary>
    /// <exception cref="ArgumentException">It is no subgroup of this group.</exception>
    public BigInteger Index(PermutationGroup subgroup)
    {
        RequireSubgroup(subgroup);
        return Order / subgroup.Order;
    }

    private void RequireSubgroup(PermutationGroup subgroup)
    {
        ArgumentNullException.ThrowIfNull(subgroup);
        for (var i = 0; i < subgroup.Generators.Length; i++)
        {
            if (!Contains(subgroup.Generators[i]))
            {
                throw new ArgumentException($"Generator {i} of the subgroup, {subgroup.Generators[i]}, is not a member of the group.", nameof(subgroup));
            }
        }
    }
}
