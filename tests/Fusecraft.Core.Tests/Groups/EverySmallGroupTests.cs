using System.Numerics;
using Fusecraft.Groups;
using Fusecraft.Permutations;

namespace Fusecraft.Tests.Groups;

/// <summary>
/// Every group of permutations of up to five points, and of six points one of each class, asked everything whose answer a list of all members gives. Sets and colourings are in <see cref="ColouringTests"/>,
/// centralizers, conjugates and intersections in <see cref="ConjugacyTests"/>, cosets in <see cref="CosetTests"/>, orbits of lists in <see cref="OrbitListTests"/>.
/// </summary>
public class EverySmallGroupTests
{
    public static TheoryData<int> Degrees => [1, 2, 3, 4, 5, 6];

    // The oracle itself: numbers of subgroups and of their classes, OEIS A005432 and A000638 (sources not opened, values from memory).
    [Theory]
    [InlineData(1, 1, 1)]
    [InlineData(2, 2, 2)]
    [InlineData(3, 4, 6)]
    [InlineData(4, 11, 30)]
    [InlineData(5, 19, 156)]
    [InlineData(6, 56, 1455)]
    public void There_are_as_many_groups_as_published(int degree, int classes, int subgroups)
    {
        Assert.Equal(classes, QueriesOracle.TableOf(degree).SubgroupClasses.Count);
        Assert.Equal(subgroups, QueriesOracle.TableOf(degree).SubgroupCount);
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Order_membership_elements_ranks_and_cycle_types(int degree)
    {
        foreach (var (table, members, group) in Groups(degree))
        {
            Assert.Equal(members.Length, group.Order);
            Assert.Equal(members.Length, group.FactoredOrder.Value);
            Assert.Equal(members.Length == 1, group.IsTrivial);
            Assert.Equal(members.Select(member => table.Permutations[member]), group.Elements());
            for (var i = 0; i < table.Count; i++)
            {
                var rank = Array.BinarySearch(members, i);
                Assert.Equal(rank >= 0, group.Contains(table.Permutations[i]));
                Assert.Equal(rank >= 0, group.Explain(table.Permutations[i]).IsMember);
                if (rank >= 0)
                {
                    Assert.Equal(rank, group.Rank(table.Permutations[i]));
                    Assert.Equal(table.Permutations[i], group.Unrank(rank));
                }
            }

            var counts = members.GroupBy(table.CycleLengths).ToDictionary(type => table.Permutations[type.First()].CycleType, type => new BigInteger(type.Count()));
            Assert.Equal(counts.OrderBy(count => count.Key.ToString()), group.CycleTypeCounts().OrderBy(count => count.Key.ToString()));
            Assert.Equal(ColouringsUpTo(table, members, 3), group.CountColourings(3));
            Assert.Equal(members.Select(member => new BigInteger(table.OrderOf(member))).Aggregate(Lcm), group.FindExponent());
        }
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Orbits_and_stabilizers_of_points(int degree)
    {
        foreach (var (table, members, group) in Groups(degree))
        {
            for (var point = 0; point < degree; point++)
            {
                int[] orbit = [.. members.Select(member => table.Image(member, point)).Distinct().Order()];
                Assert.Equal(orbit, group.OrbitOf(point));
                Assert.Contains(group.Orbits, other => other.SequenceEqual(orbit));
                Assert.Equal(orbit.Length > 1, group.MovedOrbits.Any(other => other.Contains(point)));
                Assert.Equal(orbit.Length == degree, group.IsTransitive);
                for (var second = 0; second < degree; second++)
                {
                    int[] points = point == second ? [point] : [point, second];
                    RequireMembers(table, members.Where(member => points.All(other => table.Image(member, other) == other)), group.PointwiseStabilizer(points));
                }
            }

            Assert.Equal(degree, group.Orbits.Sum(orbit => orbit.Length));
        }
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Centre_series_and_what_follows_from_them(int degree)
    {
        foreach (var (table, members, group) in Groups(degree))
        {
            int[] centre = [.. members.Where(a => members.All(b => table.Product(a, b) == table.Product(b, a)))];
            RequireMembers(table, centre, group.Centre());
            Assert.Equal(centre.Length == members.Length, group.IsAbelian);

            var derivedSeries = Series(members, last => table.Closure(last.SelectMany(_ => last, table.Commutator)));
            var centralSeries = Series(members, last => table.Closure(last.SelectMany(_ => members, table.Commutator)));
            RequireSeries(table, derivedSeries, group.DerivedSeries());
            RequireSeries(table, centralSeries, group.LowerCentralSeries());
            RequireMembers(table, derivedSeries.Count > 1 ? derivedSeries[1] : members, group.DerivedSubgroup());
            Assert.Equal(derivedSeries.Count == 1, group.IsPerfect);
            Assert.Equal(derivedSeries[^1].Length == 1, group.IsSolvable);
            Assert.Equal(centralSeries[^1].Length == 1, group.IsNilpotent);
            RequireAbelianInvariants(table, members, derivedSeries.Count > 1 ? derivedSeries[1] : members, group);
        }
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Normal_closures_and_normality(int degree)
    {
        foreach (var (table, members, group) in Groups(degree))
        {
            foreach (var member in members.Where((_, i) => degree < 6 || i % 13 == members.Length % 13))
            {
                int[] closure = table.Closure(members.Select(by => table.Conjugate(member, by)));
                var normal = group.NormalClosure(table.Permutations[member]);
                RequireMembers(table, closure, normal);
                Assert.True(normal.IsNormalIn(group));

                int[] powers = table.Closure(member);
                var isNormal = members.All(by => Array.BinarySearch(powers, table.Conjugate(member, by)) >= 0);
                Assert.Equal(isNormal, PermutationGroup.Generate(table.Permutations[member]).IsNormalIn(group));
                Assert.Equal(members.Length / powers.Length, group.Index(PermutationGroup.Generate(table.Permutations[member])));
            }
        }
    }

    [Theory]
    [MemberData(nameof(Degrees))]
    public void Block_systems_and_primitivity(int degree)
    {
        foreach (var (table, members, group) in Groups(degree))
        {
            foreach (var orbit in group.MovedOrbits)
            {
                var expected = BlockSystems(table, members, [.. orbit]);
                Assert.Equal(expected.Order(StringComparer.Ordinal), group.BlockSystems(orbit[0]).Select(system => system.ToString()).Order(StringComparer.Ordinal));
                Assert.Equal(expected.Count == 0 && orbit.Length == degree, group.IsPrimitive);
                foreach (var system in group.BlockSystems(orbit[0]))
                {
                    var action = group.ActionOn(system);
                    RequireMembers(table, members.Where(member => system.Parts.All(part => part.Contains(table.Image(member, part[0])))), action.Kernel);
                    Assert.Equal(group.Order, action.Kernel.Order * action.Image.Order);
                }

                RequireMembers(table, members.Where(member => orbit.All(point => table.Image(member, point) == point)), group.ActionOn(orbit).Kernel);
            }

            Assert.False(group.MovedOrbits.IsEmpty && group.IsPrimitive);
        }
    }

    private static IEnumerable<(SymmetricTable Table, int[] Members, PermutationGroup Group)> Groups(int degree)
    {
        var table = QueriesOracle.TableOf(degree);
        return (degree < 6 ? table.Subgroups() : table.SubgroupClasses).Select(subgroup => (table, subgroup.Members, table.ToGroup(subgroup.Generators)));
    }

    private static void RequireMembers(SymmetricTable table, IEnumerable<int> expected, PermutationGroup group)
    {
        int[] members = [.. expected];
        Assert.Equal(members, table.MembersOf(group));
        Assert.Equal(members.Length, group.Order);
        Assert.Equal(table.Degree, group.Degree);
    }

    // Colourings as numbers in base `colours`; two are one when a member carries one to the other.
    private static int ColouringsUpTo(SymmetricTable table, int[] members, int colours)
    {
        int[] places = [.. Enumerable.Range(0, table.Degree).Select(point => (int)Math.Pow(colours, point))];
        var met = new bool[(int)Math.Pow(colours, table.Degree)];
        var count = 0;
        for (var colouring = 0; colouring < met.Length; colouring++)
        {
            if (!met[colouring])
            {
                count++;
                foreach (var member in members)
                {
                    var carried = 0;
                    for (var point = 0; point < places.Length; point++)
                    {
                        carried += colouring / places[point] % colours * places[table.Image(member, point)];
                    }

                    met[carried] = true;
                }
            }
        }

        return count;
    }

    private static BigInteger Lcm(BigInteger a, BigInteger b) => a / BigInteger.GreatestCommonDivisor(a, b) * b;

    private static List<int[]> Series(int[] members, Func<int[], int[]> next)
    {
        List<int[]> series = [members];
        for (var following = next(members); following.Length < series[^1].Length; following = next(series[^1]))
        {
            series.Add(following);
        }

        return series;
    }

    private static void RequireSeries(SymmetricTable table, List<int[]> expected, IReadOnlyList<PermutationGroup> series)
    {
        Assert.Equal(expected.Count, series.Count);
        for (var i = 0; i < expected.Count; i++)
        {
            RequireMembers(table, expected[i], series[i]);
        }
    }

    // An abelian group is known by how many of its elements each number annuls; here cosets of the derived subgroup, counted by members.
    private static void RequireAbelianInvariants(SymmetricTable table, int[] members, int[] derived, PermutationGroup group)
    {
        var invariants = group.AbelianInvariants();
        Assert.Equal(invariants.Order(), invariants);
        Assert.All(invariants, invariant => Assert.Single(FactoredInteger.FromFactors(invariant).PrimePowers));
        Assert.Equal(members.Length / derived.Length, invariants.Aggregate(1, (product, invariant) => product * invariant));
        for (var power = 1; power <= members.Length; power++)
        {
            var annulled = members.Count(member => Array.BinarySearch(derived, Enumerable.Repeat(member, power).Aggregate(0, table.Product)) >= 0);
            Assert.Equal(annulled / derived.Length, invariants.Aggregate(1, (product, invariant) => product * (int)BigInteger.GreatestCommonDivisor(invariant, power)));
            if (power > 30)
            {
                break;
            }
        }
    }

    // A set of points with the first of the orbit is a part when its images are disjoint from it or equal to it.
    private static List<string> BlockSystems(SymmetricTable table, int[] members, int[] orbit)
    {
        var systems = new List<string>();
        for (var chosen = 1; chosen < (1 << (orbit.Length - 1)) - 1; chosen++)
        {
            var part = orbit.Where((_, i) => i == 0 || ((chosen >> (i - 1)) & 1) != 0).ToHashSet();
            var images = members.Select(member => part.Select(point => table.Image(member, point)).ToHashSet()).ToList();
            if (images.TrueForAll(image => image.SetEquals(part) || !image.Overlaps(part)))
            {
                var parts = images.Select(image => image.Order().ToArray()).DistinctBy(image => image[0]).OrderBy(image => image[0]);
                systems.Add(string.Join(' ', parts.Select(image => "{" + string.Join(' ', image.Select(point => point + 1)) + "}")));
            }
        }

        return systems;
    }
}
