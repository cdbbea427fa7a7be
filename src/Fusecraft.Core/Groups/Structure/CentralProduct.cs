using Fusecraft.Permutations;

namespace Fusecraft.Groups;

/// <summary>
/// What a group has in common with an abelian group that commutes with it. The abelian generators join the group one after the other; where a power of one first lies in the group so far, that
/// power, corrected by powers of the ones before, lies in the group itself.
/// </summary>
internal static class CentralProduct
{
    /// <param name="group">A group.</param>
    /// <param name="commuting">Permutations that commute with every member of the group and with each other.</param>
    public static PermutationGroup Intersect(PermutationGroup group, IReadOnlyList<Permutation> commuting)
    {
        // Step j: the group after j joined generators, the last of them.
        var steps = new List<(PermutationGroup Before, Permutation Joined)>();
        var common = new List<Permutation>();
        var current = group;
        foreach (var generator in commuting)
        {
            var power = 1;
            var element = generator;
            while (!current.Contains(element))
            {
                element *= generator;
                power++;
            }

            // Take the powers of the earlier ones off again, last first: exactly one exponent brings the element into the group before.
            for (var j = steps.Count - 1; j >= 0; j--)
            {
                while (!steps[j].Before.Contains(element))
                {
                    element *= steps[j].Joined;
                }
            }

            common.Add(element);
            if (power > 1)
            {
                steps.Add((current, generator));
                current = PermutationGroup.Generate([.. current.Generators, generator], group.Degree);
            }
        }

        return PermutationGroup.Generate(common.Where(element => !element.IsIdentity).Distinct(), group.Degree);
    }
}
