using Fusecraft.Permutations;

namespace Fusecraft.Groupoids;

/// <summary>Lists small groups outright.</summary>
internal static class PermutationClosure
{
    /// <summary>All products of some permutations, the identity first; null where there are more than <paramref name="most"/>.</summary>
    public static List<Permutation>? List(IReadOnlyCollection<Permutation> generators, int most)
    {
        var members = new List<Permutation> { Permutation.Identity };
        var seen = new HashSet<Permutation>(members);
        for (var i = 0; i < members.Count; i++)
        {
            foreach (var generator in generators)
            {
                var next = members[i] * generator;
                if (seen.Add(next))
                {
                    members.Add(next);
                }
            }

            if (members.Count > most)
            {
                return null;
            }
        }

        return members;
    }
}
