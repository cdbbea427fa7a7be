using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Tests.Groups;

namespace Fusecraft.Tests.Published;

/// <summary>The longest chains of subgroups of the symmetric groups, found among all subgroups by the comparison of groups.</summary>
public class SubgroupChainTests
{
    // P. J. Cameron, R. Solomon, A. Turull, J. Algebra 127 (1989) 340-352; OEIS A007238 (opened).
    [Theory]
    [InlineData(1, 0)]
    [InlineData(2, 1)]
    [InlineData(3, 2)]
    [InlineData(4, 4)]
    [InlineData(5, 5)]
    [InlineData(6, 6)]
    public void The_longest_chain_of_subgroups_has_the_published_length(int degree, int length)
    {
        var table = new SymmetricTable(degree);
        var classes = table.SubgroupClasses.Select(subgroup => table.ToGroup(subgroup.Generators)).OrderBy(group => group.Order).ToArray();
        var longest = new int[classes.Length];
        for (var upper = 0; upper < classes.Length; upper++)
        {
            for (var lower = 0; lower < upper; lower++)
            {
                if (longest[lower] >= longest[upper] && classes[upper].Order > classes[lower].Order && LiesIn(classes[lower], classes[upper], table))
                {
                    longest[upper] = longest[lower] + 1;
                }
            }
        }

        Assert.Equal(length, longest[^1]);
        Assert.Equal(length, (((3 * degree) + 1) / 2) - BitOperations.PopCount((uint)degree) - 1);
    }

    // Some conjugate of the one is a subgroup of the other.
    private static bool LiesIn(PermutationGroup one, PermutationGroup other, SymmetricTable table) => (other.Order % one.Order).IsZero
        && table.Permutations.Any(by => PermutationGroup.Generate(one.Generators.Select(generator => by.Inverse() * generator * by), table.Degree).IsSubgroupOf(other));
}
